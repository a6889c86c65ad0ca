import { useMemo } from 'react';
import type { WaveAxis } from '../plot/waveAxis.ts';
import { type DeskFields, desk, useDesk } from './deskStore.ts';

type Shown = Pick<DeskFields, 'analysis' | 'frame' | 'axisMedium'>;

function axisOf({ analysis, frame, axisMedium }: Shown): WaveAxis | undefined {
  if (!analysis) return undefined;
  const { medium } = analysis.reading;
  return { medium, shownMedium: axisMedium ?? medium, frame, z: analysis.z };
}

/** What the wavelength axis counts; undefined while nothing is open. */
export function useWaveAxis(): WaveAxis | undefined {
  const analysis = useDesk((state) => state.analysis);
  const frame = useDesk((state) => state.frame);
  const axisMedium = useDesk((state) => state.axisMedium);
  return useMemo(() => axisOf({ analysis, frame, axisMedium }), [analysis, frame, axisMedium]);
}

export const waveAxis = () => axisOf(desk());
