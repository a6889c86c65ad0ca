import type { SkyView } from '../../engine/index.ts';
import { words } from '../words.ts';
import type { Ink } from './inkOf.ts';
import { labelsThatFit, type Wish } from './labelsThatFit.ts';
import type { PanelLayout } from './layoutOf.ts';
import { type Pen, penOn } from './penOn.ts';
import { sampleAt } from './sampleAt.ts';
import type { Range } from './viewRange.ts';

/** What lies below the curves. */
export interface GroundScene {
  readonly sky: SkyView;
  /** Masked stretches, Angstrom: low, high, low, high ... ascending. */
  readonly masked: Float64Array;
  readonly ink: Ink;
  readonly layout: PanelLayout;
}

const FONT_PX = 10;
/** A line of the sky wants so many pixels of the width: the strongest are drawn. */
const SKY_LINE_SHARE_PX = 36;
/** Pixels between the strokes of the masked hatching. */
const HATCH_PX = 6;
const MOST_LABELS = 24;
const MIDDLE = 0.5;

/**
 * Shades what is not the object's: absorption bands of the air (a wash with its molecule), lines of the sky (dashes), masked samples (hatching).
 * Each is told by its form and its word, not by colour alone.
 */
export function paintGround(canvas: HTMLCanvasElement, { sky, masked, ink, layout }: GroundScene, view: Range): void {
  const pen = penOn(canvas, layout.width, layout.height);
  if (!pen) return;
  const inner = layout.width - layout.left - layout.right;
  const xOf = (at: number) => layout.left + ((Math.min(Math.max(at, view[0]), view[1]) - view[0]) / (view[1] - view[0])) * inner;
  const top = layout.spectrumTop;
  const bottom = layout.residualHeight > 0 ? layout.residualTop + layout.residualHeight : top + layout.spectrumHeight;
  const wishes: Wish[] = [];
  pen.font = `${FONT_PX}px ${ink.font}`;
  for (const band of sky.bands) {
    if (band.high < view[0] || band.low > view[1]) continue;
    const [from, to] = [xOf(band.low), xOf(band.high)];
    pen.fillStyle = ink.airBand;
    pen.fillRect(from, top, Math.max(to - from, 1), bottom - top);
    wishes.push({ x: (from + to) * MIDDLE, lane: 0, text: molecules(band.species), importance: to - from });
  }
  for (const [from, to] of maskedSpans(masked, view, xOf)) {
    hatch(pen, from, to, top, bottom, ink);
    wishes.push({ x: (from + to) * MIDDLE, lane: 0, text: words.spectrum.masked, importance: to - from });
  }
  pen.strokeStyle = ink.faint;
  pen.lineWidth = 1;
  pen.setLineDash([1, 5]);
  pen.beginPath();
  for (const line of strongest(sky, view, inner / SKY_LINE_SHARE_PX)) {
    const x = Math.round(xOf(line.at)) + MIDDLE;
    pen.moveTo(x, top);
    pen.lineTo(x, bottom);
    wishes.push({ x, lane: 0, text: words.sky, importance: -1 / line.strength });
  }
  pen.stroke();
  pen.setLineDash([]);
  label(pen, wishes, top + FONT_PX * MIDDLE + 1, ink);
}

function strongest({ lines }: SkyView, view: Range, most: number): SkyView['lines'] {
  const seen = lines.filter(({ at }) => at >= view[0] && at <= view[1]);
  if (seen.length <= most) return seen;
  return [...seen].sort((a, b) => b.strength - a.strength).slice(0, most);
}

function label(pen: Pen, wishes: readonly Wish[], y: number, ink: Ink): void {
  pen.fillStyle = ink.muted;
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  for (const k of labelsThatFit(wishes, (text) => pen.measureText(text).width, MOST_LABELS)) pen.fillText(wishes[k].text, wishes[k].x, y);
}

/** Masked stretches in view, pixels; those less than a pixel apart join. */
function maskedSpans(masked: Float64Array, view: Range, xOf: (at: number) => number): [from: number, to: number][] {
  const spans: [number, number][] = [];
  // pairs are disjoint and ascending: the first whose end is in view
  for (let k = sampleAt(masked, view[0]) & ~1; k < masked.length && masked[k] < view[1]; k += 2) {
    const [from, to] = [xOf(masked[k]), xOf(masked[k + 1])];
    const last = spans.at(-1);
    if (last && from <= last[1] + 1) last[1] = Math.max(last[1], to);
    else spans.push([from, to]);
  }
  return spans;
}

/** Slanted strokes, which stand in one pattern over all stretches. */
function hatch(pen: Pen, from: number, to: number, top: number, bottom: number, ink: Ink): void {
  pen.save();
  pen.beginPath();
  pen.rect(from, top, Math.max(to - from, 1), bottom - top);
  pen.clip();
  pen.strokeStyle = ink.hairline;
  pen.lineWidth = 1;
  pen.beginPath();
  const slant = bottom - top;
  for (let x = Math.floor((from - slant) / HATCH_PX) * HATCH_PX; x < to; x += HATCH_PX) {
    pen.moveTo(x, bottom);
    pen.lineTo(x + slant, top);
  }
  pen.stroke();
  pen.restore();
}

const LOWERED = '₀₁₂₃₄₅₆₇₈₉';
/** "H2O + O2" as it is printed. */
const molecules = (species: string) =>
  species === 'mixed' ? words.spectrum.airBand : species.replace(/(?<=[A-Z])\d/g, (digit) => LOWERED[Number(digit)]);
