import { describe, expect, test } from 'vitest';
import { levenbergMarquardt, type NormalEquations } from '../../src/numeric/index.ts';
import { hasShared, sharedText } from './shared.ts';

// NIST Statistical Reference Datasets, nonlinear regression: Gauss1, Gauss2, Gauss3 (National Institute of Standards and Technology, public domain).
// Two Gaussians on a decaying exponential: b1 exp(-b2 x) + b3 exp(-(x-b4)^2/b5^2) + b6 exp(-(x-b7)^2/b8^2), with certified parameters and standard deviations.

interface Certified {
  readonly starts: readonly [number[], number[]];
  readonly parameters: number[];
  readonly deviations: number[];
  readonly x: number[];
  readonly y: number[];
}

function read(name: string): Certified {
  const lines = sharedText(`nist-strd/${name}.dat`).split(/\r?\n/);
  const rows = lines.filter((l) => /^\s*b\d\s*=/.test(l)).map((l) => l.split('=')[1].trim().split(/\s+/).map(Number));
  const from = lines.map((l) => /^Data:\s+y\s+x/.test(l)).lastIndexOf(true) + 1;
  const data = lines
    .slice(from)
    .filter((l) => l.trim() !== '')
    .map((l) => l.trim().split(/\s+/).map(Number));
  const column = (k: number) => rows.map((r) => r[k]);
  return {
    starts: [column(0), column(1)],
    parameters: column(2),
    deviations: column(3),
    y: data.map((d) => d[0]),
    x: data.map((d) => d[1]),
  };
}

function equations({ x, y }: Certified): NormalEquations {
  let at = new Float64Array(8);
  const each = (p: Float64Array, use: (residual: number, row: number[]) => void) => {
    for (let i = 0; i < x.length; i++) {
      const decay = Math.exp(-p[1] * x[i]);
      const u = (x[i] - p[3]) / p[4];
      const v = (x[i] - p[6]) / p[7];
      const g = Math.exp(-u * u);
      const h = Math.exp(-v * v);
      const model = p[0] * decay + p[2] * g + p[5] * h;
      use(y[i] - model, [
        decay,
        -x[i] * p[0] * decay,
        g,
        (2 * p[2] * g * u) / p[4],
        (2 * p[2] * g * u * u) / p[4],
        h,
        (2 * p[5] * h * v) / p[7],
        (2 * p[5] * h * v * v) / p[7],
      ]);
    }
  };
  return {
    size: 8,
    evaluate(p) {
      at = p.slice();
      let chi2 = 0;
      each(p, (residual) => {
        chi2 += residual * residual;
      });
      return chi2;
    },
    accumulate(jtj, jtr) {
      each(at, (residual, row) => {
        for (let a = 0; a < 8; a++) {
          jtr[a] += row[a] * residual;
          for (let b = 0; b < 8; b++) jtj[a * 8 + b] += row[a] * row[b];
        }
      });
    },
  };
}

/** Digits that agree: -log10 of the relative difference, at most 11 as certified. */
const digits = (value: number, certified: number) => Math.min(11, -Math.log10(Math.abs(value / certified - 1) + 1e-16));

describe.skipIf(!hasShared('nist-strd/Gauss1.dat'))('certified fits (skipped: needs the NIST files below SHARED)', () => {
  test.each(['Gauss1', 'Gauss2', 'Gauss3'].flatMap((name) => [[name, 0] as const, [name, 1] as const]))(
    '%s from start %i: at least 6 digits in parameters, 4 in standard deviations',
    (name, start) => {
      const certified = read(name);
      const p = Float64Array.from(certified.starts[start]);
      const end = levenbergMarquardt(equations(certified), p, { maxSteps: 200 });
      if (end.ended !== 'converged') throw new Error(`ended ${end.ended}`);
      const s2 = end.chi2 / (certified.x.length - 8);
      const parameterDigits = certified.parameters.map((b, k) => digits(p[k], b));
      const deviationDigits = certified.deviations.map((s, k) => digits(Math.sqrt(end.covariance[k * 8 + k] * s2), s));
      expect(Math.min(...parameterDigits)).toBeGreaterThanOrEqual(6);
      expect(Math.min(...deviationDigits)).toBeGreaterThanOrEqual(4);
    },
  );
});
