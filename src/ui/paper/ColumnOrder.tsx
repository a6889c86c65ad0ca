import { useEffect, useRef, useState } from 'react';
import { PAPER_COLUMNS, type PaperColumnKey, type TableDesign } from '../../report/index.ts';
import { words } from '../words.ts';
import { setDesign } from './setPaper.ts';

const { paper: label } = words;
const COLUMN_KEYS = Object.keys(PAPER_COLUMNS) as PaperColumnKey[];
type By = 1 | -1;

/** The columns in their order, each to be moved or left out, and those not taken. */
export function ColumnOrder({ design }: { readonly design: TableDesign }) {
  const { columns } = design;
  const list = useRef<HTMLOListElement>(null);
  const moved = useRef<{ readonly key: PaperColumnKey; readonly by: By }>(undefined);
  // a row that moves takes the focus along: pressed again, its button moves it further; at an end the other button waits
  useEffect(() => {
    if (!moved.current) return;
    const { key, by } = moved.current;
    moved.current = undefined;
    const buttons = list.current?.querySelectorAll<HTMLButtonElement>(`[data-column="${key}"] button`);
    if (!buttons) return;
    const [earlier, later] = buttons;
    const wanted = by === -1 ? earlier : later;
    if (!wanted?.disabled) wanted?.focus();
    else (wanted === earlier ? later : earlier)?.focus();
  });
  const take = (next: readonly PaperColumnKey[], sentence: string) => setDesign(design, { columns: next }, sentence);
  const move = (k: number, by: By) => {
    const next = [...columns];
    [next[k], next[k + by]] = [next[k + by], next[k]];
    moved.current = { key: columns[k], by };
    take(next, label.movedColumn(PAPER_COLUMNS[columns[k]].label));
  };
  return (
    <fieldset>
      <legend>{label.columns}</legend>
      <ol className="paper-columns" ref={list}>
        {columns.map((key, k) => {
          const name = PAPER_COLUMNS[key].label;
          return (
            <li key={key} data-column={key}>
              <span>{name}</span>
              <button type="button" className="small" disabled={k === 0} aria-label={label.earlier(name)} onClick={() => move(k, -1)}>
                ↑
              </button>
              <button
                type="button"
                className="small"
                disabled={k === columns.length - 1}
                aria-label={label.later(name)}
                onClick={() => move(k, 1)}
              >
                ↓
              </button>
              <button
                type="button"
                className="small"
                disabled={columns.length === 1}
                aria-label={label.without(name)}
                onClick={() =>
                  take(
                    columns.filter((each) => each !== key),
                    label.tookOut(name),
                  )
                }
              >
                ×
              </button>
            </li>
          );
        })}
      </ol>
      <AddColumn columns={columns} add={(key) => take([...columns, key], label.addedColumn(PAPER_COLUMNS[key].label))} />
    </fieldset>
  );
}

/** The columns that are not taken. */
function AddColumn({ columns, add }: { readonly columns: readonly PaperColumnKey[]; readonly add: (key: PaperColumnKey) => void }) {
  const [chosen, setChosen] = useState('');
  const free = COLUMN_KEYS.filter((key) => !columns.includes(key));
  if (free.length === 0) return null;
  return (
    <span className="with-unit">
      <select value={chosen} aria-label={label.addColumn} onChange={(event) => setChosen(event.target.value)}>
        <option value="">{label.addColumn}</option>
        {free.map((key) => (
          <option key={key} value={key}>
            {PAPER_COLUMNS[key].label}
          </option>
        ))}
      </select>
      <button
        type="button"
        className="small"
        disabled={chosen === ''}
        onClick={() => {
          const key = free.find((each) => each === chosen);
          setChosen('');
          if (key) add(key);
        }}
      >
        {label.add}
      </button>
    </span>
  );
}
