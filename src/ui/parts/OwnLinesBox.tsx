import { type ChangeEvent, useRef, useState } from 'react';
import { useDesk } from '../desk/deskStore.ts';
import { addOwnLines, removeOwnLines } from '../desk/ownLines.ts';
import { words } from '../words.ts';

const { list: label } = words;

/** The user's own lines: added from a CSV, all or none, and taken out again. */
export function OwnLinesBox() {
  const own = useDesk((state) => state.history.document.settings.ownLines);
  const [refused, setRefused] = useState<{ readonly name: string; readonly rows: readonly string[] }>();
  const input = useRef<HTMLInputElement>(null);
  const take = async (event: ChangeEvent<HTMLInputElement>) => {
    const file = event.target.files?.[0];
    event.target.value = '';
    if (!file) return;
    const rows = await addOwnLines(file);
    setRefused(rows.length > 0 ? { name: file.name, rows } : undefined);
  };
  return (
    <section className="own-lines" aria-label={label.own}>
      <h3>{label.own}</h3>
      <p className="hint">{own ? label.ownIn(own.name) : label.ownHint}</p>
      <input
        ref={input}
        type="file"
        accept=".csv,text/csv,text/plain"
        hidden
        aria-label={label.ownAdd}
        onChange={(event) => void take(event)}
      />
      <button type="button" className="small" onClick={() => input.current?.click()}>
        {label.ownAdd}
      </button>
      {own && (
        <button type="button" className="small" onClick={removeOwnLines}>
          {label.ownRemove}
        </button>
      )}
      {refused && (
        <div role="alert">
          <p>{label.ownRefused(refused.name, refused.rows.length)}</p>
          <ul className="list-sources">
            {refused.rows.map((row) => (
              <li key={row}>{row}</li>
            ))}
          </ul>
        </div>
      )}
    </section>
  );
}
