import { useRef } from 'react';
import { useChosenRow } from '../desk/chosen.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { look, shownRange } from '../desk/looking.ts';
import { useWaveAxis } from '../desk/waveAxis.ts';
import { fixed } from '../figures.ts';
import { SCALE_KINDS } from '../plot/fluxScale.ts';
import { plotSamplesOf } from '../plot/plotSamples.ts';
import { words } from '../words.ts';
import { ChosenFlag } from './ChosenFlag.tsx';
import { CommandButton } from './CommandButton.tsx';
import { Icon } from './Icon.tsx';
import { Legend } from './Legend.tsx';
import { Overview } from './Overview.tsx';
import { Segments } from './Segments.tsx';
import { usePointer } from './usePointer.ts';
import { useSize } from './useSize.ts';
import { useSpectrumPlot } from './useSpectrumPlot.ts';

const { spectrum: label } = words;
const FRAMES = ['observed', 'rest'] as const;
const MEDIA = ['air', 'vacuum'] as const;

/** The spectrum with its marks: overview, lanes, data and fit, residuals. */
export function SpectrumView() {
  const samples = useDesk((state) => state.samples);
  const rows = useDesk((state) => state.rows);
  const scale = useDesk((state) => state.scale);
  const frame = useDesk((state) => state.frame);
  const axis = useWaveAxis();
  const chosen = useChosenRow();
  const shown = samples && plotSamplesOf(samples);
  const area = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLDivElement>(null);
  const ground = useRef<HTMLCanvasElement>(null);
  const marks = useRef<HTMLCanvasElement>(null);
  const size = useSize(area);
  const { layout, state, view } = useSpectrumPlot(canvas, ground, marks, shown, size);
  const pointer = usePointer(area, layout);
  return (
    <section className="spectrum" aria-label={label.label}>
      <div className="tools">
        <Segments
          label={label.scale}
          options={SCALE_KINDS}
          value={scale}
          words={label.scales}
          choose={(kind) => setDesk({ scale: kind, gain: 1 })}
        />
        <Segments label={label.frame} options={FRAMES} value={frame} words={label.frames} choose={(kind) => setDesk({ frame: kind })} />
        {axis && (
          <Segments
            label={label.medium}
            options={MEDIA}
            value={axis.shownMedium}
            words={words.medium}
            choose={(medium) => setDesk({ axisMedium: medium })}
          />
        )}
        <CommandButton name="zoom-in">
          <Icon name="plus" />
        </CommandButton>
        <CommandButton name="zoom-out">
          <Icon name="minus" />
        </CommandButton>
        <CommandButton name="whole">
          <Icon name="whole" />
        </CommandButton>
        <span className="spring" />
        <Legend />
      </div>
      <Overview samples={shown} rows={rows} view={view} look={look} />
      <div
        className="plot-area"
        ref={area}
        role="img"
        aria-label={label.describe(rows.length, fixed(shownRange()[0], 0), fixed(shownRange()[1], 0))}
        {...pointer.handlers}
      >
        <canvas ref={ground} className="plot-ground" />
        <div ref={canvas} className="plot-canvas" />
        <canvas ref={marks} className="plot-marks" />
        {state !== 'drawn' && <p className="plot-wait">{state === 'failed' ? label.plotFailed : label.drawing}</p>}
        <div className="plot-readout number" aria-hidden="true" ref={pointer.readout} />
      </div>
      {chosen && layout && state === 'drawn' && <ChosenFlag row={chosen} layout={layout} view={view} top={area.current?.offsetTop ?? 0} />}
    </section>
  );
}
