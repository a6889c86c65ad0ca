import { useMemo } from 'react';
import type { SamplesView } from '../../engine/index.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { useDesk } from '../desk/deskStore.ts';
import { round } from '../figures.ts';
import { decimate } from '../plot/decimate.ts';
import { fitCurve } from '../plot/fitCurve.ts';
import type { Profile } from '../plot/profileCurve.ts';
import { profileOf } from '../plot/profileOf.ts';
import { extent, place, svgPath, svgSteps } from '../plot/svgPath.ts';
import { words } from '../words.ts';

const WIDTH = 360;
const HEIGHT = 128;
const FOOT = 14;
/** Half width of the picture in FWHM. */
const HALF_FWHM = 7;
const CURVE_POINTS = 160;

/** Data, fit and every component about the chosen feature. */
export function CloseUp({ row }: { row: DeskRow }) {
  const samples = useDesk((state) => state.samples);
  const rows = useDesk((state) => state.rows);
  const drawn = useMemo(() => samples && closeUpCurves(samples, row, rows), [samples, row, rows]);
  if (!drawn) return null;
  return (
    <svg className="curves close-up" viewBox={`0 0 ${WIDTH} ${HEIGHT + FOOT}`} role="img" aria-label={words.case.closeUp}>
      <path className="curve-chosen" d={`M${drawn.centre.toFixed(1)} 0V${HEIGHT}`} />
      <path className="curve-continuum" d={drawn.continuum} />
      {drawn.components.map(({ at, d }) => (
        <path key={at} className="curve-component" d={d} />
      ))}
      <path className="curve-data" d={drawn.data} />
      <path className="curve-model" d={drawn.model} />
      <path className="curve-zero" d={`M0 ${HEIGHT}H${WIDTH}`} />
      {drawn.ticks.map(({ x, text }) => (
        <text key={text} x={x} y={HEIGHT + 11} textAnchor="middle">
          {text}
        </text>
      ))}
      <text x="2" y="9">
        {drawn.top}
      </text>
    </svg>
  );
}

function closeUpCurves(samples: SamplesView, row: DeskRow, rows: readonly DeskRow[]) {
  const { centroid, measured } = row.feature;
  const half = (Number.isFinite(measured.fwhm) ? measured.fwhm : 2) * HALF_FWHM;
  const from = centroid - half;
  const to = centroid + half;
  const cut = (values: Float64Array) => decimate(samples.wavelength, values, from, to, (2 * half) / WIDTH);
  const data = cut(samples.flux);
  const model = cut(samples.model);
  const continuum = cut(samples.continuum);
  const range = extent(data.y, model.y, continuum.y);
  if (!range) return undefined;
  const margin = (range[1] - range[0]) * 0.06;
  const xAxis = { low: from, high: to, from: 0, to: WIDTH };
  const yAxis = { low: range[0] - margin, high: range[1] + margin, from: HEIGHT - 1, to: 12 };
  const profiles = rows.map((each) => profileOf(each.feature)).filter((profile) => reaches(profile, from, to));
  const curve = (some: readonly Profile[]) => {
    const fit = fitCurve(some, continuum, from, to, CURVE_POINTS);
    return svgPath(fit.x, fit.y, xAxis, yAxis);
  };
  return {
    centre: place(xAxis, centroid),
    data: svgSteps(data.x, data.y, xAxis, yAxis),
    model: curve(profiles),
    continuum: svgPath(continuum.x, continuum.y, xAxis, yAxis),
    components: profiles.length > 1 ? profiles.map((profile) => ({ at: profile.centre, d: curve([profile]) })) : [],
    ticks: closeUpTicks(from, to).map((tick) => ({ x: place(xAxis, tick), text: String(tick) })),
    top: round(range[1], 3),
  };
}

/** A line outside the picture whose wing is still in it counts. */
const reaches = ({ centre, fwhm }: Profile, from: number, to: number) => centre > from - fwhm && centre < to + fwhm;

/** Three or four round wavelengths. */
function closeUpTicks(from: number, to: number): number[] {
  const rough = (to - from) / 4;
  const size = 10 ** Math.floor(Math.log10(rough));
  const step = size * ([1, 2, 5, 10].find((k) => k * size >= rough) ?? 10);
  const digits = Math.max(0, -Math.floor(Math.log10(step)));
  const ticks: number[] = [];
  for (let k = Math.ceil(from / step); k * step < to; k++) ticks.push(Number((k * step).toFixed(digits)));
  return ticks.filter((tick) => tick - from > rough / 4 && to - tick > rough / 4);
}
