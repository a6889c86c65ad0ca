import { useDesk } from '../desk/deskStore.ts';
import { analyse, stop } from '../desk/engineRuns.ts';
import { takeNewBuild } from '../offline/keepOffline.ts';
import { words } from '../words.ts';
import { stageWord } from './RunStrip.tsx';

/** What happened last, what is going on, and the way to stop it. */
export function StatusBar() {
  const status = useDesk((state) => state.status);
  const run = useDesk((state) => state.run);
  const newBuild = useDesk((state) => state.newBuild);
  const outOfDate = useDesk((state) => state.outOfDate);
  return (
    <footer className="status">
      <p role="status" aria-label={words.status.label}>
        {status || words.status.ready}
      </p>
      {newBuild && (
        <button type="button" className="small" onClick={takeNewBuild}>
          {words.status.newBuild}
        </button>
      )}
      {run ? (
        <>
          <span className="number">
            {run.what === 'opening' ? `${words.run.opening(run.name)} · ` : ''}
            {stageWord(run.stage)} {Math.round(run.share * 100)} %
          </span>
          <button type="button" className="small" onClick={stop}>
            {words.run.cancel}
          </button>
        </>
      ) : (
        outOfDate && (
          <button type="button" className="small" onClick={() => void analyse()}>
            {words.run.again}
          </button>
        )
      )}
    </footer>
  );
}
