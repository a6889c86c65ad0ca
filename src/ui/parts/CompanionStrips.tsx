import { useMemo } from 'react';
import type { CandidateView, CompanionView, SamplesView } from '../../engine/index.ts';
import { SPEED_OF_LIGHT_KMS } from '../../units/index.ts';
import { choose } from '../desk/chosen.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { useDesk } from '../desk/deskStore.ts';
import { decimate } from '../plot/decimate.ts';
import { plotSamplesOf } from '../plot/plotSamples.ts';
import { profileAt } from '../plot/profileCurve.ts';
import { extent, svgPath, svgSteps } from '../plot/svgPath.ts';
import { words } from '../words.ts';
import { uniqueKeys } from './uniqueKeys.ts';

const { case: label } = words;
const WIDTH = 108;
const HEIGHT = 52;
/** Half width of a strip in FWHM of the feature, and at least this many km/s. */
const HALF_FWHM = 4;
const LEAST_KMS = 150;
const CURVE_POINTS = 60;

/** The companions of a candidate: what was found at each one's place, and a look at it. */
export function CompanionStrips({ row, candidate }: { row: DeskRow; candidate: CandidateView }) {
  const samples = useDesk((state) => state.samples);
  const hasStrips = samples !== undefined && candidate.companions.some(({ outcome }) => outcome !== 'outside');
  const { fwhm } = row.feature.measured;
  const fwhmKms = Number.isFinite(fwhm) ? (SPEED_OF_LIGHT_KMS * fwhm) / row.feature.centroid : LEAST_KMS / HALF_FWHM;
  return (
    <section className="companions" aria-label={label.companions}>
      <h3 title={label.companionStrips}>
        {label.companions} {hasStrips && <span className="scale">{label.companionsScale}</span>}
      </h3>
      <ul>
        {uniqueKeys(candidate.companions, ({ label: name, expectedAt }) => `${name} ${expectedAt}`).map(({ key, item: companion }) => (
          <li key={key} className={`companion outcome-${companion.outcome}`}>
            <CompanionHead companion={companion} />
            {samples && companion.outcome !== 'outside' && <Strip samples={samples} companion={companion} fwhmKms={fwhmKms} />}
          </li>
        ))}
      </ul>
    </section>
  );
}

const SIGNS: Record<CompanionView['outcome'], string> = {
  seen: '✓',
  'wrong-ratio': '≠',
  absent: '✗',
  hidden: '≈',
  outside: '→',
  'too-faint': '·',
};

function CompanionHead({ companion }: { companion: CompanionView }) {
  const text = (
    <>
      <span className="companion-name">{companion.label}</span>
      <span className="companion-outcome">
        <span aria-hidden="true">{SIGNS[companion.outcome]}</span> {label.outcome[companion.outcome]}
      </span>
    </>
  );
  const { feature } = companion;
  if (feature === undefined) return <p className="companion-head">{text}</p>;
  return (
    <button type="button" className="companion-head" onClick={() => choose(feature)}>
      {text}
    </button>
  );
}

function Strip({ samples, companion, fwhmKms }: { samples: SamplesView; companion: CompanionView; fwhmKms: number }) {
  const half = Math.max(LEAST_KMS, HALF_FWHM * fwhmKms);
  const drawn = useMemo(() => stripCurves(samples, companion, fwhmKms, half), [samples, companion, fwhmKms, half]);
  if (!drawn) return null;
  return (
    <svg className="curves strip-curves" viewBox={`0 0 ${WIDTH} ${HEIGHT + 10}`} width={WIDTH} height={HEIGHT + 10} aria-hidden="true">
      <path className="curve-zero" d={`M${WIDTH / 2} 0V${HEIGHT}`} />
      <path className="curve-data" d={drawn.data} />
      <path className="curve-predicted" d={drawn.predicted} />
      <path className="curve-zero" d={`M0 ${HEIGHT}H${WIDTH}`} />
      <text x="0" y={HEIGHT + 9}>{`−${Math.round(half)}`}</text>
      <text x={WIDTH} y={HEIGHT + 9} textAnchor="end">{`+${Math.round(half)}`}</text>
    </svg>
  );
}

/** Data about the companion's place and its predicted profile over the continuum, velocity in km/s; undefined when there are no data. */
function stripCurves(samples: SamplesView, companion: CompanionView, fwhmKms: number, halfKms: number) {
  const { expectedAt } = companion;
  const perKms = expectedAt / SPEED_OF_LIGHT_KMS;
  const from = expectedAt - halfKms * perKms;
  const to = expectedAt + halfKms * perKms;
  const data = decimate(samples.wavelength, plotSamplesOf(samples).flux, from, to, (to - from) / WIDTH);
  const base = decimate(samples.wavelength, samples.continuum, expectedAt, expectedAt, 1).y[0];
  if (data.x.length < 2 || base === undefined) return undefined;
  const x = Array.from({ length: CURVE_POINTS + 1 }, (_, k) => from + ((to - from) * k) / CURVE_POINTS);
  const profile = { centre: expectedAt, fwhm: fwhmKms * perKms, flux: companion.predictedFlux };
  const predicted = x.map((at) => base + profileAt(profile, at));
  const range = extent(data.y, predicted);
  if (!range) return undefined;
  const xAxis = { low: from, high: to, from: 0, to: WIDTH };
  const yAxis = { low: range[0], high: range[1], from: HEIGHT - 2, to: 3 };
  return { data: svgSteps(data.x, data.y, xAxis, yAxis), predicted: svgPath(x, predicted, xAxis, yAxis) };
}
