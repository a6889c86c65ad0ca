import type { CandidateView, FeatureView, TransitionView } from '../../src/engine/index.ts';
import type { Verdict } from '../../src/session/index.ts';

/** One transition; `[O III] 5006.84` in, the rest made up around it. */
export function transition(label: string, nature = 'forbidden'): TransitionView {
  const cut = label.lastIndexOf(' ');
  const ion = label.slice(0, cut);
  const wavelengthLab = Number(label.slice(cut + 1));
  return {
    key: `${ion.replace(/[[\]]/g, '')} ${wavelengthLab.toFixed(3)}`,
    ion,
    wavelengthLab,
    wavelengthLabErr: 0.003,
    lower: '3P 2',
    upper: '1D 2',
    nature,
    excitationEv: 35.12,
    ...(nature === 'forbidden' ? { thinGas: { lifetimeS: 36.9, nCrit: 7e5, sentence: 'Slow.' } } : {}),
    sources: [],
  };
}

export function candidate(label: string, probability: number, nature?: string): CandidateView {
  const transitions = label.split(' + ').map((part) => transition(part, nature));
  return {
    label,
    keys: transitions.map((t) => t.key),
    transitions,
    shares: transitions.map(() => 1 / transitions.length),
    probability,
    velocityKms: 0,
    velocityErrKms: 1,
    evidence: [],
    companions: [],
  };
}

export function feature(number: number, at: number, candidates: readonly CandidateView[], noneProbability = 0.01): FeatureView {
  return {
    number,
    centroid: at,
    centroidErr: 0.01,
    at,
    atErr: 0.01,
    measured: {
      index: number - 1,
      kind: 'emission',
      centroid: at,
      centroidErr: 0.01,
      flux: 10,
      fluxErr: 0.1,
      fwhm: 1.2,
      fwhmErr: 0.1,
      ew: 3,
      ewErr: 0.1,
      snr: 100,
      continuum: 1,
      group: 0,
      fit: { ended: 'converged' },
      notes: [],
    },
    candidates,
    noneProbability,
  };
}

/** An analysis of these features, as far as rows of the desk need one. */
export const analysed = (...features: FeatureView[]) => ({
  features,
  table: {
    title: 'lantern',
    medium: 'air' as const,
    mediumStated: true,
    fluxUnit: '',
    z: 0,
    zErr: 0,
    te: 10_000,
    atomicVersion: '1',
    sha256: '',
    rows: features.map((f) => ({
      feature: f.number,
      wavelengthObs: f.centroid,
      flux: 10,
      alternatives: [],
      verdict: 'open' as const,
      artefact: false,
      note: '',
    })),
  },
});

export const verdict = (at: number, rest: Partial<Verdict>): Verdict => ({ at, atErr: 0.01, ...rest });
