import type * as Plotly from 'plotly.js/lib/core';
import { paintGround } from './paintGround.ts';
import { paintMarks } from './paintMarks.ts';
import { axesOf, type DrawnWindow, drawWindow, layoutFor, moveTo, type SpectrumScene } from './spectrumFigure.ts';
import type { Range } from './viewRange.ts';

/** The drawn spectrum: takes a scene and a view, draws at most once a frame. */
export interface SpectrumPlot {
  /** Everything anew. */
  show(scene: SpectrumScene, view: Range, chosen?: number): void;
  /** The same scene seen elsewhere; `chosen`: number of the feature whose label goes first. */
  move(view: Range, chosen?: number): void;
  end(): void;
}

const NO_MASK = new Float64Array(0);
/** A view that differs from the drawn one by more than this factor gets new curves and labels. */
const SAME_ZOOM = 1.7;
/** Milliseconds of rest after which a moved view gets a flux axis and labels of its own. */
const REST_MS = 140;

/** What is used of the library. Its own type of `relayout` does not know dotted paths (`xaxis.range`). */
interface Library extends Pick<typeof Plotly, 'react' | 'purge'> {
  relayout(element: HTMLElement, change: object): Promise<unknown>;
}

const CONFIG = { staticPlot: true, displayModeBar: false, showSendToCloud: false, plotlyServerURL: '' } as const;

let library: Promise<Library> | undefined;

/** The drawing library, loaded when the first spectrum is shown. */
function plotly(): Promise<Library> {
  library ??= Promise.all([import('plotly.js/lib/core'), import('plotly.js/lib/scatter')]).then(([core, scatter]) => {
    core.default.register([scatter.default]);
    return core.default;
  });
  return library;
}

/**
 * @param element takes the drawing
 * @param ground  lies below it and takes the shadings
 * @param marks   lies over it and takes the marks
 * @param drawn   called after every frame that was drawn, with the milliseconds of work it took
 */
export async function createSpectrumPlot(
  element: HTMLElement,
  ground: HTMLCanvasElement,
  marks: HTMLCanvasElement,
  drawn: (ms: number) => void,
): Promise<SpectrumPlot> {
  const lib = await plotly();
  let scene: SpectrumScene | undefined;
  let view: Range = [0, 1];
  let chosen: number | undefined;
  /** The view the axes are set to. */
  let placed: Range | undefined;
  let window: DrawnWindow | undefined;
  let frame = 0;
  let rest: ReturnType<typeof setTimeout> | undefined;

  // the library sets itself up at the first drawing: apart from the first curves, so that neither keeps the page waiting long
  await lib.react(
    element,
    [],
    { width: element.clientWidth, height: element.clientHeight, xaxis: { visible: false }, yaxis: { visible: false } },
    CONFIG,
  );
  await new Promise((resolve) => requestAnimationFrame(resolve));

  const rebuild = (now: SpectrumScene) => {
    window = drawWindow(now, view);
    void lib.react(element, window.data, layoutFor(now, axesOf(now, window, view)), CONFIG);
  };

  const draw = () => {
    frame = 0;
    if (!scene) return;
    const began = performance.now();
    if (!window || !covers(window, view)) {
      rebuild(scene);
      placed = view;
    } else if (placed?.[0] !== view[0] || placed[1] !== view[1]) {
      placed = view;
      void lib.relayout(element, moveTo(view));
      clearTimeout(rest);
      rest = setTimeout(refresh, REST_MS);
    }
    paintGround(ground, { ...scene, masked: scene.samples?.masked ?? NO_MASK }, view);
    paintMarks(marks, { ...scene, chosen }, view);
    drawn(performance.now() - began);
  };
  const refresh = () => {
    window = undefined;
    schedule();
  };
  const schedule = () => {
    if (frame === 0) frame = requestAnimationFrame(draw);
  };

  return {
    show(next, at, number) {
      chosen = number;
      const same = scene !== undefined && hasSameCurves(scene, next);
      scene = next;
      view = at;
      if (same) schedule();
      else refresh();
    },
    move(at, number) {
      chosen = number;
      view = at;
      schedule();
    },
    end() {
      cancelAnimationFrame(frame);
      clearTimeout(rest);
      scene = undefined;
      lib.purge(element);
    },
  };
}

/** Whether only marks and shadings differ, which are painted anew in any case: verdicts and names change more often than curves, and cost a fifth. */
function hasSameCurves(a: SpectrumScene, b: SpectrumScene): boolean {
  return (
    a.samples !== undefined &&
    a.samples === b.samples &&
    a.fluxUnit === b.fluxUnit &&
    a.axis.frame === b.axis.frame &&
    a.axis.medium === b.axis.medium &&
    a.axis.shownMedium === b.axis.shownMedium &&
    (a.axis.frame === 'observed' || a.axis.z === b.axis.z) &&
    a.scale.kind === b.scale.kind &&
    a.gain === b.gain &&
    a.ink.isDark === b.ink.isDark &&
    a.layout === b.layout &&
    a.fading === b.fading
  );
}

const covers = ({ window, viewWidth }: DrawnWindow, view: Range) =>
  view[0] >= window[0] && view[1] <= window[1] && sameWidth({ viewWidth }, view, SAME_ZOOM);

function sameWidth({ viewWidth }: Pick<DrawnWindow, 'viewWidth'>, view: Range, factor: number): boolean {
  const ratio = (view[1] - view[0]) / viewWidth;
  return ratio < factor && ratio > 1 / factor;
}
