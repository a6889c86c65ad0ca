import { goBackTo } from '../desk/decisions.ts';
import { useDesk } from '../desk/deskStore.ts';
import { fixed } from '../figures.ts';
import { words } from '../words.ts';
import { CommandButton } from './CommandButton.tsx';
import { NameChanges } from './NameChanges.tsx';

/** All that was done, latest first; what was taken back stands above it. */
export function HistoryPanel() {
  const { past, future } = useDesk((state) => state.history);
  const all = [...past, ...[...future].reverse()];
  const entries = all.map(({ sentence }, k) => ({ number: k + 1, sentence, isUndone: k >= past.length })).reverse();
  return (
    <section className="history">
      <h2>{words.history.title}</h2>
      <div className="buttons">
        <CommandButton name="undo" className="small" enabled={past.length > 0} />
        <CommandButton name="redo" className="small" enabled={future.length > 0} />
      </div>
      <NameChanges />
      {past.length + future.length === 0 && <p className="hint">{words.history.empty}</p>}
      <ol>
        {entries.map(({ number, sentence, isUndone }) => (
          <li key={number} className={isUndone ? 'undone' : undefined}>
            <span className="number">{number}</span> {sentence} {isUndone && <span>({words.history.undone})</span>}
            {number !== past.length && (
              <button
                type="button"
                className="small go-back"
                aria-label={`${words.history.goBack}: ${sentence}`}
                onClick={() => goBackTo(number)}
              >
                {words.history.goBack}
              </button>
            )}
          </li>
        ))}
      </ol>
      <LostVerdicts />
    </section>
  );
}

/** What was decided on features that the present settings do not find. */
function LostVerdicts() {
  const lost = useDesk((state) => state.analysis?.lostVerdicts);
  if (!lost || lost.length === 0) return null;
  return (
    <>
      <h3>{words.history.lost}</h3>
      <p className="hint">{words.history.lostHint}</p>
      <ul>
        {lost.map((verdict) => (
          <li key={verdict.at}>
            <span className="number">{`${fixed(verdict.at, 2)} Å`}</span> {verdict.decision} {verdict.accepted?.join(' + ')} {verdict.note}
          </li>
        ))}
      </ul>
    </>
  );
}
