import { useDesk } from '../desk/deskStore.ts';
import { words } from '../words.ts';

/** A hairline at the very top that grows while the worker computes. */
export function RunStrip() {
  const run = useDesk((state) => state.run);
  if (!run) return <div className="run-line" />;
  const percent = Math.round(run.share * 100);
  return (
    <div
      className="run-line is-running"
      role="progressbar"
      aria-label={stageWord(run.stage)}
      aria-valuemin={0}
      aria-valuemax={100}
      aria-valuenow={percent}
    >
      <div style={{ width: `${Math.max(percent, 4)}%` }} />
    </div>
  );
}

const STAGES: Record<string, string> = words.run.stages;
export const stageWord = (stage: string) => STAGES[stage] ?? stage;
