import { wordPlace } from '../../problems/index.ts';
import { useDesk } from '../desk/deskStore.ts';
import { chooseReading } from '../desk/readingChoices.ts';
import { words } from '../words.ts';
import { ReadingForm } from './ReadingForm.tsx';
import { ShelfBox } from './ShelfBox.tsx';
import { UnexplainedBox } from './UnexplainedBox.tsx';
import { uniqueKeys } from './uniqueKeys.ts';

const { reading: label } = words;

/** A remark begins and ends as a sentence wherever it was written. */
const sentence = (text: string) => `${text.charAt(0).toUpperCase()}${text.slice(1)}${/[.!?]$/.test(text) ? '' : '.'}`;

/** How the file was read, what was assumed, and what can be read differently. */
export function ReadingPanel() {
  const analysis = useDesk((state) => state.analysis);
  const choices = useDesk((state) => state.history.document.settings.reading);
  if (!analysis) return null;
  const { reading, remarks } = analysis;
  return (
    <section className="reading">
      <ShelfBox />
      <h2>{label.title}</h2>
      <p className="hint">{label.samples(reading.samples, reading.maskedSamples)}</p>
      <dl className="facts-list" aria-label={label.facts}>
        {uniqueKeys(reading.how, ({ fact, value }) => `${fact} ${value}`).map(({ key, item: { fact, value, reason } }) => (
          <div key={key}>
            <dt>{fact}</dt>
            <dd>
              <strong>{value}</strong>
              <span>{reason}</span>
            </dd>
          </div>
        ))}
      </dl>
      <h3>{label.remarks}</h3>
      {remarks.length === 0 && <p className="hint">{label.noRemarks}</p>}
      <ul className="remarks">
        {uniqueKeys(remarks, ({ code, found }) => `${code} ${found}`).map(({ key, item: remark }) => (
          <li key={key} className={`remark-${remark.weight}`}>
            {sentence(remark.found)}
            {remark.where.excerpt && <code>{remark.where.excerpt}</code>}
            {wordPlace(remark.where) && <span> ({wordPlace(remark.where)})</span>}
            {remark.doThis && <span> {remark.doThis}</span>}
          </li>
        ))}
      </ul>
      <UnexplainedBox />
      {reading.offers.length > 0 && (
        <>
          <h3>{label.offers}</h3>
          <ul className="offers">
            {uniqueKeys(reading.offers, ({ label: offered }) => offered).map(({ key, item: offer }) => (
              <li key={key}>
                <span>{offer.label}</span>
                <button
                  type="button"
                  className="small"
                  onClick={() => chooseReading({ ...choices, ...offer.choices }, label.taken(offer.label))}
                >
                  {label.take}
                </button>
              </li>
            ))}
          </ul>
        </>
      )}
      <h3>{label.changeable}</h3>
      <ReadingForm reading={reading} choices={choices} />
    </section>
  );
}
