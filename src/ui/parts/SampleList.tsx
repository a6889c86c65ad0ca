import { openSample, SAMPLES } from '../desk/files.ts';
import { words } from '../words.ts';

const { samples: label } = words;

/** The other objects of our own invention, each with what it is good for. */
export function SampleList() {
  return (
    <section className="samples" aria-label={label.title}>
      <h2>{label.title}</h2>
      <ul>
        {SAMPLES.slice(1).map((file) => (
          <li key={file}>
            <button type="button" className="sample" onClick={() => void openSample(file)}>
              <strong>{label[file].name}</strong>
              <span>{label[file].kind}</span>
            </button>
          </li>
        ))}
      </ul>
    </section>
  );
}
