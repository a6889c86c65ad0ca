import { expect, it } from 'vitest';
import { axisTicks, otherAxis, placeOf, shownWavelength, type WaveAxis } from '../../src/ui/plot/waveAxis.ts';

const axis = (rest: Partial<WaveAxis>): WaveAxis => ({ medium: 'air', shownMedium: 'air', frame: 'observed', z: 0.1, ...rest });

it('wavelengths of a file in air are shown as they are, or in vacuum', () => {
  expect(shownWavelength(axis({}), 5006.84)).toBe(5006.84);
  // Ciddor 1996: 5006.843 A in air is 5008.240 A in vacuum
  expect(shownWavelength(axis({ shownMedium: 'vacuum' }), 5006.843)).toBeCloseTo(5008.24, 2);
});

it('the rest frame divides vacuum wavelengths: [O III] 5007 seen at z = 0.1 is shown at its laboratory wavelength in air', () => {
  const observedAir = placeOf(axis({ shownMedium: 'vacuum' }), 5008.24 * 1.1);
  expect(shownWavelength(axis({ frame: 'rest' }), observedAir)).toBeCloseTo(5006.843, 2);
  // dividing the air wavelength itself would be wrong by more than the centroid of a good line
  expect(Math.abs(observedAir / 1.1 - 5006.843)).toBeGreaterThan(0.005);
});

it('every kind of axis leads back to the place it came from', () => {
  for (const medium of ['air', 'vacuum'] as const)
    for (const shownMedium of ['air', 'vacuum'] as const)
      for (const frame of ['observed', 'rest'] as const)
        for (const place of [2300, 4861.33, 9000, 22_000]) {
          const one = axis({ medium, shownMedium, frame, z: 0.03 });
          expect(placeOf(one, shownWavelength(one, place))).toBeCloseTo(place, 6);
          expect(otherAxis(one).frame).not.toBe(frame);
        }
});

it('ticks are round where they are read and stand where they belong', () => {
  const rest = axis({ frame: 'rest' });
  const { at, text } = axisTicks(rest, 5000, 6000, 5);
  expect(text.length).toBeGreaterThan(2);
  text.forEach((tick, k) => {
    expect(Number(tick) % 50).toBe(0);
    expect(shownWavelength(rest, at[k])).toBeCloseTo(Number(tick), 6);
    expect(at[k]).toBeGreaterThanOrEqual(5000);
    expect(at[k]).toBeLessThanOrEqual(6000);
  });
});
