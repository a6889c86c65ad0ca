import { type PointerEvent, useMemo, useRef } from 'react';
import { rangeOf } from '../desk/chosen.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { decimate } from '../plot/decimate.ts';
import type { PlotSamples } from '../plot/plotSamples.ts';
import { extent, place, svgPath } from '../plot/svgPath.ts';
import { inside, type Range } from '../plot/viewRange.ts';
import { words } from '../words.ts';
import { useSize } from './useSize.ts';

const HEIGHT = 36;
const LEFT = 64;
const RIGHT = 16;

interface Props {
  readonly samples: PlotSamples | undefined;
  readonly rows: readonly DeskRow[];
  readonly view: Range;
  readonly look: (range: Range) => void;
}

/** The whole spectrum in a strip and where the view is: click or drag moves the window. */
export function Overview({ samples, rows, view, look }: Props) {
  const box = useRef<HTMLDivElement>(null);
  const width = useSize(box)?.width ?? 0;
  const whole = useMemo(() => rangeOf(samples?.wavelength, rows), [samples, rows]);
  const xAxis = { low: whole[0], high: whole[1], from: LEFT, to: width - RIGHT };
  const path = useMemo(() => (width > 0 ? overviewPath(samples, rows, whole, width) : ''), [samples, rows, whole, width]);
  const moveTo = (event: PointerEvent) => {
    const x = event.clientX - event.currentTarget.getBoundingClientRect().left;
    const at = whole[0] + ((x - LEFT) / (width - LEFT - RIGHT)) * (whole[1] - whole[0]);
    const half = (view[1] - view[0]) / 2;
    look(inside([at - half, at + half], whole));
  };
  const from = place(xAxis, view[0]);
  const to = place(xAxis, view[1]);
  return (
    <div
      ref={box}
      className="overview"
      role="img"
      aria-label={words.spectrum.overview}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        moveTo(event);
      }}
      onPointerMove={(event) => event.buttons === 1 && moveTo(event)}
    >
      {width > 0 && (
        <svg className="curves" width={width} height={HEIGHT} aria-hidden="true">
          <path className="curve-data" d={path} />
          <rect className="outside" x={LEFT} y="0" width={Math.max(from - LEFT, 0)} height={HEIGHT} />
          <rect className="outside" x={to} y="0" width={Math.max(width - RIGHT - to, 0)} height={HEIGHT} />
          <rect className="window" x={from} y="0.5" width={Math.max(to - from, 2)} height={HEIGHT - 1} />
        </svg>
      )}
    </div>
  );
}

function overviewPath(samples: PlotSamples | undefined, rows: readonly DeskRow[], whole: Range, width: number): string {
  const step = (whole[1] - whole[0]) / (width - LEFT - RIGHT);
  const points = samples
    ? decimate(samples.wavelength, samples.flux, whole[0], whole[1], step)
    : {
        x: rows.flatMap(({ feature }) => [feature.centroid, feature.centroid, feature.centroid]),
        y: rows.flatMap(({ feature }) => [0, feature.measured.flux, Number.NaN]),
      };
  const small = samples?.typicalNoise ?? 1;
  const shown = points.y.map((flux) => Math.asinh(flux / (3 * small)));
  const range = extent(shown);
  if (!range) return '';
  return svgPath(
    points.x,
    shown,
    { low: whole[0], high: whole[1], from: LEFT, to: width - RIGHT },
    { low: range[0], high: range[1], from: HEIGHT - 2, to: 3 },
  );
}
