import type { DensityLadder, Rung } from '../../plasma/index.ts';

/** Survival of a line at a density between the nodes of its curve, straight in the logarithms; undefined without a curve. */
export function survivalLeft({ logNe }: Pick<DensityLadder, 'logNe'>, rung: Pick<Rung, 'survival'>, log: number): number | undefined {
  const curve = rung.survival;
  if (!curve) return undefined;
  const at = Math.min(Math.max((log - logNe[0]) / (logNe[1] - logNe[0]), 0), logNe.length - 1);
  const cell = Math.min(Math.floor(at), logNe.length - 2);
  return Math.exp(Math.log(curve[cell]) + (at - cell) * (Math.log(curve[cell + 1]) - Math.log(curve[cell])));
}
