import { type AtomicData, isInsideRange, survival } from '../atomic/index.ts';
import { nearestWord, ProblemError } from '../problems/index.ts';
import { airFromVacuum } from '../units/index.ts';
import { ionLabel } from './lineNames.ts';
import { thinGasOf } from './transitionView.ts';

/** One thin-gas line of an ion with what it tolerates. */
export interface LimitRow {
  /** With brackets. */
  readonly ion: string;
  /** Angstrom. */
  readonly wavelengthAir: number;
  readonly wavelengthVac: number;
  readonly lower: string;
  readonly upper: string;
  /** s^-1 */
  readonly aValue: number;
  readonly lifetimeS: number;
  /** cm^-3, collisions to all other levels; absent = no collision data. */
  readonly nCrit?: number;
  /** Emission per ion and electron at `ne` over its low-density limit; absent = no collision data. */
  readonly survival?: number;
  /** False where collision strengths had to be held at the end of their tabulated temperatures. */
  readonly insideRange: boolean;
}

/**
 * The thin-gas lines of an ion, ascending wavelength.
 *
 * @param te K
 * @param ne cm^-3
 * @throws ProblemError when the list has no such ion; an ion without thin-gas lines gives an empty list
 */
export function limitsOf(data: AtomicData, ion: string, te: number, ne: number): LimitRow[] {
  const { lines } = data;
  const wanted = ion.replace(/[[\]]/g, '').trim();
  const names = [...new Set(lines.ions.map((i) => i.name))];
  const index = lines.ions.findIndex((i) => i.name.toLowerCase() === wanted.toLowerCase());
  if (index < 0) {
    const near = nearestWord(wanted, names);
    throw new ProblemError({
      code: 'no-such-ion',
      where: {},
      found: `no ion '${ion}' in the line list`,
      expected: 'a name such as "O III"',
      doThis: near ? `Did you mean ${near}?` : undefined,
    });
  }
  const model = data.levelModel(lines.ions[index].name);
  const rows: LimitRow[] = [];
  for (let line = 0; line < lines.count; line++) {
    if (lines.ion[line] !== index) continue;
    const facts = thinGasOf({ data, medium: 'vacuum', te }, line);
    if (!facts) continue;
    const upper = lines.upperLevel[line];
    const left = model && upper > 0 && facts.nCrit !== undefined ? survival(model, upper, te, [ne])[0] : Number.NaN;
    rows.push({
      ion: ionLabel(data, line),
      wavelengthAir: airFromVacuum(lines.wavelengthVac[line]),
      wavelengthVac: lines.wavelengthVac[line],
      lower: data.lowerLabel(line),
      upper: data.upperLabel(line),
      aValue: lines.aValue[line],
      lifetimeS: facts.lifetimeS,
      ...(facts.nCrit === undefined ? {} : { nCrit: facts.nCrit }),
      ...(Number.isFinite(left) ? { survival: left } : {}),
      insideRange: model === undefined || upper <= 0 || isInsideRange(model, upper, te),
    });
  }
  return rows;
}
