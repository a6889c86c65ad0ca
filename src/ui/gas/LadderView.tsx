import type { DensityLadder, Gas, Rung } from '../../plasma/index.ts';
import { choose } from '../desk/chosen.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { powerText } from '../figures.ts';
import { words } from '../words.ts';
import { FigureBox } from './FigureBox.tsx';
import { fadingOf } from './fading.ts';
import { ladderFigure } from './ladderFigure.ts';
import { survivalLeft } from './survivalLeft.ts';

const { ladder: label } = words.gas;
const LOWEST_LOG = 0;
const HIGHEST_LOG = 20;
/** Where the slider starts, log10 cm^-3. */
const START_LOG = 6;

/** The thin-gas lines by critical density, and a density to try on them. */
export function LadderView({ gas }: { readonly gas: Gas }) {
  const { ladder } = gas;
  const log = useDesk((state) => state.ladderLogNe);
  if (ladder.rungs.length === 0) return <p className="hint">{label.none}</p>;
  return (
    <>
      <p>
        {ladder.ceiling ? (
          <>
            <strong>{label.ceiling(powerText(ladder.ceiling.densityCm3, 2))}</strong> {label.ceilingBy(ladder.ceiling.label)}
          </>
        ) : (
          label.noCeiling
        )}
      </p>
      <p className="hint">{label.assumption(ladder.te)}</p>
      {ladder.contradictions.map((sentence) => (
        <p key={sentence} className="doubt">
          {sentence}
        </p>
      ))}
      <DensitySlider gas={gas} log={log} />
      <FigureBox name="ladder" draw={(width) => ladderFigure(ladder, width, log)} />
      <h3>{label.lines}</h3>
      <ul className="rungs">
        {ladder.rungs.map((rung) => (
          <RungItem key={rung.features.join()} ladder={ladder} rung={rung} log={log ?? START_LOG} />
        ))}
      </ul>
    </>
  );
}

/** A density, and what it would do to the lines: also on the spectrum. */
function DensitySlider({ gas, log }: { readonly gas: Gas; readonly log: number | undefined }) {
  const value = log ?? START_LOG;
  const density = powerText(10 ** value, 2);
  const left = fadingOf(gas, value);
  const gone = [...left.values()].filter((share) => share < 0.5).length;
  return (
    <div className="density-slider">
      <label htmlFor="density-slider">{label.slider}</label>
      <input
        id="density-slider"
        type="range"
        min={LOWEST_LOG}
        max={HIGHEST_LOG}
        step={0.1}
        value={value}
        aria-valuetext={`${density} ${label.perCm3}`}
        onChange={(event) => setDesk({ ladderLogNe: Number(event.target.value) })}
      />
      <output htmlFor="density-slider" className="number">
        {density} cm⁻³
      </output>
      <p className="hint">{log === undefined ? label.sliderHint : label.fades(gone, left.size)}</p>
      {log !== undefined && (
        <button type="button" className="small" onClick={() => setDesk({ ladderLogNe: undefined })}>
          {label.sliderOff}
        </button>
      )}
    </div>
  );
}

function RungItem({ ladder, rung, log }: { readonly ladder: DensityLadder; readonly rung: Rung; readonly log: number }) {
  const left = survivalLeft(ladder, rung, log);
  return (
    <li>
      <details>
        <summary>
          <span className="rung-name">
            {rung.label} {!rung.accepted && <span className="muted">{words.standing.open}</span>}
          </span>
          <span className="number">{rung.nCrit === undefined ? label.unknown : powerText(rung.nCrit, 2)}</span>
          <span className="number">{left === undefined ? '–' : `${percent(left)} %`}</span>
        </summary>
        <p>{rung.laboratory}</p>
        {rung.collisions && (
          <dl className="collisions">
            {ladder.gases.map(({ name, densityCm3 }, k) => (
              <div key={name}>
                <dt>
                  {name} <span className="muted number">{`(${powerText(densityCm3, 2)} cm⁻³)`}</span>
                </dt>
                <dd className="number">{powerText(rung.collisions?.[k], 2)}</dd>
              </div>
            ))}
          </dl>
        )}
        {!rung.insideRange && <p className="hint">{label.held}</p>}
        <button type="button" className="small" onClick={() => choose(rung.features[0] - 1)}>
          {label.goTo(rung.features[0])}
        </button>
      </details>
    </li>
  );
}

const percent = (share: number) => (share >= 0.0995 ? Math.round(100 * share) : Number((100 * share).toPrecision(1)));
