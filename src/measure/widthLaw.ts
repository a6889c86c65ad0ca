import { quantile, robustSigma } from '../numeric/index.ts';
import type { WidthLaw } from './feature.ts';
import { constantResolvingPower, fwhmAt } from './lineSpread.ts';

/** An isolated line: where, how wide, Angstrom, and the relative error of the width. */
export interface TellingLine {
  readonly centre: number;
  readonly fwhm: number;
  readonly relativeErr: number;
}

const FEWEST_LINES = 3;
/** Another law than a constant resolving power needs so many lines, spread over a range of wavelengths with this ratio of ends ... */
const FEWEST_TO_CHOOSE = 10;
const RANGE_TO_CHOOSE = 1.25;
/** ... and this much better a fit, beyond what its parameters cost (Schwarz 1978). */
const CLEARLY_BETTER = 20;
const LEAST_SPREAD = 0.015;
const MOST_SPREAD = 0.4;
/** The scatter that a few dozen lines show is a little less than that of all. */
const SPREAD_MARGIN = 1.2;

/** The law that the widths of isolated lines follow, and how far they scatter about it (one sigma of ln width); undefined when fewer than three lines tell. */
export function widthLawOf(lines: readonly TellingLine[]): { law: WidthLaw; spread: number } | undefined {
  if (lines.length < FEWEST_LINES) return undefined;
  const at = quantile(
    lines.map((l) => l.centre),
    0.5,
  );
  const power = Math.exp(
    quantile(
      lines.map((l) => Math.log(l.centre / l.fwhm)),
      0.5,
    ),
  );
  const constant = constantResolvingPower(power, at);
  const law = mayChoose(lines) ? bestOf(lines, [constant, constantWidth(lines, at), straight(lines, at)]) : constant;
  const measuredErr = quantile(
    lines.map((l) => l.relativeErr),
    0.5,
  );
  const scatter = Math.sqrt(Math.max(0, robustSigma(offLaw(lines, law)) ** 2 - measuredErr ** 2));
  return { law, spread: Math.min(MOST_SPREAD, Math.max(LEAST_SPREAD, SPREAD_MARGIN * scatter)) };
}

function mayChoose(lines: readonly TellingLine[]): boolean {
  const centres = lines.map((l) => l.centre);
  return lines.length >= FEWEST_TO_CHOOSE && quantile(centres, 0.9) / quantile(centres, 0.1) > RANGE_TO_CHOOSE;
}

const offLaw = (lines: readonly TellingLine[], law: WidthLaw) => lines.map((l) => Math.log(l.fwhm / fwhmAt(law, l.centre)));

const constantWidth = (lines: readonly TellingLine[], at: number): WidthLaw => ({
  form: 'constant-width',
  at,
  fwhmA: quantile(
    lines.map((l) => l.fwhm),
    0.5,
  ),
  slope: 0,
});

/** Median of the slopes of all pairs (Theil 1950, Sen 1968), then the median of what is left. */
function straight(lines: readonly TellingLine[], at: number): WidthLaw {
  const slopes: number[] = [];
  for (let i = 0; i < lines.length; i++)
    for (let j = 0; j < i; j++)
      if (lines[i].centre !== lines[j].centre) slopes.push((lines[i].fwhm - lines[j].fwhm) / (lines[i].centre - lines[j].centre));
  const slope = quantile(slopes, 0.5);
  return {
    form: 'linear',
    at,
    slope,
    fwhmA: quantile(
      lines.map((l) => l.fwhm - slope * (l.centre - at)),
      0.5,
    ),
  };
}

/** The first law, unless another one explains the widths clearly better: least absolute deviations, so that a few broad lines decide nothing. */
function bestOf(lines: readonly TellingLine[], [usual, ...others]: readonly WidthLaw[]): WidthLaw {
  const n = lines.length;
  const floor = quantile(
    lines.map((l) => l.relativeErr),
    0.5,
  );
  const price = (law: WidthLaw) => (law.form === 'linear' ? 2 : 1) * Math.log(n);
  const badness = (law: WidthLaw) => {
    const off = offLaw(lines, law).reduce((sum, v) => sum + Math.abs(v), 0) / n;
    return 2 * n * Math.log(Math.max(off, 0.3 * floor, 1e-4)) + price(law);
  };
  const best = others.reduce((a, b) => (badness(b) < badness(a) ? b : a));
  return badness(best) + CLEARLY_BETTER < badness(usual) ? best : usual;
}
