import { createEngine, loadAtomicData, type SamplesView } from '../../../src/engine/index.ts';
import { seededRandom } from '../../../src/numeric/index.ts';
import { bytesSource } from '../../../src/readers/index.ts';
import { EMPTY_DOCUMENT } from '../../../src/session/index.ts';
import { deskRows } from '../../../src/ui/desk/deskRows.ts';
import type { DeskFields } from '../../../src/ui/desk/deskStore.ts';

const FROM = 3500;
const TO = 10_500;
const SIGMA = 0.4;

/** A desk with `n` samples and `count` features, named by the engine, as it stands after an analysis. */
export async function crowdedDesk(bundle: Uint8Array, n: number, count: number): Promise<Partial<DeskFields>> {
  const random = seededRandom(8);
  const places = Array.from({ length: count }, () => FROM + 5 + random.uniform() * (TO - FROM - 10)).sort((a, b) => a - b);
  const peaks = places.map(() => 10 ** (2 * random.uniform()));
  const list = [
    '# air',
    'wavelength,wavelength_err,flux,fwhm',
    ...places.map((at, k) => `${at.toFixed(3)},0.02,${peaks[k].toFixed(3)},0.94`),
  ];
  const engine = createEngine(loadAtomicData(bundle), () => performance.now() / 1000);
  await engine.open(bytesSource('crowd.csv', new TextEncoder().encode(`${list.join('\n')}\n`)), 'line-list');
  const { samples: _, ...analysis } = await engine.analyse(EMPTY_DOCUMENT.settings, []);
  const rows = deskRows(analysis, []);
  return { stage: 'desk', analysis, rows, samples: samplesWith(places, peaks, n), chosenAt: rows[count >> 1].feature.at };
}

function samplesWith(places: readonly number[], peaks: readonly number[], n: number): SamplesView {
  const random = seededRandom(9);
  const step = (TO - FROM) / (n - 1);
  const wavelength = Float64Array.from({ length: n }, (_, i) => FROM + i * step);
  const model = new Float64Array(n).fill(1);
  places.forEach((place, k) => {
    const middle = Math.round((place - FROM) / step);
    const reach = Math.ceil((5 * SIGMA) / step);
    for (let i = Math.max(0, middle - reach); i < Math.min(n, middle + reach); i++)
      model[i] += peaks[k] * Math.exp(-0.5 * ((wavelength[i] - place) / SIGMA) ** 2);
  });
  return {
    wavelength,
    flux: model.map((value) => value + 0.1 * random.normal()),
    masked: new Uint8Array(n),
    continuum: new Float64Array(n).fill(1),
    model,
    noise: new Float64Array(n).fill(0.1),
  };
}
