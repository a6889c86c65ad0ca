import { useState } from 'react';
import type { FeatureShape, FluxLimit } from '../../engine/index.ts';
import type { FeatureEdit } from '../../session/index.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { measuringClient } from '../desk/engineRuns.ts';
import {
  addFeature,
  deleteFeature,
  editText,
  moveFeature,
  reshapeFeature,
  splitFeature,
  takeEditOut,
  tieFeature,
} from '../desk/handEdits.ts';
import { fixed, fluxText, round, wavelengthText, withError } from '../figures.ts';
import { words } from '../words.ts';
import { TextSetting } from './TextSetting.tsx';

const { hand: label } = words;
const NO_EDITS: readonly FeatureEdit[] = [];

/** What may be done by hand to the chosen feature and beside it; every step can be taken back. */
export function FitByHand({ row }: { row: DeskRow }) {
  const hasSamples = useDesk((state) => state.samples !== undefined);
  const edits = useDesk((state) => state.history.document.settings.measure.edits) ?? NO_EDITS;
  const place = useDesk((state) => state.handPlace);
  if (!hasSamples) return null;
  return (
    <details className="by-hand" open={place !== undefined || undefined}>
      <summary>{label.title(edits.length)}</summary>
      <div className="buttons">
        <button type="button" className="small" onClick={() => splitFeature(row)}>
          {label.splitButton}
        </button>
        <button type="button" className="small" onClick={() => deleteFeature(row)}>
          {label.deleteButton}
        </button>
      </div>
      <PlaceTools row={row} />
      <TieTool row={row} />
      <Shapes row={row} />
      {edits.length > 0 && (
        <ol className="edits" aria-label={label.listLabel}>
          {edits.map((edit, k) => (
            <li key={JSON.stringify([k, edit])}>
              {editText(edit)}
              <button type="button" className="small" aria-label={label.takeOutNamed(editText(edit))} onClick={() => takeEditOut(k, edits)}>
                {label.takeOut}
              </button>
            </li>
          ))}
        </ol>
      )}
    </details>
  );
}

/** A wavelength and what can be done there. */
function PlaceTools({ row }: { row: DeskRow }) {
  const place = useDesk((state) => state.handPlace);
  const samples = useDesk((state) => state.samples);
  const [limit, setLimit] = useState<{ readonly at: number; readonly found?: FluxLimit }>();
  const here = place ?? row.feature.centroid;
  const low = samples?.wavelength[0] ?? 0;
  const high = samples?.wavelength[samples.wavelength.length - 1] ?? 0;
  const fault = (text: string) => (Number(text) > low && Number(text) < high ? undefined : label.placeFault(round(low, 6), round(high, 6)));
  return (
    <>
      <TextSetting
        key={here}
        label={label.place}
        unit="Å"
        hint={label.placeHint}
        value={wavelengthText(here, undefined)}
        fault={fault}
        commit={(text) => setDesk({ handPlace: Number(text) })}
      />
      <div className="buttons">
        <button type="button" className="small" onClick={() => addFeature(here)}>
          {label.addButton}
        </button>
        <button type="button" className="small" disabled={place === undefined} onClick={() => moveFeature(row, here)}>
          {label.moveButton}
        </button>
        <button type="button" className="small" onClick={async () => setLimit({ at: here, found: await measuringClient().limitAt(here) })}>
          {label.limitButton}
        </button>
      </div>
      <p className="hint" aria-live="polite">
        {limit && limitText(limit.at, limit.found)}
      </p>
    </>
  );
}

function limitText(at: number, found: FluxLimit | undefined): string {
  if (!found) return label.noLimit(wavelengthText(at, undefined));
  const seen = Math.abs(found.flux) > found.limit ? label.limitSeen(fluxText(found.flux, found.fluxErr)) : '';
  return `${label.limit(wavelengthText(at, undefined), round(found.limit, 3), fixed(found.fwhm, 2))} ${seen}`;
}

/** Ties the feature to another one of its ion. */
function TieTool({ row }: { row: DeskRow }) {
  const rows = useDesk((state) => state.rows);
  const ion = row.name?.transitions.length === 1 ? row.name.transitions[0].ion : undefined;
  const partners = rows.filter((other) => other !== row && other.name?.transitions.length === 1 && other.name.transitions[0].ion === ion);
  const [chosen, setChosen] = useState('');
  const [ratio, setRatio] = useState('');
  if (!ion || partners.length === 0) return null;
  const partner = partners.find((other) => String(other.feature.number) === chosen);
  return (
    <div className="field tie">
      <label htmlFor="tie-to">{label.tieTo}</label>
      <span className="with-unit">
        <select id="tie-to" value={partner ? chosen : ''} onChange={(event) => setChosen(event.target.value)}>
          <option value="">{label.tieNone}</option>
          {partners.map((other) => (
            <option key={other.feature.number} value={other.feature.number}>
              {other.name?.label}
            </option>
          ))}
        </select>
        <button
          type="button"
          className="small"
          disabled={!partner || !isRatio(ratio)}
          onClick={() => partner && tieFeature(row, partner, ratio === '' ? undefined : Number(ratio))}
        >
          {label.tieButton}
        </button>
      </span>
      <label className="with-unit">
        {label.tieRatio}
        <input
          type="text"
          inputMode="decimal"
          value={ratio}
          aria-invalid={!isRatio(ratio)}
          onChange={(event) => setRatio(event.target.value.trim())}
        />
      </label>
      <p className="hint">{label.tieHint}</p>
    </div>
  );
}

/** Nothing, or a flux ratio. */
const isRatio = (text: string) => text === '' || Number(text) > 0;

/** The feature as a Gaussian, a Voigt profile and two Gaussians, side by side. */
function Shapes({ row }: { row: DeskRow }) {
  const [shapes, setShapes] = useState<readonly FeatureShape[]>();
  return (
    <>
      <button type="button" className="small" onClick={async () => setShapes(await measuringClient().shapesAt(row.feature.centroid))}>
        {label.compareShapes}
      </button>
      <div aria-live="polite">
        {shapes?.length === 0 && <p className="hint">{label.noShapes}</p>}
        {shapes !== undefined && shapes.length > 0 && (
          <table className="shapes">
            <caption className="hint">{label.shapesHint}</caption>
            <thead>
              <tr>
                {label.shapeColumns.map((name) => (
                  <th key={name} scope="col">
                    {name}
                  </th>
                ))}
                <th aria-label={label.takeShape} />
              </tr>
            </thead>
            <tbody>
              {shapes.map((shape) => (
                <tr key={shape.as}>
                  <th scope="row">{label.shapes[shape.as]}</th>
                  <td className="number">{fluxText(shape.flux, shape.fluxErr)}</td>
                  <td className="number">{withError(shape.fwhm, shape.fwhmErr, 2)}</td>
                  <td className="number">{`+${fixed(shape.bicOver, 1)}`}</td>
                  <td>
                    <button
                      type="button"
                      className="small"
                      aria-label={label.takeShapeNamed(label.shapes[shape.as])}
                      onClick={() => reshapeFeature(row, shape.as)}
                    >
                      {label.takeShape}
                    </button>
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        )}
      </div>
    </>
  );
}
