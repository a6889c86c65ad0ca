import type { AtomicData } from '../atomicData.ts';
import type { Ion, LineList } from '../lineList.ts';
import type { UserLine } from './userLine.ts';

/** One sigma of a strength the user gives, dex. */
const USER_STRENGTH_ERR_DEX = 0.3;

/**
 * The atomic data with the user's lines among the bundled ones, in order of wavelength. The bundled data stay as they are; indices of lines differ between the two.
 *
 * A user's line whose ion and upper (lower) label are those of the list gets that level: companions and thin-gas facts follow. Ions new to the list get the median
 * creation and ionization energy of the listed ions of their charge. Line keys (ion and wavelength) mean the same in both.
 */
export function withUserLines(data: AtomicData, added: readonly UserLine[]): AtomicData {
  if (added.length === 0) return data;
  const old = data.lines;
  const lines = [...added].sort((p, q) => p.wavelengthVac - q.wavelengthVac);
  // origin[i] >= 0: line of the bundle; -1 - k: user's line k
  const origin = mergedOrder(old, lines);
  const ions = withIons(old.ions, lines);
  const levels = levelsOf(data, lines);
  const pick = <T>(bundled: (line: number) => T, own: (line: UserLine, k: number) => T) => {
    return (line: number): T => {
      const from = origin[line];
      return from >= 0 ? bundled(from) : own(lines[-1 - from], -1 - from);
    };
  };
  const fill = <A extends { [index: number]: number }>(into: A, valueAt: (line: number) => number): A => {
    for (let i = 0; i < origin.length; i++) into[i] = valueAt(i);
    return into;
  };
  const n = origin.length;
  const nature = pick<ReturnType<LineList['nature']>>(old.nature, (line) => line.nature);
  const list: LineList = {
    count: n,
    ions: ions.all,
    ion: fill(
      new Uint16Array(n),
      pick(
        (i) => old.ion[i],
        (line) => ions.indexOf(line.ion),
      ),
    ),
    wavelengthVac: fill(
      new Float64Array(n),
      pick(
        (i) => old.wavelengthVac[i],
        (line) => line.wavelengthVac,
      ),
    ),
    wavelengthErr: fill(
      new Float32Array(n),
      pick(
        (i) => old.wavelengthErr[i],
        (line) => line.wavelengthErr,
      ),
    ),
    nature,
    mechanism: pick(old.mechanism, (line) => (line.nature === 'permitted' ? 'recombination' : 'collisional')),
    logStrength: fill(
      new Float32Array(n),
      pick(
        (i) => old.logStrength[i],
        (line) => (line.strength === undefined ? Number.NEGATIVE_INFINITY : Math.log10(line.strength)),
      ),
    ),
    strengthErrDex: fill(
      new Float32Array(n),
      pick(
        (i) => old.strengthErrDex[i],
        (line) => (line.strength === undefined ? 0 : USER_STRENGTH_ERR_DEX),
      ),
    ),
    aValue: fill(
      new Float32Array(n),
      pick(
        (i) => old.aValue[i],
        () => Number.NaN,
      ),
    ),
    upperLevel: fill(
      new Int16Array(n),
      pick(
        (i) => old.upperLevel[i],
        (_, k) => levels[k].upperLevel,
      ),
    ),
    lowerLevel: fill(
      new Int16Array(n),
      pick(
        (i) => old.lowerLevel[i],
        (_, k) => levels[k].lowerLevel,
      ),
    ),
    multiplet: fill(
      new Uint32Array(n),
      pick(
        (i) => old.multiplet[i],
        () => 0,
      ),
    ),
    upperId: fill(
      new Uint32Array(n),
      pick(
        (i) => old.upperId[i],
        (_, k) => levels[k].upperId,
      ),
    ),
  };
  const placeOf = new Int32Array(old.count);
  for (let i = 0; i < n; i++) if (origin[i] >= 0) placeOf[origin[i]] = i;
  return {
    ...data,
    version: `${data.version}+${added.length} own`,
    lines: list,
    referenceAbundance: Float32Array.from(ions.all, (_, k) => data.referenceAbundance[k] ?? 0),
    multipletName: pick(data.multipletName, () => ''),
    lowerLabel: pick(data.lowerLabel, (line) => line.lower),
    upperLabel: pick(data.upperLabel, (line) => line.upper),
    lowerEnergyCm1: pick(data.lowerEnergyCm1, (_, k) => levels[k].lowerEnergyCm1),
    upperEnergyCm1: pick(data.upperEnergyCm1, (_, k) => levels[k].upperEnergyCm1),
    isResonance: pick(data.isResonance, () => false),
    lineName: pick(data.lineName, () => ''),
    ritzVac: pick(data.ritzVac, (_, k) => 1e8 / (levels[k].upperEnergyCm1 - levels[k].lowerEnergyCm1)),
    wavelengthNote: pick(data.wavelengthNote, (line) => `added by you: ${line.source}`),
    strengthBasis: pick<ReturnType<AtomicData['strengthBasis']>>(data.strengthBasis, (line) =>
      line.strength === undefined ? 'unknown' : 'estimate',
    ),
    strengthNote: pick(data.strengthNote, (line) => (line.strength === undefined ? 'none given' : `added by you: ${line.source}`)),
    aNote: pick(data.aNote, () => ''),
    lineSources: pick<readonly string[]>(data.lineSources, (line) => [`added by you: ${line.source}`]),
    hydrogenicLine: (ion, nLower, nUpper) => {
      const line = data.hydrogenicLine(ion, nLower, nUpper);
      return line < 0 ? line : placeOf[line];
    },
  };
}

/** Both lists in one ascending order; at equal wavelengths the bundled line stands first. */
function mergedOrder(old: LineList, added: readonly UserLine[]): Int32Array {
  const origin = new Int32Array(old.count + added.length);
  let k = 0;
  let at = 0;
  for (let i = 0; i < old.count; i++) {
    while (k < added.length && added[k].wavelengthVac < old.wavelengthVac[i]) origin[at++] = -1 - k++;
    origin[at++] = i;
  }
  while (k < added.length) origin[at++] = -1 - k++;
  return origin;
}

function withIons(
  known: readonly Ion[],
  added: readonly UserLine[],
): { readonly all: readonly Ion[]; readonly indexOf: (name: string) => number } {
  const all = [...known];
  const index = new Map<string, number>();
  // sky carriers may bear an ion's name further down: the first is the object's
  known.forEach((ion, k) => {
    if (!index.has(ion.name)) index.set(ion.name, k);
  });
  for (const { ion, element, charge } of added) {
    if (index.has(ion)) continue;
    index.set(ion, all.length);
    const alike = known.filter((k) => k.charge === charge && k.ionizationEv > 0);
    all.push({
      name: ion,
      element,
      charge,
      creationEv: charge === 0 ? 0 : middle(alike.map((k) => k.creationEv)),
      ionizationEv: middle(alike.map((k) => k.ionizationEv)),
    });
  }
  return { all, indexOf: (name) => index.get(name) ?? 0 };
}

/** Median; the highest energy of the list where no listed ion has that charge. */
function middle(values: readonly number[]): number {
  const HIGHEST_EV = 500;
  return values.length > 0 ? [...values].sort((p, q) => p - q)[values.length >> 1] : HIGHEST_EV;
}

interface UserLevels {
  readonly upperId: number;
  readonly upperLevel: number;
  readonly lowerLevel: number;
  readonly upperEnergyCm1: number;
  readonly lowerEnergyCm1: number;
}

/** Levels of the list that the user's lines name by ion and label. Upper levels new to the list get new numbers, one a label. */
function levelsOf(data: AtomicData, added: readonly UserLine[]): UserLevels[] {
  const { lines } = data;
  const asked = new Set(added.map((line) => line.ion));
  const known = new Map<string, { id: number; level: number; energyCm1: number }>();
  let lastId = 0;
  for (let i = 0; i < lines.count; i++) {
    lastId = Math.max(lastId, lines.upperId[i]);
    const ion = lines.ions[lines.ion[i]].name;
    if (!asked.has(ion)) continue;
    const lower = `${ion} ${data.lowerLabel(i)}`;
    if (!known.has(lower)) known.set(lower, { id: 0, level: lines.lowerLevel[i], energyCm1: data.lowerEnergyCm1(i) });
    known.set(`${ion} ${data.upperLabel(i)}`, { id: lines.upperId[i], level: lines.upperLevel[i], energyCm1: data.upperEnergyCm1(i) });
  }
  return added.map((line) => {
    const none = { id: 0, level: -1, energyCm1: Number.NaN };
    const lower = line.lower === '' ? none : (known.get(`${line.ion} ${line.lower}`) ?? none);
    const key = `${line.ion} ${line.upper}`;
    let upper = line.upper === '' ? none : (known.get(key) ?? none);
    if (line.upper !== '' && upper.id === 0) {
      upper = { ...upper, id: ++lastId };
      known.set(key, upper);
    }
    return {
      upperId: upper.id,
      upperLevel: upper.level,
      lowerLevel: lower.level,
      upperEnergyCm1: upper.energyCm1,
      lowerEnergyCm1: lower.energyCm1,
    };
  });
}
