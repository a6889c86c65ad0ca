import { setDesk, useDesk } from '../desk/deskStore.ts';
import { NumberSetting } from '../parts/NumberSetting.tsx';
import { Segments } from '../parts/Segments.tsx';
import { words } from '../words.ts';
import { LadderView } from './LadderView.tsx';
import { MotionView } from './MotionView.tsx';
import { PlasmaView } from './PlasmaView.tsx';
import { ReddeningView } from './ReddeningView.tsx';
import { saveGasCsv } from './saveFigure.ts';
import { setGas } from './setGas.ts';
import './gas.css';

const { gas: label } = words;
const VIEWS = ['ladder', 'reddening', 'plasma', 'motion'] as const;
const PARTS = { ladder: LadderView, reddening: ReddeningView, plasma: PlasmaView, motion: MotionView };

/** What the named lines say of the gas, in four views. */
export function GasPanel() {
  const gas = useDesk((state) => state.analysis?.gas);
  const view = useDesk((state) => state.gasView);
  const chosen = useDesk((state) => state.history.document.settings.gas);
  if (!gas) return null;
  const Part = PARTS[view];
  return (
    <section className="gas" aria-label={label.title}>
      <Segments label={label.views} options={VIEWS} value={view} words={label.viewNames} choose={(gasView) => setDesk({ gasView })} />
      <Part gas={gas} />
      <h3>{label.names}</h3>
      <p>{label.used(gas.accepted, gas.probable, gas.settings.leastProbability)}</p>
      {gas.withoutErr > 0 && <p className="hint">{label.withoutErr(gas.withoutErr)}</p>}
      <div className="two gas-settings">
        <NumberSetting
          label={label.leastProbability}
          unit=""
          hint={label.leastProbabilityHint}
          low={0.5}
          high={2}
          value={chosen?.leastProbability}
          used={gas.settings.leastProbability}
          commit={(leastProbability, said) => setGas({ leastProbability }, said)}
        />
        <NumberSetting
          label={label.calibration}
          unit="%"
          hint={label.calibrationHint}
          low={0}
          high={50}
          value={chosen?.calibrationErr === undefined ? undefined : Number((100 * chosen.calibrationErr).toFixed(3))}
          used={Number((100 * gas.settings.calibrationErr).toFixed(3))}
          commit={(percent, said) => setGas({ calibrationErr: percent === undefined ? undefined : percent / 100 }, said)}
        />
      </div>
      <button type="button" onClick={saveGasCsv}>
        {label.saveCsv}
      </button>
    </section>
  );
}
