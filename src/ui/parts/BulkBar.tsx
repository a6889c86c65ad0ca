import { useState } from 'react';
import { acceptAll, declareAll, noteOnAll, rejectAll, reopenAll } from '../desk/bulkDecisions.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { copyRows } from '../desk/files.ts';
import { pickNone } from '../desk/picking.ts';
import { words } from '../words.ts';
import { Icon } from './Icon.tsx';
import { Mark } from './Mark.tsx';

const { bulk: label } = words;

/** What can be done with the picked rows, all at once. */
export function BulkBar({ rows }: { rows: readonly DeskRow[] }) {
  const [note, setNote] = useState<string>();
  const write = () => {
    if (note?.trim()) noteOnAll(rows, note.trim());
    setNote(undefined);
  };
  return (
    <section className="filter bulk" aria-label={label.label}>
      <strong className="number" aria-live="polite">
        {label.picked(rows.length)}
      </strong>
      <button type="button" className="small" onClick={() => acceptAll(rows)}>
        <Icon name="check" /> {words.case.accept}
      </button>
      <button type="button" className="small" onClick={() => rejectAll(rows)}>
        <Icon name="close" /> {words.case.reject}
      </button>
      <button type="button" className="small" onClick={() => declareAll(rows, 'unidentified')}>
        <Mark standing="unidentified" /> {words.case.unidentified}
      </button>
      <button type="button" className="small" onClick={() => declareAll(rows, 'artefact')}>
        <Mark standing="artefact" /> {words.case.artefact}
      </button>
      <button type="button" className="small" onClick={() => reopenAll(rows)}>
        {words.case.reopen}
      </button>
      {note === undefined ? (
        <button type="button" className="small" onClick={() => setNote('')}>
          {words.case.note}
        </button>
      ) : (
        <input
          type="text"
          aria-label={label.noteFor(rows.length)}
          placeholder={words.case.notePlaceholder}
          value={note}
          // the button it stands in for had the focus
          ref={(field) => field?.focus()}
          onChange={(event) => setNote(event.target.value)}
          onBlur={write}
          onKeyDown={(event) => {
            if (event.key === 'Enter') write();
            if (event.key === 'Escape') setNote(undefined);
          }}
        />
      )}
      <span className="spring" />
      <button type="button" className="small" onClick={() => void copyRows(rows)}>
        {label.copy}
      </button>
      <button type="button" className="small" onClick={pickNone}>
        {label.none}
      </button>
    </section>
  );
}
