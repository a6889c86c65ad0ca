import { describe, expect, it } from 'vitest';
import { DEFAULT_GAS_SETTINGS, describeGas } from '../../src/plasma/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from './simulatedGas.ts';

const lines = simulatedGas({ ...SOME_GAS, cHbeta: 0, noise: 0, floor: 1e-4 });
const h11 = lines.find((line) => line.lines[0] === bundled.hydrogenicLine('H I', 2, 11))?.flux ?? 0;
/** Liu et al. 2001 turned round: the jump that belongs to a temperature, without helium. */
const jumpAt = (te: number) => h11 * (te / 368) ** (-1 / 1.5);
const gasOf = (levels: (from: number, to: number) => readonly number[] | undefined) =>
  describeGas(lines, {
    data: bundled,
    settings: { ...DEFAULT_GAS_SETTINGS, cHbeta: 0 },
    startTe: 1e4,
    startNe: 1e3,
    continuum: { levels, z: 0 },
  });
/** Samples of a continuum with a step at the limit of the Balmer series, a little scatter on them. */
const stepped = (step: number) => (from: number) =>
  from > 4000 ? undefined : Array.from({ length: 40 }, (_, k) => 2 + (from < 3650 ? step : 0) + 0.002 * Math.sin(9 * k));

describe('the Balmer jump', () => {
  it('tells the temperature it was made with', () => {
    const { jumps } = gasOf(stepped(jumpAt(9_000)));
    expect(jumps).toHaveLength(1);
    const { result } = jumps[0];
    if (result.ended !== 'value') throw new Error('no value');
    expect(Math.abs(result.value / 9_000 - 1)).toBeLessThan(0.02);
    expect(result.high - result.low).toBeGreaterThan(0);
  });

  it('is not told where nothing stands out, nor where the spectrum ends before it', () => {
    expect(gasOf(stepped(0)).jumps).toEqual([]);
    expect(gasOf(() => undefined).jumps).toEqual([]);
  });

  it('a step that no ionised gas makes is named as such', () => {
    expect(gasOf(stepped(jumpAt(200_000))).jumps[0].result).toMatchObject({ ended: 'none', reason: expect.stringContaining('K') });
  });
});
