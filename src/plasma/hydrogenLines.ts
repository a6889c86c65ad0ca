import { type AtomicData, caseBIntensity, linesBetween } from '../atomic/index.ts';
import type { LineFlux } from './lineFluxes.ts';

/** A line of H I or He II that may say something about reddening. */
export interface HydrogenicFlux {
  readonly label: string;
  /** Place in the list of fluxes. */
  readonly index: number;
  readonly nLower: number;
  readonly nUpper: number;
  readonly flux: number;
  readonly fluxErr: number;
  readonly restVac: number;
  readonly ew?: number;
  /** He II line of the Pickering series under a Balmer line: [nLower, nUpper]; absent when it stands apart or He II is not seen. */
  readonly under?: readonly [number, number];
  /** Why the line is not used. */
  readonly unusable?: string;
}

/** Higher members crowd together and depend on how collisions mix their sublevels: common practice, no source. */
const HIGHEST_UPPER = 15;
const LEAST_SNR = 3;
/** A foreign line counts as blended within this many FWHM ... */
const BLENDED_FWHM = 0.7;
/** ... from this share of the hydrogen line on, by the strengths of the list. */
const HARMLESS_SHARE = 0.03;
const DEFAULT_FWHM_A = 1;

/** Quantum numbers of the hydrogenic lines of one ion: line of the list -> [nLower, nUpper]. */
function quantumNumbers(data: AtomicData, ion: 'H I' | 'He II'): Map<number, readonly [number, number]> {
  const found = new Map<number, readonly [number, number]>();
  data.caseB.ion.forEach((name, row) => {
    if (name !== ion) return;
    const [lower, upper] = [data.caseB.nLower[row], data.caseB.nUpper[row]];
    const line = data.hydrogenicLine(ion, lower, upper);
    if (line >= 0) found.set(line, [lower, upper]);
  });
  return found;
}

/**
 * The lines of H I (Balmer, Paschen and on) or He II among the fluxes, with the reasons why some are not used.
 *
 * @param fluxes all named lines
 */
export function hydrogenicFluxes(data: AtomicData, ion: 'H I' | 'He II', fluxes: readonly LineFlux[]): HydrogenicFlux[] {
  const numbers = quantumNumbers(data, ion);
  const named = new Set(fluxes.flatMap((flux) => flux.lines));
  const ions = new Set([...named].map((line) => data.lines.ion[line]));
  const hasHelium = fluxes.some((flux) => flux.lines.length === 1 && flux.lines[0] === data.hydrogenicLine('He II', 3, 4));
  return fluxes.flatMap((flux, index): HydrogenicFlux[] => {
    const own = flux.lines.map((line) => numbers.get(line)).find((found) => found !== undefined);
    if (!own) return [];
    const [nLower, nUpper] = own;
    const pickering = ion === 'H I' && nLower === 2 ? data.hydrogenicLine('He II', 4, 2 * nUpper) : -1;
    const foreign = flux.lines.some((line) => !numbers.has(line) && line !== pickering);
    const width = BLENDED_FWHM * (flux.fwhmA ?? DEFAULT_FWHM_A);
    const joined = flux.lines.includes(pickering) || (!named.has(pickering) && reaches(data, pickering, flux));
    const unusable =
      (foreign ? 'blended with another ion' : undefined) ?? reasonAgainst(data, ion, flux, own, width, { named, ions, pickering });
    return [
      {
        label: flux.label,
        index,
        nLower,
        nUpper,
        flux: flux.flux,
        fluxErr: flux.fluxErr,
        restVac: flux.restVac,
        ...(flux.ew === undefined ? {} : { ew: flux.ew }),
        ...(pickering >= 0 && hasHelium && joined ? { under: [4, 2 * nUpper] as const } : {}),
        ...(unusable === undefined ? {} : { unusable }),
      },
    ];
  });
}

/** Whether another line lies so near that its light is measured with this one's. */
const reaches = (data: AtomicData, other: number, flux: LineFlux) =>
  other >= 0 && Math.abs(data.lines.wavelengthVac[other] - data.lines.wavelengthVac[flux.lines[0]]) < (flux.fwhmA ?? DEFAULT_FWHM_A);

interface Company {
  readonly named: ReadonlySet<number>;
  readonly ions: ReadonlySet<number>;
  readonly pickering: number;
}

function reasonAgainst(
  data: AtomicData,
  ion: string,
  flux: LineFlux,
  [nLower, nUpper]: readonly [number, number],
  width: number,
  company: Company,
): string | undefined {
  if (flux.doubt) return flux.doubt;
  if (ion === 'H I' && nLower === 1) return 'Lyman line: scattered and absorbed on its way out';
  if (ion === 'H I' && nUpper > HIGHEST_UPPER && nLower < 4) return 'too near the limit of its series';
  if (Number.isNaN(caseBIntensity(data.caseB, ion, nLower, nUpper, 1e4, 1e3))) return 'no case-B intensity in the tables';
  if (flux.flux < LEAST_SNR * flux.fluxErr) return 'too weak';
  const neighbour = strongNeighbour(data, flux, width, company);
  return neighbour === undefined ? undefined : `within its width lies ${neighbour}`;
}

/** A line of another ion that is seen in the spectrum, too near to be told apart and too strong to be left alone; its name. */
function strongNeighbour(data: AtomicData, flux: LineFlux, width: number, { named, ions, pickering }: Company): string | undefined {
  const { lines } = data;
  const own = flux.lines[0];
  const at = lines.wavelengthVac[own];
  const [first, end] = linesBetween(lines, at - width, at + width);
  for (let line = first; line < end; line++) {
    const foreign = lines.ion[line] !== lines.ion[own] && ions.has(lines.ion[line]) && line !== pickering && !named.has(line);
    if (foreign && lines.logStrength[line] > lines.logStrength[own] + Math.log10(HARMLESS_SHARE))
      return `${lines.ions[lines.ion[line]].name} ${lines.wavelengthVac[line].toFixed(2)} (vacuum)`;
  }
  return undefined;
}
