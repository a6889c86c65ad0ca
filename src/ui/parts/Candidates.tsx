import { useState } from 'react';
import type { CandidateView } from '../../engine/index.ts';
import { acceptCandidate, rejectCandidate } from '../desk/decisions.ts';
import { type DeskRow, isOfTheAir, thinGasOf } from '../desk/deskRows.ts';
import { fixed, probabilityText, signed } from '../figures.ts';
import { words } from '../words.ts';
import { CandidateCase } from './CandidateCase.tsx';
import { Icon } from './Icon.tsx';
import { Ring } from './Mark.tsx';
import { uniqueKeys } from './uniqueKeys.ts';

const { case: label } = words;

/** Candidates of a feature, best first, the case of one of them open. */
export function Candidates({ row }: { row: DeskRow }) {
  const [opened, setOpened] = useState<{ feature: number; candidate: string }>();
  const keyed = uniqueKeys(row.candidates, (candidate) => candidate.label);
  const first = keyed.find(({ item }) => item === row.name) ?? keyed[0];
  const shown = opened?.feature === row.feature.number ? opened.candidate : first?.key;
  return (
    <section className="candidates" aria-label={label.candidates}>
      {row.candidates.length === 0 && <p className="hint">{label.noCandidates}</p>}
      <ol>
        {keyed.map(({ key, item: candidate }, k) => (
          <CandidateCard
            key={key}
            row={row}
            candidate={candidate}
            digit={k + 1}
            isOpen={key === shown}
            toggle={() => setOpened({ feature: row.feature.number, candidate: key === shown ? '' : key })}
          />
        ))}
      </ol>
      <p className="none-of-these">
        <span>{label.noneOfThese}</span>
        <Probability value={row.feature.noneProbability} />
      </p>
      {row.turnedDown.length > 0 && (
        <ul className="turned-down" aria-label={label.turnedDown}>
          {uniqueKeys(row.turnedDown, (candidate) => candidate.label).map(({ key, item: candidate }) => (
            <li key={key}>
              <s>{candidate.label}</s>
              <button type="button" className="small" onClick={() => acceptCandidate(row, candidate, 'go-on')}>
                {label.acceptAfterAll}
              </button>
            </li>
          ))}
        </ul>
      )}
    </section>
  );
}

interface CardProps {
  readonly row: DeskRow;
  readonly candidate: CandidateView;
  readonly digit: number;
  readonly isOpen: boolean;
  readonly toggle: () => void;
}

function CandidateCard({ row, candidate, digit, isOpen, toggle }: CardProps) {
  const isAccepted = row.standing === 'accepted' && row.name === candidate;
  return (
    <li className={isAccepted ? 'candidate is-accepted' : 'candidate'}>
      <div className="candidate-head">
        <kbd>{digit <= 9 ? digit : ''}</kbd>
        <button type="button" className="candidate-name" aria-expanded={isOpen} onClick={toggle}>
          {candidate.label}
          {thinGasOf(candidate) && <Ring title={label.thinGas} />}
          {isOfTheAir(candidate) && <span className="tag">{words.sky}</span>}
        </button>
        <Probability value={candidate.probability} />
        <button
          type="button"
          className={isAccepted ? 'small is-on' : 'small'}
          aria-pressed={isAccepted}
          aria-label={`${label.accept} ${candidate.label}`}
          title={label.accept}
          onClick={() => acceptCandidate(row, candidate, 'go-on')}
        >
          <Icon name="check" />
        </button>
        <button
          type="button"
          className="small"
          aria-label={`${label.reject} ${candidate.label}`}
          title={label.reject}
          onClick={() => rejectCandidate(row, candidate)}
        >
          <Icon name="close" />
        </button>
      </div>
      {isOpen && <CandidateCase row={row} candidate={candidate} />}
      {!isOpen && Number.isFinite(candidate.velocityKms) && <p className="candidate-brief number">{briefOf(candidate)}</p>}
    </li>
  );
}

/** One line about a candidate whose case is closed: its velocity and the sum of its evidence. */
function briefOf(candidate: CandidateView): string {
  const nats = candidate.evidence.reduce((sum, piece) => sum + piece.nats, 0);
  return `${label.off(signed(candidate.velocityKms, candidate.velocityErrKms, 1))} · ${nats > 0 ? '+' : ''}${fixed(nats, 1)} ${label.nats}`;
}

function Probability({ value }: { value: number }) {
  return (
    <span className="probability number" style={{ '--share': value }}>
      {probabilityText(value)}
    </span>
  );
}
