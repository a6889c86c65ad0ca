import { type DragEvent, lazy, Suspense, useState } from 'react';
import { useDesk } from './desk/deskStore.ts';
import { openAll } from './desk/files.ts';
import { Alerts } from './parts/Alerts.tsx';
import { EmptyDesk } from './parts/EmptyDesk.tsx';
import { GuideStrip } from './parts/GuideStrip.tsx';
import { LineTable } from './parts/LineTable.tsx';
import { MediumStrip } from './parts/MediumStrip.tsx';
import { RunStrip } from './parts/RunStrip.tsx';
import { SidePanel } from './parts/SidePanel.tsx';
import { SpectrumView } from './parts/SpectrumView.tsx';
import { StatusBar } from './parts/StatusBar.tsx';
import { TopBar } from './parts/TopBar.tsx';
import { useKeys } from './useKeys.ts';
import { words } from './words.ts';

const PaperSheet = lazy(() => import('./paper/PaperSheet.tsx'));

/** The whole screen: one desk, or an empty one that says what to do. */
export function App() {
  const stage = useDesk((state) => state.stage);
  const tab = useDesk((state) => state.tab);
  const drop = useDrop();
  useKeys();
  const atDesk = stage === 'desk';
  return (
    <div className="app" {...drop.handlers}>
      <RunStrip />
      <TopBar />
      <Alerts />
      {atDesk && (
        <div className="notices">
          <MediumStrip />
          <GuideStrip />
        </div>
      )}
      {atDesk ? (
        <main className="desk">
          {tab === 'paper' ? (
            <Suspense>
              <PaperSheet />
            </Suspense>
          ) : (
            <SpectrumView />
          )}
          <SidePanel />
          {tab !== 'paper' && <LineTable />}
        </main>
      ) : (
        <main className={tab === 'keys' && stage !== 'starting' ? 'desk desk-empty' : 'desk-alone'}>
          {stage !== 'starting' && <EmptyDesk />}
          {tab === 'keys' && stage !== 'starting' && <SidePanel />}
        </main>
      )}
      <StatusBar />
      {drop.over && <div className="drop-veil">{words.drop}</div>}
    </div>
  );
}

/** Files dropped anywhere on the window are opened. */
function useDrop() {
  const [over, setOver] = useState(false);
  const hasFiles = (event: DragEvent) => event.dataTransfer.types.includes('Files');
  const handlers = {
    onDragOver(event: DragEvent) {
      if (!hasFiles(event)) return;
      event.preventDefault();
      setOver(true);
    },
    onDragLeave(event: DragEvent) {
      if (!(event.relatedTarget instanceof Node && event.currentTarget.contains(event.relatedTarget))) setOver(false);
    },
    onDrop(event: DragEvent) {
      event.preventDefault();
      setOver(false);
      void openAll([...event.dataTransfer.files]);
    },
  };
  return { over, handlers };
}
