/** Places and heights of the lines in the drawing, in its own units. */
const LINES: readonly (readonly [x: number, height: number, named: boolean])[] = [
  [24, 22, false],
  [52, 38, true],
  [71, 12, false],
  [96, 30, true],
  [120, 52, true],
  [127, 88, true],
  [163, 10, false],
  [188, 26, true],
  [231, 16, false],
  [252, 72, true],
  [258, 34, true],
  [268, 26, true],
  [302, 18, false],
];

/** A spectrum in a few strokes, for the empty desk. */
export function LanternDrawing() {
  const curve = LINES.map(([x, height]) => `L${x - 4} 100Q${x - 1} 100 ${x} ${100 - height}Q${x + 1} 100 ${x + 4} 100`).join('');
  return (
    <svg className="lantern" viewBox="0 0 328 112" aria-hidden="true">
      <path d={`M4 100${curve}L324 100`} />
      {LINES.filter(([, , named]) => named).map(([x, height]) => (
        <rect key={x} x={x - 2} y={100 - height - 10} width="4" height="4" />
      ))}
    </svg>
  );
}
