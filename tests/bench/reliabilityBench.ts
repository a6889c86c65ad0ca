import { writeFileSync } from 'node:fs';
import { bundled } from '../atomic/bundledData.ts';
import { asideNebula, binsOf, claimsFor, usualNebula } from '../identify/reliability.ts';
import { reliabilityFigure } from './reliabilityFigure.ts';

const SPECTRA = 400;
const POPULATED = 100;

/** What names of simulated nebulae claim against what is right, in more nebulae than the test takes; draws tests/identify/reliability.svg anew. */
export function reliabilityBench(): string[] {
  const usual = claimsFor(bundled, usualNebula, 3001, 3000 + SPECTRA);
  const aside = claimsFor(bundled, asideNebula, 1001, 1000 + SPECTRA / 2);
  writeFileSync(new URL('../identify/reliability.svg', import.meta.url), reliabilityFigure(usual, aside));
  return (
    [
      ['usual ranges', usual],
      ['kept aside', aside],
    ] as const
  ).flatMap(([title, { claims, spectra, missedRedshifts }]) => {
    const right = claims.filter((c) => c.right).length / claims.length;
    const bins = binsOf(claims).filter(({ count }) => count >= POPULATED);
    return [
      `${title}: ${spectra} spectra, ${claims.length} names, ${(100 * right).toFixed(1)} % right, ${missedRedshifts.length} redshifts missed`,
      `claimed:right (names) ${bins.map((b) => `${b.claimed.toFixed(2)}:${b.right.toFixed(2)} (${b.count})`).join('  ')}`,
    ];
  });
}
