import { expect, test } from 'vitest';
import { draggedRedshift } from '../../src/ui/desk/ruler.ts';
import { airFromVacuum, redshiftFromVelocity } from '../../src/units/index.ts';

test('dragging the rest wavelength of a line onto the line gives its redshift', () => {
  // [O III] 5008.240 in vacuum stands at 5008.240; its line is seen at z = 0.1
  expect(draggedRedshift(0, 5008.24, 5008.24 * 1.1, 'vacuum', 'observed')).toBeCloseTo(0.1, 12);
  const seen = airFromVacuum(5008.24 * 1.0001);
  expect(draggedRedshift(0, airFromVacuum(5008.24), seen, 'air', 'observed')).toBeCloseTo(0.0001, 9);
});

test('over a rest spectrum the ruler moves the other way, and no drag leaves what is searched', () => {
  expect(draggedRedshift(0.1, 5000, 5000 / 1.1, 'vacuum', 'rest')).toBeCloseTo(0.21, 9);
  expect(draggedRedshift(0, 1000, 9000, 'vacuum', 'observed')).toBeLessThanOrEqual(10);
  expect(draggedRedshift(0, 9000, 1000, 'vacuum', 'observed')).toBeGreaterThanOrEqual(redshiftFromVelocity(-30_000));
});
