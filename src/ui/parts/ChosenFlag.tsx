import { acceptCandidate, rejectCandidate } from '../desk/decisions.ts';
import { type DeskRow, shortName } from '../desk/deskRows.ts';
import { probabilityText } from '../figures.ts';
import type { PanelLayout } from '../plot/layoutOf.ts';
import type { Range } from '../plot/viewRange.ts';
import { words } from '../words.ts';
import { Icon } from './Icon.tsx';
import { Mark } from './Mark.tsx';

const FLAG_WIDTH = 232;

interface Props {
  readonly row: DeskRow;
  readonly layout: PanelLayout;
  readonly view: Range;
  /** Pixels of the picture below the top of the view. */
  readonly top: number;
}

/** The chosen feature on the spectrum: a line through all panels and a flag with its name, to be accepted or turned down on the spot. */
export function ChosenFlag({ row, layout, view, top }: Props) {
  const inner = layout.width - layout.left - layout.right;
  const x = layout.left + ((row.feature.centroid - view[0]) / (view[1] - view[0])) * inner;
  if (x < layout.left || x > layout.width - layout.right) return null;
  const best = row.name ?? row.candidates[0];
  const left = Math.min(Math.max(x + 8, layout.left), layout.width - FLAG_WIDTH);
  return (
    <>
      <div
        className="chosen-line"
        style={{ left: x, top: top + layout.spectrumTop, height: layout.height - layout.spectrumTop - layout.bottom }}
      />
      <div className="chosen-flag" style={{ left, top: top + layout.spectrumTop + 4 }}>
        <Mark standing={row.standing} />
        <span className="flag-name">{best ? shortName(best) : words.spectrum.unnamed}</span>
        <span className="number muted">{best && probabilityText(best.probability)}</span>
        {best && (
          <>
            <button
              type="button"
              className="small"
              aria-pressed={row.standing === 'accepted'}
              aria-label={`${words.case.accept} ${best.label}`}
              title={words.case.accept}
              onClick={() => acceptCandidate(row, best, 'go-on')}
            >
              <Icon name="check" />
            </button>
            <button
              type="button"
              className="small"
              aria-label={`${words.case.reject} ${best.label}`}
              title={words.case.reject}
              onClick={() => rejectCandidate(row, best)}
            >
              <Icon name="close" />
            </button>
          </>
        )}
      </div>
    </>
  );
}
