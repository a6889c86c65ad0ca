import { useState } from 'react';
import { noteOn } from '../desk/decisions.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { NOTE_ID } from '../desk/focus.ts';
import { words } from '../words.ts';

/** The note of a feature: written when the field is left. */
export function NoteField({ row }: { row: DeskRow }) {
  const [text, setText] = useState(row.note);
  const [shown, setShown] = useState(row.note);
  if (shown !== row.note) {
    setShown(row.note);
    setText(row.note);
  }
  return (
    <label className="field note">
      <span>{words.case.note}</span>
      <input
        id={NOTE_ID}
        type="text"
        value={text}
        placeholder={words.case.notePlaceholder}
        onChange={(event) => setText(event.target.value)}
        onBlur={() => text !== row.note && noteOn(row, text)}
        onKeyDown={(event) => event.key === 'Enter' && event.currentTarget.blur()}
      />
    </label>
  );
}
