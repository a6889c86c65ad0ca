import type { AtomicData, SkyBand } from './atomicData.ts';
import { type Bundle, openBundle } from './bundle.ts';
import { NATURES, NO_LEVEL, STRENGTH_BASES } from './bundleFormat.ts';
import type { CaseBTable } from './caseB.ts';
import type { LevelModel } from './levelModel.ts';
import type { LineList } from './lineList.ts';
import { openLevelModels } from './openLevelModels.ts';
import { openLineList } from './openLineList.ts';

/** cm^-1: widest ground term among the ions with permitted lines (Fe II 6D, 977 cm^-1). */
const GROUND_TERM_CM1 = 1100;

/**
 * Opens the bundled atomic data.
 *
 * @param bytes `public/atomic.bin` as it stands on disk (not compressed); kept as the ground of the arrays, so leave it unchanged
 * @throws RangeError when the bytes are no bundle of this program's schema
 * Speed: tests/bench/atomicBench.ts. Checked in tests/atomic/bundle.test.ts.
 */
export function loadAtomicData(bytes: Uint8Array): AtomicData {
  const bundle = openBundle(bytes);
  const { inputsHash, schema } = bundle.header;
  const models = openLevelModels(bundle);
  const lines = openLineList(bundle);
  const records = lineRecords(bundle, (ion) => models.model(ion)?.sources);
  return {
    version: `${schema}-${inputsHash.slice(0, 8)}`,
    inputsHash,
    lines,
    modelIons: models.names,
    levelModel: models.model,
    referenceAbundance: bundle.f32('ion.abundance'),
    skyBands: skyBands(bundle),
    caseB: openCaseB(bundle),
    hydrogenicLine: hydrogenicLines(lines, records),
    ...records,
  };
}

function skyBands(bundle: Bundle): SkyBand[] {
  const texts = bundle.text('texts');
  const [low, high] = [bundle.f64('band.low'), bundle.f64('band.high')];
  const [kind, species, note] = [bundle.u16('band.kind'), bundle.u16('band.species'), bundle.u16('band.note')];
  const kindOf = (text: string): SkyBand['kind'] => (text === 'telluric' || text === 'lamp' ? text : 'emission');
  return Array.from(low, (lowVac, i) => ({
    kind: kindOf(texts[kind[i]]),
    species: texts[species[i]],
    lowVac,
    highVac: high[i],
    note: texts[note[i]],
  })).sort((p, q) => p.lowVac - q.lowVac);
}

function openCaseB(bundle: Bundle): CaseBTable {
  const texts = bundle.text('texts');
  const ionName = bundle.u16('ion.name');
  return {
    ion: Array.from(bundle.u16('caseB.ion'), (ion) => texts[ionName[ion]]),
    nLower: bundle.u8('caseB.nLower'),
    nUpper: bundle.u8('caseB.nUpper'),
    intensity: bundle.f32('caseB.intensity'),
  };
}

/** Finds lines of H I and He II by quantum numbers; the index is made at the first question. */
function hydrogenicLines(lines: LineList, records: LineRecords): AtomicData['hydrogenicLine'] {
  let index: Map<string, number> | undefined;
  return (ion, nLower, nUpper) => {
    if (index === undefined) {
      index = new Map();
      for (let i = 0; i < lines.count; i++) {
        const { name } = lines.ions[lines.ion[i]];
        if ((name === 'H I' || name === 'He II') && lines.upperId[i] > 0) {
          index.set(`${name} ${records.lowerLabel(i)} ${records.upperLabel(i)}`, i);
        }
      }
    }
    return index.get(`${ion} n=${nLower} n=${nUpper}`) ?? -1;
  };
}

type LineRecords = Omit<
  AtomicData,
  'version' | 'inputsHash' | 'lines' | 'modelIons' | 'levelModel' | 'referenceAbundance' | 'skyBands' | 'caseB' | 'hydrogenicLine'
>;

/** Texts and energies of single lines, decoded when asked for. */
function lineRecords(bundle: Bundle, modelSources: (ion: string) => LevelModel['sources'] | undefined): LineRecords {
  const [lower, upper] = [bundle.u16('line.lower'), bundle.u16('line.upper')];
  const [energy, canonical] = [bundle.f64('level.energy'), bundle.u16('level.canonical')];
  const [configuration, term, j] = [bundle.u16('level.configuration'), bundle.u16('level.term'), bundle.u16('level.j')];
  const [model, lineIon, ionName] = [bundle.i16('level.model'), bundle.u16('line.ion'), bundle.u16('ion.name')];
  const kind = bundle.u8('line.kind');
  const text = (index: number): string => bundle.text('texts')[index];
  const citations = (section: string, line: number): string[] => bundle.text('sources')[bundle.u8(section)[line]].split('\t');
  const termLabel = (level: number): string => [text(configuration[level]), text(term[level])].filter((t) => t !== '').join(' ');
  const label = (level: number): string => {
    if (level === NO_LEVEL) return '';
    const own = canonical[level];
    return [termLabel(own), text(j[own]).replaceAll(' ', ',')].filter((t) => t !== '').join(' ');
  };
  const energyOf = (level: number): number => (level === NO_LEVEL ? Number.NaN : energy[level]);
  return {
    multipletName: (line) => {
      if (lower[line] === NO_LEVEL) return '';
      const moore = text(bundle.u16('line.moore')[line]);
      return `${termLabel(canonical[lower[line]])} - ${termLabel(canonical[upper[line]])}${moore === '' ? '' : ` (${moore})`}`;
    },
    lowerLabel: (line) => label(lower[line]),
    upperLabel: (line) => label(upper[line]),
    lowerEnergyCm1: (line) => energyOf(lower[line]),
    upperEnergyCm1: (line) => energyOf(upper[line]),
    isResonance: (line) => NATURES[kind[line] & 7] === 'permitted' && energyOf(lower[line]) < GROUND_TERM_CM1,
    lineName: (line) => text(bundle.u16('line.name')[line]),
    ritzVac: (line) => 1e8 / (energyOf(upper[line]) - energyOf(lower[line])),
    wavelengthNote: (line) => citations('line.wavelengthSource', line).join('; '),
    strengthBasis: (line) => STRENGTH_BASES[(kind[line] >> 5) & 3],
    strengthNote: (line) => citations('line.strengthSource', line).join('; '),
    aNote: (line) => text(bundle.u16('line.aNote')[line]),
    lineSources: (line) => {
      const own = citations('line.source', line);
      // rows of the n-level atoms name their compilation; the papers behind stand with the atom
      if (lower[line] === NO_LEVEL || canonical[upper[line]] !== upper[line] || model[upper[line]] < 0) return own;
      const papers = modelSources(text(ionName[lineIon[line]]));
      return papers === undefined ? own : [...new Set([...own, ...papers.energies, ...papers.radiative])];
    },
  };
}
