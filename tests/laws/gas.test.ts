import fc from 'fast-check';
import { expect, it } from 'vitest';
import { DEFAULT_GAS_SETTINGS, describeGas, type GasSettings, type NamedLine } from '../../src/plasma/index.ts';
import { gasCsv } from '../../src/report/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from '../plasma/simulatedGas.ts';

const all = simulatedGas(SOME_GAS);
const gasOf = (lines: readonly NamedLine[], settings: GasSettings = DEFAULT_GAS_SETTINGS) =>
  describeGas(lines, { data: bundled, settings, startTe: 10_000, startNe: 1_000, draws: 40 });

/** Some of the lines, each with a flux that may be anything a measurement can give. */
const someLines = fc
  .array(
    fc.record({
      pick: fc.nat(all.length - 1),
      factor: fc.oneof(fc.constant(1), fc.double({ min: 1e-6, max: 1e6, noNaN: true })),
      relativeErr: fc.oneof(fc.constant(Number.NaN), fc.constant(0), fc.double({ min: 1e-6, max: 5, noNaN: true })),
      isDoubtful: fc.boolean(),
    }),
    { maxLength: 40 },
  )
  .map((picks) =>
    picks.map(({ pick, factor, relativeErr, isDoubtful }, k): NamedLine => {
      const flux = all[pick].flux * factor;
      return { ...all[pick], feature: k + 1, flux, fluxErr: relativeErr * flux, ...(isDoubtful ? { doubt: 'doubted' } : {}) };
    }),
  );
const someSettings = fc.record({
  curve: fc.constantFrom('ccm89' as const, 'ccm89-odonnell94' as const, 'fitzpatrick99' as const),
  rV: fc.double({ min: 2, max: 6, noNaN: true }),
  stellarEwA: fc.oneof(fc.constant('fitted' as const), fc.double({ min: 0, max: 5, noNaN: true })),
  leastProbability: fc.constant(0.9),
  calibrationErr: fc.double({ min: 0, max: 0.3, noNaN: true }),
});

it('whatever was measured, every number told is a number inside its own interval, and the CSV can be written', () => {
  fc.assert(
    fc.property(someLines, someSettings, (lines, settings) => {
      const gas = gasOf(lines, settings);
      for (const estimate of [
        ...gas.diagnostics.map(({ result }) => result),
        ...gas.zones.flatMap(({ te, ne }) => [te.estimate, ne.estimate]),
      ]) {
        if (estimate.ended === 'value') {
          expect(estimate.low).toBeLessThanOrEqual(estimate.value);
          expect(estimate.high).toBeGreaterThanOrEqual(estimate.value);
          expect(estimate.low).toBeGreaterThan(0);
        } else if (estimate.ended !== 'none') expect(estimate.limit).toBeGreaterThan(0);
      }
      for (const { value, err } of gas.intensities ?? []) {
        expect(value).toBeGreaterThanOrEqual(0);
        expect(err).toBeGreaterThanOrEqual(0);
      }
      for (const { abundance } of gas.abundances) expect(abundance).toBeGreaterThanOrEqual(0);
      expect(gasCsv(gas)).not.toMatch(/NaN|undefined|Infinity/);
    }),
    { numRuns: 150, seed: 7 },
  );
});

it('the order of the lines and the unit of the flux do not matter', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-18, max: 1e6, noNaN: true }), (unit) => {
      const scaled = all.map((line) => ({ ...line, flux: unit * line.flux, fluxErr: unit * line.fluxErr }));
      const [here, there] = [gasOf(all), gasOf(scaled.toReversed())];
      expect((there.reddening.cHbeta?.value ?? 0) / (here.reddening.cHbeta?.value ?? 1)).toBeCloseTo(1, 4);
      here.diagnostics.forEach(({ label, ratio }) => {
        expect((there.diagnostics.find((each) => each.label === label)?.ratio.value ?? 0) / ratio.value, label).toBeCloseTo(1, 4);
      });
    }),
    { numRuns: 10, seed: 7 },
  );
});
