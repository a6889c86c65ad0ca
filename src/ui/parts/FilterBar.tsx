import { useMemo } from 'react';
import { choose } from '../desk/chosen.ts';
import { acceptNames } from '../desk/decisions.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { FILTER_ID } from '../desk/focus.ts';
import { ionsIn, type RowFilter } from '../table/rowFilter.ts';
import { words } from '../words.ts';
import { ColumnsMenu } from './ColumnsMenu.tsx';

const { table: label } = words;
/** Names at least this probable may be accepted in one go. */
const SURE = 0.9;

/** What the table shows and how much that is. */
export function FilterBar({ shown }: { shown: readonly DeskRow[] }) {
  const filter = useDesk((state) => state.filter);
  const rows = useDesk((state) => state.rows);
  const change = (part: RowFilter) => setDesk({ filter: { ...filter, ...part } });
  const isFiltered = Object.values(filter).some(Boolean);
  const ions = useMemo(() => ionsIn(rows), [rows]);
  const sure = shown.filter((row) => row.standing === 'open' && row.name && row.name.probability >= SURE);
  return (
    <div className="filter">
      <input
        id={FILTER_ID}
        type="search"
        aria-label={label.filter}
        placeholder={label.filter}
        value={filter.text ?? ''}
        onChange={(event) => change({ text: event.target.value })}
        onKeyDown={(event) => {
          if (event.key !== 'Enter' && event.key !== 'ArrowDown') return;
          event.preventDefault();
          event.currentTarget.blur();
          if (shown[0]) choose(shown[0].index);
        }}
      />
      <select aria-label={label.ion} value={filter.ion ?? ''} onChange={(event) => change({ ion: event.target.value || undefined })}>
        <option value="">{label.anyIon}</option>
        {ions.map((ion) => (
          <option key={ion}>{ion}</option>
        ))}
      </select>
      <Choice label={label.nature} options={label.natures} value={filter.nature} choose={(nature) => change({ nature })} />
      <Choice
        label={label.standing}
        options={{ any: label.anyStanding, ...words.standing }}
        value={filter.standing}
        choose={(standing) => change({ standing })}
      />
      <Choice
        label={label.probability}
        options={label.probabilities}
        value={filter.probability}
        choose={(probability) => change({ probability })}
      />
      {isFiltered && (
        <button type="button" className="small" onClick={() => setDesk({ filter: {} })}>
          {label.clear}
        </button>
      )}
      <span className="spring" />
      {sure.length > 0 && (
        <button type="button" className="small" onClick={() => acceptNames(sure)}>
          {label.acceptShown(sure.length)}
        </button>
      )}
      <ColumnsMenu />
      <span className="number muted count">{label.count(shown.length, rows.length)}</span>
    </div>
  );
}

interface ChoiceProps<Option extends string> {
  readonly label: string;
  readonly options: Record<Option | 'any', string>;
  readonly value: Option | undefined;
  readonly choose: (option: Option | undefined) => void;
}

function Choice<Option extends string>({ label: name, options, value, choose }: ChoiceProps<Option>) {
  const keys = Object.keys(options) as (Option | 'any')[];
  return (
    <select
      aria-label={name}
      value={value ?? 'any'}
      onChange={(event) => {
        const key = keys.find((each) => each === event.target.value);
        choose(key === 'any' ? undefined : (key as Option | undefined));
      }}
    >
      {keys.map((key) => (
        <option key={key} value={key}>
          {options[key]}
        </option>
      ))}
    </select>
  );
}
