import { DEFAULT_NAMING_SETTINGS, nameMarks } from '../../src/identify/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { nebula } from '../identify/nebula.ts';

const RUNS = 5;

/** Milliseconds to name 50 and 800 features against the whole list, redshift unknown. */
export function namingBench(): string[] {
  const fifty = nebula({ seed: 3 });
  // sixteen copies, each a little off: as crowded as a deep echelle spectrum
  const many = Array.from({ length: 16 }, (_, copy) =>
    fifty.map((m) => ({ ...m, wavelength: m.wavelength * (1 + copy * 7e-4), flux: m.flux * 0.7 ** copy })),
  ).flat();
  return [fifty, many].map((marks) => {
    const times = Array.from({ length: RUNS }, () => {
      const began = performance.now();
      nameMarks(marks, bundled, { ...DEFAULT_NAMING_SETTINGS, ...(marks === many ? { z: 0 } : {}) }, []);
      return performance.now() - began;
    }).sort((a, b) => a - b);
    return `${marks.length} features: ${times[RUNS >> 1].toFixed(0)} ms (median of ${RUNS})`;
  });
}
