import { nameWords, roleOf } from '../columnRoles.ts';
import type { ErrorValues } from '../errorValues.ts';
import { flaggedBy } from '../maskValues.ts';
import { noteFact } from '../notes.ts';
import type { ReadingChoices } from '../reading.ts';
import type { FitsFile } from './candidate.ts';
import { type Hdu, nameHdu } from './hdus.ts';
import { textOf } from './header.ts';
import { imageLine } from './imageLine.ts';

/** Other units of a file that belong to an image of fluxes. */
export interface Companions {
  readonly wavelength?: Hdu;
  readonly error?: { readonly hdu: Hdu; readonly meaning: ErrorValues['meaning']; readonly reason: string };
  readonly mask?: Hdu;
}

/** Finds wavelengths, errors and masks of an image by keywords of the format (ERRDATA, HDUCLAS3), else by names with the same stem: B_FLUX, B_IVAR. */
export function companions({ hdus }: FitsFile, flux: Hdu): Companions {
  const role = imageRole(flux);
  if (role !== 'flux' && role !== 'other') return {};
  const others = hdus.filter((h) => h !== flux && h.kind === 'image' && h.axes[0] === flux.axes[0] && h.axes.length > 0);
  const stem = stemOf(flux);
  const kin = (h: Hdu) =>
    stemOf(h) === stem ||
    (stem !== '' && stemOf(h) === '' && hdus.filter((o) => imageRole(o) === 'flux').length === 1) ||
    (flux.index === 0 && stemOf(h) === '');
  const sameShape = (h: Hdu) => linesOf(h) === 1 || linesOf(h) === linesOf(flux);
  const by = (keyword: string) => {
    const name = textOf(flux.header, keyword);
    return name === '' ? undefined : others.find((h) => h.name === name);
  };
  const wavelength = others.find((h) => imageRole(h) === 'wavelength' && kin(h) && sameShape(h));
  const named = by('ERRDATA');
  const errorHdu = named ?? others.find((h) => isErrorRole(imageRole(h)) && kin(h) && linesOf(h) === linesOf(flux));
  const mask = by('QUALDATA') ?? others.find((h) => imageRole(h) === 'mask' && kin(h) && linesOf(h) === linesOf(flux));
  const error = errorHdu && { hdu: errorHdu, ...meaningOf(errorHdu) };
  return { ...(wavelength ? { wavelength } : {}), ...(error ? { error } : {}), ...(mask ? { mask } : {}) };
}

const linesOf = (hdu: Hdu) => hdu.axes.slice(1).reduce((a, b) => a * b, 1);

/** The role by the words of the name that name roles: B_IVAR and IVAR are the same. */
export function imageRole(hdu: Hdu) {
  if (hdu.name === '' && hdu.index === 0) return 'flux';
  const known = unitWords(hdu).filter((w) => ROLE_WORDS.test(w));
  // "sci" and "data" say nothing where another word names the role
  const telling = known.filter((w) => !/^(sci|data|primary)$/.test(w));
  const words = telling.length ? telling : known;
  return roleOf({ name: words.length ? words.join('_') : hdu.name, unit: '', kind: 'real' }).role;
}

const isErrorRole = (role: string) => role === 'sigma' || role === 'ivar' || role === 'variance' || role === 'relative';

const ROLE_WORDS =
  /^(flux|fluxes|wave|wavelength|wavelengths|lambda|loglam|ivar|err|errs|error|errors|sigma|variance|var|mask|dq|sci|data|stat|rel|relative|spec|spectrum|noise|unc|uncert|uncertainty|std|sig|sigmas?|lam|wl|wav|invvar|variances|intensity|signal|quality|flags?|counts|qual|primary)$/;

/** The words of a unit's name; SCIFLUX and FLUX1 are taken apart. */
const unitWords = (hdu: Hdu) =>
  nameWords(hdu.name.replace(/^(sci|sky|cal|obj)(flux|wave|wavelength|var|err|ivar)/i, '$1_$2').replace(/([a-z])(\d+)$/i, '$1_$2'));

/** The name without the words of its role: "b" of B_FLUX. */
const stemOf = (hdu: Hdu) =>
  unitWords(hdu)
    .filter((w) => !ROLE_WORDS.test(w))
    .join(' ');

/** HDUCLAS3 (MSE, RMSE, INVMSE) says what an error unit holds; a unit called STAT holds variances by common practice. */
function meaningOf(hdu: Hdu): { meaning: ErrorValues['meaning']; reason: string } {
  const word = textOf(hdu.header, 'HDUCLAS3').toUpperCase();
  const told = ({ MSE: 'variance', RMSE: 'sigma', INVMSE: 'ivar', INVRMSE: 'sigma' } as const)[word];
  if (told && word !== 'INVRMSE') return { meaning: told, reason: `HDUCLAS3 = ${word}` };
  if (/^stat$/i.test(hdu.name)) return { meaning: 'variance', reason: 'a unit called STAT holds variances (common practice, no source)' };
  const role = imageRole(hdu);
  return { meaning: role === 'ivar' || role === 'variance' || role === 'relative' ? role : 'sigma', reason: `its name is ${hdu.name}` };
}

/** Errors of the line at `at` from a companion unit. */
export async function companionErrors(
  { source, notes }: FitsFile,
  { error }: Companions,
  along: number,
  at: readonly number[],
  choices: ReadingChoices,
): Promise<ErrorValues | undefined> {
  if (!error) return undefined;
  const meaning = choices.errorMeaning ?? error.meaning;
  noteFact(
    notes,
    'uncertainty',
    `${nameHdu(error.hdu)}, taken as ${{ sigma: 'one sigma', variance: 'variance', ivar: 'inverse variance', relative: 'a share of the flux' }[meaning]}`,
    error.reason,
  );
  return { values: await imageLine(source, error.hdu, along, at, notes), meaning, label: nameHdu(error.hdu) };
}

export async function companionMask(
  { source, notes }: FitsFile,
  { mask, error }: Companions,
  along: number,
  at: readonly number[],
  choices: ReadingChoices,
): Promise<Uint8Array | undefined> {
  if (!mask || choices.maskColumn === 'none' || error?.meaning === 'ivar') return undefined;
  const n = mask.axes[along - 1];
  return flaggedBy(
    { name: mask.name, unit: '', kind: 'whole', samples: n, read: () => imageLine(source, mask, along, at, notes) },
    choices,
    notes,
    { hdu: mask.index },
  );
}
