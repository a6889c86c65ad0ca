import type { DeskRow, Standing } from '../desk/deskRows.ts';
import { words } from '../words.ts';
import type { Ink } from './inkOf.ts';
import type { PanelLayout } from './layoutOf.ts';
import { marksOf } from './marksOf.ts';
import { type Pen, penOn } from './penOn.ts';
import type { Range } from './viewRange.ts';
import { axisTicks, otherAxis, TICK_PX, type WaveAxis } from './waveAxis.ts';

const FONT_PX = 10.5;
const RING_PX = 5.25;
/** Half a mark, pixels. */
const HALF = 2.75;
const TICK_LENGTH_PX = 4;
/** Free ground about the chosen label. */
const HALO_PX = 4;
const BROKEN = [2.5, 2.5];

/** What the marks are painted from. */
export interface MarksScene {
  readonly rows: readonly DeskRow[];
  /** Number of the chosen feature. */
  readonly chosen?: number;
  readonly axis: WaveAxis;
  readonly ink: Ink;
  readonly layout: PanelLayout;
}

/**
 * Paints marks, thin-gas rings and labels of the lanes. On a canvas, anew for every frame: 800 marks as elements of a drawing cost 20 ms a move, painted 2 ms,
 * and labels make room for each other at every zoom.
 */
export function paintMarks(canvas: HTMLCanvasElement, { rows, chosen, axis, ink, layout }: MarksScene, view: Range): void {
  const pen = penOn(canvas, layout.width, Math.ceil(layout.spectrumTop));
  if (!pen) return;
  pen.font = `${FONT_PX}px ${ink.font}`;
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  pen.fillStyle = ink.ink;
  const { marks, labels } = marksOf(rows, view, layout, (text) => pen.measureText(text).width, chosen);
  const own = rows.find((row) => row.feature.number === chosen)?.feature.centroid;
  if (own !== undefined && own >= view[0] && own <= view[1]) paintChosenLine(pen, own, layout, ink, view);
  pen.strokeStyle = ink.ink;
  pen.lineWidth = 1.25;
  for (const { x, y, standing, ring } of marks) {
    SHAPES[standing](pen, x, y);
    if (ring) paintRing(pen, x, y, ring);
  }
  pen.strokeStyle = ink.surface;
  pen.lineWidth = HALO_PX;
  for (const { x, y, text, isChosen } of labels) {
    pen.font = `${isChosen ? '600 ' : ''}${FONT_PX}px ${ink.font}`;
    if (isChosen) pen.strokeText(text, x, y);
    pen.fillText(text, x, y);
  }
  paintSecondAxis(pen, otherAxis(axis), layout, ink, view);
}

/** Through the lanes, below marks and labels; it goes on through the curves as an element of the page. */
function paintChosenLine(pen: Pen, at: number, layout: PanelLayout, ink: Ink, view: Range): void {
  const x = layout.left + ((at - view[0]) / (view[1] - view[0])) * (layout.width - layout.left - layout.right);
  pen.strokeStyle = ink.accent;
  pen.lineWidth = 1;
  pen.beginPath();
  pen.moveTo(x, layout.top);
  pen.lineTo(x, layout.spectrumTop);
  pen.stroke();
}

/** The wavelengths of the other frame, along the top. */
function paintSecondAxis(pen: Pen, axis: WaveAxis, layout: PanelLayout, ink: Ink, view: Range): void {
  const inner = layout.width - layout.left - layout.right;
  const y = layout.top - 0.5;
  pen.strokeStyle = ink.hairline;
  pen.fillStyle = ink.muted;
  pen.font = `${FONT_PX}px ${ink.font}`;
  pen.lineWidth = 1;
  pen.beginPath();
  pen.moveTo(layout.left, y);
  pen.lineTo(layout.width - layout.right, y);
  const { at, text } = axisTicks(axis, view[0], view[1], inner / TICK_PX);
  at.forEach((place, k) => {
    const x = layout.left + ((place - view[0]) / (view[1] - view[0])) * inner;
    pen.moveTo(x, y);
    pen.lineTo(x, y - TICK_LENGTH_PX);
    const half = pen.measureText(text[k]).width / 2;
    pen.fillText(
      text[k],
      Math.min(Math.max(x, layout.left + half), layout.width - layout.right - half),
      y - TICK_LENGTH_PX - FONT_PX / 2 - 1,
    );
  });
  pen.stroke();
  pen.textAlign = 'right';
  pen.fillText(words.spectrum.frames[axis.frame], layout.left - 6, y - TICK_LENGTH_PX - FONT_PX / 2 - 1);
}

/** Forbidden lines have a whole ring, intercombination lines a broken one. */
function paintRing(pen: Pen, x: number, y: number, ring: 'whole' | 'broken'): void {
  if (ring === 'broken') pen.setLineDash(BROKEN);
  pen.beginPath();
  pen.arc(x, y, RING_PX, 0, 2 * Math.PI);
  pen.stroke();
  if (ring === 'broken') pen.setLineDash([]);
}

/** Verdicts are told apart by shape and fill, not by colour: the same signs as beside the words (parts/Mark.tsx). */
const SHAPES: Record<Standing, (pen: Pen, x: number, y: number) => void> = {
  open: (pen, x, y) => pen.strokeRect(x - HALF, y - HALF, 2 * HALF, 2 * HALF),
  accepted: (pen, x, y) => pen.fillRect(x - HALF - 0.5, y - HALF - 0.5, 2 * HALF + 1, 2 * HALF + 1),
  rejected(pen, x, y) {
    pen.beginPath();
    pen.moveTo(x - HALF, y - HALF);
    pen.lineTo(x + HALF, y + HALF);
    pen.moveTo(x + HALF, y - HALF);
    pen.lineTo(x - HALF, y + HALF);
    pen.stroke();
  },
  unidentified: (pen, x, y) => strokeShape(pen, [x, y - HALF - 1, x + HALF + 1, y, x, y + HALF + 1, x - HALF - 1, y]),
  artefact: (pen, x, y) => strokeShape(pen, [x - HALF - 1, y - HALF, x + HALF + 1, y - HALF, x, y + HALF + 0.5]),
};

function strokeShape(pen: Pen, points: readonly number[]): void {
  pen.beginPath();
  pen.moveTo(points[0], points[1]);
  for (let k = 2; k < points.length; k += 2) pen.lineTo(points[k], points[k + 1]);
  pen.closePath();
  pen.stroke();
}
