import type { Data, Layout } from 'plotly.js/lib/core';
import type { SkyView } from '../../engine/index.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { words } from '../words.ts';
import { decimate, type Points } from './decimate.ts';
import { faded } from './faded.ts';
import { fitCurve } from './fitCurve.ts';
import { commonExponent, type FluxScale, fluxTicks, tickText } from './fluxScale.ts';
import type { Ink } from './inkOf.ts';
import { UNNAMED_LANE } from './lanes.ts';
import { domainOf, LANE_COUNT, LANE_FOOT, type PanelLayout } from './layoutOf.ts';
import { laneTicks } from './marksOf.ts';
import type { PlotSamples } from './plotSamples.ts';
import { profileOf } from './profileOf.ts';
import { extent } from './svgPath.ts';
import type { Range } from './viewRange.ts';
import { type AxisTicks, axisTicks, TICK_PX, type WaveAxis } from './waveAxis.ts';

/** All that the picture shows. */
export interface SpectrumScene {
  readonly samples?: PlotSamples;
  readonly rows: readonly DeskRow[];
  readonly sky: SkyView;
  readonly fluxUnit: string;
  /** What the wavelength axis counts; all places are Angstrom as the file has them. */
  readonly axis: WaveAxis;
  readonly scale: FluxScale;
  readonly gain: number;
  readonly ink: Ink;
  readonly layout: PanelLayout;
  /** What is left of features, by number, at a density that is tried; absent = none is tried. */
  readonly fading?: ReadonlyMap<number, number>;
}

/** Decimated curves of a window that is wider than the view, so that moving inside it needs no new ones. */
export interface DrawnWindow {
  readonly window: Range;
  /** Width of the view it was made for. */
  readonly viewWidth: number;
  readonly data: Data[];
  /** Flux of data and fit in the window, for the height of the axis; observed Angstrom. */
  readonly heights: Points;
}

/** Fewer points than this a pixel of the window are drawn as steps: one level a sample. */
const STEPS_BELOW = 1;
/** Residuals beyond this are cut, sigma. */
const RESIDUAL_REACH = 6;

/** Curves of a window three views wide. */
export function drawWindow(scene: SpectrumScene, view: Range): DrawnWindow {
  const viewWidth = view[1] - view[0];
  const window: Range = [view[0] - viewWidth, view[1] + viewWidth];
  const inner = scene.layout.width - scene.layout.left - scene.layout.right;
  const step = viewWidth / Math.max(inner, 100);
  const { ink, samples } = scene;
  const cut = (values: Float64Array) => (samples ? decimate(samples.wavelength, values, window[0], window[1], step) : { x: [], y: [] });
  const flux = samples ? cut(samples.flux) : sticks(scene.rows, window);
  const continuum = samples ? cut(samples.continuum) : { x: [], y: [] };
  const residual = samples ? cut(samples.residual) : { x: [], y: [] };
  const isSparse = samples !== undefined && flux.x.length < STEPS_BELOW * inner;
  const model = isSparse ? fitBetween(scene.rows, continuum, window, 3 * inner) : samples ? cut(samples.model) : { x: [], y: [] };
  const line = (
    points: Points,
    yaxis: 'y2' | 'y3',
    color: string,
    width: number,
    stroke: 'solid' | 'dot' | 'dash' | 'steps' = 'solid',
  ): Data => ({
    type: 'scatter',
    mode: 'lines',
    x: points.x,
    y: yaxis === 'y2' ? points.y.map(scene.scale.forward) : points.y,
    xaxis: 'x',
    yaxis,
    line: { color, width, dash: stroke === 'steps' ? 'solid' : stroke, shape: stroke === 'steps' ? 'hvh' : 'linear' },
    hoverinfo: 'skip',
  });
  return {
    window,
    viewWidth,
    heights: { x: [...flux.x, ...model.x], y: [...flux.y, ...model.y] },
    data: [
      // the lanes' axis is only drawn when something stands on it; the marks themselves are painted over the drawing
      { type: 'scatter', mode: 'markers', x: [window[0]], y: [UNNAMED_LANE - 1], yaxis: 'y', hoverinfo: 'skip' },
      line(residual, 'y3', ink.muted, 1, isSparse ? 'steps' : 'solid'),
      line(continuum, 'y2', ink.muted, 1, 'dot'),
      line(model, 'y2', ink.fit, 2.5),
      line(flux, 'y2', ink.ink, samples ? 1 : 1.5, isSparse ? 'steps' : 'solid'),
      ...(scene.fading
        ? [
            line(
              samples ? faded(model, continuum, scene.rows, scene.fading) : sticks(scene.rows, window, scene.fading),
              'y2',
              ink.accent,
              2,
              'dash',
            ),
          ]
        : []),
    ],
  };
}

/** The fit as a smooth curve, where the samples are wider than a pixel. */
function fitBetween(rows: readonly DeskRow[], continuum: Points, window: Range, count: number): Points {
  const from = Math.max(window[0], continuum.x[0] ?? window[0]);
  const to = Math.min(window[1], continuum.x.at(-1) ?? window[1]);
  const near = rows.map((row) => profileOf(row.feature)).filter(({ centre, fwhm }) => centre > from - 4 * fwhm && centre < to + 4 * fwhm);
  return fitCurve(near, continuum, from, to, Math.max(count, 1));
}

/** A list of lines as sticks from zero. */
function sticks(rows: readonly DeskRow[], window: Range, left?: ReadonlyMap<number, number>): Points {
  const points: Points = { x: [], y: [] };
  for (const { feature } of rows) {
    if (feature.centroid < window[0] || feature.centroid > window[1]) continue;
    points.x.push(feature.centroid, feature.centroid, feature.centroid);
    points.y.push(0, feature.measured.flux * (left?.get(feature.number) ?? 1), Number.NaN);
  }
  return points;
}

/** Axes as the view needs them. */
export interface Axes {
  readonly x: Range;
  readonly waveTicks: AxisTicks;
  readonly y: Range;
  readonly ticks: { readonly at: number[]; readonly text: string[] };
  readonly fluxTitle: string;
}

/** What depends on the view alone. */
export function axesOf(scene: SpectrumScene, drawn: DrawnWindow, view: Range): Axes {
  const [low, high] = fluxRange(scene, drawn, view);
  const { scale } = scene;
  const ticks = fluxTicks(scale, low, high, Math.max(2, Math.floor(scene.layout.spectrumHeight / 44)));
  const exponent = commonExponent(high);
  const unit = scene.fluxUnit ? ` (${scene.fluxUnit})` : '';
  const tens = exponent ? ` × 10<sup>${exponent}</sup>` : '';
  return {
    x: view,
    // ticks for the whole window: moving inside it needs no new ones
    waveTicks: axisTicks(scene.axis, drawn.window[0], drawn.window[1], (3 * (scene.layout.width - scene.layout.left)) / TICK_PX),
    y: [scale.forward(low), scale.forward(high)],
    ticks: { at: ticks.map(scale.forward), text: ticks.map((tick) => tickText(tick, exponent)) },
    fluxTitle: shorten(`${words.spectrum.flux}${tens}${unit}`, scene.layout.spectrumHeight),
  };
}

/** A move as a change of an existing picture: along the spectrum only, which is cheap and calm; the flux axis follows when the view rests. */
export const moveTo = (view: Range): object => ({ 'xaxis.range': [...view] });

/** Drops the unit when the title would be longer than its axis. */
function shorten(title: string, height: number): string {
  const letters = title.replace(/<[^>]+>/g, '').length;
  return letters * 6 > height ? title.replace(/ \(.*\)$/, '') : title;
}

/** Fluxes at the ends of the axis: all that is in view fits, or is cut at the top when the user asked for a taller axis. */
function fluxRange(scene: SpectrumScene, { heights }: DrawnWindow, view: Range): [number, number] {
  const seen = heights.y.filter((_, k) => heights.x[k] >= view[0] && heights.x[k] <= view[1]);
  const [low, high] = extent(seen) ?? [0, 1];
  const { scale, gain } = scene;
  const bottom = scale.forward(scale.kind === 'linear' ? Math.min(low, 0) : low);
  const top = scale.forward(high);
  const span = Math.max(top - bottom, 1e-300) / gain;
  return [scale.back(bottom - span * 0.04), scale.back(bottom + span * 1.06)];
}

/** The whole layout. */
export function layoutFor(scene: SpectrumScene, axes: Axes): Partial<Layout> {
  const { ink, layout } = scene;
  const lanes = laneTicks(words.spectrum.unnamed);
  const plain = {
    // said, or the library looks through the values whether they are dates
    type: 'linear',
    fixedrange: true,
    zeroline: false,
    showline: true,
    linecolor: ink.hairline,
    tickcolor: ink.hairline,
    gridcolor: ink.hairline,
    tickfont: { size: 11, color: ink.muted, family: ink.font },
    title: { font: { size: 11, color: ink.muted, family: ink.font }, standoff: 4 },
  } as const;
  return {
    width: layout.width,
    height: layout.height,
    autosize: false,
    margin: { l: layout.left, r: layout.right, t: layout.top, b: layout.bottom, pad: 0 },
    paper_bgcolor: 'rgba(0,0,0,0)',
    plot_bgcolor: 'rgba(0,0,0,0)',
    showlegend: false,
    hovermode: false,
    dragmode: false,
    font: { family: ink.font, size: 11, color: ink.muted },
    shapes: lanes.values
      .filter((_, k) => k % 2 === 1)
      .map((lane) => ({
        type: 'rect',
        layer: 'below',
        xref: 'paper',
        x0: 0,
        x1: 1,
        yref: 'y',
        y0: lane - LANE_FOOT,
        y1: lane + 1 - LANE_FOOT,
        fillcolor: ink.band,
        line: { width: 0 },
      })),
    xaxis: {
      ...plain,
      anchor: scene.samples ? 'y3' : 'y2',
      range: [...axes.x],
      showgrid: false,
      ticks: 'outside',
      ticklen: 4,
      tickmode: 'array',
      tickvals: [...axes.waveTicks.at],
      ticktext: [...axes.waveTicks.text],
      title: {
        ...plain.title,
        text: words.spectrum.wavelength(words.medium[scene.axis.shownMedium], words.spectrum.frames[scene.axis.frame]),
      },
    },
    yaxis: {
      ...plain,
      domain: domainOf(layout, layout.top, layout.lanesHeight),
      range: [UNNAMED_LANE - LANE_FOOT, UNNAMED_LANE + LANE_COUNT - LANE_FOOT],
      tickvals: lanes.values,
      ticktext: lanes.texts,
      ticks: '',
      showgrid: false,
      title: { ...plain.title, text: 'eV' },
    },
    yaxis2: {
      ...plain,
      domain: domainOf(layout, layout.spectrumTop, layout.spectrumHeight),
      showgrid: true,
      ticks: 'outside',
      ticklen: 4,
      tickmode: 'array',
      range: [...axes.y],
      tickvals: axes.ticks.at,
      ticktext: axes.ticks.text,
      title: { ...plain.title, text: axes.fluxTitle },
    },
    yaxis3: {
      ...plain,
      domain: scene.samples ? domainOf(layout, layout.residualTop, layout.residualHeight) : [0, 0.001],
      range: [-RESIDUAL_REACH, RESIDUAL_REACH],
      tickvals: scene.samples ? [-3, 0, 3] : [],
      ticks: 'outside',
      ticklen: 4,
      visible: scene.samples !== undefined,
      title: { ...plain.title, text: words.spectrum.residual },
    },
  };
}
