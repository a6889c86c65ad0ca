import { type PointerEvent, useRef, useState } from 'react';
import type { DeskRow } from '../desk/deskRows.ts';
import { setDesk, useDesk } from '../desk/deskStore.ts';
import { moveFeature } from '../desk/handEdits.ts';

/** Straight axis of the picture: values low ... high stand at from ... to, in its own units. */
interface Axis {
  readonly low: number;
  readonly high: number;
  readonly from: number;
  readonly to: number;
}

/** A press this near to the feature's centre takes hold of it, share of the picture. */
const GRIP = 0.025;
/** A drag shorter than this is a click, share of the picture. */
const CLICK = 0.012;

/** Click = choose a place for what is done by hand; drag of the centre = move the feature there. `shown` is where a line is to be drawn. */
export function useCloseUpPointer(row: DeskRow, axis: Axis | undefined) {
  const place = useDesk((state) => state.handPlace);
  const press = useRef<{ readonly at: number; readonly holds: boolean }>(undefined);
  const [dragged, setDragged] = useState<number>();
  const shareOf = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    return (event.clientX - box.left) / box.width;
  };
  const wavelengthAt = (share: number) => (axis ? axis.low + share * (axis.high - axis.low) : 0);
  const centre = axis ? (row.feature.centroid - axis.low) / (axis.high - axis.low) : 0;
  const handlers = {
    onPointerDown(event: PointerEvent<SVGSVGElement>) {
      if (event.button !== 0 || !axis) return;
      event.currentTarget.setPointerCapture(event.pointerId);
      const at = shareOf(event);
      press.current = { at, holds: Math.abs(at - centre) < GRIP };
    },
    onPointerMove(event: PointerEvent<SVGSVGElement>) {
      const { current } = press;
      if (current?.holds && Math.abs(shareOf(event) - current.at) > CLICK) setDragged(wavelengthAt(shareOf(event)));
    },
    onPointerUp(event: PointerEvent<SVGSVGElement>) {
      const { current } = press;
      press.current = undefined;
      setDragged(undefined);
      if (!current) return;
      const at = shareOf(event);
      if (Math.abs(at - current.at) <= CLICK) setDesk({ handPlace: wavelengthAt(at) });
      else if (current.holds) moveFeature(row, wavelengthAt(at));
    },
    onPointerCancel() {
      press.current = undefined;
      setDragged(undefined);
    },
  };
  return { handlers, shown: dragged ?? place };
}
