import { flushSync } from 'react-dom';
import { createRoot } from 'react-dom/client';
import '../../../src/ui/tokens.css';
import '../../../src/ui/desk.css';
import { App } from '../../../src/ui/App.tsx';
import { wholeRange } from '../../../src/ui/desk/chosen.ts';
import { desk, setDesk } from '../../../src/ui/desk/deskStore.ts';
import { look, shownRange } from '../../../src/ui/desk/looking.ts';
import { decimate } from '../../../src/ui/plot/decimate.ts';
import { panned, type Range, zoomed } from '../../../src/ui/plot/viewRange.ts';
import { crowdedDesk } from './crowdedDesk.ts';

/** Milliseconds of script in each frame: the whole desk, and a bare rival that draws the same curve and marks anew with the library alone. */
interface FrameTimes {
  readonly mine: readonly number[];
  readonly rival: readonly number[];
}

declare global {
  interface Window {
    measureFrames: (samples: number, features: number) => Promise<FrameTimes>;
  }
}

const nextFrame = () => new Promise<number>((resolve) => requestAnimationFrame(resolve));
const ZOOMS = [0.6, 0.2, 0.02] as const;
const STEPS = 30;

/** A tour as a hand makes it: at three zooms along the spectrum, in and out again. */
function* tour(): Generator<Range> {
  for (const zoom of ZOOMS) {
    const whole = wholeRange();
    let view = zoomed(whole, (whole[0] + whole[1]) / 2, zoom, whole);
    for (let k = 0; k < STEPS; k++) yield (view = panned(view, 0.03, whole));
    for (let k = 0; k < STEPS; k++) yield (view = zoomed(view, view[0] + 0.3 * (view[1] - view[0]), 0.93, whole));
    for (let k = 0; k < STEPS; k++) yield (view = zoomed(view, view[0] + 0.3 * (view[1] - view[0]), 1 / 0.93, whole));
  }
}

async function myFrames(): Promise<number[]> {
  const canvas = document.querySelector<HTMLElement>('.plot-canvas');
  if (!canvas) throw new Error('the desk draws no spectrum');
  const times: number[] = [];
  for (const view of tour()) {
    await nextFrame();
    canvas.dataset.frameMs = '';
    const began = performance.now();
    flushSync(() => look(view));
    const asked = performance.now() - began;
    await nextFrame();
    if (canvas.dataset.frameMs) times.push(asked + Number(canvas.dataset.frameMs));
  }
  return times;
}

/** The library alone: thousand-pixel decimation, one trace of marks, everything handed over anew in each frame. */
async function rivalFrames(): Promise<number[]> {
  const [core, scatter] = await Promise.all([import('plotly.js/lib/core'), import('plotly.js/lib/scatter')]);
  core.default.register([scatter.default]);
  const element = document.createElement('div');
  element.style.cssText = 'width:1000px;height:500px;position:fixed;top:0;left:0';
  document.body.append(element);
  const { samples, rows } = desk();
  const times: number[] = [];
  for (const view of tour()) {
    await nextFrame();
    const began = performance.now();
    if (!samples) throw new Error('no samples');
    const curve = decimate(samples.wavelength, samples.flux, view[0], view[1], (view[1] - view[0]) / 1000);
    const seen = rows.filter(({ feature }) => feature.centroid >= view[0] && feature.centroid <= view[1]);
    await core.default.react(
      element,
      [
        { type: 'scatter', mode: 'lines', x: curve.x, y: curve.y },
        { type: 'scatter', mode: 'markers', x: seen.map(({ feature }) => feature.centroid), y: seen.map(() => 50) },
      ],
      { xaxis: { range: [...view] }, showlegend: false },
      { staticPlot: true },
    );
    times.push(performance.now() - began);
  }
  element.remove();
  return times;
}

window.measureFrames = async (samples, features) => {
  const bundle = new Uint8Array(await (await fetch('atomic.bin')).arrayBuffer());
  setDesk({ ...(await crowdedDesk(bundle, samples, features)), range: undefined });
  const root = document.getElementById('root');
  if (!root) throw new Error('the page has no #root');
  const app = createRoot(root);
  app.render(<App />);
  while (!document.querySelector('.plot-canvas .scatterlayer')) await nextFrame();
  look(shownRange());
  const mine = await myFrames();
  const rival = await rivalFrames();
  app.unmount();
  return { mine, rival };
};
