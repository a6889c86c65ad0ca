import { type LevelModel, UPSILON_TE } from '../../src/atomic/index.ts';

/**
 * An invented atom from a line of text a part: levels `term J energyCm1 parity`, decays `lower upper A`, collisions `lower upper Upsilon [teLow teHigh]`
 * (the same at all temperatures), each separated by semicolons.
 */
export function someAtom(parts: { levels: string; decays: string; collisions: string }): LevelModel {
  const rows = (text: string) =>
    text
      .split(';')
      .map((row) => row.trim().split(' '))
      .filter(([first]) => first !== '');
  const [decays, collisions] = [rows(parts.decays), rows(parts.collisions)];
  return {
    ion: 'Xx III',
    levels: rows(parts.levels).map(([term, j, energy, parity]) => ({
      configuration: '2p2',
      term,
      j: Number(j),
      energyCm1: Number(energy),
      energyErrCm1: 0.1,
      parity: parity === 'odd' ? 'odd' : 'even',
    })),
    radiative: {
      lower: Uint8Array.from(decays, ([lower]) => Number(lower)),
      upper: Uint8Array.from(decays, ([, upper]) => Number(upper)),
      a: Float64Array.from(decays, ([, , a]) => Number(a)),
    },
    collisions: {
      lower: Uint8Array.from(collisions, ([lower]) => Number(lower)),
      upper: Uint8Array.from(collisions, ([, upper]) => Number(upper)),
      upsilon: Float32Array.from(collisions.flatMap(([, , upsilon]) => UPSILON_TE.map(() => Number(upsilon)))),
      teLow: Float32Array.from(collisions, (row) => Number(row[3] ?? 'NaN')),
      teHigh: Float32Array.from(collisions, (row) => Number(row[4] ?? 'NaN')),
    },
    sources: { energies: ['invented'], radiative: ['invented'], collisions: ['invented'] },
  };
}
