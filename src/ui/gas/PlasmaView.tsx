import type { AbundanceResult, DiagnosticResult, Gas } from '../../plasma/index.ts';
import { useDesk } from '../desk/deskStore.ts';
import { fixed, withError } from '../figures.ts';
import { NumberSetting } from '../parts/NumberSetting.tsx';
import { words } from '../words.ts';
import { bandsFigure, letterOf } from './bandsFigure.ts';
import { chargedIon } from './chargedIon.ts';
import { abundanceText, estimateText } from './estimateText.ts';
import { FigureBox } from './FigureBox.tsx';
import { setGas } from './setGas.ts';

const { plasma: label } = words.gas;
const UNIT = { temperature: 'K', density: 'cm⁻³' } as const;

/** Temperature, density and abundances. */
export function PlasmaView({ gas }: { readonly gas: Gas }) {
  return (
    <>
      <Zones gas={gas} />
      <p className="hint">{label.assumption(gas.draws)}</p>
      {gas.bands.length > 0 && <FigureBox name="te-ne" draw={(width) => bandsFigure(gas, width)} />}
      <Diagnostics gas={gas} />
      <PlasmaSettings />
      <Abundances gas={gas} />
    </>
  );
}

function Zones({ gas }: { readonly gas: Gas }) {
  return (
    <table className="numbers">
      <caption>{label.zonesCaption}</caption>
      <thead>
        <tr>
          <th scope="col">{label.zone}</th>
          <th scope="col">Te</th>
          <th scope="col">ne</th>
        </tr>
      </thead>
      <tbody>
        {gas.zones.map(({ zone, te, ne }) => (
          <tr key={zone}>
            <th scope="row">{label.zones[zone]}</th>
            <td>
              {estimateText(te.estimate, 'K')}
              <span className="reason">{te.from}</span>
            </td>
            <td>
              {estimateText(ne.estimate, 'cm⁻³')}
              <span className="reason">{ne.from}</span>
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Diagnostics({ gas }: { readonly gas: Gas }) {
  const { diagnostics, jumps, unused } = gas;
  if (diagnostics.length === 0 && unused.length === 0) return <p className="hint">{label.none}</p>;
  return (
    <table className="numbers">
      <caption>{label.diagnostics}</caption>
      <thead>
        <tr>
          <th scope="col">{label.ratio}</th>
          <th scope="col">{label.measured}</th>
          <th scope="col">{label.tells}</th>
        </tr>
      </thead>
      <tbody>
        {diagnostics.map((diagnostic, k) => (
          <DiagnosticRow key={diagnostic.label} diagnostic={diagnostic} letter={letterOf(k)} />
        ))}
        {jumps.map((jump) => (
          <NumberRow
            key={jump.label}
            name={jump.label}
            cells={[withError(jump.ratio.value, jump.ratio.err, 4), estimateText(jump.result, 'K')]}
            why={`${jump.result.ended === 'none' ? `${jump.result.reason}. ` : ''}${jump.assumption}`}
          />
        ))}
        {unused.map(({ label: name, reason }) => (
          <NumberRow key={name} name={name} cells={['–', '–']} why={reason} />
        ))}
      </tbody>
    </table>
  );
}

function DiagnosticRow({ diagnostic, letter }: { readonly diagnostic: DiagnosticResult; readonly letter: string }) {
  const { label: name, ratio, result, tells, counts, assumption } = diagnostic;
  const why = `${result.ended === 'none' ? `${result.reason}. ` : ''}${assumption}${counts ? '' : ` ${label.aside}`}`;
  return (
    <NumberRow letter={letter} name={name} cells={[withError(ratio.value, ratio.err, 4), estimateText(result, UNIT[tells])]} why={why} />
  );
}

interface NumberRowProps {
  readonly letter?: string;
  readonly name: string;
  readonly cells: readonly string[];
  readonly why: string;
}

/** A row of numbers, and below it in small what they assume. */
function NumberRow({ letter, name, cells, why }: NumberRowProps) {
  const [first, ...others] = cells;
  return (
    <>
      <tr>
        <th scope="row">
          {letter && <b>{`${letter} `}</b>}
          {name}
        </th>
        <td>{first}</td>
        {others.map((cell) => (
          <td key={cell}>{cell}</td>
        ))}
      </tr>
      <tr className="why">
        <td colSpan={1 + cells.length}>{why}</td>
      </tr>
    </>
  );
}

function PlasmaSettings() {
  const chosen = useDesk((state) => state.history.document.settings.gas);
  return (
    <div className="two gas-settings">
      <NumberSetting
        label={label.te}
        unit="K"
        hint={label.fixHint}
        low={3_000}
        high={30_000}
        value={chosen?.te}
        used={undefined}
        commit={(te, said) => setGas({ te }, said)}
      />
      <NumberSetting
        label={label.ne}
        unit="cm⁻³"
        hint={label.fixHint}
        low={1}
        high={1e8}
        value={chosen?.ne}
        used={undefined}
        commit={(ne, said) => setGas({ ne }, said)}
      />
    </div>
  );
}

function Abundances({ gas }: { readonly gas: Gas }) {
  const { abundances, discrepancies } = gas;
  if (abundances.length === 0) return <p className="hint">{label.noAbundances}</p>;
  return (
    <>
      <table className="numbers">
        <caption>{label.abundances}</caption>
        <thead>
          <tr>
            <th scope="col">{label.ion}</th>
            <th scope="col">N/N(H⁺)</th>
          </tr>
        </thead>
        <tbody>
          {abundances.map((abundance) => (
            <AbundanceRow key={`${abundance.ion} ${abundance.from}`} abundance={abundance} />
          ))}
        </tbody>
      </table>
      {discrepancies.length > 0 && <h3>{label.discrepancies}</h3>}
      {discrepancies.map(({ ion, factor, low, high }) => (
        <p key={ion} className="number">
          {label.discrepancy(chargedIon(ion), fixed(factor, 2), fixed(low, 2), fixed(high, 2))}
        </p>
      ))}
    </>
  );
}

function AbundanceRow({ abundance: { ion, from, abundance, low, high, lines, assumption } }: { readonly abundance: AbundanceResult }) {
  return (
    <NumberRow
      name={label.ionOf(chargedIon(ion), from)}
      cells={[abundanceText(abundance, low, high)]}
      why={`${lines.join(', ')}. ${assumption}`}
    />
  );
}
