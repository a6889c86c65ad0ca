import { useState } from 'react';
import type { Gas } from '../../plasma/index.ts';
import { withError } from '../figures.ts';
import { Segments } from '../parts/Segments.tsx';
import { words } from '../words.ts';
import { FigureBox } from './FigureBox.tsx';
import { type MotionX, type MotionY, motionFigure, trendOf } from './motionFigure.ts';

const { motion: label } = words.gas;
const YS: readonly MotionY[] = ['velocity', 'width'];
const XS: readonly MotionX[] = ['energy', 'wavelength'];
/** Slopes are told for this much of the axis. */
const PER = { energy: 10, wavelength: 1000 } as const;

/** Velocities and widths of the lines, and their means ion by ion. */
export function MotionView({ gas }: { readonly gas: Gas }) {
  const { kinematics } = gas;
  const [y, setY] = useState<MotionY>('velocity');
  const [x, setX] = useState<MotionX>('energy');
  const trend = trendOf(kinematics, y, x);
  if (kinematics.points.length === 0) return <p className="hint">{label.none}</p>;
  return (
    <>
      <div className="tools motion-tools">
        <Segments label={label.showY} options={YS} value={y} words={label.ys} choose={setY} />
        <Segments label={label.showX} options={XS} value={x} words={label.xs} choose={setX} />
      </div>
      <FigureBox name={`${y}-${x}`} draw={(width) => motionFigure(kinematics, width, y, x)} />
      {trend && (
        <p className="number">{label.trend(withError(PER[x] * trend.slope, PER[x] * trend.slopeErr, 2), label.per[x], trend.points)}</p>
      )}
      <p className="hint">{label.assumption}</p>
      {kinematics.findings.length === 0 && <p>{label.noFinding}</p>}
      {kinematics.findings.map((sentence) => (
        <p key={sentence} className="doubt">
          {sentence}
        </p>
      ))}
      <table className="numbers">
        <caption>{label.ions}</caption>
        <thead>
          <tr>
            <th scope="col">{label.ion}</th>
            <th scope="col">eV</th>
            <th scope="col">n</th>
            <th scope="col">{label.velocity}</th>
            <th scope="col">{label.fwhm}</th>
          </tr>
        </thead>
        <tbody>
          {kinematics.ions.map((mean) => (
            <tr key={mean.ion}>
              <th scope="row">{mean.ion}</th>
              <td>{mean.energyEv.toFixed(1)}</td>
              <td>{mean.count}</td>
              <td>{withError(mean.velocityKms, mean.velocityErrKms, 1)}</td>
              <td>{mean.fwhmKms === undefined ? '–' : withError(mean.fwhmKms, mean.fwhmErrKms, 1)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </>
  );
}
