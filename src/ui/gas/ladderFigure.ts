import type { DensityLadder, Rung } from '../../plasma/index.ts';
import { place, svgPath } from '../plot/svgPath.ts';
import { words } from '../words.ts';
import { axesShapes, type Figure, frameOf, powerTicks, px, type Shape } from './figure.ts';

const { ladder: label } = words.gas;
const CURVES_HEIGHT = 190;
const RUNG_PX = 15;
const HEAD_PX = 22;
const FOOT_PX = 8;
/** Axis of density, log10 cm^-3. */
const LOW = 0;
const HIGH = 20;
/** Curves that rise beyond are drawn up to here. */
const HIGHEST_LEFT = 2;
const AIR_ABOVE = 0.08;

/**
 * The ladder: above, what is left of each level's light against density; below, a rung a line by rising critical density: whole up to where half is left, broken up to a tenth,
 * a dot at the critical density.
 *
 * @param log density of the slider, log10 cm^-3; absent = no mark
 */
export function ladderFigure(ladder: DensityLadder, width: number, log: number | undefined): Figure {
  const drawn = ladder.rungs.filter((rung) => rung.survival !== undefined);
  const height = CURVES_HEIGHT + HEAD_PX + drawn.length * RUNG_PX + FOOT_PX;
  const x = { low: LOW, high: HIGH, title: label.density, ticks: powerTicks(LOW, HIGH, width < 380 ? 4 : 2) };
  const shown = curves(drawn, ladder.logNe);
  const y = {
    low: 0,
    high: AIR_ABOVE + Math.min(HIGHEST_LEFT, Math.max(1, ...shown.flat().filter(Number.isFinite))),
    title: label.left,
    ticks: [
      [0, '0'],
      [0.5, '0.5'],
      [1, '1'],
    ] as const,
  };
  const frame = frameOf(width, CURVES_HEIGHT, x, y);
  const gases = ladder.gases.map(({ densityCm3 }) => place(frame.x, Math.log10(densityCm3)));
  const shapes: Shape[] = [
    ...axesShapes(frame, x, y),
    ...gases.map((at): Shape => ({ draw: 'path', d: `M${px(at)} ${frame.y.to}V${height}`, ink: 'faint', dash: '1 3' })),
    ...shown.map((curve): Shape => ({ draw: 'path', d: svgPath(ladder.logNe, curve, frame.x, frame.y), ink: 'fit', width: 1 })),
    ...drawn.flatMap((rung, k) => rungShapes(rung, CURVES_HEIGHT + HEAD_PX + k * RUNG_PX, (value) => place(frame.x, value), frame.x.from)),
    { draw: 'text', x: 4, y: CURVES_HEIGHT + HEAD_PX / 2, text: label.rungs },
  ];
  if (log !== undefined) {
    const at = place(frame.x, log);
    shapes.push({ draw: 'path', d: `M${px(at)} ${frame.y.to}V${height}`, ink: 'accent', width: 1.5 });
  }
  return { width, height, title: label.describe(drawn.length), shapes };
}

/** Each curve once (lines of one upper level share theirs), NaN outside the frame. */
function curves(rungs: readonly Rung[], logNe: readonly number[]): number[][] {
  const seen = new Map<string, number[]>();
  for (const { ion, nCrit, survival } of rungs)
    if (survival)
      seen.set(
        `${ion} ${nCrit}`,
        Array.from(survival, (value, k) => (logNe[k] < LOW || value > HIGHEST_LEFT ? Number.NaN : value)),
      );
  return [...seen.values()];
}

function rungShapes({ label: text, nCrit, halfAt, tenthAt }: Rung, y: number, at: (log: number) => number, from: number): Shape[] {
  const clipped = (density: number) => at(Math.min(Math.max(Math.log10(density), LOW), HIGH));
  const half = clipped(halfAt ?? 10 ** HIGH);
  const tenth = clipped(tenthAt ?? 10 ** HIGH);
  return [
    { draw: 'path', d: `M${from} ${y}H${px(half)}`, ink: 'ink', width: 2 },
    { draw: 'path', d: `M${px(half)} ${y}H${px(tenth)}`, ink: 'ink', width: 2, dash: '2 2' },
    ...(nCrit === undefined ? [] : [{ draw: 'dot', x: clipped(nCrit), y, r: 3, ink: 'ink', filled: false } as const]),
    { draw: 'text', x: tenth + 6, y: y + 4, text, ink: 'ink' },
  ];
}
