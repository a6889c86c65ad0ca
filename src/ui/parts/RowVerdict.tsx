import { acceptCandidate, rejectCandidate } from '../desk/decisions.ts';
import type { DeskRow } from '../desk/deskRows.ts';
import { words } from '../words.ts';
import { Icon } from './Icon.tsx';

/** Accept and turn down beside the verdict of a row: by mouse; the keys of the desk do the same. */
export function RowVerdict({ row }: { row: DeskRow }) {
  const best = row.name ?? row.candidates[0];
  return (
    <span className="row-verdict">
      {best && (
        <>
          <button
            type="button"
            className="quiet"
            tabIndex={-1}
            aria-pressed={row.standing === 'accepted'}
            aria-label={`${words.case.accept} ${best.label}`}
            title={`${words.case.accept} ${best.label}`}
            onClick={(event) => {
              event.stopPropagation();
              acceptCandidate(row, best, 'stay');
            }}
          >
            <Icon name="check" />
          </button>
          <button
            type="button"
            className="quiet"
            tabIndex={-1}
            aria-label={`${words.case.reject} ${best.label}`}
            title={`${words.case.reject} ${best.label}`}
            onClick={(event) => {
              event.stopPropagation();
              rejectCandidate(row, best);
            }}
          >
            <Icon name="close" />
          </button>
        </>
      )}
    </span>
  );
}
