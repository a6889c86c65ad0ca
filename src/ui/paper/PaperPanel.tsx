import { PRESETS, type PresetName, TABLE_FORMATS, type TableDesign, type TableFormatName } from '../../report/index.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { Segments } from '../parts/Segments.tsx';
import { TextSetting } from '../parts/TextSetting.tsx';
import { words } from '../words.ts';
import { ColumnOrder } from './ColumnOrder.tsx';
import { saveArchive, saveDesigned, saveProvenance } from './savePaper.ts';
import { setDesign, setPaper, useDesign } from './setPaper.ts';
import './paper.css';

const { paper: label } = words;
const PRESET_NAMES = Object.keys(PRESETS) as PresetName[];
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
      <ColumnOrder design={design} />
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
