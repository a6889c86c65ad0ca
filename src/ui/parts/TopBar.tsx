import { velocityFromRedshift } from '../../units/index.ts';
import { setDesk, type Tab, type Theme, useDesk } from '../desk/deskStore.ts';
import { signed } from '../figures.ts';
import { words } from '../words.ts';
import { CommandButton } from './CommandButton.tsx';
import { ExportMenu } from './ExportMenu.tsx';
import { Icon } from './Icon.tsx';

/** Name of the program, facts about what is open, undo, export. */
export function TopBar() {
  const atDesk = useDesk((state) => state.stage === 'desk');
  return (
    <header className="top">
      <span className="wordmark">{words.program}</span>
      {atDesk ? <Facts /> : <span className="tagline">{words.tagline}</span>}
      <span className="spring" />
      {atDesk && <UndoButtons />}
      <ThemeButton />
      <CommandButton name="show-keys">?</CommandButton>
      {atDesk && <CommandButton name="open" className="plain" />}
      {atDesk && <ExportMenu />}
    </header>
  );
}

function UndoButtons() {
  const past = useDesk((state) => state.history.past.length > 0);
  const future = useDesk((state) => state.history.future.length > 0);
  return (
    <>
      <CommandButton name="undo" enabled={past}>
        <Icon name="undo" />
      </CommandButton>
      <CommandButton name="redo" enabled={future}>
        <Icon name="redo" />
      </CommandButton>
    </>
  );
}

/** File, medium, velocity, resolving power, counts: each leads to where it can be changed. */
function Facts() {
  const analysis = useDesk((state) => state.analysis);
  const rows = useDesk((state) => state.rows);
  const others = useDesk((state) => state.history.document.shelf?.length ?? 0);
  if (!analysis) return null;
  const { reading, z, zErr, resolvingPower } = analysis;
  const named = rows.filter((row) => row.name).length;
  const accepted = rows.filter((row) => row.standing === 'accepted').length;
  return (
    <nav className="facts" aria-label={words.top.summary}>
      <Fact tab="reading" strong>
        {reading.name}
      </Fact>
      {others > 0 && <Fact tab="reading">{words.shelf.more(others)}</Fact>}
      <Fact tab="reading">{`${words.medium[reading.medium]}${reading.mediumStated ? '' : ' ?'}`}</Fact>
      <Fact tab="settings">{velocityFact(z, zErr)}</Fact>
      {resolvingPower !== undefined && <Fact tab="settings">{`R ${Math.round(resolvingPower).toLocaleString('en')}`}</Fact>}
      <span className="fact-count">
        <b>{rows.length}</b> {words.top.features} · <b>{named}</b> {words.top.named} · <b>{accepted}</b> {words.top.accepted}
      </span>
    </nav>
  );
}

/** Redshifts beyond this are given as z. */
const SMALL_Z = 0.01;

function velocityFact(z: number, zErr: number): string {
  if (Math.abs(z) > SMALL_Z) return `z = ${signed(z, zErr > 0 ? zErr : undefined, 5)}`;
  return `v = ${signed(velocityFromRedshift(z), zErr > 0 ? velocityFromRedshift(zErr) : undefined, 1)} km/s`;
}

function Fact({ tab, children, strong = false }: { tab: Tab; children: string; strong?: boolean }) {
  return (
    <button type="button" className={strong ? 'fact fact-strong' : 'fact'} onClick={() => setDesk({ tab })}>
      {children}
    </button>
  );
}

const NEXT: Record<Theme, Theme> = { system: 'dark', dark: 'light', light: 'system' };

function ThemeButton() {
  const theme = useDesk((state) => state.theme);
  const label = `${words.top.theme}: ${words.theme[theme]}`;
  return (
    <button type="button" className="quiet" aria-label={label} title={label} onClick={() => setDesk({ theme: NEXT[theme] })}>
      <Icon name="theme" />
    </button>
  );
}
