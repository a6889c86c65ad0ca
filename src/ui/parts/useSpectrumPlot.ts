import { type RefObject, useEffect, useMemo, useRef, useState } from 'react';
import { rangeOf, useChosenRow } from '../desk/chosen.ts';
import { useDesk } from '../desk/deskStore.ts';
import { useWaveAxis } from '../desk/waveAxis.ts';
import { useFading } from '../gas/useFading.ts';
import { fluxScale } from '../plot/fluxScale.ts';
import { inkOf } from '../plot/inkOf.ts';
import { layoutOf } from '../plot/layoutOf.ts';
import type { PlotSamples } from '../plot/plotSamples.ts';
import type { SpectrumScene } from '../plot/spectrumFigure.ts';
import { createSpectrumPlot, type SpectrumPlot } from '../plot/spectrumPlot.ts';
import { useDarkness } from './useDarkness.ts';

/** Keeps the picture in step with the desk. */
export function useSpectrumPlot(
  canvas: RefObject<HTMLDivElement | null>,
  ground: RefObject<HTMLCanvasElement | null>,
  marks: RefObject<HTMLCanvasElement | null>,
  samples: PlotSamples | undefined,
  size: { width: number; height: number } | undefined,
) {
  const [plot, setPlot] = useState<SpectrumPlot>();
  const [state, setState] = useState<'waiting' | 'drawn' | 'failed'>('waiting');
  const analysis = useDesk((desk) => desk.analysis);
  const rows = useDesk((desk) => desk.rows);
  const range = useDesk((desk) => desk.range);
  const scale = useDesk((desk) => desk.scale);
  const gain = useDesk((desk) => desk.gain);
  const axis = useWaveAxis();
  const fading = useFading();
  const chosen = useChosenRow()?.feature.number;
  const dark = useDarkness();
  const layout = useMemo(() => size && layoutOf(size.width, size.height, samples !== undefined), [size, samples]);
  const whole = useMemo(() => rangeOf(samples?.wavelength, rows), [samples, rows]);
  const view = range ?? whole;

  useEffect(() => {
    if (!canvas.current || !ground.current || !marks.current) return;
    let gone = false;
    let made: SpectrumPlot | undefined;
    createSpectrumPlot(canvas.current, ground.current, marks.current, (ms) => {
      setState('drawn');
      if (canvas.current) canvas.current.dataset.frameMs = ms.toFixed(2);
    }).then(
      (created) => {
        made = created;
        if (gone) created.end();
        else setPlot(created);
      },
      () => setState('failed'),
    );
    return () => {
      gone = true;
      made?.end();
    };
  }, [canvas, ground, marks]);

  const scene = useMemo((): SpectrumScene | undefined => {
    if (!analysis || !axis || !layout || !canvas.current) return undefined;
    return {
      samples,
      rows,
      sky: analysis.sky,
      fluxUnit: analysis.reading.fluxUnit,
      axis,
      scale: fluxScale(scale, samples ? samples.typicalNoise : smallest(rows.map((row) => row.feature.measured.flux))),
      gain,
      ink: inkOf(canvas.current, dark),
      layout,
      ...(fading ? { fading } : {}),
    };
  }, [analysis, layout, canvas, samples, rows, axis, scale, gain, dark, fading]);

  const shown = useRef<SpectrumScene>(undefined);
  useEffect(() => {
    if (!plot || !scene) return;
    if (shown.current === scene) plot.move(view, chosen);
    else plot.show(scene, view, chosen);
    shown.current = scene;
  }, [plot, scene, view, chosen]);

  return { layout, state, view };
}

/** The faintest line of a list: a logarithm starts below it. */
const smallest = (fluxes: readonly number[]) => Math.min(...fluxes.filter((flux) => flux > 0), Number.POSITIVE_INFINITY) / 3 || 1;
