import { useMemo } from 'react';
import type { WaveAxis } from '../plot/waveAxis.ts';
import { type DeskFields, desk, useDesk } from './deskStore.ts';

type Shown = Pick<DeskFields, 'analysis' | 'frame' | 'axisMedium' | 'draggedZ'>;

function axisOf({ analysis, frame, axisMedium, draggedZ }: Shown): WaveAxis | undefined {
  if (!analysis) return undefined;
  const { medium } = analysis.reading;
  return { medium, shownMedium: axisMedium ?? medium, frame, z: draggedZ ?? analysis.z };
}

/** What the wavelength axis counts; undefined while nothing is open. */
export function useWaveAxis(): WaveAxis | undefined {
  const analysis = useDesk((state) => state.analysis);
  const frame = useDesk((state) => state.frame);
  const axisMedium = useDesk((state) => state.axisMedium);
  const draggedZ = useDesk((state) => state.draggedZ);
  return useMemo(() => axisOf({ analysis, frame, axisMedium, draggedZ }), [analysis, frame, axisMedium, draggedZ]);
}

export const waveAxis = () => axisOf(desk());
