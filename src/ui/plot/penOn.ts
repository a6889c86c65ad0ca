export type Pen = CanvasRenderingContext2D;

/** A pen on an empty canvas of so many CSS pixels, sharp on every screen; undefined where the browser gives none. */
export function penOn(canvas: HTMLCanvasElement, width: number, height: number): Pen | undefined {
  const pen = canvas.getContext('2d');
  if (!pen) return undefined;
  const scale = window.devicePixelRatio;
  const [w, h] = [Math.round(width * scale), Math.round(height * scale)];
  if (canvas.width !== w || canvas.height !== h) {
    canvas.width = w;
    canvas.height = h;
    canvas.style.width = `${width}px`;
    canvas.style.height = `${height}px`;
  }
  pen.setTransform(scale, 0, 0, scale, 0, 0);
  pen.clearRect(0, 0, width, height);
  return pen;
}
