import { vacuumFromAir, velocityFromRedshift } from '../../units/index.ts';
import { fixed, signed } from '../figures.ts';
import { words } from '../words.ts';
import { set } from './decisions.ts';
import { desk, setDesk } from './deskStore.ts';

/** Redshifts that a drag may reach. */
const LEAST_Z = -0.1;
const MOST_Z = 10;

/**
 * The redshift after the ruler of the other frame was dragged from one observed place to another (Angstrom of the file): what stood at `from` stands at `to`.
 * The ruler counts rest wavelengths over an observed spectrum, and observed ones over a rest spectrum.
 */
export function draggedRedshift(z: number, from: number, to: number, medium: 'air' | 'vacuum', frame: 'observed' | 'rest'): number {
  const vacuum = (w: number) => (medium === 'air' ? vacuumFromAir(w) : w);
  const share = vacuum(to) / vacuum(from);
  const dragged = (1 + z) * (frame === 'observed' ? share : 1 / share) - 1;
  return Math.min(MOST_Z, Math.max(LEAST_Z, dragged));
}

/** Shows the ruler where it is dragged to; returns its redshift in words. */
export function dragRuler(from: number, to: number): string {
  const { analysis, frame } = desk();
  if (!analysis) return '';
  const z = draggedRedshift(analysis.z, from, to, analysis.reading.medium, frame);
  setDesk({ draggedZ: z });
  return `z ${signed(z, undefined, 6)}   ${fixed(velocityFromRedshift(z), 1)} km/s`;
}

/** Takes the redshift of the dragged ruler as given. */
export function dropRuler(): void {
  const { draggedZ: z } = desk();
  setDesk({ draggedZ: undefined });
  if (z !== undefined)
    set(
      (settings) => ({ ...settings, naming: { ...settings.naming, z } }),
      words.settings.changed(words.settings.redshift, signed(z, undefined, 6)),
    );
}
