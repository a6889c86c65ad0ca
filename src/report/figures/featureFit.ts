import type { InlineText } from '../inline.ts';
import { COLUMN_WIDTHS_MM, type Figure, figureOf, pathOf, ptOf, roundTicks, stroke } from './figure.ts';
import { fixed, textAt } from './svgText.ts';

/** One feature and its surroundings; arrays are one value a sample of the stretch shown. */
export interface FeatureFitInput {
  readonly name: string;
  readonly title: InlineText;
  readonly wavelength: Float64Array;
  readonly flux: Float64Array;
  readonly noise: Float64Array;
  readonly masked: Uint8Array;
  readonly model: Float64Array;
  readonly continuum: Float64Array;
  /** Centres of all components in the stretch, with their names. */
  readonly components: readonly { readonly at: number; readonly text: InlineText }[];
  readonly medium: 'air' | 'vacuum';
  readonly fluxUnit: string;
}

const TEXT_PT = 7;
const LEFT_PT = 40;
const RIGHT_PT = 8;
const HEAD_PT = 18;
const BODY_PT = 130;
const RESIDUAL_PT = 36;
const GAP_PT = 5;
const FOOT_PT = 26;
const MOST_SIGMA = 5;

/** Data with their errors, fit, continuum and what is left over in sigma: one feature, one column of a journal wide. */
export function featureFitFigure(input: FeatureFitInput): Figure {
  const { wavelength, flux, noise, masked, model, continuum } = input;
  const n = wavelength.length;
  const widthPt = ptOf(COLUMN_WIDTHS_MM.single);
  const right = widthPt - RIGHT_PT;
  const bodyFoot = HEAD_PT + BODY_PT;
  const restFoot = bodyFoot + GAP_PT + RESIDUAL_PT;
  const x = (w: number) => LEFT_PT + ((w - wavelength[0]) / (wavelength[n - 1] - wavelength[0])) * (right - LEFT_PT);
  const seen = Array.from({ length: n }, (_, i) => i).filter((i) => !masked[i] && Number.isFinite(flux[i]));
  const values = seen.flatMap((i) => [flux[i], model[i], continuum[i]]);
  const [least, most] = [Math.min(...values), Math.max(...values)];
  const margin = 0.06 * (most - least || 1);
  const y = (f: number) => bodyFoot - ((f - least + margin) / (most - least + 2 * margin)) * BODY_PT;
  const middle = restFoot - RESIDUAL_PT / 2;
  const yLeft = (sigma: number) => middle - (Math.max(-MOST_SIGMA, Math.min(MOST_SIGMA, sigma)) / MOST_SIGMA) * (RESIDUAL_PT / 2 - 2);
  const box = (top: number, height: number) =>
    `<rect x="${LEFT_PT}" y="${fixed(top)}" width="${fixed(right - LEFT_PT)}" height="${height}" fill="none" stroke="#000" stroke-width="0.5"/>`;
  const all = (of: Float64Array) => pathOf(Array.from(of, (v, i) => [x(wavelength[i]), y(v)] as const));
  const parts = [
    box(HEAD_PT, BODY_PT),
    box(bodyFoot + GAP_PT, RESIDUAL_PT),
    stroke(all(continuum), 0.5, '#888', '1 1.5'),
    ...seen.map((i) => stroke(`M${fixed(x(wavelength[i]))} ${fixed(y(flux[i] - noise[i]))}V${fixed(y(flux[i] + noise[i]))}`, 0.3, '#999')),
    ...seen.map((i) => `<circle cx="${fixed(x(wavelength[i]))}" cy="${fixed(y(flux[i]))}" r="0.9"/>`),
    stroke(all(model), 0.8),
    stroke(`M${LEFT_PT} ${fixed(middle)}H${fixed(right)}`, 0.3, '#888'),
    ...seen.map((i) => `<circle cx="${fixed(x(wavelength[i]))}" cy="${fixed(yLeft((flux[i] - model[i]) / noise[i]))}" r="0.8"/>`),
    textAt(input.title, LEFT_PT, 10, TEXT_PT + 1),
    ...input.components.flatMap(({ at }) => [stroke(`M${fixed(x(at))} ${fixed(HEAD_PT)}v5`, 0.5)]),
  ];
  for (const tick of roundTicks(wavelength[0], wavelength[n - 1], 5))
    parts.push(stroke(`M${fixed(x(tick))} ${fixed(restFoot)}v-3`, 0.4), textAt(String(tick), x(tick), restFoot + 9, TEXT_PT, 'middle'));
  for (const tick of roundTicks(least, most, 4))
    parts.push(
      stroke(`M${LEFT_PT} ${fixed(y(tick))}h3`, 0.4),
      textAt(String(tick).replace('-', '−'), LEFT_PT - 3, y(tick) + 2.4, TEXT_PT, 'end'),
    );
  for (const sigma of [-3, 3]) parts.push(textAt(String(sigma).replace('-', '−'), LEFT_PT - 3, yLeft(sigma) + 2.4, TEXT_PT, 'end'));
  parts.push(textAt(`wavelength in ${input.medium} (Å)`, (LEFT_PT + right) / 2, restFoot + 20, TEXT_PT, 'middle'));
  parts.push(textAt(`flux${input.fluxUnit ? ` (${input.fluxUnit})` : ''}`, 9, HEAD_PT + BODY_PT / 2, TEXT_PT, 'middle', -90));
  parts.push(textAt('σ', 9, middle, TEXT_PT, 'middle', -90));
  return figureOf(input.name, `Fit of ${input.name}`, widthPt, restFoot + FOOT_PT, parts);
}
