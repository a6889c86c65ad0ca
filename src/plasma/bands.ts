import type { MeasuredRatio } from './measuredRatios.ts';
import { NE_GRID, NE_RANGE, profileAlong, solveProfile, TE_GRID, TE_RANGE } from './populationGrid.ts';
import type { LnRatio } from './solveZones.ts';

/** Where in the Te-ne plane a measured ratio holds: the line (NaN where it leaves the table) and one sigma to either side (the end of the table where it leaves that). */
export interface Band {
  readonly label: string;
  readonly tells: 'temperature' | 'density';
  /** Density bands run over Te, temperature bands over ne: `at` is that one, the other three the quantity told. */
  readonly at: readonly number[];
  readonly middle: readonly number[];
  readonly low: readonly number[];
  readonly high: readonly number[];
}

/** The band of one diagnostic. `ln`: its measured ratio. */
export function bandOf({ diagnostic, grid }: MeasuredRatio, ln: LnRatio): Band {
  const along = diagnostic.tells === 'density' ? 'ne' : 'te';
  const at = along === 'ne' ? TE_GRID : NE_GRID;
  const [first, last] = along === 'ne' ? NE_RANGE : TE_RANGE;
  const solveAll = (value: number, ends: readonly [number, number]) =>
    at.map((other) => {
      const solution = solveProfile(profileAlong(grid, along, other), value);
      return solution.ended === 'value' ? solution.x : ends[solution.ended === 'below' ? 0 : 1];
    });
  const sides = [ln.value - ln.err, ln.value + ln.err].map((value) => solveAll(value, [first, last]));
  return {
    label: diagnostic.label,
    tells: diagnostic.tells,
    at,
    middle: solveAll(ln.value, [Number.NaN, Number.NaN]),
    low: at.map((_, k) => Math.min(sides[0][k], sides[1][k])),
    high: at.map((_, k) => Math.max(sides[0][k], sides[1][k])),
  };
}
