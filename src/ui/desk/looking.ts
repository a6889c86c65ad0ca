import { SCALE_KINDS } from '../plot/fluxScale.ts';
import { inside, type Range, zoomed } from '../plot/viewRange.ts';
import { chosenRow, wholeRange } from './chosen.ts';
import { desk, setDesk } from './deskStore.ts';
import { waveAxis } from './waveAxis.ts';

/** Width of the view that shows a feature with its surroundings, in FWHM. */
const CLOSE_FWHM = 60;

export const shownRange = (): Range => desk().range ?? wholeRange();

/** Looks at `range`; the whole spectrum when nothing of it is left out. */
export function look(range: Range): void {
  const whole = wholeRange();
  const isWhole = range[1] - range[0] >= (whole[1] - whole[0]) * 0.999;
  setDesk({ range: isWhole ? undefined : range });
}

/** Zooms about the chosen feature if it is in view, else about the middle. */
export function zoomBy(factor: number): void {
  const range = shownRange();
  const centroid = chosenRow()?.feature.centroid;
  const at = centroid !== undefined && centroid > range[0] && centroid < range[1] ? centroid : (range[0] + range[1]) / 2;
  look(zoomed(range, at, factor, wholeRange()));
}

export const wholeSpectrum = () => setDesk({ range: undefined, gain: 1 });

export function closeIn(): void {
  const row = chosenRow();
  if (!row) return;
  const { centroid, measured } = row.feature;
  const half = ((Number.isFinite(measured.fwhm) ? measured.fwhm : centroid / 2000) * CLOSE_FWHM) / 2;
  look(inside([centroid - half, centroid + half], wholeRange()));
}

export function nextScale(): void {
  const next = (SCALE_KINDS.indexOf(desk().scale) + 1) % SCALE_KINDS.length;
  setDesk({ scale: SCALE_KINDS[next], gain: 1 });
}

export function otherMedium(): void {
  const axis = waveAxis();
  if (axis) setDesk({ axisMedium: axis.shownMedium === 'air' ? 'vacuum' : 'air' });
}

export const otherFrame = () => setDesk({ frame: desk().frame === 'observed' ? 'rest' : 'observed' });
