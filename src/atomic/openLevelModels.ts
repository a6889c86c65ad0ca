import type { Bundle } from './bundle.ts';
import { LOG_UPSILON_SCALE, UNKNOWN_16 } from './bundleFormat.ts';
import { type Level, type LevelModel, UPSILON_TE } from './levelModel.ts';

interface Place {
  readonly levels: readonly [number, number];
  readonly decays: readonly [number, number];
  readonly collisions: readonly [number, number];
  readonly number: number;
}

/** `0` -> 0, `3/2` -> 1.5. */
function jOf(text: string): number {
  const [top, bottom] = text.split('/').map(Number);
  return bottom === undefined ? top : top / bottom;
}

/** The n-level atoms of a bundle: names at once, each atom when first asked for. */
export function openLevelModels(bundle: Bundle): {
  readonly names: readonly string[];
  readonly model: (ion: string) => LevelModel | undefined;
} {
  const texts = bundle.text('texts');
  const ionName = bundle.u16('ion.name');
  const names = Array.from(bundle.u16('model.ion'), (ion) => texts[ionName[ion]]);
  const places = new Map<string, Place>();
  const [levels, decays, collisions] = [bundle.u8('model.levels'), bundle.u16('model.decays'), bundle.u16('model.collisions')];
  let [l, d, c] = [0, 0, 0];
  names.forEach((name, i) => {
    places.set(name, {
      levels: [l, l + levels[i]],
      decays: [d, d + decays[i]],
      collisions: [c, c + collisions[i]],
      number: i,
    });
    [l, d, c] = [l + levels[i], d + decays[i], c + collisions[i]];
  });
  const made = new Map<string, LevelModel>();
  return {
    names,
    model: (ion) => {
      const place = places.get(ion);
      if (place === undefined) return undefined;
      let atom = made.get(ion);
      if (atom === undefined) {
        atom = openModel(bundle, ion, place);
        made.set(ion, atom);
      }
      return atom;
    },
  };
}

function openModel(bundle: Bundle, ion: string, place: Place): LevelModel {
  const texts = bundle.text('texts');
  const [configuration, term, j] = [bundle.u16('level.configuration'), bundle.u16('level.term'), bundle.u16('level.j')];
  const [energy, energyErr] = [bundle.f64('level.energy'), bundle.f32('level.energyErr')];
  const levels: Level[] = [];
  for (let k = place.levels[0]; k < place.levels[1]; k++) {
    levels.push({
      configuration: texts[configuration[k]],
      term: texts[term[k]],
      j: jOf(texts[j[k]]),
      energyCm1: energy[k],
      energyErrCm1: energyErr[k],
      parity: texts[term[k]].endsWith('o') ? 'odd' : 'even',
    });
  }
  const sources = (name: string): readonly string[] => texts[bundle.u16(name)[place.number]].split('\t').filter((text) => text !== '');
  return {
    ion,
    levels,
    radiative: {
      lower: bundle.u8('a.lower').slice(...place.decays),
      upper: bundle.u8('a.upper').slice(...place.decays),
      a: Float64Array.from(bundle.f32('a.value').subarray(...place.decays)),
    },
    collisions: {
      lower: bundle.u8('upsilon.lower').slice(...place.collisions),
      upper: bundle.u8('upsilon.upper').slice(...place.collisions),
      upsilon: upsilons(bundle.i16('upsilon.log'), place.collisions),
      teLow: bundle.f32('upsilon.teLow').slice(...place.collisions),
      teHigh: bundle.f32('upsilon.teHigh').slice(...place.collisions),
    },
    sources: {
      energies: sources('model.energySources'),
      radiative: sources('model.aSources'),
      collisions: sources('model.upsilonSources'),
    },
  };
}

/** Undoes the packing: temperature by temperature, each log as the difference from the temperature before. */
function upsilons(log: Int16Array, [from, to]: readonly [number, number]): Float32Array {
  const temperatures = UPSILON_TE.length;
  const pairs = log.length / temperatures;
  const out = new Float32Array((to - from) * temperatures);
  for (let pair = from; pair < to; pair++) {
    let before = 0;
    for (let t = 0; t < temperatures; t++) {
      const stored = log[t * pairs + pair];
      const at = (pair - from) * temperatures + t;
      if (stored === UNKNOWN_16) {
        out[at] = Number.NaN;
        before = 0;
      } else {
        before += stored;
        out[at] = 10 ** (before / LOG_UPSILON_SCALE);
      }
    }
  }
  return out;
}
