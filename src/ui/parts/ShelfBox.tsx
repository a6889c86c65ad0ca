import { closeSpectrum, goToSpectrum } from '../desk/decisions.ts';
import { useDesk } from '../desk/deskStore.ts';
import { words } from '../words.ts';

const { shelf: label } = words;

/** The other spectra of the session, each as it was left; nothing while there is only one. */
export function ShelfBox() {
  const { source, verdicts, shelf } = useDesk((state) => state.history.document);
  if (!source || !shelf) return null;
  return (
    <>
      <h2>{label.title}</h2>
      <ul className="offers" aria-label={label.title}>
        <li>
          <span>
            <strong>{source.name}</strong> {label.here}, {label.verdicts(verdicts.length)}
          </span>
        </li>
        {shelf.map((other) => (
          <li key={`${other.source.kind} ${other.source.name} ${other.source.size}`}>
            <span>
              {other.source.name}, {label.verdicts(other.verdicts.length)}
            </span>
            <button
              type="button"
              className="small"
              aria-label={label.goToNamed(other.source.name)}
              onClick={() => goToSpectrum(other.source)}
            >
              {label.goTo}
            </button>
            <button
              type="button"
              className="small"
              aria-label={label.closeNamed(other.source.name)}
              onClick={() => closeSpectrum(other.source)}
            >
              {label.close}
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
