import { COMMANDS, type Command } from '../commands.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { startGuide } from '../desk/guide.ts';
import { words } from '../words.ts';
import { Key } from './CommandButton.tsx';

const GROUPS = Object.keys(words.commandGroups) as Command['group'][];

/** Keys, mouse and our own words. */
export function KeysPanel() {
  const single = useDesk((state) => state.singleKeys);
  const { keys } = words;
  return (
    <section className="keys">
      <h2>{keys.title}</h2>
      <label className="choice">
        <input type="checkbox" checked={single} onChange={() => setDesk({ singleKeys: !single })} />
        {keys.single}
      </label>
      <p className="hint">{keys.singleHint}</p>
      {GROUPS.map((group) => (
        <section key={group}>
          <h3>{words.commandGroups[group]}</h3>
          <dl className="key-list">
            {COMMANDS.filter((command) => command.group === group && !command.hidden).map((command) => (
              <div key={command.name}>
                <dt>{command.name === 'accept-1' ? <kbd>1 – 9</kbd> : command.keys.map((key) => <Key key={key} stroke={key} />)}</dt>
                <dd>{command.name === 'accept-1' ? command.label.replace('1', '1 – 9') : command.label}</dd>
              </div>
            ))}
          </dl>
        </section>
      ))}
      <button type="button" onClick={startGuide}>
        {keys.tour}
      </button>
      <Pairs title={keys.mouse} pairs={keys.mouseLines} />
      <Pairs title={keys.glossary} pairs={keys.words} />
    </section>
  );
}

function Pairs({ title, pairs }: { title: string; pairs: readonly (readonly [string, string])[] }) {
  return (
    <section>
      <h3>{title}</h3>
      <dl className="key-list">
        {pairs.map(([term, meaning]) => (
          <div key={term}>
            <dt>{term}</dt>
            <dd>{meaning}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}
