import { type AtomicData, levelPopulations, linesBetween } from '../../src/atomic/index.ts';
import type { Mark } from '../../src/identify/index.ts';
import { seededRandom } from '../../src/numeric/index.ts';
import { joinUnresolved } from './joinUnresolved.ts';

/** A mark whose origin is known: its lines, strongest first; none = a line that no list holds. */
export interface SimulatedMark extends Mark {
  readonly lines: readonly number[];
  /** Share of the flux that its strongest line carries; 1 for a line of no list. */
  readonly mainShare: number;
}

export interface SimulatedNebula {
  readonly seed: number;
  readonly kind: 'low' | 'high' | 'shocked' | 'nova' | 'galaxy';
  /** Wanted number of marks; the faintest ones set the depth. */
  readonly count: number;
  readonly resolvingPower: number;
  readonly z: number;
  /** Observed range, vacuum Angstrom. */
  readonly low: number;
  readonly high: number;
  /** Share of marks that are lines of no list. */
  readonly strangers: number;
  /** Gas in which collisional lines arise: K, cm^-3; absent = that of the reference nebula. */
  readonly te?: number;
  readonly ne?: number;
  /** c(Hbeta). */
  readonly cHbeta?: number;
  /** Scatter of ion abundances and ionisation, dex. */
  readonly ionScatterDex?: number;
  /** Smooth error of the wavelength calibration, in widths, one sigma. */
  readonly calibrationFwhm?: number;
  /** Smooth error of the flux calibration, dex. */
  readonly bendDex?: number;
  /** Share of the fainter half that the observer left out. */
  readonly leftOut?: number;
  /** Widths are not given. */
  readonly withoutWidths?: boolean;
}

/** Ions above these creation energies (eV) are missing or weak in each kind of gas, and how fast they fade beyond, eV a dex. */
const CUT_EV = { low: 36, high: 110, shocked: 60, nova: 240, galaxy: 100 } as const;
const FADE_EV = 15;
const ION_SCATTER_DEX = 0.5;
/** What pumps a line follows the star, not the abundance: scatter of an ion's pumped lines together, dex. */
const PUMPED_SCATTER_DEX = 0.6;
/** The reference nebula's gas, about. */
const REFERENCE_TE = 10_000;
const REFERENCE_NE = 3_000;
/** A line that carries less of a feature is no name of it. */
const LEAST_SHARE = 0.25;
/** S/N of the faintest kept mark. */
const FAINTEST_SNR = 5;

/**
 * Marks as measured of a nebula made from the list's own strengths with other abundances, line ratios, temperature, density, reddening, velocity, errors of
 * calibration and lines that no list holds. Same argument, same nebula.
 */
export function simulateNebula(data: AtomicData, what: SimulatedNebula): SimulatedMark[] {
  const { lines } = data;
  const random = seededRandom(what.seed);
  const scatter = what.ionScatterDex ?? ION_SCATTER_DEX;
  const scales = lines.ions.map((ion) => {
    const beyond = Math.max(0, ion.creationEv - CUT_EV[what.kind]) / FADE_EV;
    const soft = what.kind === 'shocked' && ion.creationEv < 10 ? 0.6 : 0;
    return soft - beyond + scatter * random.normal() * (ion.element === 'H' ? 0 : ion.element === 'He' ? 0.3 : 1);
  });
  const pumped = lines.ions.map(() => PUMPED_SCATTER_DEX * random.normal() + (what.kind === 'nova' ? 0.7 : 0));
  const cHbeta = what.cHbeta ?? 1.2 * random.uniform();
  const bend = [random.normal(), random.normal()];
  const shifts = gasShifts(data, what.te ?? REFERENCE_TE, what.ne ?? REFERENCE_NE);
  const [first, end] = linesBetween(lines, what.low / (1 + what.z), what.high / (1 + what.z));
  const emitted: { line: number; at: number; flux: number }[] = [];
  for (let line = first; line < end; line++) {
    const nature = lines.nature(line);
    const known = lines.logStrength[line];
    if (nature === 'sky' || nature === 'telluric' || nature === 'interstellar' || !Number.isFinite(known)) continue;
    const wavelength = lines.wavelengthVac[line] + Math.min(0.6, lines.wavelengthErr[line]) * random.normal();
    const dimming = cHbeta * ((4862.7 / wavelength) ** 1.25 - 1);
    const ion = lines.ion[line];
    const fed = lines.mechanism(line) === 'fluorescence' ? pumped[ion] : shifts(line);
    const along = Math.log(wavelength / 5000);
    const bent = (what.bendDex ?? 0) * (bend[0] * Math.sin(3 * along) + bend[1] * Math.cos(5 * along));
    const log = known + scales[ion] + fed + lines.strengthErrDex[line] * random.normal() - dimming + bent;
    emitted.push({ line, at: wavelength * (1 + what.z), flux: 10 ** log });
  }
  const blends = joinUnresolved(emitted, what.resolvingPower).sort((a, b) => b.flux - a.flux);
  const kept = blends.slice(0, what.count);
  const limit = kept[kept.length - 1].flux;
  const drift = [random.normal(), random.normal()];
  const shown = kept.filter((_, k) => k < kept.length / 2 || random.uniform() > (what.leftOut ?? 0));
  const marks = shown.map(({ at, flux, parts }): SimulatedMark => {
    const fwhm = at / what.resolvingPower;
    const snr = (FAINTEST_SNR * flux) / limit;
    const err = Math.hypot((0.6 * fwhm) / snr, 0.02 * fwhm);
    const share = (at - what.low) / (what.high - what.low);
    const calibration = (what.calibrationFwhm ?? 0.01) * fwhm * (drift[0] + drift[1] * Math.cos(3 * share));
    const measured = flux * (1 + Math.hypot(1 / snr, 0.02) * random.normal());
    return {
      wavelength: at + err * random.normal() + calibration,
      wavelengthErr: err,
      flux: Math.max(0.2 * limit, measured),
      fluxErr: Math.hypot(limit / FAINTEST_SNR, 0.02 * flux),
      ...(what.withoutWidths ? {} : { fwhm }),
      lines: parts.filter((p) => p.flux > LEAST_SHARE * flux).map((p) => p.line),
      mainShare: parts[0].flux / flux,
    };
  });
  for (let k = 0; k < what.strangers * what.count; k++) {
    const wavelength = what.low + (what.high - what.low) * random.uniform();
    const flux = limit * 10 ** (1.2 * random.uniform());
    const fwhm = wavelength / what.resolvingPower;
    marks.push({
      wavelength,
      wavelengthErr: (0.12 * fwhm * limit) / flux,
      flux,
      fluxErr: limit / FAINTEST_SNR,
      ...(what.withoutWidths ? {} : { fwhm }),
      lines: [],
      mainShare: 1,
    });
  }
  return marks.sort((a, b) => a.wavelength - b.wavelength);
}

/** log10 of what another temperature and density do to a collisional line against hydrogen. */
function gasShifts(data: AtomicData, te: number, ne: number): (line: number) => number {
  const made = new Map<number, Float64Array | undefined>();
  const shiftsOf = (ion: number) => {
    const model = data.levelModel(data.lines.ions[ion].name);
    if (!model) return undefined;
    const there = levelPopulations(model, te, ne);
    const usual = levelPopulations(model, REFERENCE_TE, REFERENCE_NE);
    // atoms without collision strengths keep their reference pattern
    return there.map((population, level) =>
      population > 0 && usual[level] > 0 ? Math.log10(population / usual[level]) : Math.log10(ne / REFERENCE_NE),
    );
  };
  return (line) => {
    const { ion, upperLevel } = data.lines;
    if (upperLevel[line] < 1 || data.lines.mechanism(line) !== 'collisional' || (te === REFERENCE_TE && ne === REFERENCE_NE)) return 0;
    if (!made.has(ion[line])) made.set(ion[line], shiftsOf(ion[line]));
    const shifts = made.get(ion[line]);
    // excited levels fill with ne as the emission of hydrogen does, until collisions empty them as fast
    return shifts ? shifts[upperLevel[line]] - Math.log10(ne / REFERENCE_NE) : 0;
  };
}
