import type { Drawn } from './drawGas.ts';
import { boundedEstimate, type Estimate, estimateOf } from './estimate.ts';
import type { DiagnosticResult, ZoneQuantity, ZoneResult } from './gas.ts';
import type { MeasuredRatio } from './measuredRatios.ts';
import { NE_RANGE, TE_RANGE } from './populationGrid.ts';
import type { LnRatio, ZoneSettings, ZonesSolved } from './solveZones.ts';
import { nearestZones, ZONES, type Zone } from './zones.ts';

/** Each diagnostic with its value or limit. */
export function diagnosticResults(
  ratios: readonly MeasuredRatio[],
  ln: readonly LnRatio[],
  { zones, solutions, members }: ZonesSolved,
  drawn: Drawn,
  numbers: (indices: readonly number[]) => number[],
): DiagnosticResult[] {
  return ratios.map((ratio, k) => {
    const { diagnostic, zone, over, under } = ratio;
    const range = diagnostic.tells === 'density' ? NE_RANGE : TE_RANGE;
    const solution = solutions[k];
    const value = solution.ended === 'value' ? solution.x : undefined;
    const beyond = solution.ended === 'value' ? undefined : solution.ended;
    const ratioValue = Math.exp(ln[k].value);
    const at =
      diagnostic.tells === 'density' ? `Te = ${Math.round(zones[zone].te)} K` : `ne = ${Number(zones[zone].ne.toPrecision(2))} cm⁻³`;
    return {
      label: diagnostic.label,
      ion: diagnostic.ion,
      zone,
      tells: diagnostic.tells,
      features: numbers([...over, ...under]),
      ratio: { value: ratioValue, err: ratioValue * ln[k].err },
      result: boundedEstimate(value, beyond, drawn.diagnostics[k], range),
      counts: members[diagnostic.tells][zone].includes(k),
      assumption: `${diagnostic.ion} level populations at ${at} of its zone, one gas.${diagnostic.caution ? ` ${diagnostic.caution}` : ''}`,
    };
  });
}

/**
 * Temperature and density of every zone, with where they are from. Where the diagnostics of a zone disagree by more than their errors, the error of the mean grows accordingly
 * (the practice of the Particle Data Group's averages).
 */
export function zoneResults(ratios: readonly MeasuredRatio[], solved: ZonesSolved, drawn: Drawn, settings: ZoneSettings): ZoneResult[] {
  const { members } = solved;
  const quantity = (zone: Zone, tells: 'temperature' | 'density'): ZoneQuantity => {
    const name = tells === 'temperature' ? 'te' : 'ne';
    const value = solved.zones[zone][name];
    const given = settings[name];
    if (given !== undefined) return { estimate: estimateOf(given, []), from: 'given' };
    const source = nearestZones(zone).find((each) => members[tells][each].length > 0);
    if (source === undefined) return unmeasured(ratios, drawn, tells, value);
    const range = tells === 'density' ? NE_RANGE : TE_RANGE;
    const estimate = widened(boundedEstimate(value, undefined, drawn[name][zone], range), disagreement(solved, source, tells));
    const labels = members[tells][source].map((k) => ratios[k].diagnostic.label);
    return { estimate, from: source === zone ? labels.join(', ') : `taken from the ${source} zone` };
  };
  return ZONES.map((zone) => ({ zone, te: quantity(zone, 'temperature'), ne: quantity(zone, 'density') }));
}

/** How much more than their errors allow the diagnostics of a zone disagree: sqrt(chi2/dof) of their mean in the logarithm, at least 1. */
function disagreement({ solutions, weights, zones, members }: ZonesSolved, zone: Zone, tells: 'temperature' | 'density'): number {
  const mean = Math.log(zones[zone][tells === 'temperature' ? 'te' : 'ne']);
  const solved = members[tells][zone].flatMap((k) => {
    const solution = solutions[k];
    return solution.ended === 'value' ? [weights[k] * (Math.log(solution.x) - mean) ** 2] : [];
  });
  const chi2 = solved.reduce((sum, part) => sum + part, 0);
  return solved.length > 1 ? Math.max(1, Math.sqrt(chi2 / (solved.length - 1))) : 1;
}

/** An interval made wider about its value by a factor, in the logarithm. */
function widened(estimate: Estimate, factor: number): Estimate {
  if (estimate.ended !== 'value' || factor === 1) return estimate;
  const { value, low, high } = estimate;
  return { ended: 'value', value, low: value * (low / value) ** factor, high: value * (high / value) ** factor };
}

/** Nothing solved: a limit where a ratio was measured at its flat end, else what was assumed. */
function unmeasured(ratios: readonly MeasuredRatio[], drawn: Drawn, tells: 'temperature' | 'density', value: number): ZoneQuantity {
  const range = tells === 'density' ? NE_RANGE : TE_RANGE;
  const limits = ratios.flatMap((ratio, k): { estimate: Estimate; label: string }[] => {
    if (ratio.diagnostic.tells !== tells) return [];
    const estimate = boundedEstimate(undefined, 'below', drawn.diagnostics[k], range);
    return estimate.ended === 'below' ? [{ estimate, label: ratio.diagnostic.label }] : [];
  });
  const [best] = limits.toSorted((a, b) => limitOf(a.estimate) - limitOf(b.estimate));
  return best ? { estimate: best.estimate, from: best.label } : { estimate: estimateOf(value, []), from: 'assumed: no ratio tells it' };
}

const limitOf = (estimate: Estimate) => (estimate.ended === 'below' ? estimate.limit : Number.POSITIVE_INFINITY);
