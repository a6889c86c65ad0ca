import { useRef } from 'react';
import { useSize } from '../parts/useSize.ts';
import { words } from '../words.ts';
import { FigureView } from './FigureView.tsx';
import type { Figure } from './figure.ts';
import { savePng, saveSvg } from './saveFigure.ts';

interface Props {
  /** Ending of the file's name. */
  readonly name: string;
  readonly draw: (width: number) => Figure;
}

/** A figure as wide as there is room, and the ways to save it. */
export function FigureBox({ name, draw }: Props) {
  const box = useRef<HTMLDivElement>(null);
  const width = useSize(box)?.width ?? 0;
  const figure = width > 0 ? draw(width) : undefined;
  return (
    <div className="figure-box" ref={box}>
      {figure && <FigureView figure={figure} />}
      {figure && (
        <p className="figure-save">
          <button type="button" className="small" onClick={() => saveSvg(name, figure)}>
            {words.gas.saveSvg}
          </button>
          <button type="button" className="small" onClick={() => void savePng(name, figure)}>
            {words.gas.savePng}
          </button>
        </p>
      )}
    </div>
  );
}
