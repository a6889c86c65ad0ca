import type { AtomicData, Mechanism } from '../atomic/index.ts';
import { roughDimming } from './roughReddening.ts';

/** What the inference asks of every line again and again, one value a line in every array. */
export interface LineFacts {
  /** 1 = sky, telluric, interstellar: stands still in the observer's frame. */
  readonly local: Uint8Array;
  /** 1 = telluric, interstellar. */
  readonly absorbs: Uint8Array;
  /** log10 flux for H beta = 100 in the reference nebula; a low one where nobody knows it. */
  readonly logStrength: Float64Array;
  /** One sigma of `logStrength` within the ion, model scatter included, dex. */
  readonly errDex: Float64Array;
  /** log10 of the dimming relative to H beta for c(Hbeta) = 1, sign as in `roughDimming`. */
  readonly dimming: Float64Array;
  /** How hard the ion is to make, ln((eV + 8) / 25), one value an ion: what a trend of velocity is taken against. */
  readonly hardness: Float64Array;
  /** Index into `families` of every line. */
  readonly family: Uint16Array;
  /** Lines of one ion fed in one way share one scale: forbidden lines fade in dense gas, fluorescence follows the star. */
  readonly families: readonly Family[];
}

/** The lines of one ion that one mechanism feeds. */
export interface Family {
  /** Index into `lines.ions`. */
  readonly ion: number;
  readonly mechanism: Mechanism;
  /** Energy that makes the gas it shines in, eV: of the ion, or of the ion that recombines to it. */
  readonly zoneEv: number;
  /** Its lines stand still in the observer's frame. */
  readonly local: boolean;
}

/** A line whose strength nobody knows is expected to be faint, with a wide error. */
const UNKNOWN_LOG_STRENGTH = -3.5;
const UNKNOWN_ERR_DEX = 1.3;
/** Scatter of a line's flux about the prediction beyond the list's own error, dex: other temperature, density, calibration. */
const MODEL_SCATTER_DEX = 0.12;
/** Collisionally excited lines move further with temperature and density. */
const COLLISIONAL_SCATTER_DEX = 0.2;

const SOFTEST_EV = 8;
const MIDDLE_EV = 25;

const known = new WeakMap<AtomicData, LineFacts>();

/** Facts of a bundle's lines, made once a bundle. */
export function factsOf(data: AtomicData): LineFacts {
  const before = known.get(data);
  if (before) return before;
  const { lines } = data;
  const facts: LineFacts = {
    local: new Uint8Array(lines.count),
    absorbs: new Uint8Array(lines.count),
    logStrength: new Float64Array(lines.count),
    errDex: new Float64Array(lines.count),
    dimming: new Float64Array(lines.count),
    hardness: Float64Array.from(lines.ions, (ion) => Math.log((ion.creationEv + SOFTEST_EV) / MIDDLE_EV)),
    ...familiesOf(data),
  };
  for (let line = 0; line < lines.count; line++) {
    const nature = lines.nature(line);
    const absorbs = nature === 'telluric' || nature === 'interstellar';
    facts.absorbs[line] = absorbs ? 1 : 0;
    facts.local[line] = absorbs || nature === 'sky' ? 1 : 0;
    const strength = lines.logStrength[line];
    const isKnown = Number.isFinite(strength);
    facts.logStrength[line] = isKnown ? strength : UNKNOWN_LOG_STRENGTH;
    const own = Number.isFinite(lines.strengthErrDex[line]) ? lines.strengthErrDex[line] : 0.5;
    const model = lines.mechanism(line) === 'collisional' ? COLLISIONAL_SCATTER_DEX : MODEL_SCATTER_DEX;
    facts.errDex[line] = isKnown ? Math.hypot(own, model) : UNKNOWN_ERR_DEX;
    facts.dimming[line] = roughDimming(lines.wavelengthVac[line]);
  }
  known.set(data, facts);
  return facts;
}

function familiesOf({ lines }: AtomicData): Pick<LineFacts, 'family' | 'families'> {
  const families: Family[] = [];
  const family = new Uint16Array(lines.count);
  const index = new Map<string, number>();
  for (let line = 0; line < lines.count; line++) {
    const nature = lines.nature(line);
    const local = nature === 'sky' || nature === 'telluric' || nature === 'interstellar';
    const mechanism = lines.mechanism(line);
    const key = `${lines.ion[line]} ${local} ${local ? '' : mechanism}`;
    let at = index.get(key);
    if (at === undefined) {
      at = families.length;
      index.set(key, at);
      const { creationEv, ionizationEv } = lines.ions[lines.ion[line]];
      families.push({ ion: lines.ion[line], mechanism, local, zoneEv: mechanism === 'recombination' ? ionizationEv : creationEv });
    }
    family[line] = at;
  }
  return { family, families };
}
