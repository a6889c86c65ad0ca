import { type KeyboardEvent, lazy, Suspense } from 'react';
import { setDesk, type Tab, useDesk } from '../desk/deskStore.ts';
import { GasPanel } from '../gas/GasPanel.tsx';
import { words } from '../words.ts';
import { CaseView } from './CaseView.tsx';
import { HistoryPanel } from './HistoryPanel.tsx';
import { KeysPanel } from './KeysPanel.tsx';
import { ListPanel } from './ListPanel.tsx';
import { ReadingPanel } from './ReadingPanel.tsx';
import { SettingsPanel } from './SettingsPanel.tsx';

const PaperPanel = lazy(() => import('../paper/PaperPanel.tsx'));
const TABS: readonly Tab[] = ['case', 'gas', 'paper', 'settings', 'reading', 'list', 'history', 'keys'];
const PANELS = {
  case: CaseView,
  gas: GasPanel,
  paper: PaperPanel,
  settings: SettingsPanel,
  reading: ReadingPanel,
  list: ListPanel,
  history: HistoryPanel,
  keys: KeysPanel,
};

/** Right of the spectrum: the case of the chosen feature, or what stands beside it. */
export function SidePanel() {
  const tab = useDesk((state) => state.tab);
  const atDesk = useDesk((state) => state.stage === 'desk');
  // the keys have a button of their own on top: their tab only stands here while they are shown
  const tabs: readonly Tab[] = atDesk ? TABS.filter((each) => each !== 'keys' || tab === 'keys') : ['keys'];
  const Panel = PANELS[atDesk ? tab : 'keys'];
  const walk = (event: KeyboardEvent) => {
    const by = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
    if (!by) return;
    event.preventDefault();
    const next = tabs[(tabs.indexOf(tab) + by + tabs.length) % tabs.length];
    setDesk({ tab: next });
    document.getElementById(`tab-${next}`)?.focus();
  };
  return (
    <section className="side" aria-label={words.tabsLabel}>
      <div role="tablist" aria-label={words.tabsLabel} className="tabs">
        {tabs.map((each) => (
          <button
            key={each}
            type="button"
            role="tab"
            id={`tab-${each}`}
            aria-selected={each === tab}
            aria-controls="side-panel"
            tabIndex={each === tab ? 0 : -1}
            onKeyDown={walk}
            onClick={() => setDesk({ tab: each })}
          >
            {words.tabs[each]}
          </button>
        ))}
      </div>
      <div key={tab} role="tabpanel" id="side-panel" aria-labelledby={`tab-${tab}`} className="panel" tabIndex={-1}>
        <Suspense>
          <Panel />
        </Suspense>
      </div>
    </section>
  );
}
