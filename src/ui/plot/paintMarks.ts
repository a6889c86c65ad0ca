import type { DeskRow, Standing } from '../desk/deskRows.ts';
import type { Ink } from './inkOf.ts';
import type { PanelLayout } from './layoutOf.ts';
import { marksOf } from './marksOf.ts';
import type { Range } from './viewRange.ts';

const FONT_PX = 10.5;
const RING_PX = 5.25;
/** Half a mark, pixels. */
const HALF = 2.75;

/** What the marks are painted from. */
export interface MarksScene {
  readonly rows: readonly DeskRow[];
  readonly ink: Ink;
  readonly layout: PanelLayout;
}

/**
 * Paints marks, thin-gas rings and labels of the lanes. On a canvas, anew for every frame: 800 marks as elements of a drawing cost 20 ms a move, painted 2 ms,
 * and labels make room for each other at every zoom.
 */
export function paintMarks(canvas: HTMLCanvasElement, { rows, ink, layout }: MarksScene, view: Range): void {
  const pen = canvas.getContext('2d');
  if (!pen) return;
  const height = Math.ceil(layout.spectrumTop);
  const scale = window.devicePixelRatio;
  if (canvas.width !== Math.round(layout.width * scale) || canvas.height !== Math.round(height * scale)) {
    canvas.width = Math.round(layout.width * scale);
    canvas.height = Math.round(height * scale);
    canvas.style.width = `${layout.width}px`;
    canvas.style.height = `${height}px`;
  }
  pen.setTransform(scale, 0, 0, scale, 0, 0);
  pen.clearRect(0, 0, layout.width, height);
  pen.font = `${FONT_PX}px ${ink.font}`;
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  pen.strokeStyle = ink.ink;
  pen.fillStyle = ink.ink;
  const { marks, labels } = marksOf(rows, view, layout, (text) => pen.measureText(text).width);
  pen.lineWidth = 1.25;
  for (const { x, y, standing, ring } of marks) {
    SHAPES[standing](pen, x, y);
    if (ring) paintRing(pen, x, y);
  }
  for (const { x, y, text } of labels) pen.fillText(text, x, y);
}

type Pen = CanvasRenderingContext2D;

function paintRing(pen: Pen, x: number, y: number): void {
  pen.beginPath();
  pen.arc(x, y, RING_PX, 0, 2 * Math.PI);
  pen.stroke();
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
