import type { Settings } from '../../session/index.ts';
import { set } from '../desk/decisions.ts';
import { useDesk } from '../desk/deskStore.ts';
import { numberPairs, pairsText } from '../desk/numberPairs.ts';
import { fixed, round } from '../figures.ts';
import { words } from '../words.ts';
import { NumberSetting } from './NumberSetting.tsx';
import { TextSetting } from './TextSetting.tsx';

const { settings: label } = words;

type Measuring = Settings['measure'];
type Continuum = NonNullable<Measuring['continuum']>;

const measure = (change: Measuring, sentence: string) => set((s) => ({ ...s, measure: { ...s.measure, ...change } }), sentence);

/** How the spectrum is measured: threshold, line width, continuum, ties; each with its unit, a sentence and the value really used. */
export function MeasuringSettings() {
  const analysis = useDesk((state) => state.analysis);
  const chosen = useDesk((state) => state.history.document.settings.measure);
  if (!analysis) return null;
  const used = analysis.settings.measure;
  return (
    <>
      <NumberSetting
        label={label.threshold}
        hint={`${label.thresholdHint}${analysis.expectedFalse === undefined ? '' : ` ${label.expectedFalse(round(analysis.expectedFalse, 2))}`}`}
        unit="σ"
        low={1}
        high={1000}
        value={chosen.thresholdSigma}
        used={used.thresholdSigma}
        commit={(thresholdSigma, said) => measure({ thresholdSigma }, said)}
      />
      <NumberSetting
        label={label.resolvingPower}
        hint={label.resolvingPowerHint}
        unit={analysis.resolvingPowerFrom ? label.resolvingPowerFrom[analysis.resolvingPowerFrom] : 'λ/FWHM'}
        low={10}
        high={1_000_000}
        value={chosen.resolvingPower}
        used={analysis.resolvingPower && Math.round(analysis.resolvingPower)}
        commit={(resolvingPower, said) => measure({ resolvingPower }, said)}
      />
      <NumberSetting
        label={label.instrumentFwhm}
        unit="Å"
        low={0.0001}
        high={1000}
        value={chosen.instrumentFwhmA}
        used={analysis.lineWidth && Number(analysis.lineWidth.fwhmA.toPrecision(3))}
        commit={(instrumentFwhmA, said) => measure({ instrumentFwhmA }, said)}
      />
      <NumberSetting
        label={label.instrumentSlope}
        unit="Å per 1000 Å"
        low={-100}
        high={100}
        value={chosen.instrumentFwhmSlope === undefined ? undefined : Number((1000 * chosen.instrumentFwhmSlope).toPrecision(6))}
        used={0}
        commit={(slope, said) => measure({ instrumentFwhmSlope: slope === undefined ? undefined : slope / 1000 }, said)}
      />
      <p className="hint">
        {label.instrumentHint} {analysis.lineWidth ? label.widthForm[analysis.lineWidth.form] : ''}
      </p>
      <ContinuumSettings chosen={chosen.continuum ?? {}} usedPeriod={analysis.continuumHalfPeriodA} />
      <Choice
        label={label.absorption}
        hint={label.absorptionHint}
        checked={used.absorption}
        commit={(absorption, said) => measure({ absorption }, said)}
      />
      <Choice
        label={label.tieNamedPairs}
        hint={label.tieNamedPairsHint}
        checked={used.tieNamedPairs}
        commit={(tieNamedPairs, said) => measure({ tieNamedPairs }, said)}
      />
    </>
  );
}

function ContinuumSettings({ chosen, usedPeriod }: { chosen: Continuum; usedPeriod: number | undefined }) {
  const change = (part: Continuum, sentence: string) => {
    const { halfPeriodA, exclude, pins } = { ...chosen, ...part };
    const after = {
      ...(halfPeriodA === undefined ? {} : { halfPeriodA }),
      ...(exclude?.length ? { exclude } : {}),
      ...(pins?.length ? { pins } : {}),
    };
    measure({ continuum: Object.keys(after).length > 0 ? after : undefined }, sentence);
  };
  const exclude = pairsText(chosen.exclude ?? [], '-');
  const pins = pairsText(
    (chosen.pins ?? []).map(({ wavelength, level }) => [wavelength, level] as const),
    ' ',
  );
  return (
    <>
      <NumberSetting
        label={label.continuumPeriod}
        hint={label.continuumPeriodHint}
        unit="Å"
        low={0.1}
        high={100_000}
        value={chosen.halfPeriodA}
        used={usedPeriod === undefined ? undefined : Number(fixed(usedPeriod, 0))}
        commit={(halfPeriodA, said) => change({ halfPeriodA }, said)}
      />
      <TextSetting
        key={`exclude ${exclude}`}
        label={label.continuumExclude}
        hint={label.continuumExcludeHint}
        unit="Å"
        value={exclude}
        fault={(text) => (text === '' || numberPairs(text, 'rising') ? undefined : label.pairsFault)}
        commit={(text) =>
          change({ exclude: numberPairs(text, 'rising') ?? [] }, label.changed(label.continuumExclude, text || label.nothing))
        }
      />
      <TextSetting
        key={`pins ${pins}`}
        label={label.continuumPins}
        hint={label.continuumPinsHint}
        value={pins}
        fault={(text) => (text === '' || numberPairs(text, 'any') ? undefined : label.pairsFault)}
        commit={(text) =>
          change(
            { pins: (numberPairs(text, 'any') ?? []).map(([wavelength, level]) => ({ wavelength, level })) },
            label.changed(label.continuumPins, text || label.nothing),
          )
        }
      />
    </>
  );
}

interface ChoiceProps {
  readonly label: string;
  readonly hint: string;
  readonly checked: boolean;
  readonly commit: (value: boolean, sentence: string) => void;
}

function Choice({ label: name, hint, checked, commit }: ChoiceProps) {
  return (
    <>
      <label className="choice">
        <input
          type="checkbox"
          checked={checked}
          onChange={(event) => commit(event.target.checked, label.changed(name, event.target.checked ? 'on' : 'off'))}
        />
        {name}
      </label>
      <p className="hint">{hint}</p>
    </>
  );
}
