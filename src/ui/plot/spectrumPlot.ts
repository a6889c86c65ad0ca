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
  let window: DrawnWindow | undefined;
  let frame = 0;
  let rest: ReturnType<typeof setTimeout> | undefined;

  const rebuild = (now: SpectrumScene) => {
    window = drawWindow(now, view);
    void lib.react(element, window.data, layoutFor(now, axesOf(now, window, view)), {
      staticPlot: true,
      displayModeBar: false,
      showSendToCloud: false,
      plotlyServerURL: '',
    });
  };

  const draw = () => {
    frame = 0;
    if (!scene) return;
    const began = performance.now();
    if (!window || !covers(window, view)) rebuild(scene);
    else {
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
      scene = next;
      view = at;
      refresh();
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

const covers = ({ window, viewWidth }: DrawnWindow, view: Range) =>
  view[0] >= window[0] && view[1] <= window[1] && sameWidth({ viewWidth }, view, SAME_ZOOM);

function sameWidth({ viewWidth }: Pick<DrawnWindow, 'viewWidth'>, view: Range, factor: number): boolean {
  const ratio = (view[1] - view[0]) / viewWidth;
  return ratio < factor && ratio > 1 / factor;
}
