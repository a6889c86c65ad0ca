import type { CandidateView, TransitionView } from '../../engine/index.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { fixed, powerText, withError } from '../figures.ts';
import { words } from '../words.ts';
import { CompanionStrips } from './CompanionStrips.tsx';
import { Ring } from './Mark.tsx';
import { uniqueKeys } from './uniqueKeys.ts';

const { case: label } = words;

/** The evidence for one candidate: sentences with what each adds, companions, thin-gas facts, the transition. */
export function CandidateCase({ row, candidate }: { row: DeskRow; candidate: CandidateView }) {
  return (
    <div className="case-body">
      <table className="evidence">
        <tbody>
          {uniqueKeys(candidate.evidence, ({ kind, sentence }) => `${kind} ${sentence}`).map(({ key, item: piece }) => (
            <tr key={key}>
              <th scope="row">{label.evidence[piece.kind]}</th>
              <td>{piece.sentence}</td>
              <td className="number nats" title={label.natsTitle}>
                {`${piece.nats > 0 ? '+' : ''}${fixed(piece.nats, 1)}`}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {candidate.transitions.map((transition, k) => (
        <Transition
          key={transition.key}
          transition={transition}
          share={candidate.transitions.length > 1 ? candidate.shares[k] : undefined}
        />
      ))}
      {candidate.companions.length > 0 && <CompanionStrips row={row} candidate={candidate} />}
    </div>
  );
}

function Transition({ transition, share }: { transition: TransitionView; share?: number }) {
  const { thinGas } = transition;
  return (
    <section className="transition" aria-label={label.transition}>
      <p>
        <strong>{`${transition.ion} ${withError(transition.wavelengthLab, transition.wavelengthLabErr || undefined, 3)} Å`}</strong>
        {share !== undefined && <span className="number">{` ${label.shares} ${fixed(share, 2)}`}</span>}
        <span className="levels">{levelsText(transition)}</span>
      </p>
      {thinGas && (
        <div className="thin-gas">
          <p>
            <Ring title={label.thinGas} /> <strong>{label.thinGas}</strong>
            <span className="number">
              {` ${label.lifetime} ${powerText(thinGas.lifetimeS, 3)} s, ${label.nCrit} ${thinGas.nCrit === undefined ? label.noCollisions : `${powerText(thinGas.nCrit, 2)} cm⁻³`}`}
            </span>
          </p>
          <p>{thinGas.sentence}</p>
        </div>
      )}
      {transition.sources.length > 0 && (
        <details className="sources">
          <summary>{`${label.sources} (${transition.sources.length})`}</summary>
          <ul>
            {uniqueKeys(transition.sources, (source) => source).map(({ key, item }) => (
              <li key={key}>{item}</li>
            ))}
          </ul>
        </details>
      )}
    </section>
  );
}

/** "2p2 3P 2 – 2p2 1D 2, forbidden"; only the nature where the levels are not known. */
function levelsText({ lower, upper, nature }: TransitionView): string {
  return lower || upper ? `${lower} – ${upper}, ${nature}` : nature;
}
