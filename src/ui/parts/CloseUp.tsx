import { useMemo } from 'react';
import type { SamplesView } from '../../engine/index.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { useDesk } from '../desk/deskStore.ts';
import { round } from '../figures.ts';
import { decimate } from '../plot/decimate.ts';
import { evenTicks } from '../plot/evenTicks.ts';
import { fitCurve } from '../plot/fitCurve.ts';
import { plotSamplesOf } from '../plot/plotSamples.ts';
import type { Profile } from '../plot/profileCurve.ts';
import { profileOf } from '../plot/profileOf.ts';
import { extent, place, svgPath, svgSteps } from '../plot/svgPath.ts';
import { words } from '../words.ts';
import { uniqueKeys } from './uniqueKeys.ts';
import { useCloseUpPointer } from './useCloseUpPointer.ts';

const WIDTH = 360;
const HEIGHT = 128;
const FOOT = 14;
/** Half width of the picture in FWHM. */
const HALF_FWHM = 7;
/** Half width of what must fit into its height. */
const CORE_FWHM = 1.25;
const CURVE_POINTS = 160;

/** Data, fit and every component about the chosen feature. */
export function CloseUp({ row }: { row: DeskRow }) {
  const samples = useDesk((state) => state.samples);
  const rows = useDesk((state) => state.rows);
  const drawn = useMemo(() => samples && closeUpCurves(samples, row, rows), [samples, row, rows]);
  const { handlers, shown } = useCloseUpPointer(row, drawn?.xAxis);
  if (!drawn) return null;
  return (
    <svg className="curves close-up" viewBox={`0 0 ${WIDTH} ${HEIGHT + FOOT}`} role="img" aria-label={words.case.closeUp} {...handlers}>
      <svg width={WIDTH} height={HEIGHT} aria-hidden="true">
        <path className="curve-chosen" d={`M${drawn.centre.toFixed(1)} 0V${HEIGHT}`} />
        <path className="curve-continuum" d={drawn.continuum} />
        {uniqueKeys(drawn.components, ({ at }) => String(at)).map(({ key, item }) => (
          <path key={key} className="curve-component" d={item.d} />
        ))}
        {shown !== undefined && <path className="curve-place" d={`M${place(drawn.xAxis, shown).toFixed(1)} 0V${HEIGHT}`} />}
        <path className="curve-data" d={drawn.data} />
        <path className="curve-model" d={drawn.model} />
      </svg>
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
  const { flux } = plotSamplesOf(samples);
  const data = cut(flux);
  const continuum = cut(samples.continuum);
  // the height is that of the chosen line: a strong neighbour runs out of the picture
  const reach = half * (CORE_FWHM / HALF_FWHM);
  const core = (values: Float64Array) => decimate(samples.wavelength, values, centroid - reach, centroid + reach, (2 * half) / WIDTH).y;
  const range = extent(core(flux), core(samples.model), continuum.y);
  if (!range) return undefined;
  const margin = (range[1] - range[0]) * 0.08;
  const xAxis = { low: from, high: to, from: 0, to: WIDTH };
  const yAxis = { low: range[0] - margin, high: range[1] + margin, from: HEIGHT - 1, to: 12 };
  const profiles = rows.map((each) => profileOf(each.feature)).filter((profile) => reaches(profile, from, to));
  const curve = (some: readonly Profile[]) => {
    const fit = fitCurve(some, continuum, from, to, CURVE_POINTS);
    return svgPath(fit.x, fit.y, xAxis, yAxis);
  };
  return {
    xAxis,
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

/** Round wavelengths that are not cut by an end of the picture. */
function closeUpTicks(from: number, to: number): number[] {
  const air = (to - from) / 16;
  return evenTicks(from, to, 4).filter((tick) => tick - from > air && to - tick > air);
}
