import { useDesk } from '../desk/deskStore.ts';
import { endGuide, guideTo } from '../desk/guide.ts';
import { words } from '../words.ts';

const { guide: label } = words;

/** One step of the tour: a sentence and what to try; it goes on by itself when that was done. */
export function GuideStrip() {
  const step = useDesk((state) => state.guide);
  if (step === undefined) return null;
  const [what, tryThis] = label.steps[step] ?? label.steps[0];
  const isLast = step === label.steps.length - 1;
  return (
    <section className="strip strip-guide" aria-label={label.label}>
      <span className="number muted">{label.place(step + 1, label.steps.length)}</span>
      <p aria-live="polite">
        {what} <strong>{tryThis}</strong>
      </p>
      <span className="buttons">
        {step > 0 && (
          <button type="button" className="small" onClick={() => guideTo(step - 1)}>
            {label.back}
          </button>
        )}
        <button type="button" className="small" onClick={() => guideTo(step + 1)}>
          {isLast ? label.done : label.next}
        </button>
        {!isLast && (
          <button type="button" className="small" onClick={endGuide}>
            {label.skip}
          </button>
        )}
      </span>
    </section>
  );
}
