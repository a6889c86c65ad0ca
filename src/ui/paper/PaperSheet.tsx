import { useMemo } from 'react';
import {
  atlasFigures,
  atlasInput,
  densityLadderFigure,
  type Figure,
  featureFitFigure,
  featureFitInput,
  type LineTable,
  paperTable,
  type TableDesign,
  temperatureDensityFigure,
} from '../../report/index.ts';
import { useChosenRow } from '../desk/chosen.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { Segments } from '../parts/Segments.tsx';
import { words } from '../words.ts';
import { MethodsSheet } from './MethodsSheet.tsx';
import { PaperWords } from './PaperWords.tsx';
import { SecondOpinion } from './SecondOpinion.tsx';
import { saveFigure } from './savePaper.ts';
import { setDesign, useDesign } from './setPaper.ts';
import './paper.css';

const { paper: label } = words;
/** Rows that are set; the files hold all. */
const MOST_ROWS = 200;
/** A part that scrolls is reached by keyboard. */
const SCROLLS = { tabIndex: 0 } as const;
const SHEETS = ['table', 'figures', 'methods', 'opinion'] as const;

/** What the paper will hold, as large as the spectrum: the table as it will be printed, figures, methods, a second opinion. */
export default function PaperSheet() {
  const analysis = useDesk((state) => state.analysis);
  const sheet = useDesk((state) => state.paperSheet);
  const design = useDesign();
  if (!analysis) return null;
  return (
    <section className="paper-sheet" aria-label={label.title}>
      <Segments
        label={label.sheets}
        options={SHEETS}
        value={sheet}
        words={label.sheetNames}
        choose={(paperSheet) => setDesk({ paperSheet })}
      />
      <section className="paper-scroll" {...SCROLLS} aria-label={label.sheetNames[sheet]}>
        {sheet === 'table' && <TableSheet table={analysis.table} design={design} />}
        {sheet === 'figures' && <FigureSheet table={analysis.table} design={design} />}
        {sheet === 'methods' && <MethodsSheet methods={analysis.methods} />}
        {sheet === 'opinion' && <SecondOpinion />}
      </section>
    </section>
  );
}

function TableSheet({ table, design }: { readonly table: LineTable; readonly design: TableDesign }) {
  const paper = useMemo(() => paperTable(table, design), [table, design]);
  if (paper.rows.length === 0)
    return (
      <div className="paper-empty">
        <p>{label.noRows}</p>
        <button type="button" onClick={() => setDesign(design, { rows: 'all' }, label.changed(label.rowsLabel, label.rows.all))}>
          {label.takeAll}
        </button>
      </div>
    );
  return (
    <table className="typeset">
      <caption>{paper.caption}</caption>
      <thead>
        <tr>
          {paper.columns.map(({ key, head, unit, align }) => (
            <th key={key} scope="col" className={align}>
              <PaperWords pieces={head} />
              {unit.length > 0 && (
                <span className="unit">
                  (<PaperWords pieces={unit} />)
                </span>
              )}
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {paper.rows.slice(0, MOST_ROWS).map((row) => (
          <tr key={`${row.feature} ${JSON.stringify(row.cells)}`} className={row.kind}>
            {row.cells.map((cell, c) => (
              <td key={paper.columns[c].key} className={paper.columns[c].align}>
                <PaperWords pieces={cell} />
              </td>
            ))}
          </tr>
        ))}
      </tbody>
      <tfoot>
        <tr>
          <td colSpan={paper.columns.length}>
            {paper.rows.length > MOST_ROWS && <p>{label.moreRows(paper.rows.length - MOST_ROWS)}</p>}
            <p>
              {paper.remarks.map((remark) => (
                <span key={JSON.stringify(remark)}>
                  <PaperWords pieces={remark} />{' '}
                </span>
              ))}
            </p>
            {paper.notes.map(({ mark, text }) => (
              <p key={mark}>
                <sup>{mark}</sup> {text}
              </p>
            ))}
          </td>
        </tr>
      </tfoot>
    </table>
  );
}

function FigureSheet({ table, design }: { readonly table: LineTable; readonly design: TableDesign }) {
  const samples = useDesk((state) => state.samples);
  const { width, panels } = useDesk((state) => state.paperFigures);
  const row = useChosenRow();
  const rows = design.rows;
  const atlas = useMemo(
    () => (samples ? atlasFigures(atlasInput(table, samples, { rows }), { width, panels }) : []),
    [table, samples, rows, width, panels],
  );
  const feature = row?.feature.number;
  const fit = useMemo(() => {
    const input = samples && feature !== undefined ? featureFitInput(table, samples, feature) : undefined;
    return input && featureFitFigure(input);
  }, [table, samples, feature]);
  const gas = useDesk((state) => state.analysis?.gas);
  const ladder = useMemo(() => gas && densityLadderFigure(gas.ladder, 'single'), [gas]);
  const plane = useMemo(() => gas && temperatureDensityFigure(gas, 'single'), [gas]);
  return (
    <>
      {!samples && <p className="hint">{label.noSamples}</p>}
      {fit && <FigureFrame figure={fit} words={label.fitOf(feature ?? 0)} />}
      {atlas.map((figure) => (
        <FigureFrame key={figure.name} figure={figure} words={label.atlas} />
      ))}
      <div className="printed-row">
        {ladder && <FigureFrame figure={ladder} words={label.ladder} />}
        {plane && <FigureFrame figure={plane} words={label.plane} />}
      </div>
    </>
  );
}

function FigureFrame({ figure, words: said }: { readonly figure: Figure; readonly words: string }) {
  const address = useMemo(() => `data:image/svg+xml;charset=utf-8,${encodeURIComponent(figure.svg)}`, [figure]);
  return (
    <figure className="printed">
      <figcaption>
        {`${said}: ${Math.round(figure.widthMm)} × ${Math.round(figure.heightMm)} mm`}
        <button type="button" className="small" aria-label={label.saveSvgOf(said)} onClick={() => void saveFigure(figure, 'svg')}>
          {label.saveSvg}
        </button>
        <button type="button" className="small" aria-label={label.savePngOf(said)} onClick={() => void saveFigure(figure, 'png')}>
          {label.savePng}
        </button>
      </figcaption>
      <img src={address} alt={said} style={{ width: `${figure.widthMm}mm` }} />
    </figure>
  );
}
