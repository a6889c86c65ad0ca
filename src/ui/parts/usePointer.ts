import { type PointerEvent, type RefObject, useEffect, useRef } from 'react';
import { choose, wholeRange } from '../desk/chosen.ts';
import { desk, setDesk } from '../desk/deskStore.ts';
import { pointAt } from '../desk/handEdits.ts';
import { look, shownRange, wholeSpectrum } from '../desk/looking.ts';
import { dragRuler, dropRuler } from '../desk/ruler.ts';
import { waveAxis } from '../desk/waveAxis.ts';
import { fixed, round } from '../figures.ts';
import { UNNAMED_LANE } from '../plot/lanes.ts';
import type { PanelLayout } from '../plot/layoutOf.ts';
import { LANE_COUNT } from '../plot/layoutOf.ts';
import { laneOfRow } from '../plot/marksOf.ts';
import { nearestFeature } from '../plot/nearestFeature.ts';
import { sampleAt } from '../plot/sampleAt.ts';
import { inside, panned, pinched, type Range, zoomed } from '../plot/viewRange.ts';
import { shownWavelength } from '../plot/waveAxis.ts';

/** A press that moves less than this is a click, pixels. */
const CLICK_PX = 4;
/** A click this near to a feature means it, pixels. */
const REACH_PX = 9;
const WHEEL_RATE = 0.0016;
const PINCH_RATE = 0.01;
const MOST_GAIN = 1e5;

/** The ruler of the other frame stands above the lanes, this high, pixels. */
const RULER_PX = 20;

interface Press {
  readonly x: number;
  readonly y: number;
  readonly range: Range;
  moved: boolean;
  /** Observed wavelength where the ruler of the other frame was taken hold of. */
  readonly ruler?: number;
}

/** Wheel, drag, pinch, click and double click on the spectrum. */
export function usePointer(area: RefObject<HTMLDivElement | null>, layout: PanelLayout | undefined) {
  const presses = useRef(new Map<number, { x: number; y: number }>());
  const press = useRef<Press>(undefined);
  const pinch = useRef<{ fingers: readonly [number, number]; range: Range }>(undefined);
  const readout = useRef<HTMLDivElement>(null);

  useEffect(() => {
    const element = area.current;
    if (!element || !layout) return;
    const wheel = (event: WheelEvent) => {
      event.preventDefault();
      const x = event.clientX - element.getBoundingClientRect().left;
      if (x < layout.left) {
        setDesk({ gain: Math.min(Math.max(desk().gain * Math.exp(-event.deltaY * WHEEL_RATE * 2), 1), MOST_GAIN) });
      } else if (Math.abs(event.deltaX) > Math.abs(event.deltaY) || event.shiftKey) {
        look(panned(shownRange(), (event.deltaX || event.deltaY) / innerWidthOf(layout), wholeRange()));
      } else {
        // a pinch on a touch pad arrives as small turns of the wheel with Ctrl
        const rate = event.ctrlKey ? PINCH_RATE : WHEEL_RATE;
        look(zoomed(shownRange(), wavelengthAt(layout, x), Math.exp(event.deltaY * rate), wholeRange()));
      }
    };
    element.addEventListener('wheel', wheel, { passive: false });
    return () => element.removeEventListener('wheel', wheel);
  }, [area, layout]);

  const local = (event: PointerEvent) => {
    const box = event.currentTarget.getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top };
  };

  const handlers = {
    onPointerDown(event: PointerEvent) {
      if (event.button !== 0) return;
      const at = local(event);
      event.currentTarget.setPointerCapture(event.pointerId);
      presses.current.set(event.pointerId, at);
      const ruler = layout && onRuler(layout, at) ? { ruler: wavelengthAt(layout, at.x) } : {};
      press.current = { ...at, range: shownRange(), moved: presses.current.size > 1, ...ruler };
      const [a, b] = [...presses.current.values()];
      if (a && b && layout) pinch.current = { fingers: [shareOf(layout, a.x), shareOf(layout, b.x)], range: shownRange() };
    },
    onPointerMove(event: PointerEvent) {
      if (!layout) return;
      const at = local(event);
      if (presses.current.has(event.pointerId)) presses.current.set(event.pointerId, at);
      const [a, b] = [...presses.current.values()];
      if (a && b && pinch.current)
        return look(pinched(pinch.current.range, pinch.current.fingers, [shareOf(layout, a.x), shareOf(layout, b.x)], wholeRange()));
      if (press.current?.ruler !== undefined) {
        const said = dragRuler(press.current.ruler, wavelengthAt(layout, at.x));
        press.current.moved = true;
        if (readout.current) readout.current.textContent = said;
        return;
      }
      event.currentTarget.classList.toggle('on-ruler', onRuler(layout, at));
      if (press.current) drag(press.current, at.x, layout);
      pointAt(at.x > layout.left ? wavelengthAt(layout, at.x) : undefined);
      if (readout.current) readout.current.textContent = at.x > layout.left ? readoutAt(wavelengthAt(layout, at.x)) : '';
    },
    onPointerUp(event: PointerEvent) {
      presses.current.delete(event.pointerId);
      if (presses.current.size < 2) pinch.current = undefined;
      const { current } = press;
      press.current = undefined;
      if (current?.ruler !== undefined) dropRuler();
      else if (current && !current.moved && layout) click(layout, local(event));
    },
    onPointerCancel(event: PointerEvent) {
      if (press.current?.ruler !== undefined) setDesk({ draggedZ: undefined });
      presses.current.delete(event.pointerId);
      press.current = undefined;
      pinch.current = undefined;
    },
    onPointerLeave() {
      pointAt(undefined);
      if (readout.current) readout.current.textContent = '';
    },
    onDoubleClick: wholeSpectrum,
  };
  return { handlers, readout };
}

const onRuler = (layout: PanelLayout, at: { x: number; y: number }) =>
  at.y < layout.top && at.y > layout.top - RULER_PX && at.x > layout.left && desk().samples !== undefined;

const innerWidthOf = (layout: PanelLayout) => layout.width - layout.left - layout.right;

/** Place of a pixel in the view: 0 at its left end, 1 at its right. */
const shareOf = (layout: PanelLayout, x: number) => (x - layout.left) / innerWidthOf(layout);

/** Observed wavelength under a pixel. */
function wavelengthAt(layout: PanelLayout, x: number): number {
  const [low, high] = shownRange();
  return low + shareOf(layout, x) * (high - low);
}

function drag(press: Press, x: number, layout: PanelLayout): void {
  const by = x - press.x;
  if (Math.abs(by) >= CLICK_PX) press.moved = true;
  if (!press.moved) return;
  const shift = (-by / innerWidthOf(layout)) * (press.range[1] - press.range[0]);
  look(inside([press.range[0] + shift, press.range[1] + shift], wholeRange()));
}

/** A click among the lanes means a mark of that lane, one on the spectrum the nearest feature. */
function click(layout: PanelLayout, at: { x: number; y: number }): void {
  const { rows } = desk();
  const [low, high] = shownRange();
  const reach = (REACH_PX / innerWidthOf(layout)) * (high - low);
  const inLanes = at.y < layout.top + layout.lanesHeight;
  const lane = UNNAMED_LANE + LANE_COUNT - 1 - Math.floor(((at.y - layout.top) / layout.lanesHeight) * LANE_COUNT);
  const targets = inLanes ? rows.filter((row) => laneOfRow(row) === lane) : rows;
  const hit = nearestFeature(
    targets.map(({ feature }) => ({ centroid: feature.centroid, fwhm: inLanes ? 0 : feature.measured.fwhm })),
    wavelengthAt(layout, at.x),
    reach,
  );
  if (hit !== undefined) choose(targets[hit].index);
}

function readoutAt(wavelength: number): string {
  const { samples } = desk();
  const axis = waveAxis();
  const shown = axis ? shownWavelength(axis, wavelength) : wavelength;
  if (!samples) return `${fixed(shown, 2)} Å`;
  const k = Math.min(sampleAt(samples.wavelength, wavelength), samples.wavelength.length - 1);
  return `${fixed(shown, 2)} Å   ${round(samples.flux[k], 4)}`;
}
