import { choose } from '../desk/chosen.ts';
import { useDesk } from '../desk/deskStore.ts';
import { fixed } from '../figures.ts';
import { words } from '../words.ts';

const { reading: label } = words;

/** What the names leave open: lines they predict that are not there, and features without a name; each with what it would imply. */
export function UnexplainedBox() {
  const missing = useDesk((state) => state.analysis?.missing) ?? [];
  const unnamed = useDesk((state) => state.analysis?.unnamed) ?? [];
  const rows = useDesk((state) => state.rows);
  return (
    <>
      {missing.length > 0 && (
        <>
          <h3>{label.expected}</h3>
          <p className="hint">{label.expectedHint}</p>
          <ul className="remarks" aria-label={label.expected}>
            {missing.map((line) => (
              <li key={`${line.label} ${line.expectedAt}`}>
                <strong>{line.label}</strong> {label.expectedAt(fixed(line.expectedAt, 2))}. {line.implies}
              </li>
            ))}
          </ul>
        </>
      )}
      {unnamed.length > 0 && (
        <>
          <h3>{label.nameless}</h3>
          <p className="hint">{label.namelessHint}</p>
          <ul className="remarks" aria-label={label.nameless}>
            {unnamed.map(({ feature, implies }) => {
              const row = rows[feature];
              return (
                <li key={feature}>
                  {row && (
                    <button type="button" className="small" onClick={() => choose(feature)}>
                      {`${fixed(row.feature.centroid, 2)} Å`}
                    </button>
                  )}{' '}
                  {implies}
                </li>
              );
            })}
          </ul>
        </>
      )}
    </>
  );
}
