import type { Settings } from '../../session/index.ts';
import { redshiftFromVelocity, velocityFromRedshift } from '../../units/index.ts';
import { set } from '../desk/decisions.ts';
import { useDesk } from '../desk/deskStore.ts';
import { fixed, probabilityText, signed } from '../figures.ts';
import { words } from '../words.ts';
import { MeasuringSettings } from './MeasuringSettings.tsx';
import { NumberSetting } from './NumberSetting.tsx';

const { settings: label } = words;
const KINDS = Object.keys(words.kinds) as (keyof typeof words.kinds)[];

const naming = (change: Settings['naming'], sentence: string) => set((s) => ({ ...s, naming: { ...s.naming, ...change } }), sentence);

/** Every setting with its unit, a sentence, and the value really used. */
export function SettingsPanel() {
  const analysis = useDesk((state) => state.analysis);
  const chosen = useDesk((state) => state.history.document.settings);
  if (!analysis) return null;
  const { settings: used } = analysis;
  return (
    <section className="settings">
      <h2>{label.title}</h2>
      <RedshiftSettings />
      <NumberSetting
        label={label.toleranceKms}
        hint={label.toleranceKmsHint}
        unit="km/s"
        low={1}
        high={5000}
        value={chosen.naming.toleranceKms}
        used={used.naming.toleranceKms}
        commit={(toleranceKms, said) => naming({ toleranceKms }, said)}
      />
      <NumberSetting
        label={label.toleranceSigma}
        hint={label.toleranceSigmaHint}
        unit="σ"
        low={0}
        high={50}
        value={chosen.naming.toleranceSigma}
        used={used.naming.toleranceSigma}
        commit={(toleranceSigma, said) => naming({ toleranceSigma }, said)}
      />
      <label className="field">
        <span>{label.kind}</span>
        <select value={used.naming.kind} onChange={(event) => chooseKind(event.target.value)}>
          {KINDS.map((kind) => (
            <option key={kind} value={kind}>
              {words.kinds[kind]}
            </option>
          ))}
        </select>
        <p className="hint">{label.kindHint}</p>
      </label>
      <NumberSetting
        label={label.te}
        hint={label.teHint}
        unit="K"
        low={500}
        high={100_000}
        value={chosen.naming.te}
        used={used.naming.te}
        commit={(te, said) => naming({ te }, said)}
      />
      <NumberSetting
        label={label.ne}
        hint={label.neHint}
        unit="cm⁻³"
        low={0.01}
        high={1e12}
        value={chosen.naming.ne}
        used={used.naming.ne}
        commit={(ne, said) => naming({ ne }, said)}
      />
      {analysis.reading.kind === 'spectrum' && <MeasuringSettings />}
    </section>
  );
}

function chooseKind(value: string): void {
  const kind = KINDS.find((each) => each === value);
  if (kind) naming({ kind }, label.changed(label.kind, words.kinds[kind]));
}

/** Redshift or velocity, typed or found, and what else was weighed. */
function RedshiftSettings() {
  const analysis = useDesk((state) => state.analysis);
  const typed = useDesk((state) => state.history.document.settings.naming.z);
  if (!analysis) return null;
  const { z, redshifts } = analysis;
  const take = (value: number | undefined, said: string) => naming({ z: value }, said);
  return (
    <fieldset className="redshift">
      <legend>{`${label.redshift}: ${typed === undefined ? label.found : label.typed}`}</legend>
      <div className="two">
        <NumberSetting
          label={label.velocity}
          unit="km/s"
          low={-30_000}
          high={3_000_000}
          value={typed === undefined ? undefined : Number(velocityFromRedshift(typed).toFixed(3))}
          used={Number(velocityFromRedshift(z).toFixed(2))}
          commit={(v, said) => take(v === undefined ? undefined : redshiftFromVelocity(v), said)}
        />
        <NumberSetting
          label={label.redshift}
          unit="z"
          low={-0.1}
          high={10}
          value={typed === undefined ? undefined : Number(typed.toFixed(8))}
          used={Number(z.toFixed(6))}
          commit={take}
        />
      </div>
      <p className="hint">{label.redshiftHint}</p>
      {typed !== undefined && (
        <button type="button" className="small" onClick={() => take(undefined, label.cleared(label.redshift))}>
          {label.find}
        </button>
      )}
      {redshifts.length > 0 && (
        <>
          <h3>{label.hypotheses}</h3>
          <ul className="hypotheses">
            {redshifts.slice(0, 4).map((hypothesis) => (
              <li key={hypothesis.z}>
                <span className="number">
                  {`z ${signed(hypothesis.z, hypothesis.zErr, 5)}`}{' '}
                  <span className="muted">{`(${fixed(velocityFromRedshift(hypothesis.z), 1)} km/s)`}</span>
                </span>
                <span className="number">{probabilityText(hypothesis.probability)}</span>
                <button
                  type="button"
                  className="small"
                  onClick={() => take(hypothesis.z, label.changed(label.redshift, signed(hypothesis.z, undefined, 6)))}
                >
                  {label.take}
                </button>
                <p className="hint">{hypothesis.reason}</p>
              </li>
            ))}
          </ul>
        </>
      )}
    </fieldset>
  );
}
