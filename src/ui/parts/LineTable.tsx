import { useVirtualizer } from '@tanstack/react-virtual';
import { type MouseEvent, useEffect, useMemo, useRef } from 'react';
import { choose, useChosenRow } from '../desk/chosen.ts';
import { type DeskRow, isOfTheAir, thinGasOf } from '../desk/deskRows.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { pickAlso, pickedRows, pickTo, tick } from '../desk/picking.ts';
import { shownColumns, type TableColumn } from '../table/columns.ts';
import { sortedBy } from '../table/sortRows.ts';
import { tableRows } from '../table/tableRows.ts';
import { words } from '../words.ts';
import { BulkBar } from './BulkBar.tsx';
import { FilterBar } from './FilterBar.tsx';
import { Mark, Ring } from './Mark.tsx';
import { RowVerdict } from './RowVerdict.tsx';

const ROW_PX = 26;
const PICK_PX = 28;
const GROWING: Record<string, string> = { name: '320px', note: '1fr' };
const trackOf = ({ key, width }: TableColumn) => (GROWING[key] ? `minmax(${width}px, ${GROWING[key]})` : `${width}px`);
const gridOf = (columns: readonly TableColumn[]) => ({
  gridTemplateColumns: [`${PICK_PX}px`, ...columns.map(trackOf)].join(' '),
});
const leastWidth = (columns: readonly TableColumn[]) => columns.reduce((sum, { width }) => sum + width, PICK_PX);

/** Every feature as a row: sorted, filtered, only what is in sight drawn. */
export function LineTable() {
  const rows = useDesk((state) => state.rows);
  const filter = useDesk((state) => state.filter);
  const sorting = useDesk((state) => state.sorting);
  const hidden = useDesk((state) => state.hiddenColumns);
  const chosen = useChosenRow()?.index;
  const shown = useMemo(() => tableRows(rows, filter, sorting), [rows, filter, sorting]);
  const picked = useDesk((state) => state.picked);
  const isPicked = useMemo(() => new Set(picked), [picked]);
  const inHand = useMemo(() => pickedRows(rows, picked), [rows, picked]);
  const columns = useMemo(() => shownColumns(hidden), [hidden]);
  const grid = useMemo(() => gridOf(columns), [columns]);
  const scroller = useRef<HTMLDivElement>(null);
  const virtual = useVirtualizer({
    count: shown.length,
    getScrollElement: () => scroller.current,
    estimateSize: () => ROW_PX,
    overscan: 8,
    scrollMargin: ROW_PX,
    scrollPaddingStart: ROW_PX,
    initialRect: { width: 800, height: 400 },
  });
  const place = shown.findIndex((row) => row.index === chosen);
  useEffect(() => {
    if (place >= 0) virtual.scrollToIndex(place, { align: 'auto' });
  }, [place, virtual]);
  return (
    <section className="table" aria-label={words.table.label}>
      {inHand.length > 0 ? <BulkBar rows={inHand} /> : <FilterBar shown={shown} />}
      <div ref={scroller} className="table-scroll">
        <table className="lines" style={{ minWidth: leastWidth(columns) }} aria-label={words.table.label} aria-rowcount={shown.length + 1}>
          <thead>
            <tr style={grid} aria-rowindex={1}>
              <td />
              {columns.map((column) => (
                <Head key={column.key} column={column} />
              ))}
            </tr>
          </thead>
          <tbody style={{ height: virtual.getTotalSize() }}>
            {virtual.getVirtualItems().map((item) => (
              <Row
                key={shown[item.index].index}
                row={shown[item.index]}
                columns={columns}
                grid={grid}
                place={item.index}
                start={item.start - ROW_PX}
                isChosen={item.index === place}
                isPicked={isPicked.has(shown[item.index].feature.number)}
              />
            ))}
          </tbody>
        </table>
        {shown.length === 0 && <p className="hint">{rows.length === 0 ? words.table.noFeatures : words.table.nothing}</p>}
      </div>
    </section>
  );
}

const rowId = (row: DeskRow) => `line-${row.feature.number}`;

const cellClass = ({ key, numeric }: TableColumn) => (key === 'standing' ? 'cell verdict-cell' : numeric ? 'cell right number' : 'cell');

function Head({ column }: { column: TableColumn }) {
  const sorting = useDesk((state) => state.sorting);
  const isSorted = sorting.column === column.key;
  return (
    <th scope="col" className={column.numeric ? 'cell right' : 'cell'} aria-sort={isSorted ? sorting.direction : 'none'}>
      <button type="button" className="head" onClick={() => setDesk({ sorting: sortedBy(sorting, column.key) })}>
        {column.head}
        {column.unit && <span className="unit"> {column.unit}</span>}
        {isSorted && (
          <span aria-hidden="true" className="arrow">
            {sorting.direction === 'ascending' ? '↑' : '↓'}
          </span>
        )}
      </button>
    </th>
  );
}

/** A click chooses; with Shift it picks all rows up to this one, with Ctrl or ⌘ this one too. */
function clicked(event: MouseEvent, row: DeskRow): void {
  if (event.shiftKey) pickTo(row);
  else if (event.ctrlKey || event.metaKey) pickAlso(row);
  else choose(row.index);
}

interface RowProps {
  readonly row: DeskRow;
  readonly columns: readonly TableColumn[];
  readonly grid: { readonly gridTemplateColumns: string };
  /** Among the rows shown. */
  readonly place: number;
  /** Pixels below the head. */
  readonly start: number;
  readonly isChosen: boolean;
  readonly isPicked: boolean;
}

function Row({ row, columns, grid, place, start, isChosen, isPicked }: RowProps) {
  return (
    // the keys of the desk walk the rows: a click is the mouse's way to the same thing
    <tr
      id={rowId(row)}
      className={`body-row standing-${row.standing}${isPicked ? ' is-picked' : ''}`}
      style={{ ...grid, height: ROW_PX, transform: `translateY(${start}px)` }}
      aria-rowindex={place + 2}
      aria-current={isChosen || undefined}
      onClick={(event) => clicked(event, row)}
      onKeyDown={(event) => event.key === ' ' && choose(row.index)}
    >
      <td className="pick">
        <input
          type="checkbox"
          tabIndex={-1}
          aria-label={words.bulk.pick(row.feature.number)}
          checked={isPicked}
          onChange={() => tick(row)}
          onClick={(event) => event.stopPropagation()}
        />
      </td>
      {columns.map((column) => (
        <td key={column.key} className={cellClass(column)} title={column.key === 'note' ? column.text(row) : undefined}>
          {column.key === 'standing' && <Mark standing={row.standing} />}
          {column.text(row)}
          {column.key === 'standing' && <RowVerdict row={row} />}
          {column.key === 'name' && thinGasOf(row.name) && <Ring title={words.case.thinGas} />}
          {column.key === 'name' && row.name && isOfTheAir(row.name) && <span className="tag">{words.sky}</span>}
        </td>
      ))}
    </tr>
  );
}
