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
            <button type="button" className="small" onClick={() => goToSpectrum(other.source)}>
              {label.goTo(other.source.name)}
            </button>
            <button type="button" className="small" onClick={() => closeSpectrum(other.source)}>
              {label.close(other.source.name)}
            </button>
          </li>
        ))}
      </ul>
    </>
  );
}
