import { words } from '../words.ts';
import { Mark } from './Mark.tsx';

const { legend } = words.spectrum;

/** What the strokes and signs of the picture mean. */
export function Legend() {
  return (
    <ul className="legend">
      <li>
        <Stroke className="curve-data" /> {legend.data}
      </li>
      <li>
        <Stroke className="curve-model" /> {legend.model}
      </li>
      <li>
        <Stroke className="curve-continuum" /> {legend.continuum}
      </li>
      <li>
        <Mark standing="open" /> {legend.open}
      </li>
      <li>
        <Mark standing="accepted" /> {legend.accepted}
      </li>
      <li>
        <Mark standing="open" ring /> {legend.ring}
      </li>
    </ul>
  );
}

function Stroke({ className }: { className: string }) {
  return (
    <svg className="curves" viewBox="0 0 16 8" width="16" height="8" aria-hidden="true">
      <path className={className} d="M0 4H16" />
    </svg>
  );
}
