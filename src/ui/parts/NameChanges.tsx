import type { NameChange } from '../../engine/index.ts';
import { choose } from '../desk/chosen.ts';
import { useDesk } from '../desk/deskStore.ts';
import { words } from '../words.ts';

const { changes: label } = words;

/** Names that the last step changed without deciding on them. */
export function NameChanges() {
  const changes = useDesk((state) => state.analysis?.changes);
  const rows = useDesk((state) => state.rows);
  if (!changes || changes.length === 0) return null;
  return (
    <>
      <h3>{label.title}</h3>
      <p className="hint">{label.hint}</p>
      <ul aria-label={label.title}>
        {changes.map((change) => {
          const row = rows[change.feature];
          return (
            <li key={change.feature}>
              {row && (
                <button type="button" className="small" onClick={() => choose(change.feature)}>
                  {words.case.feature(row.feature.number)}
                </button>
              )}{' '}
              {sentenceOf(change)}
            </li>
          );
        })}
      </ul>
    </>
  );
}

const sentenceOf = ({ from, to }: NameChange): string => {
  const named = (name: NameChange['to']) => (name ? `${name.label} (${name.probability.toFixed(2)})` : label.noName);
  return label.fromTo(named(from), named(to));
};
