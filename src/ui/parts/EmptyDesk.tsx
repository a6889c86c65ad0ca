import { useDesk } from '../desk/deskStore.ts';
import { openSample, SAMPLES } from '../desk/files.ts';
import { pickFile } from '../desk/pickFile.ts';
import { words } from '../words.ts';
import { LanternDrawing } from './LanternDrawing.tsx';
import { SampleList } from './SampleList.tsx';

/** Nothing is open: what can be done, and one click that shows it. */
export function EmptyDesk() {
  const awaited = useDesk((state) => (state.stage === 'awaiting' ? state.history.document.source?.name : undefined));
  const { empty } = words;
  return (
    <div className="empty">
      <div className="empty-zone">
        <LanternDrawing />
        <h1>{awaited ? words.awaiting(awaited) : empty.title}</h1>
        <p className="empty-body">{empty.body}</p>
        <div className="buttons">
          <button type="button" className="primary" onClick={pickFile}>
            {empty.open}
          </button>
          {!awaited && (
            <button type="button" onClick={() => void openSample(SAMPLES[0])}>
              {empty.sample}
            </button>
          )}
        </div>
      </div>
      {!awaited && <SampleList />}
      <ol className="empty-steps">
        {empty.steps.map(([title, text], k) => (
          <li key={title}>
            <span className="number">{k + 1}</span>
            <strong>{title}</strong>
            <p>{text}</p>
          </li>
        ))}
      </ol>
    </div>
  );
}
