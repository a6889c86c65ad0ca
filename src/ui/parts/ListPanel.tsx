import { useDeferredValue, useState } from 'react';
import type { LineRecord, ListedLine } from '../../engine/index.ts';
import { useDesk } from '../desk/deskStore.ts';
import { useLineRecord, useLineSearch } from '../desk/lineList.ts';
import { fixed, powerText, round } from '../figures.ts';
import { words } from '../words.ts';
import { OwnLinesBox } from './OwnLinesBox.tsx';
import '../list.css';

const { list: label } = words;
/** The gas of critical densities and companions while no spectrum is open: K and cm^-3. */
const DEFAULT_GAS = { te: 10_000, ne: 1_000 };

/** The bundled line list: search it, and see all it holds of a line. */
export function ListPanel() {
  const [query, setQuery] = useState('');
  const [line, setLine] = useState<number>();
  const { te, ne } = useDesk((state) => state.analysis?.settings.naming) ?? DEFAULT_GAS;
  const record = useLineRecord(line, te, ne);
  return (
    <section className="list">
      <h2>{label.title}</h2>
      {line === undefined ? (
        <>
          <Search query={query} setQuery={setQuery} choose={setLine} />
          <OwnLinesBox />
        </>
      ) : (
        <>
          <button type="button" className="small" onClick={() => setLine(undefined)}>
            {label.back}
          </button>
          {record && <RecordView record={record} te={te} choose={setLine} />}
        </>
      )}
    </section>
  );
}

function Search({ query, setQuery, choose }: { query: string; setQuery: (text: string) => void; choose: (line: number) => void }) {
  const result = useLineSearch(useDeferredValue(query));
  return (
    <>
      <label className="field">
        <span>{label.search}</span>
        <input type="search" value={query} onChange={(event) => setQuery(event.target.value)} />
        <span className="hint">{label.hint}</span>
      </label>
      <p className="hint" role="status">
        {result ? label.found(result.total, result.lines.length, result.understood) : label.loading}
      </p>
      {result?.total === 0 && <p>{label.none}</p>}
      <ul className="list-lines" aria-label={label.results}>
        {result?.lines.map((each) => (
          <li key={each.index}>
            <ListRow line={each} choose={choose} />
          </li>
        ))}
      </ul>
    </>
  );
}

function ListRow({ line, choose }: { line: ListedLine; choose: (line: number) => void }) {
  return (
    <button type="button" className="list-row" onClick={() => choose(line.index)}>
      <strong>{line.ion}</strong>
      <span className="figure">{fixed(line.wavelengthAir, 3)}</span>
      <span className="list-levels">
        {line.lower} – {line.upper}
      </span>
      <span className="figure">{powerText(line.strength, 2)}</span>
    </button>
  );
}

function RecordView({ record, te, choose }: { record: LineRecord; te: number; choose: (line: number) => void }) {
  const err = record.wavelengthErr >= 0.001 ? fixed(record.wavelengthErr, 3) : powerText(record.wavelengthErr, 1);
  const facts: readonly (readonly [string, string, string?])[] = [
    [
      label.wavelength,
      `${fixed(record.wavelengthAir, 4)} ± ${err} Å ${label.air}; ${fixed(record.wavelengthVac, 4)} Å ${label.vacuum}`,
      record.wavelengthNote,
    ],
    ...(record.ritzVac === undefined ? [] : ([[label.ritz, `${fixed(record.ritzVac, 4)} Å`]] as const)),
    [label.levels, `${record.lower} – ${record.upper}`],
    ...(record.upperEnergyCm1 === undefined
      ? []
      : ([[label.energies, `${fixed(record.lowerEnergyCm1, 2)} – ${fixed(record.upperEnergyCm1, 2)} cm⁻¹`]] as const)),
    [label.multiplet, record.multiplet || '–'],
    [label.nature, record.nature],
    [label.aValue, `${powerText(record.aValue, 3)} s⁻¹`],
    ...(record.thinGas
      ? ([
          [label.lifetime, `${powerText(record.thinGas.lifetimeS, 3)} s`],
          [label.nCrit(te), `${powerText(record.thinGas.nCrit, 2)} cm⁻³`, record.thinGas.sentence],
        ] as const)
      : []),
    [
      label.strength,
      powerText(record.strength, 2),
      `${record.strengthNote} (${label.strengthOf(record.strengthBasis, round(record.strengthErrDex, 2))})`,
    ],
  ];
  return (
    <>
      <h3>
        {record.ion} {fixed(record.wavelengthAir, 2)} {record.name && <span className="hint">{record.name}</span>}
      </h3>
      <dl className="facts-list">
        {facts.map(([fact, value, reason]) => (
          <div key={fact}>
            <dt>{fact}</dt>
            <dd>
              <strong>{value}</strong>
              {reason && <span>{reason}</span>}
            </dd>
          </div>
        ))}
      </dl>
      {record.companions.length > 0 && (
        <>
          <h3>{label.companions}</h3>
          <ul className="list-lines" aria-label={label.companions}>
            {record.companions.map((other) => (
              <li key={other.index}>
                <button type="button" className="list-row" onClick={() => choose(other.index)}>
                  <strong>{other.ion}</strong>
                  <span className="figure">{fixed(other.wavelengthAir, 3)}</span>
                  <span className="list-levels">{label.relations[other.relation]}</span>
                  <span className="figure">
                    {other.ratio === undefined ? '–' : label.ratio(powerText(other.ratio, 3), round(other.errDex, 1))}
                  </span>
                </button>
              </li>
            ))}
          </ul>
        </>
      )}
      <h3>{label.sources}</h3>
      <ul className="list-sources">
        {record.sources.map((source) => (
          <li key={source}>{source}</li>
        ))}
      </ul>
    </>
  );
}
