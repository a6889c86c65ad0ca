import { type AtomicData, caseBIntensity } from '../atomic/index.ts';
import { extinctionRatio } from './extinction.ts';
import type { Reddening, ReddeningLine } from './gas.ts';
import type { GasSettings } from './gasSettings.ts';
import type { HydrogenicFlux } from './hydrogenLines.ts';
import type { LineFlux } from './lineFluxes.ts';
import type { NamedLine } from './namedLine.ts';
import { curveOf, H_BETA_VAC, type ReddeningResult } from './reddening.ts';

const CURVES = {
  ccm89: 'Cardelli, Clayton & Mathis 1989',
  'ccm89-odonnell94': "Cardelli, Clayton & Mathis 1989 with O'Donnell 1994 in the optical",
  fitzpatrick99: 'Fitzpatrick 1999',
} as const;

/** The reddening as it is shown: what each line had to say, c(H beta) and what follows from it. */
export function reddeningView(
  data: AtomicData,
  named: readonly NamedLine[],
  fluxes: readonly LineFlux[],
  result: ReddeningResult,
  settings: GasSettings,
  te: number,
  ne: number,
): Reddening {
  const { fit, helium } = result;
  const f = curveOf(settings);
  const lines = result.lines.map((line): ReddeningLine => {
    const expected = caseBIntensity(data.caseB, 'H I', line.nLower, line.nUpper, te, ne);
    const scale = fit ? 100 / Math.exp(fit.lnHbeta) : Number.NaN;
    const used = fit?.used.find((each) => each.line.index === line.index);
    const outlier = fit?.outliers.find((each) => each.line.index === line.index);
    const fitted = used ?? outlier;
    const observed = fitted ? Math.exp(fitted.y) * expected * (scale / 100) : line.flux * scale;
    return {
      features: featuresOf(named, fluxes, line),
      label: line.label,
      restVac: line.restVac,
      f: f(line.restVac),
      observed,
      observedErr: (observed * line.fluxErr) / line.flux,
      expected,
      ...(fit && fitted ? { offSigma: (fitted.y - fit.lnHbeta + Math.LN10 * fit.cHbeta * fitted.f) / fitted.yErr } : {}),
      state: used ? 'used' : outlier ? 'outlier' : 'unusable',
      ...(used ? {} : { reason: line.unusable ?? (outlier ? 'lies off what the others agree on' : 'no fit') }),
    };
  });
  const given = settings.cHbeta;
  const c = given === undefined ? (fit ? { value: fit.cHbeta, err: fit.cHbetaErr } : undefined) : { value: given, err: 0 };
  const times = (factor: number) => c && { value: c.value * factor, err: c.err * factor };
  // A(H beta) = 2.5 c
  const aVPerC = 2.5 / extinctionRatio(settings.curve, settings.rV, H_BETA_VAC);
  return {
    ended: given === undefined ? (fit ? 'fitted' : 'none') : 'given',
    ...(c ? { cHbeta: c, aV: times(aVPerC), eBV: times(aVPerC / settings.rV) } : {}),
    ...(fit ? { chi2: fit.chi2, dof: fit.dof } : {}),
    lines,
    stellarEwA: result.stellarEwA,
    ...(result.stellarEwErrA === undefined ? {} : { stellarEwErrA: result.stellarEwErrA }),
    ...(helium
      ? { helium: { cHbeta: { value: helium.cHbeta, err: helium.cHbetaErr }, lines: helium.used.map(({ line }) => line.label) } }
      : {}),
    te,
    ne,
    assumption: `Case B (Storey & Hummer 1995) at ${Math.round(te)} K and ${Number(ne.toPrecision(2))} cm⁻³; one screen of dust in the frame of the object, ${CURVES[settings.curve]}, R(V) = ${settings.rV}; stellar absorption ${result.stellarEwA.toFixed(1)} Å under every Balmer line.`,
  };
}

const featuresOf = (named: readonly NamedLine[], fluxes: readonly LineFlux[], { index }: HydrogenicFlux) =>
  fluxes[index].from.map((k) => named[k].feature);
