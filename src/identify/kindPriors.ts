import type { Ion } from '../atomic/index.ts';
import type { ObjectKind } from './naming.ts';

/** Ions made above this energy do not exist in gas ionised by hot stars alone: the second edge of helium, eV. */
const HELIUM_EDGE_EV = 54.4;
const HYDROGEN_EDGE_EV = 13.59;
const OXYGEN_EDGE_EV = 35;

/**
 * Expected log10 scale of a family against the reference nebula, which holds every ionisation zone. The user's word on the kind of object only shifts this prior;
 * the lines themselves can overrule it. Shifts: common practice, no source.
 *
 * @param zoneEv energy that makes the gas the family shines in
 */
export function priorLogScale(ion: Ion, zoneEv: number, kind: ObjectKind): number {
  const high = zoneEv >= HELIUM_EDGE_EV;
  const middle = zoneEv > OXYGEN_EDGE_EV;
  const neutral = zoneEv < HYDROGEN_EDGE_EV;
  switch (kind) {
    case 'hii-region':
      return high ? -2.5 : middle ? -0.5 : 0;
    case 'planetary-nebula':
      return ion.element === 'Fe' ? -0.5 : 0;
    case 'nova-shell':
      return high ? 0.7 : 0.3;
    case 'shocked-gas':
      return neutral ? 0.6 : high ? -0.5 : 0;
    case 'narrow-line-galaxy':
      return neutral ? 0.2 : 0;
    default:
      return 0;
  }
}

/** Reduced spectra have their sky subtracted: what is left of it is expected this far below the list's own scale, log10. */
export const LOCAL_LOG_SCALE = -2;
