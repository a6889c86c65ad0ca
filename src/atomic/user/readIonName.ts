import { nearestWord } from '../../problems/index.ts';
import type { UserLine } from './userLine.ts';

const ELEMENTS =
  'H He Li Be B C N O F Ne Na Mg Al Si P S Cl Ar K Ca Sc Ti V Cr Mn Fe Co Ni Cu Zn Ga Ge As Se Br Kr Rb Sr Y Zr Nb Mo Tc Ru Rh Pd Ag Cd In Sn Sb Te I Xe Cs Ba La Ce Pr Nd Pm Sm Eu Gd Tb Dy Ho Er Tm Yb Lu Hf Ta W Re Os Ir Pt Au Hg Tl Pb Bi Po At Rn Fr Ra Ac Th Pa U'.split(
    ' ',
  );

const ROMAN: readonly (readonly [string, number])[] = [
  ['L', 50],
  ['XL', 40],
  ['X', 10],
  ['IX', 9],
  ['V', 5],
  ['IV', 4],
  ['I', 1],
];

/** An ion as people write it. `wrong` tells in words what it is instead. */
export type IonName =
  | {
      readonly ended: 'read';
      readonly ion: string;
      readonly element: string;
      readonly charge: number;
      readonly nature?: UserLine['nature'];
    }
  | { readonly ended: 'wrong'; readonly found: string; readonly doThis: string };

/** Reads `O III`, `OIII`, `o iii`, `[O III]`, `O III]`; brackets say the nature of the line. */
export function readIonName(text: string): IonName {
  const [, open, bare, close] = /^\s*(\[?)\s*([^[\]]*?)\s*(\]?)\s*$/.exec(text) ?? [];
  const parts = /^([A-Z][a-z]?)\s*([IVXL]+)$/.exec(bare ?? '') ?? /^([A-Za-z]{1,2})\s+([IVXLivxl]+)$/.exec(bare ?? '');
  const doThis = 'Write element and ionization stage, such as O III, [O III] or C III].';
  if (!parts || (open && !close)) return { ended: 'wrong', found: `'${text}' is no ion`, doThis };
  const element = parts[1][0].toUpperCase() + parts[1].slice(1).toLowerCase();
  const stage = parts[2].toUpperCase();
  const number = ELEMENTS.indexOf(element) + 1;
  if (number === 0) {
    const near = nearestWord(element, ELEMENTS);
    return { ended: 'wrong', found: `'${text}': no element ${element}`, doThis: near ? `Did you mean ${near} ${stage}?` : doThis };
  }
  const charge = numberOf(stage) - 1;
  if (roman(charge + 1) !== stage) return { ended: 'wrong', found: `'${text}': ${stage} is no Roman number`, doThis };
  if (charge >= number)
    return { ended: 'wrong', found: `'${text}': ${element} has only ${number} electron${number === 1 ? '' : 's'}`, doThis };
  const nature = open ? 'forbidden' : close ? 'intercombination' : undefined;
  return { ended: 'read', ion: `${element} ${stage}`, element, charge, ...(nature ? { nature } : {}) };
}

/** Value of letters among I, V, X, L; those in a wrong order give a value that `roman` writes differently. */
function numberOf(stage: string): number {
  let rest = stage;
  let sum = 0;
  while (rest !== '') {
    const [letters, value] = ROMAN.filter(([word]) => rest.startsWith(word)).reduce((best, next) =>
      next[0].length > best[0].length ? next : best,
    );
    sum += value;
    rest = rest.slice(letters.length);
  }
  return sum;
}

/** 1 ... 99. */
function roman(value: number): string {
  let rest = value;
  let text = '';
  for (const [letters, size] of ROMAN) {
    while (rest >= size) {
      text += letters;
      rest -= size;
    }
  }
  return text;
}
