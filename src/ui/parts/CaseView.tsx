import { useEffect, useRef } from 'react';
import { useChosenRow } from '../desk/chosen.ts';
import { declareRow, reopenRow } from '../desk/decisions.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { fixed, fluxText, wavelengthText, withError } from '../figures.ts';
import { words } from '../words.ts';
import { Candidates } from './Candidates.tsx';
import { CloseUp } from './CloseUp.tsx';
import { CommandButton } from './CommandButton.tsx';
import { FitByHand } from './FitByHand.tsx';
import { Icon } from './Icon.tsx';
import { Mark } from './Mark.tsx';
import { NoteField } from './NoteField.tsx';
import { uniqueKeys } from './uniqueKeys.ts';

/** The chosen feature: close-up, numbers, candidates with their evidence, verdict. */
export function CaseView() {
  const row = useChosenRow();
  const top = useRef<HTMLElement>(null);
  const number = row?.feature.number;
  useEffect(() => {
    if (number !== undefined) top.current?.scrollIntoView({ block: 'nearest' });
  }, [number]);
  if (!row) return <p className="hint">{words.case.none}</p>;
  return (
    <article className="case">
      <header className="case-head" ref={top}>
        <CommandButton name="previous-feature">
          <Icon name="left" />
        </CommandButton>
        <div aria-live="polite">
          <h2>
            <Mark standing={row.standing} /> {words.case.feature(row.feature.number)}
            <span className="standing">{words.standing[row.standing]}</span>
          </h2>
          <p className="number case-place">{`${wavelengthText(row.feature.centroid, finite(row.feature.centroidErr))} Å`}</p>
        </div>
        <CommandButton name="next-feature">
          <Icon name="right" />
        </CommandButton>
      </header>
      <CloseUp row={row} />
      <Measured row={row} />
      <FitByHand key={`hand ${row.feature.number}`} row={row} />
      <Verdicts row={row} />
      <Candidates row={row} />
      <NoteField key={row.feature.number} row={row} />
    </article>
  );
}

const finite = (value: number) => (Number.isFinite(value) ? value : undefined);

function Measured({ row }: { row: DeskRow }) {
  const { measured } = row.feature;
  const { case: label } = words;
  const facts: [string, string][] = [
    [label.flux, fluxText(measured.flux, measured.fluxErr)],
    [label.fwhm, `${withError(measured.fwhm, finite(measured.fwhmErr), 2)} Å`],
    [label.snr, fixed(measured.snr, 1)],
  ];
  if (Number.isFinite(measured.ew)) facts.push([label.ew, `${withError(measured.ew, finite(measured.ewErr), 2)} Å`]);
  if (measured.intrinsicFwhmKms !== undefined) facts.push([label.intrinsic, `${fixed(measured.intrinsicFwhmKms, 1)} km/s`]);
  const doubts = [
    measured.artefact ? label.artefactFound(measured.artefact) : '',
    measured.fit.ended === 'converged' ? '' : label.fit[measured.fit.ended],
    measured.byHand ?? '',
    ...measured.notes,
  ].filter(Boolean);
  return (
    <>
      <dl className="measured" aria-label={label.facts}>
        {facts.map(([name, value]) => (
          <div key={name}>
            <dt>{name}</dt>
            <dd className="number">{value}</dd>
          </div>
        ))}
      </dl>
      {uniqueKeys(doubts, (doubt) => doubt).map(({ key, item }) => (
        <p key={key} className="doubt">
          {item}
        </p>
      ))}
    </>
  );
}

/** Verdicts that name no candidate. */
function Verdicts({ row }: { row: DeskRow }) {
  const { case: label } = words;
  const goesOn = useDesk((state) => state.goOn);
  return (
    <div className="verdicts">
      <button
        type="button"
        className="small"
        aria-pressed={row.standing === 'unidentified'}
        onClick={() => declareRow(row, 'unidentified', 'go-on')}
      >
        <Mark standing="unidentified" /> {label.unidentified}
      </button>
      <button
        type="button"
        className="small"
        aria-pressed={row.standing === 'artefact'}
        onClick={() => declareRow(row, 'artefact', 'go-on')}
      >
        <Mark standing="artefact" /> {label.artefact}
      </button>
      <label className="choice go-on">
        <input type="checkbox" checked={goesOn} onChange={() => setDesk({ goOn: !goesOn })} />
        {label.goOn}
      </label>
      {row.standing !== 'open' && (
        <button type="button" className="small" onClick={() => reopenRow(row)}>
          {label.reopen}
        </button>
      )}
    </div>
  );
}
