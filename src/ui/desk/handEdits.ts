import { dropEdit, editFeature, type FeatureEdit } from '../../session/index.ts';
import { wavelengthText } from '../figures.ts';
import { words } from '../words.ts';
import { commitChange } from './decisions.ts';
import type { DeskRow } from './deskRows.ts';
import { desk, setDesk } from './deskStore.ts';

const { hand } = words;

/** Wavelength under the pointer on the spectrum, Angstrom of the file; absent while it is elsewhere. */
let pointedAt: number | undefined;
export const pointAt = (at: number | undefined) => {
  pointedAt = at;
};
export const isPointing = () => pointedAt !== undefined && desk().samples !== undefined;

const edit = (what: FeatureEdit, sentence: string) => commitChange(editFeature(desk().history.document, what, sentence));
const at = (row: DeskRow) => row.feature.centroid;
const placeText = (place: number) => `${wavelengthText(place, undefined)} Å`;

/** Makes a feature where there is none, and brings it up. */
export function addFeature(place: number): void {
  const { chosenAt } = desk();
  edit({ edit: 'add', at: place }, hand.added(placeText(place)));
  setDesk({ tab: 'case', handPlace: undefined, chosenAt: vacuumPlace(place) ?? chosenAt });
}

/** The same place in vacuum, from the nearest feature's own: the difference varies by nothing over a few Angstrom. */
function vacuumPlace(place: number): number | undefined {
  const { rows } = desk();
  const nearest = rows.reduce<DeskRow | undefined>(
    (best, row) => (!best || Math.abs(at(row) - place) < Math.abs(at(best) - place) ? row : best),
    undefined,
  );
  return nearest && place * (nearest.feature.at / at(nearest));
}

export function addAtPointer(): void {
  if (pointedAt !== undefined) addFeature(pointedAt);
}

export const splitFeature = (row: DeskRow) => edit({ edit: 'split', at: at(row) }, hand.split(row.feature.number));
export const deleteFeature = (row: DeskRow) => edit({ edit: 'delete', at: at(row) }, hand.deleted(row.feature.number, placeText(at(row))));

export function moveFeature(row: DeskRow, to: number): void {
  edit({ edit: 'move', at: at(row), to }, hand.moved(row.feature.number, placeText(to)));
  setDesk({ handPlace: undefined, chosenAt: to * (row.feature.at / at(row)) });
}

export const reshapeFeature = (row: DeskRow, as: Extract<FeatureEdit, { edit: 'profile' }>['as']) =>
  edit({ edit: 'profile', at: at(row), as }, hand.reshaped(row.feature.number, hand.shapes[as]));

/** Ties a feature to another one by their names, with a ratio of their fluxes where one is given. */
export function tieFeature(row: DeskRow, to: DeskRow, ratio: number | undefined): void {
  const [line, other] = [row.name?.transitions[0], to.name?.transitions[0]];
  if (!line || !other) return;
  edit(
    {
      edit: 'tie',
      at: at(row),
      to: at(to),
      restAt: line.wavelengthLab,
      restTo: other.wavelengthLab,
      ...(ratio === undefined ? {} : { ratio }),
    },
    hand.tied(row.feature.number, to.feature.number),
  );
}

export const takeEditOut = (place: number, edits: readonly FeatureEdit[]) =>
  commitChange(dropEdit(desk().history.document, place, hand.tookOut(editText(edits[place]))));

/** An edit in words, for the list of what was done. */
export function editText(done: FeatureEdit): string {
  const place = placeText(done.at);
  switch (done.edit) {
    case 'move':
      return hand.list.move(place, placeText(done.to));
    case 'tie':
      return hand.list.tie(place, placeText(done.to));
    case 'profile':
      return hand.list.profile(place, hand.shapes[done.as]);
    default:
      return hand.list[done.edit](place);
  }
}
