import type { Column, ColumnRole, RoleGuess } from './columns.ts';
import { spectralUnit } from './spectralUnits.ts';

// Names met in published spectra; one word each after the name is taken apart at case changes, underscores and blanks.
const WAVE_WORDS = words(`wave waves wavelength wavelengths wavelen wav wvl wlen wl wls wa lam lamb lambda lambdas lamda lbda lambdaair ll
  angstrom angstroms microns micron spectral dispersion loglam loglambda logwave logwl loglamb lnlam lnwave λ`);
const FREQUENCY_WORDS = words('freq frequency frequencies nu hz energy energies wavenumber wavenumbers wavenum');
const FLUX_WORDS =
  words(`flux fluxes flx fl flam flambda flamb fnu fluxden spec spectrum spectra int intens intensity intensities counts count cts
  adu dn electrons signal brightness surf sb radiance irradiance lum luminosity reflectance transmission photons value values f i y net data sci`);
const ERROR_WORDS =
  words(`err errs error errors er sigma sig std stdev stddev stdv sd unc uncert uncertainty uncertainties noise rms dflux eflux fluxerr
  errflux fluxerror fluxsig sigflux fluxsigma fluxunc fluxstd staterror dfnu dflam dflambda efnu eflam sigmaflux errorflux dfl ferr specerr staterr stat`);
const VARIANCE_WORDS = words('var variance vari fluxvar varflux');
const IVAR_WORDS = words('ivar invvar invar ivars fluxivar');
const MASK_WORDS = words('mask masks dq flag flags quality qual bad badpix pixmask andmask ormask good ok usable bitmask');
/** Words that say how the same quantity was got; they make a family. */
const FAMILY_WORDS = words('opt box');
/** Words that may stand in the name of a wavelength column. */
const WAVE_ASIDES = words(
  'air vac vacuum obs observed rest helio hel bary corr corrected cal a aa ang nm um axis coord coordinate log log10 value grid in restframe frame angstrom angstroms micron microns 0 1 bin center centre x data hz khz mhz ghz thz ev kev cm',
);
const FLUX_ASIDES: Readonly<Record<string, number>> = {
  density: 0,
  dens: 0,
  den: 0,
  lambda: 0,
  lam: 0,
  nu: -1,
  cal: 0,
  calibrated: 0,
  total: 0,
  tot: 0,
  best: 0,
  obs: 0,
  observed: 0,
  sci: 0,
  corr: -1,
  corrected: -1,
  opt: 0,
  jy: 0,
  mjy: 0,
  ujy: 0,
  cgs: 0,
  value: 0,
  data: 0,
  f: 0,
  spec: 0,
  source: 0,
  src: 0,
  star: 0,
  object: 0,
  obj: 0,
  erg: 0,
  s: 0,
  cm2: 0,
  a: 0,
  e: 0,
  per: 0,
  w: 0,
  m2: 0,
  coadd: 0,
  coadded: 0,
  mean: 0,
  avg: 0,
  average: 0,
  median: -2,
  weighted: 0,
  stacked: 0,
  combined: 0,
  merged: 0,
  scaled: -2,
  relative: 0,
  rel: 0,
  arb: 0,
  norm: -10,
  normalized: -10,
  normalised: -10,
  rectified: -10,
  dered: -5,
  dereddened: -5,
  smooth: -20,
  smoothed: -20,
  raw: -30,
  uncorr: -40,
  uncorrected: -40,
  gross: -35,
  box: -30,
  aperture: -10,
  bright: 0,
  brightness: -15,
  surface: -15,
  surf: -15,
  '1': 0,
  '0': 0,
  '2': -5,
  '3': -6,
  '4': -7,
};
/** Words that make a column something else whatever stands beside them. */
const OTHER_WORDS =
  words(`sky background bkgd bkg back bg continuum cont model fit resid residual calib calibration response telluric transmissionsky template
  wdisp fwhm disp resolution res trace chi2 npix npixels npts exptime ref eff min max name id frac niv nivar poisson rnoise flat sens sensfunc cross talk
  start end lower upper low high left right width line bin edge edges z number num index pixel pix spat det upar`);

function words(text: string): ReadonlySet<string> {
  return new Set(text.split(/\s+/));
}

/** The name in words, lower case: `OPT_COUNTS_SIG` -> opt counts sig, `FluxErr` -> flux err, `e_Flux` -> e flux. */
export function nameWords(name: string): string[] {
  return name
    .normalize('NFKC')
    .replace(/([a-zλ])([A-Z])/g, '$1 $2')
    .toLowerCase()
    .split(/[^a-z0-9λ+^]+/)
    .filter((w) => w !== '');
}

/** What the column most likely is, from its UCD and utype (open standards) first, its name next. */
export function roleOf(column: Pick<Column, 'name' | 'unit' | 'ucd' | 'utype' | 'kind' | 'description'>): RoleGuess {
  if (column.kind === 'text') return { role: 'other', merit: 0, stem: '', reason: 'it holds text' };
  const byUtype = column.utype ? roleOfUtype(column.utype) : undefined;
  const byName = roleOfName(column);
  if (byUtype) return { ...byUtype, stem: byName.stem };
  const byUcd = column.ucd ? roleOfUcd(column.ucd) : undefined;
  // UNCORR_FLUX and FLUX may share a UCD: the name's rank decides between them
  if (byUcd)
    return { ...byUcd, merit: byUcd.merit + Math.min(0, byName.role === byUcd.role ? byName.merit - 100 : -10), stem: byName.stem };
  return byName;
}

function roleOfUtype(utype: string): RoleGuess | undefined {
  const reason = `its utype is ${utype}`;
  const guess = (role: ColumnRole, merit: number) => ({ role, merit, stem: '', reason });
  if (/published/i.test(utype)) return guess('other', 0);
  if (/SpectralAxis\.Value$/i.test(utype)) return guess('wavelength', 130);
  if (/FluxAxis\.Value$/i.test(utype)) return guess('flux', /^(spec:)?(spectrum\.)?data\./i.test(utype) ? 130 : 90);
  if (/FluxAxis\.Accuracy\.(StatError|StatErrHigh)$/i.test(utype)) return guess('sigma', 130);
  if (/FluxAxis\.(Accuracy\.)?Quality/i.test(utype)) return guess('mask', 130);
  return undefined;
}

function roleOfUcd(ucd: string): RoleGuess | undefined {
  const reason = `its UCD is ${ucd}`;
  const atoms = ucd
    .toLowerCase()
    .split(';')
    .map((a) => a.trim());
  const guess = (role: ColumnRole, merit: number) => ({ role, merit, stem: '', reason });
  const main = atoms.includes('meta.main') ? 15 : 0;
  if (atoms.includes('stat.error') || atoms.includes('stat.stdev'))
    return atoms.some((a) => a.startsWith('phot') || a.startsWith('arith'))
      ? guess('sigma', 120 + main)
      : atoms.some((a) => a.startsWith('em.'))
        ? guess('other', 0)
        : guess('sigma', 90);
  if (atoms[0] === 'stat.variance') return guess('variance', 110 + main);
  if (/^em\.(wl|freq|energy|wavenumber)/.test(atoms[0]))
    return atoms.some((a) => /^stat\.|^instr\./.test(a)) ? guess('other', 0) : guess('wavelength', 115 + main);
  if (/^(phot\.(flux|fludens|count)|arith\.ratio|phot\.flux)/.test(atoms[0])) return guess('flux', 110 + main);
  if (/^meta\.code\.qual|^meta\.code$/.test(atoms[0])) return guess('mask', 100);
  return undefined;
}

function roleOfName({ name, unit }: Pick<Column, 'name' | 'unit'>): RoleGuess {
  const parts = nameWords(name);
  const reason = `its name is ${name}`;
  const has = (set: ReadonlySet<string>) => parts.some((p) => set.has(p));
  const stemWithout = (...sets: ReadonlySet<string>[]) => parts.filter((p) => !sets.some((s) => s.has(p))).join(' ');
  const family = parts.filter((p) => FAMILY_WORDS.has(p)).join(' ');
  const guess = (role: ColumnRole, merit: number, stem: string): RoleGuess => ({ role, merit, stem, reason });
  const other = guess('other', 0, parts.join(' '));
  if (parts.length === 0) return other;
  const asUnit = spectralUnit(unit);

  const isWave = has(WAVE_WORDS) || has(FREQUENCY_WORDS);
  const isError = has(ERROR_WORDS) || (parts.length > 1 && (parts[0] === 'e' || parts[0] === 'd' || parts[0] === 'u'));
  if (/^(delta?_?(w|l|wave|lam|lambda)|dw|dlam(bda)?|cdelt1?|wstep|wave_?step|dwave)$/i.test(name))
    return guess('wavelength-step', 100, '');
  if (/^(s\/?n|snr|sn_?ratio|signal_?to_?noise)$/i.test(name)) return guess('snr', 100, '');
  if (has(MASK_WORDS)) return guess('mask', 100 - 5 * (parts.length - 1) - (/or_?mask/i.test(name) ? 10 : 0), stemWithout(MASK_WORDS));
  if (parts.join(' ') === 'inverse') return guess('ivar', 90, '');
  if (parts.includes('inverse') && has(VARIANCE_WORDS)) return guess('ivar', 100, stemWithout(VARIANCE_WORDS, new Set(['inverse'])));
  if (has(OTHER_WORDS)) return other;
  if (has(IVAR_WORDS)) return isWave ? other : guess('ivar', 100, stemWithout(IVAR_WORDS));
  if (has(VARIANCE_WORDS)) return isWave ? other : guess('variance', 95, stemWithout(VARIANCE_WORDS));
  if (isError && !(parts.length === 1 && parts[0] === 'e')) {
    if (isWave && !has(FLUX_WORDS)) return other;
    const share = parts.some((p) => /^(rel|relative|frac|fractional|percent|pct)$/.test(p));
    return guess(
      share ? 'relative' : 'sigma',
      100,
      stemWithout(ERROR_WORDS, new Set(['e', 'd', 'u', 'rel', 'relative', 'frac', 'fractional', 'percent', 'pct'])),
    );
  }
  if (isWave && parts.every((p) => WAVE_WORDS.has(p) || FREQUENCY_WORDS.has(p) || WAVE_ASIDES.has(p) || FAMILY_WORDS.has(p))) {
    return guess(
      'wavelength',
      110 - 3 * (parts.length - 1) - (parts.includes('rest') ? 10 : 0) - (has(WAVE_WORDS) ? 0 : 5) + (asUnit ? 5 : 0),
      family,
    );
  }
  if (/^(vel(ocity)?|vrad|vlsr|vhel(io)?|v)$/i.test(name)) return guess('velocity', 60, '');
  if (parts.length === 1 && parts[0] === 'e') return guess('sigma', 40, '');
  const fluxWord = parts.findLast((p) => FLUX_WORDS.has(p));
  if (fluxWord !== undefined && parts.every((p) => FLUX_WORDS.has(p) || p in FLUX_ASIDES || FAMILY_WORDS.has(p))) {
    const rank: Record<string, number> = {
      flux: 0,
      flam: -6,
      flambda: -6,
      fnu: -6,
      f: -20,
      i: -20,
      y: -20,
      value: -25,
      values: -25,
      data: -25,
      net: -20,
      sb: -15,
    };
    const asides = parts.reduce((sum, p) => sum + (p === fluxWord ? 0 : (FLUX_ASIDES[p] ?? 0)), 0);
    return guess('flux', 100 + (rank[fluxWord] ?? -3) + asides - (parts.length > 1 ? 1 : 0), parts.join(' '));
  }
  if (asUnit && asUnit.quantity !== 'velocity' && /^[a-z]{1,4}\d?$/i.test(name))
    return { role: 'wavelength', merit: 60, stem: family, reason: `its unit is ${unit}` };
  return other;
}
