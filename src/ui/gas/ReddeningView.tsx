import type { Gas, GasSettings, ReddeningLine } from '../../plasma/index.ts';
import { useDesk } from '../desk/deskStore.ts';
import { fixed, withError } from '../figures.ts';
import { ChoiceSelect } from '../parts/ChoiceSelect.tsx';
import { NumberSetting } from '../parts/NumberSetting.tsx';
import { words } from '../words.ts';
import { errText } from './estimateText.ts';
import { FigureBox } from './FigureBox.tsx';
import { reddeningFigure } from './reddeningFigure.ts';
import { setGas } from './setGas.ts';

const { reddening: label } = words.gas;
const CURVES = ['ccm89-odonnell94', 'ccm89', 'fitzpatrick99'] as const;

/** c(H beta) and what it is from. */
export function ReddeningView({ gas }: { readonly gas: Gas }) {
  const { reddening } = gas;
  const { cHbeta, aV, eBV, chi2, dof, helium, stellarEwA, stellarEwErrA } = reddening;
  return (
    <>
      {cHbeta ? (
        <dl className="measured">
          <div>
            <dt>c(Hβ)</dt>
            <dd className="number">{errText(cHbeta)}</dd>
          </div>
          <div>
            <dt>A(V)</dt>
            <dd className="number">{`${errText(aV)} mag`}</dd>
          </div>
          <div>
            <dt>E(B−V)</dt>
            <dd className="number">{`${errText(eBV)} mag`}</dd>
          </div>
          {chi2 !== undefined && dof !== undefined && dof > 0 && (
            <div>
              <dt>{label.chi2}</dt>
              <dd className="number">{fixed(chi2 / dof, 1)}</dd>
            </div>
          )}
          {stellarEwErrA !== undefined && (
            <div>
              <dt>{label.stellarFound}</dt>
              <dd className="number">{`${withError(stellarEwA, stellarEwErrA, 2)} Å`}</dd>
            </div>
          )}
        </dl>
      ) : (
        <p>{label.none}</p>
      )}
      <p className="hint">{reddening.assumption}</p>
      {helium && <p className="hint">{label.helium(errText(helium.cHbeta), helium.lines.join(', '))}</p>}
      {reddening.lines.length > 0 && <FigureBox name="reddening" draw={(width) => reddeningFigure(reddening, width)} />}
      <ReddeningSettings />
      {reddening.lines.length > 0 && (
        <>
          <h3>{label.lines}</h3>
          <table className="numbers">
            <thead>
              <tr>
                <th scope="col">{label.line}</th>
                <th scope="col">{label.observed}</th>
                <th scope="col">{label.caseB}</th>
                <th scope="col">{label.off}</th>
              </tr>
            </thead>
            <tbody>
              {reddening.lines.map((line) => (
                <LineRow key={line.features.join()} line={line} />
              ))}
            </tbody>
          </table>
        </>
      )}
    </>
  );
}

function LineRow({ line }: { readonly line: ReddeningLine }) {
  return (
    <tr>
      <th scope="row">
        {line.label}
        {line.reason && <span className="reason">{line.reason}</span>}
      </th>
      <td>{withError(line.observed, line.observedErr, 2)}</td>
      <td>{fixed(line.expected, 2)}</td>
      <td>{line.offSigma === undefined ? '–' : fixed(line.offSigma, 1)}</td>
    </tr>
  );
}

function ReddeningSettings() {
  const chosen = useDesk((state) => state.history.document.settings.gas);
  const used = useDesk((state) => state.analysis?.settings.gas);
  if (!used) return null;
  const fitted = used.stellarEwA === 'fitted';
  return (
    <>
      <ChoiceSelect<GasSettings['curve']>
        label={label.curve}
        value={chosen?.curve}
        otherwise={`${label.curves[used.curve]}`}
        options={CURVES.map((curve) => [curve, label.curves[curve]])}
        choose={(curve, text) => setGas({ curve }, label.changed(label.curve, text))}
      />
      <div className="two gas-settings">
        <NumberSetting
          label={label.rV}
          unit=""
          low={1}
          high={7}
          value={chosen?.rV}
          used={used.rV}
          commit={(rV, said) => setGas({ rV }, said)}
        />
        <NumberSetting
          label={label.given}
          unit=""
          low={-1}
          high={20}
          value={chosen?.cHbeta}
          used={undefined}
          commit={(cHbeta, said) => setGas({ cHbeta }, said)}
        />
      </div>
      <NumberSetting
        label={label.stellar}
        unit="Å"
        hint={label.stellarHint}
        low={0}
        high={20}
        value={typeof chosen?.stellarEwA === 'number' ? chosen.stellarEwA : undefined}
        used={typeof used.stellarEwA === 'number' ? used.stellarEwA : undefined}
        commit={(stellarEwA, said) => setGas({ stellarEwA }, said)}
      />
      <label className="choice">
        <input
          type="checkbox"
          checked={fitted}
          onChange={(event) =>
            setGas(
              { stellarEwA: event.target.checked ? 'fitted' : undefined },
              label.changed(label.stellar, event.target.checked ? label.fitted : '0 Å'),
            )
          }
        />
        {label.stellarFit}
      </label>
    </>
  );
}
