import { useDesk } from '../desk/deskStore.ts';
import { chooseMedium } from '../desk/readingChoices.ts';
import { words } from '../words.ts';

/** Asks for air or vacuum as long as neither the file nor the user has said it. */
export function MediumStrip() {
  const reading = useDesk((state) => state.analysis?.reading);
  const chosen = useDesk((state) => state.history.document.settings.reading.medium);
  if (!reading || reading.mediumStated || chosen) return null;
  const reason = reading.how.find(({ fact }) => /medium/i.test(fact))?.reason ?? '';
  const { medium } = words;
  return (
    <section className="strip strip-question" aria-label={medium.question}>
      <strong>{medium.question}</strong>
      <p>{medium.assumed(medium[reading.medium], reason.replace(/\.$/, ''))}</p>
      <span className="buttons">
        <button type="button" onClick={() => chooseMedium('air')}>
          {medium.isAir}
        </button>
        <button type="button" onClick={() => chooseMedium('vacuum')}>
          {medium.isVacuum}
        </button>
      </span>
    </section>
  );
}
