import { type AtomicData, linesBetween } from '../atomic/index.ts';
import { median, quantile } from '../numeric/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../units/index.ts';
import { USUAL_LEFT_OUT } from './leftOut.ts';
import type { SystemModel } from './model.ts';
import type { Mark } from './naming.ts';
import { isLocal } from './options.ts';

/** Common practice, no source: deep spectra leave a few percent without a name. */
export const USUAL_STRANGERS = 0.12;

/** The model before any name is weighed. */
export const startModel = (marks: readonly Mark[], data: AtomicData, z: number, zErr: number): SystemModel => ({
  z,
  zErr,
  dispersionKms: startDispersion(marks),
  trendKms: 0,
  logZero: startZero(marks, data, z),
  cHbeta: 0,
  strangers: USUAL_STRANGERS,
  leftOut: USUAL_LEFT_OUT,
  hydrogenSeen: false,
});

/** A first guess of the dispersion: marks with tiny formal errors still scatter by the wavelength calibration. */
const startDispersion = (marks: readonly Mark[]) =>
  Math.min(20, Math.max(3, 0.3 * median(marks.map((m) => (m.wavelengthErr / m.wavelength) * SPEED_OF_LIGHT_KMS))));

/** H beta's mark if there is one where it should be, else the median of the brightest marks against the strongest lines in their places. */
function startZero(marks: readonly Mark[], data: AtomicData, z: number): number {
  const offsets: number[] = [];
  for (const mark of marks) {
    if (mark.artefact || mark.flux <= 0) continue;
    const reach = Math.max(3 * mark.wavelengthErr, mark.wavelength * 3e-4);
    const [first, end] = linesBetween(data.lines, (mark.wavelength - reach) / (1 + z), (mark.wavelength + reach) / (1 + z));
    let best = Number.NEGATIVE_INFINITY;
    let hydrogen = false;
    for (let line = first; line < end; line++) {
      if (isLocal(data, line) || data.lines.logStrength[line] <= best) continue;
      best = data.lines.logStrength[line];
      hydrogen = data.lines.ions[data.lines.ion[line]].name === 'H I';
    }
    if (best > -0.5) offsets.push(...Array.from({ length: hydrogen ? 4 : 1 }, () => Math.log10(mark.flux) - best));
  }
  return offsets.length > 0
    ? median(offsets)
    : quantile(
        marks.filter((m) => m.flux > 0).map((m) => Math.log10(m.flux)),
        0.9,
      ) - 2;
}
