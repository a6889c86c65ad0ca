import { readFileSync } from 'node:fs';
import { type AtomicData, linesBetween, loadAtomicData } from '../../src/atomic/index.ts';
import { vacuumFromAir } from '../../src/units/index.ts';

/** The bundle as it ships. */
export const bundled: AtomicData = loadAtomicData(new Uint8Array(readFileSync(new URL('../../public/atomic.bin', import.meta.url))));

const OWN_FRAME = new Set(['sky', 'telluric', 'interstellar']);

/** Nearest line of an ion of the object (not of the sky) to a vacuum wavelength, within 2 A. @throws when there is none */
export function lineAt(ion: string, vacuum: number): number {
  const { lines } = bundled;
  const [start, end] = linesBetween(lines, vacuum - 2, vacuum + 2);
  let best = -1;
  for (let i = start; i < end; i++) {
    if (lines.ions[lines.ion[i]].name !== ion || OWN_FRAME.has(lines.nature(i))) continue;
    if (best < 0 || Math.abs(lines.wavelengthVac[i] - vacuum) < Math.abs(lines.wavelengthVac[best] - vacuum)) best = i;
  }
  if (best < 0) throw new Error(`no line of ${ion} within 2 A of ${vacuum}`);
  return best;
}

/** The same for a wavelength in air. */
export function lineAtAir(ion: string, air: number): number {
  return lineAt(ion, vacuumFromAir(air));
}

/** Flux for H beta = 100. */
export function strength(line: number): number {
  return 10 ** bundled.lines.logStrength[line];
}
