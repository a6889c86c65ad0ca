import type { AtomicData } from '../../src/atomic/index.ts';

/** The atomic data as a list would be that lacks some lines: what a namer knows of a nebula that emits them all. */
export function withoutLines(data: AtomicData, isGone: (line: number) => boolean): { data: AtomicData; placeOf: Int32Array } {
  const { lines } = data;
  const kept = Array.from({ length: lines.count }, (_, line) => line).filter((line) => !isGone(line));
  const placeOf = new Int32Array(lines.count).fill(-1);
  kept.forEach((line, k) => {
    placeOf[line] = k;
  });
  const at =
    <T>(of: (line: number) => T) =>
    (line: number) =>
      of(kept[line]);
  return {
    placeOf,
    data: {
      ...data,
      version: `${data.version} less ${lines.count - kept.length}`,
      lines: {
        ...lines,
        count: kept.length,
        ion: Uint16Array.from(kept, (line) => lines.ion[line]),
        wavelengthVac: Float64Array.from(kept, (line) => lines.wavelengthVac[line]),
        wavelengthErr: Float32Array.from(kept, (line) => lines.wavelengthErr[line]),
        nature: at(lines.nature),
        mechanism: at(lines.mechanism),
        logStrength: Float32Array.from(kept, (line) => lines.logStrength[line]),
        strengthErrDex: Float32Array.from(kept, (line) => lines.strengthErrDex[line]),
        aValue: Float32Array.from(kept, (line) => lines.aValue[line]),
        upperLevel: Int16Array.from(kept, (line) => lines.upperLevel[line]),
        lowerLevel: Int16Array.from(kept, (line) => lines.lowerLevel[line]),
        multiplet: Uint32Array.from(kept, (line) => lines.multiplet[line]),
        upperId: Uint32Array.from(kept, (line) => lines.upperId[line]),
      },
      multipletName: at(data.multipletName),
      lowerLabel: at(data.lowerLabel),
      upperLabel: at(data.upperLabel),
      lowerEnergyCm1: at(data.lowerEnergyCm1),
      upperEnergyCm1: at(data.upperEnergyCm1),
      isResonance: at(data.isResonance),
      lineName: at(data.lineName),
      ritzVac: at(data.ritzVac),
      wavelengthNote: at(data.wavelengthNote),
      strengthBasis: at(data.strengthBasis),
      strengthNote: at(data.strengthNote),
      aNote: at(data.aNote),
      lineSources: at(data.lineSources),
      hydrogenicLine: (ion, nLower, nUpper) => {
        const line = data.hydrogenicLine(ion, nLower, nUpper);
        return line < 0 ? line : placeOf[line];
      },
    },
  };
}
