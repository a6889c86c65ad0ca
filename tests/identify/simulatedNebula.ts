import { type AtomicData, linesBetween } from '../../src/atomic/index.ts';
import type { Mark } from '../../src/identify/index.ts';
import { seededRandom } from '../../src/numeric/index.ts';

/** A mark whose origin is known: its lines, strongest first; none = a line that no list holds. */
export interface SimulatedMark extends Mark {
  readonly lines: readonly number[];
  /** Share of the flux that its strongest line carries; 1 for a line of no list. */
  readonly mainShare: number;
}

export interface SimulatedNebula {
  readonly seed: number;
  readonly kind: 'low' | 'high' | 'shocked';
  /** Wanted number of marks; the faintest ones set the depth. */
  readonly count: number;
  readonly resolvingPower: number;
  readonly z: number;
  /** Observed range, vacuum Angstrom. */
  readonly low: number;
  readonly high: number;
  /** Share of marks that are lines of no list. */
  readonly strangers: number;
}

/** Ions above these creation energies (eV) are missing or weak in each kind of gas. */
const CUT_EV = { low: 36, high: 110, shocked: 60 } as const;
const ION_SCATTER_DEX = 0.5;
/** A feature further than this share of a width from the next one is measured apart. */
const APART_FWHM = 0.9;
const LEAST_SHARE = 0.25;

/**
 * Marks as measured of a nebula made from the list's own strengths with other abundances, line ratios, reddening, velocity, calibration errors and lines
 * that no list holds. Same argument, same nebula.
 */
export function simulateNebula(data: AtomicData, what: SimulatedNebula): SimulatedMark[] {
  const { lines } = data;
  const random = seededRandom(what.seed);
  const scales = lines.ions.map((ion) => {
    const beyond = Math.max(0, ion.creationEv - CUT_EV[what.kind]) / 15;
    const low = what.kind === 'shocked' && ion.creationEv < 10 ? 0.6 : 0;
    return low - beyond + ION_SCATTER_DEX * random.normal() * (ion.element === 'H' ? 0 : ion.element === 'He' ? 0.3 : 1);
  });
  const cHbeta = 1.2 * random.uniform();
  const [first, end] = linesBetween(lines, what.low / (1 + what.z), what.high / (1 + what.z));
  const emitted: { line: number; at: number; flux: number }[] = [];
  for (let line = first; line < end; line++) {
    const nature = lines.nature(line);
    const known = lines.logStrength[line];
    if (nature === 'sky' || nature === 'telluric' || nature === 'interstellar' || !Number.isFinite(known)) continue;
    const wavelength = lines.wavelengthVac[line] + Math.min(0.6, lines.wavelengthErr[line]) * random.normal();
    const dimming = cHbeta * ((4862.7 / wavelength) ** 1.25 - 1);
    const log = known + scales[lines.ion[line]] + lines.strengthErrDex[line] * random.normal() - dimming;
    emitted.push({ line, at: wavelength * (1 + what.z), flux: 10 ** log });
  }
  const blends = joinUnresolved(emitted, what.resolvingPower).sort((a, b) => b.flux - a.flux);
  const kept = blends.slice(0, what.count);
  const limit = kept[kept.length - 1].flux;
  const drift = [random.normal(), random.normal()];
  const marks = kept.map(({ at, flux, parts }): SimulatedMark => {
    const fwhm = at / what.resolvingPower;
    const snr = (5 * flux) / limit;
    const err = Math.hypot((0.6 * fwhm) / snr, 0.02 * fwhm);
    const share = (at - what.low) / (what.high - what.low);
    const calibration = 0.01 * fwhm * (drift[0] + drift[1] * Math.cos(3 * share));
    const measured = flux * (1 + Math.hypot(1 / snr, 0.02) * random.normal());
    return {
      wavelength: at + err * random.normal() + calibration,
      wavelengthErr: err,
      flux: Math.max(0.2 * limit, measured),
      fluxErr: Math.hypot(limit / 5, 0.02 * flux),
      fwhm,
      lines: parts.filter((p) => p.flux > LEAST_SHARE * flux).map((p) => p.line),
      mainShare: parts[0].flux / flux,
    };
  });
  for (let k = 0; k < what.strangers * what.count; k++) {
    const wavelength = what.low + (what.high - what.low) * random.uniform();
    const flux = limit * 10 ** (1.2 * random.uniform());
    const fwhm = wavelength / what.resolvingPower;
    marks.push({ wavelength, wavelengthErr: (0.12 * fwhm * limit) / flux, flux, fluxErr: limit / 5, fwhm, lines: [], mainShare: 1 });
  }
  return marks.sort((a, b) => a.wavelength - b.wavelength);
}

interface Blend {
  at: number;
  flux: number;
  parts: { line: number; flux: number }[];
}

/** Neighbours nearer than a width are measured as one, at their mean weighted by flux. */
function joinUnresolved(emitted: readonly { line: number; at: number; flux: number }[], resolvingPower: number): Blend[] {
  const blends: Blend[] = [];
  for (const { line, at, flux } of [...emitted].sort((a, b) => a.at - b.at)) {
    const last = blends[blends.length - 1];
    if (last && at - last.at < (APART_FWHM * at) / resolvingPower) {
      last.at = (last.at * last.flux + at * flux) / (last.flux + flux);
      last.flux += flux;
      last.parts.push({ line, flux });
    } else blends.push({ at, flux, parts: [{ line, flux }] });
  }
  for (const blend of blends) blend.parts.sort((a, b) => b.flux - a.flux);
  return blends;
}
