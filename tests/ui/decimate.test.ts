import { describe, expect, it } from 'vitest';
import { decimate } from '../../src/ui/plot/decimate.ts';

const grid = (n: number) => Float64Array.from({ length: n }, (_, i) => 4000 + i * 0.01);

describe('decimation', () => {
  it('keeps every extremum: the least and greatest sample of each pixel column are drawn', () => {
    const x = grid(100_000);
    const y = x.map((_, i) => Math.sin(i / 50) + ((i * 7919) % 101) / 500);
    y[54_321] = 99;
    y[12_345] = -99;
    const step = 1;
    const drawn = decimate(x, y, 4000, 5000, step);
    for (let column = 4001; column < 4999; column++) {
      const inside = [...y.keys()].filter((i) => x[i] >= column && x[i] < column + step).map((i) => y[i]);
      const shown = drawn.y.filter((_, k) => drawn.x[k] >= column && drawn.x[k] < column + step);
      expect(Math.max(...shown)).toBe(Math.max(...inside));
      expect(Math.min(...shown)).toBe(Math.min(...inside));
      if (column > 4010) column += 20;
    }
    expect(drawn.y).toContain(99);
    expect(drawn.y).toContain(-99);
  });

  it('draws at most two points a column, in ascending wavelength', () => {
    const x = grid(200_000);
    const y = x.map((_, i) => Math.cos(i));
    const drawn = decimate(x, y, 4000, 6000, 2);
    expect(drawn.x.length).toBeLessThanOrEqual(2 * 1002);
    for (let k = 1; k < drawn.x.length; k++) expect(drawn.x[k]).toBeGreaterThanOrEqual(drawn.x[k - 1]);
  });

  it('leaves sparse samples as they are, with one sample beyond each end so that the line runs out of the picture', () => {
    const x = Float64Array.from([1, 2, 3, 4, 5, 6]);
    const y = Float64Array.from([0, 1, 0, 1, 0, 1]);
    expect(decimate(x, y, 2.5, 4.5, 0.01)).toEqual({ x: [2, 3, 4, 5], y: [1, 0, 1, 0] });
  });

  it('ends where the edge of a column is rounded onto a sample', () => {
    const at = 3651.3883333333333;
    const step = 3.688271043771044;
    expect((Math.floor(at / step) + 1) * step).toBeLessThanOrEqual(at);
    const x = Float64Array.from({ length: 400 }, (_, i) => at + i * 0.1);
    expect(
      decimate(
        x,
        x.map(() => 1),
        at,
        at + 40,
        step,
      ).y.length,
    ).toBeGreaterThan(0);
  });

  it('breaks the line where samples are masked', () => {
    const x = grid(10_000);
    const y = x.map((_, i) => (i > 4000 && i < 6000 ? Number.NaN : 1));
    const drawn = decimate(x, y, 4000, 4100, 1);
    expect(drawn.y.some(Number.isNaN)).toBe(true);
    expect(drawn.x.filter((at, k) => at > 4040.5 && at < 4059.5 && !Number.isNaN(drawn.y[k]))).toEqual([]);
  });
});
