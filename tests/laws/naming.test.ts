import fc from 'fast-check';
import { expect, test } from 'vitest';
import { DEFAULT_NAMING_SETTINGS, nameMarks } from '../../src/identify/index.ts';
import { bundled as data } from '../atomic/bundledData.ts';
import { simulateNebula } from '../identify/simulatedNebula.ts';

const nebulae = fc.record({
  seed: fc.integer({ min: 1, max: 1_000_000 }),
  kind: fc.constantFrom('low' as const, 'high' as const, 'shocked' as const),
  count: fc.integer({ min: 25, max: 60 }),
  resolvingPower: fc.constantFrom(2000, 8000, 20_000),
  z: fc.constantFrom(0, 1e-4, 0.08),
});
const marksOf = (what: { seed: number; kind: 'low' | 'high' | 'shocked'; count: number; resolvingPower: number; z: number }) =>
  simulateNebula(data, { ...what, low: 3600, high: 9500, strangers: 0.05 });
const leading = (naming: ReturnType<typeof nameMarks>) => naming.features.map((f) => f.candidates[0]?.lines.join('+') ?? '');
const RUNS = { numRuns: 15, seed: 20_261_201 };

test('the unit of flux does not matter', () => {
  fc.assert(
    fc.property(nebulae, fc.integer({ min: -18, max: 6 }), (what, power) => {
      const marks = marksOf(what);
      const scaled = marks.map((m) => ({ ...m, flux: m.flux * 10 ** power, fluxErr: m.fluxErr * 10 ** power }));
      const name = (list: typeof marks) => nameMarks(list, data, DEFAULT_NAMING_SETTINGS, []);
      expect(leading(name(scaled))).toEqual(leading(name(marks)));
    }),
    RUNS,
  );
});

test('every case is a distribution, and its best candidate sums up its own evidence', () => {
  fc.assert(
    fc.property(nebulae, (what) => {
      for (const { candidates, noneProbability } of nameMarks(marksOf(what), data, DEFAULT_NAMING_SETTINGS, []).features) {
        const sum = candidates.reduce((s, c) => s + c.probability, noneProbability);
        expect(sum).toBeGreaterThan(0.99);
        expect(sum).toBeLessThan(1 + 1e-9);
        for (const candidate of candidates) {
          expect(candidate.shares.reduce((a, b) => a + b, 0)).toBeCloseTo(1, 9);
          const nats = candidate.evidence.reduce((s, e) => s + e.nats, 0);
          if (noneProbability > 1e-12 && candidate.probability > 1e-12)
            expect(nats).toBeCloseTo(Math.log(candidate.probability / noneProbability), 6);
        }
      }
    }),
    RUNS,
  );
});

test('the same marks are named the same twice', () => {
  fc.assert(
    fc.property(nebulae, (what) => {
      const marks = marksOf(what);
      expect(nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, [])).toEqual(nameMarks(marks, data, DEFAULT_NAMING_SETTINGS, []));
    }),
    { ...RUNS, numRuns: 4 },
  );
});
