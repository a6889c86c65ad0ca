import { useState } from 'react';
import {
  PAPER_COLUMNS,
  type PaperColumnKey,
  PRESETS,
  type PresetName,
  TABLE_FORMATS,
  type TableDesign,
  type TableFormatName,
} from '../../report/index.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { Segments } from '../parts/Segments.tsx';
import { TextSetting } from '../parts/TextSetting.tsx';
import { words } from '../words.ts';
import { saveArchive, saveDesigned, saveProvenance } from './savePaper.ts';
import { setDesign, setPaper, useDesign } from './setPaper.ts';
import './paper.css';

const { paper: label } = words;
const PRESET_NAMES = Object.keys(PRESETS) as PresetName[];
const COLUMN_KEYS = Object.keys(PAPER_COLUMNS) as PaperColumnKey[];
const FORMATS = Object.keys(TABLE_FORMATS) as TableFormatName[];
const ROWS = Object.keys(label.rows) as TableDesign['rows'][];
const SCALES = Object.keys(label.scales) as TableDesign['scale'][];
const ORDERS = Object.keys(label.orders) as TableDesign['order'][];
const MOST_PANELS = 20;

/** How the paper's table and figures are made; the sheet beside it shows every change at once. */
export default function PaperPanel() {
  const design = useDesign();
  const figures = useDesk((state) => state.paperFigures);
  const change = (part: Partial<TableDesign>, sentence: string) => setDesign(design, part, sentence);
  return (
    <section className="paper" aria-label={label.title}>
      <h2>{label.title}</h2>
      <fieldset className="buttons">
        <legend>{label.presets}</legend>
        {PRESET_NAMES.map((name) => (
          <button
            key={name}
            type="button"
            className="small"
            aria-pressed={sameDesign(design, PRESETS[name])}
            title={label.presetHints[name]}
            onClick={() =>
              setPaper(
                { design: { ...PRESETS[name], ...(design.caption ? { caption: design.caption } : {}) } },
                label.tookPreset(label.presetNames[name]),
              )
            }
          >
            {label.presetNames[name]}
          </button>
        ))}
      </fieldset>
      <Columns design={design} />
      <Choice
        label={label.rowsLabel}
        options={ROWS}
        value={design.rows}
        names={label.rows}
        choose={(rows) => change({ rows }, label.changed(label.rowsLabel, label.rows[rows]))}
      />
      <Choice
        label={label.scaleLabel}
        options={SCALES}
        value={design.scale}
        names={label.scales}
        choose={(scale) => change({ scale }, label.changed(label.scaleLabel, label.scales[scale]))}
      />
      <Choice
        label={label.orderLabel}
        options={ORDERS}
        value={design.order}
        names={label.orders}
        choose={(order) => change({ order }, label.changed(label.orderLabel, label.orders[order]))}
      />
      <Choice
        label={label.digitsLabel}
        options={['1', '2']}
        value={String(design.errorDigits) as '1' | '2'}
        names={label.digits}
        choose={(digits) => change({ errorDigits: digits === '1' ? 1 : 2 }, label.changed(label.digitsLabel, digits))}
      />
      <label className="choice">
        <input
          type="checkbox"
          checked={design.blends === 'a-row-each'}
          onChange={(event) =>
            change(
              { blends: event.target.checked ? 'a-row-each' : 'one-row' },
              label.changed(label.blends, event.target.checked ? 'on' : 'off'),
            )
          }
        />
        {label.blends}
      </label>
      <TextSetting
        key={design.caption ?? ''}
        label={label.caption}
        hint={label.captionHint}
        value={design.caption ?? ''}
        commit={(caption) => change({ caption: caption || undefined }, label.changed(label.caption, caption))}
      />
      <h3>{label.figures}</h3>
      <Segments
        label={label.widthLabel}
        options={['single', 'double']}
        value={figures.width}
        words={label.widths}
        choose={(width) => setDesk({ paperFigures: { ...figures, width } })}
      />
      <label className="field">
        <span>{label.panels}</span>
        <input
          type="number"
          min={1}
          max={MOST_PANELS}
          value={figures.panels}
          onChange={(event) => {
            const panels = Math.round(Number(event.target.value));
            if (panels >= 1 && panels <= MOST_PANELS) setDesk({ paperFigures: { ...figures, panels } });
          }}
        />
      </label>
      <label className="choice">
        <input
          type="checkbox"
          checked={figures.fits}
          onChange={(event) => setDesk({ paperFigures: { ...figures, fits: event.target.checked } })}
        />
        {label.fits}
      </label>
      <h3>{label.save}</h3>
      <p className="hint">{label.saveHint}</p>
      <div className="buttons">
        <button type="button" className="primary" onClick={() => void saveArchive()}>
          {label.archive}
        </button>
        <button type="button" className="small" onClick={() => void saveProvenance()}>
          {label.provenance}
        </button>
        {FORMATS.map((name) => (
          <button key={name} type="button" className="small" onClick={() => void saveDesigned(name)}>
            {TABLE_FORMATS[name].label}
          </button>
        ))}
      </div>
    </section>
  );
}

const sameDesign = (a: TableDesign, b: TableDesign) =>
  JSON.stringify({ ...a, caption: undefined }) === JSON.stringify({ ...b, caption: undefined });

interface ChoiceProps<Option extends string> {
  readonly label: string;
  readonly options: readonly Option[];
  readonly value: Option;
  readonly names: Record<Option, string>;
  readonly choose: (option: Option) => void;
}

function Choice<Option extends string>({ label: name, options, value, names, choose }: ChoiceProps<Option>) {
  return (
    <label className="field">
      <span>{name}</span>
      <select
        value={value}
        onChange={(event) => {
          const found = options.find((option) => option === event.target.value);
          if (found) choose(found);
        }}
      >
        {options.map((option) => (
          <option key={option} value={option}>
            {names[option]}
          </option>
        ))}
      </select>
    </label>
  );
}

/** The columns in their order, each to be moved or left out, and those not taken. */
function Columns({ design }: { readonly design: TableDesign }) {
  const [added, setAdded] = useState('');
  const { columns } = design;
  const free = COLUMN_KEYS.filter((key) => !columns.includes(key));
  const take = (next: readonly PaperColumnKey[], sentence: string) => setDesign(design, { columns: next }, sentence);
  const move = (k: number, by: 1 | -1) => {
    const next = [...columns];
    [next[k], next[k + by]] = [next[k + by], next[k]];
    take(next, label.movedColumn(PAPER_COLUMNS[columns[k]].label));
  };
  return (
    <fieldset>
      <legend>{label.columns}</legend>
      <ol className="paper-columns">
        {columns.map((key, k) => {
          const name = PAPER_COLUMNS[key].label;
          return (
            <li key={key}>
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
      {free.length > 0 && (
        <span className="with-unit">
          <select value={added} aria-label={label.addColumn} onChange={(event) => setAdded(event.target.value)}>
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
            disabled={added === ''}
            onClick={() => {
              const key = free.find((each) => each === added);
              setAdded('');
              if (key) take([...columns, key], label.addedColumn(PAPER_COLUMNS[key].label));
            }}
          >
            {label.add}
          </button>
        </span>
      )}
    </fieldset>
  );
}
