import { LANES } from './lanes.ts';

/** Pixels of the panels of the spectrum view, top to bottom: second wavelength axis (in the top margin), lanes, spectrum, residuals, wavelength axis. */
export interface PanelLayout {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly lanesHeight: number;
  readonly spectrumTop: number;
  readonly spectrumHeight: number;
  readonly residualTop: number;
  readonly residualHeight: number;
}

/** Lanes by energy and one for features without a name. */
export const LANE_COUNT = LANES.length + 1;
/** Height of a mark above the foot of its lane, in lanes. */
export const LANE_FOOT = 0.28;

const MARGIN = { left: 64, right: 16, top: 20, bottom: 40 };
const GAP = 8;
const LANE = { least: 23, most: 30 };
const RESIDUAL = { least: 36, most: 72 };

/** Shares `height` among the panels: the spectrum gets most of it. */
export function layoutOf(width: number, height: number, hasSamples: boolean): PanelLayout {
  const inner = Math.max(height - MARGIN.top - MARGIN.bottom, 120);
  const lane = clamp((inner * 0.3) / LANE_COUNT, LANE.least, LANE.most);
  const residualHeight = hasSamples ? clamp(inner * 0.13, RESIDUAL.least, RESIDUAL.most) : 0;
  const lanesHeight = lane * LANE_COUNT;
  const spectrumTop = MARGIN.top + lanesHeight + GAP;
  const residualTop = MARGIN.top + inner - residualHeight;
  return {
    width,
    height,
    ...MARGIN,
    lanesHeight,
    spectrumTop,
    spectrumHeight: Math.max(residualTop - spectrumTop - (hasSamples ? GAP : 0), 40),
    residualTop,
    residualHeight,
  };
}

const clamp = (value: number, low: number, high: number) => Math.min(Math.max(value, low), high);

/** Plotly's share of the height between margins, counted from the bottom, of a panel given from the top in pixels. */
export function domainOf(layout: PanelLayout, top: number, height: number): [number, number] {
  const inner = layout.height - layout.top - layout.bottom;
  const from = 1 - (top + height - layout.top) / inner;
  return [Math.max(0, from), Math.min(1, from + height / inner)];
}
