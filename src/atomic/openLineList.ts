import type { Bundle } from './bundle.ts';
import {
  ERR_DEX_SCALE,
  LOG_A_SCALE,
  LOG_STRENGTH_SCALE,
  MECHANISMS,
  NATURES,
  NO_LEVEL,
  UNKNOWN_16,
  WAVELENGTH_ERR_FLOOR,
  WAVELENGTH_ERR_STEPS_PER_DEX,
} from './bundleFormat.ts';
import type { Ion, LineList } from './lineList.ts';

function openIons(bundle: Bundle): Ion[] {
  const texts = bundle.text('texts');
  const [name, element] = [bundle.u16('ion.name'), bundle.u16('ion.element')];
  const charge = bundle.u8('ion.charge');
  const [creation, ionization] = [bundle.f64('ion.creationEv'), bundle.f64('ion.ionizationEv')];
  return Array.from(name, (text, i) => ({
    name: texts[text],
    element: texts[element[i]],
    charge: charge[i],
    creationEv: creation[i],
    ionizationEv: ionization[i],
  }));
}

/** Decodes the transitions of a bundle into a line list; its arrays are read-only. */
export function openLineList(bundle: Bundle): LineList {
  const n = bundle.header.counts.lines;
  const [lower, upper] = [bundle.u16('line.lower'), bundle.u16('line.upper')];
  const [energy, canonical, model] = [bundle.f64('level.energy'), bundle.u16('level.canonical'), bundle.i16('level.model')];
  const [kind, given] = [bundle.u8('line.kind'), bundle.f64('line.givenVac')];
  const [errCode, strengthErr] = [bundle.u8('line.wavelengthErr'), bundle.u8('line.strengthErr')];
  const [logStrengthCode, logACode] = [bundle.i16('line.logStrength'), bundle.i16('line.logA')];
  const errOfCode = Float32Array.from({ length: 256 }, (_, k) => WAVELENGTH_ERR_FLOOR * 10 ** (k / WAVELENGTH_ERR_STEPS_PER_DEX));
  const wavelengthVac = new Float64Array(n);
  const wavelengthErr = new Float32Array(n);
  const logStrength = new Float32Array(n);
  const strengthErrDex = new Float32Array(n);
  const aValue = new Float32Array(n);
  const upperLevel = new Int16Array(n).fill(-1);
  const lowerLevel = new Int16Array(n).fill(-1);
  const upperId = new Uint32Array(n);
  let used = 0;
  for (let i = 0; i < n; i++) {
    const [lo, up] = [lower[i], upper[i]];
    wavelengthVac[i] = kind[i] & 128 ? given[used++] : 1e8 / (energy[up] - energy[lo]);
    wavelengthErr[i] = errOfCode[errCode[i]];
    logStrength[i] = logStrengthCode[i] === UNKNOWN_16 ? Number.NEGATIVE_INFINITY : logStrengthCode[i] / LOG_STRENGTH_SCALE;
    strengthErrDex[i] = strengthErr[i] / ERR_DEX_SCALE;
    aValue[i] = logACode[i] === UNKNOWN_16 ? Number.NaN : 10 ** (logACode[i] / LOG_A_SCALE);
    if (lo !== NO_LEVEL) lowerLevel[i] = model[lo];
    if (up !== NO_LEVEL) {
      upperLevel[i] = model[up];
      upperId[i] = canonical[up] + 1;
    }
  }
  return {
    count: n,
    ions: openIons(bundle),
    ion: bundle.u16('line.ion'),
    wavelengthVac,
    wavelengthErr,
    nature: (line) => NATURES[kind[line] & 7],
    mechanism: (line) => MECHANISMS[(kind[line] >> 3) & 3],
    logStrength,
    strengthErrDex,
    aValue,
    upperLevel,
    lowerLevel,
    multiplet: Uint32Array.from(bundle.u16('line.multiplet')),
    upperId,
  };
}
