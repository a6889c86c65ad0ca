import { FWHM_PER_SIGMA } from '../units/index.ts';
import { fitGroup, type GroupFit } from './fitGroup.ts';
import type { Component, FitSamples, WidthPrior } from './fitSamples.ts';
import { isPlateau } from './plateau.ts';

/** A row of so many lines, each this near to the next in usual FWHM, may be a fence under one broad line. */
const FEWEST_LINES = 4;
const NEIGHBOUR_FWHM = 1.6;
/** A broad line is wider than usual ones by this. */
const BROAD_TIMES = 1.5;
/** A broad line pays for its free width and for being unusual as much as this many usual ones. */
const PRICE_LINES = 2;

/**
 * The fit with a fence of narrow lines exchanged for one broad line, with or without a narrow one on top of it, where that explains the samples better for
 * its price (Schwarz 1978): winds and shells of several hundred km/s, the broad lines of active galaxies.
 *
 * @param price of one component in chi2
 */
export function withBroadLine(samples: FitSamples, fit: GroupFit, width: WidthPrior, price: number): GroupFit {
  const row = longestRow(fit.components, width);
  if (row.length < FEWEST_LINES) return fit;
  const others = fit.components.filter((c) => !row.includes(c));
  const strongest = row.reduce((a, b) => (Math.abs(b.flux) > Math.abs(a.flux) ? b : a));
  const trials = [
    [broadOf(row)],
    [
      ...row.filter((c) => c === strongest).map((c) => ({ ...c, sigma: width.sigmaAt(c.centre) })),
      broadOf(row.filter((c) => c !== strongest)),
    ],
  ];
  const cost = (f: GroupFit) => f.end.chi2 + price * f.components.reduce((sum, c) => sum + (c.isBroad ? PRICE_LINES : 1), 0);
  let best = fit;
  for (const starts of trials) {
    const trial = fitGroup(
      samples,
      fit.first,
      fit.last,
      [...others, ...starts].sort((a, b) => a.centre - b.centre),
      width,
    );
    const stays = trial.components.every((c) => !c.isBroad || c.sigma > BROAD_TIMES * width.sigmaAt(c.centre));
    if (trial.end.ended === 'converged' && stays && cost(trial) < cost(best)) best = trial;
  }
  // a step up and down of the continuum looks like a broad line, too
  return best !== fit && isPlateau(samples, fit, row, width) ? fit : best;
}

/** The longest run of emission lines each near the next. */
function longestRow(components: readonly Component[], width: WidthPrior): Component[] {
  let longest: Component[] = [];
  let row: Component[] = [];
  for (const line of [...components].sort((a, b) => a.centre - b.centre)) {
    const last = row.at(-1);
    const reach = NEIGHBOUR_FWHM * FWHM_PER_SIGMA * width.sigmaAt(line.centre);
    if (line.isBroad || line.flux <= 0) continue;
    row = last && line.centre - last.centre < reach ? [...row, line] : [line];
    if (row.length > longest.length) longest = row;
  }
  return longest;
}

/** One line with the flux, the centre and the width of all. */
function broadOf(lines: readonly Component[]): Component {
  const flux = lines.reduce((sum, c) => sum + c.flux, 0);
  const centre = lines.reduce((sum, c) => sum + c.flux * c.centre, 0) / flux;
  const variance = lines.reduce((sum, c) => sum + c.flux * (c.sigma ** 2 + (c.centre - centre) ** 2), 0) / flux;
  return { flux, centre, sigma: Math.sqrt(variance), isBroad: true };
}
