import { expect, test } from 'vitest';
import { createEngine } from '../../src/engine/index.ts';
import { seededRandom } from '../../src/numeric/index.ts';
import { bytesSource } from '../../src/readers/index.ts';
import { EMPTY_DOCUMENT, type SessionDocument } from '../../src/session/index.ts';
import { bundled } from '../atomic/bundledData.ts';

/** Air wavelength and flux of lines of a nebula; [N II] 6548 stands on the foot of H alpha. */
const LINES = [
  [4340.46, 47],
  [4363.21, 6],
  [4861.33, 100],
  [4958.91, 170],
  [5006.84, 507],
  [5875.64, 14],
  [6548.05, 9.33],
  [6562.8, 900],
  [6583.45, 28],
  [6716.44, 12],
  [6730.82, 14],
] as const;
const FWHM_A = 11;

const spectrumText = () => {
  const random = seededRandom(7);
  const rows = Array.from({ length: 2000 }, (_, i) => {
    const w = 4200 + 1.4 * i;
    const sigma = FWHM_A / 2.3548;
    const flux = LINES.reduce(
      (sum, [at, total]) => sum + (total / (sigma * Math.sqrt(2 * Math.PI))) * Math.exp(-0.5 * ((w - at) / sigma) ** 2),
      5,
    );
    return `${w.toFixed(1)},${(flux + 0.12 * random.normal()).toFixed(5)},0.12`;
  });
  return `# air wavelengths in Angstrom\nwavelength,flux,flux_err\n${rows.join('\n')}\n`;
};

async function analysed(document: SessionDocument) {
  const engine = createEngine(bundled, () => 0);
  await engine.open(bytesSource('blend.csv', new TextEncoder().encode(spectrumText())), 'spectrum');
  const analysis = await engine.analyse(document.settings, document.verdicts);
  return { engine, analysis, near: (at: number) => analysis.features.filter((f) => Math.abs(f.centroid - at) < 4) };
}

test('a blended line of a named pair takes velocity, width and ratio from its partner, and the table says so', async () => {
  const { near, analysis } = await analysed(EMPTY_DOCUMENT);
  const [weak] = near(6548.05);
  const [strong] = near(6583.45);
  expect(weak.name?.label).toMatch(/^\[N II\] 6548/);
  expect(weak.measured.byHand).toMatch(/^tied to 6583/);
  expect(weak.centroid / strong.centroid).toBeCloseTo(6548.05 / 6583.45, 6);
  expect(Math.abs(weak.measured.flux - 9.33)).toBeLessThan(4 * weak.measured.fluxErr);
  expect(analysis.table.rows[weak.number - 1].note).toMatch(/tied to 6583/);
});

test('without the setting every line stands for itself', async () => {
  const document = { ...EMPTY_DOCUMENT, settings: { ...EMPTY_DOCUMENT.settings, measure: { tieNamedPairs: false } } };
  const { near } = await analysed(document);
  expect(near(6548.05)[0].measured.byHand).toBeUndefined();
});

test('limits and other shapes are told of the spectrum that was analysed', async () => {
  const { engine } = await analysed(EMPTY_DOCUMENT);
  const limit = engine.limitAt(5200);
  // noise under a Gaussian of this width: 0.12 sqrt(2 sqrt(pi) sigma step), three times
  expect((limit?.limit ?? 0) / (3 * 0.12 * Math.sqrt(2 * Math.sqrt(Math.PI) * (FWHM_A / 2.3548) * 1.4))).toBeCloseTo(1, 0);
  expect(engine.limitAt(2000)).toBeUndefined();
  expect(engine.shapesAt(5006.84)[0].as).toBe('gaussian');
  expect(engine.shapesAt(5200)).toEqual([]);
});
