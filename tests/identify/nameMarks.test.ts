import { describe, expect, test } from 'vitest';
import { type Candidate, DEFAULT_NAMING_SETTINGS, type FixedName, type Naming, nameMarks } from '../../src/identify/index.ts';
import { airFromVacuum } from '../../src/units/index.ts';
import { bundled as data } from '../atomic/bundledData.ts';
import { type NamedMark, nebula } from './nebula.ts';

const name = (marks: readonly NamedMark[], settings = {}, fixed: readonly FixedName[] = []): Naming =>
  nameMarks(marks, data, { ...DEFAULT_NAMING_SETTINGS, ...settings }, fixed);

const bare = (ion: string) => ion.replace(/[[\]]/g, '');
/** Whether one of the candidate's lines is the expert's, within 1.2 A: multiplet means are printed as one line. */
const isRight = (candidate: Candidate | undefined, mark: NamedMark) =>
  candidate?.lines.some(
    (line) =>
      data.lines.ions[data.lines.ion[line]].name === bare(mark.ion) &&
      Math.abs(airFromVacuum(data.lines.wavelengthVac[line]) - mark.air) < 1.2,
  ) ?? false;
const wrong = (marks: readonly NamedMark[], naming: Naming) =>
  marks.filter((mark, k) => !isRight(naming.features[k].candidates[0], mark)).map((m) => `${m.ion} ${m.air}`);

describe('a nebula of fifty lines', () => {
  test.each([1, 2, 3])('is named as an expert would, redshift unknown (noise %i)', (seed) => {
    const marks = nebula({ seed, z: 1.3e-4 });
    const naming = name(marks);
    expect(naming.z).toBeCloseTo(1.3e-4, 5);
    expect(wrong(marks, naming)).toEqual([]);
  });

  test('at low resolution at most two names are wrong', () => {
    const marks = nebula({ seed: 4, scatter: 0.3 });
    expect(wrong(marks, name(marks)).length).toBeLessThanOrEqual(2);
  });

  test.each([0.0213, 0.35, 2.1])('is recognised at redshift %f', (z) => {
    const marks = nebula({ seed: 5, z, scatter: 0.1 });
    const naming = name(marks);
    expect(Math.abs(naming.z - z)).toBeLessThan(1e-4);
    expect(naming.redshifts[0].probability).toBeGreaterThan(0.9);
    expect(wrong(marks, naming).length).toBeLessThanOrEqual(1);
  });

  test('gives the same names whatever the order of the marks', () => {
    const marks = nebula({ seed: 6 });
    const forward = name(marks);
    const backward = name([...marks].reverse());
    expect(backward.features.map((f) => f.candidates[0]?.lines).reverse()).toEqual(forward.features.map((f) => f.candidates[0]?.lines));
  });
});

describe('an unresolved doublet', () => {
  test('is named by both its lines although neither stands within the tolerance', () => {
    const list =
      '[O II] 3727.5 250;[Ne III] 3868.76 12;H I 4340.46 46;H I 4861.33 100;[O III] 4958.91 60;[O III] 5006.84 180;[O I] 6300.3 10;[N II] 6548.05 30;H I 6562.8 290;[N II] 6583.45 90;[S II] 6716.44 50;[S II] 6730.82 40';
    const marks = nebula({ seed: 9, z: 0.032, scatter: 0.25, list }).map((m) => ({ ...m, fwhm: 5.2 }));
    const { lines } = name(marks).features[0].candidates[0];
    expect(
      lines
        .map((line) => `${data.lines.ions[data.lines.ion[line]].name} ${Math.round(airFromVacuum(data.lines.wavelengthVac[line]))}`)
        .sort(),
    ).toEqual(['O II 3726', 'O II 3729']);
  });
});

describe('the case of a candidate', () => {
  const marks = nebula({ seed: 7 });
  const naming = name(marks);

  test('probabilities and "none of these" sum to one', () => {
    for (const { candidates, noneProbability } of naming.features) {
      expect(candidates.reduce((s, c) => s + c.probability, noneProbability)).toBeGreaterThan(0.995);
      expect(candidates.reduce((s, c) => s + c.probability, noneProbability)).toBeLessThan(1.0001);
    }
  });

  test('the pieces of evidence sum to the log odds against "none of these"', () => {
    for (const { candidates, noneProbability } of naming.features) {
      if (candidates.length === 0 || noneProbability < 1e-12) continue;
      const [best] = candidates;
      const nats = best.evidence.reduce((s, e) => s + e.nats, 0);
      expect(nats).toBeCloseTo(Math.log(best.probability / noneProbability), 4);
    }
  });

  test('names companions that are seen: 4959 for 5007', () => {
    const k = marks.findIndex((m) => m.air === 5006.84);
    const seen = naming.features[k].candidates[0].companions
      .filter((c) => c.outcome === 'seen')
      .map((c) => Math.round(airFromVacuum(data.lines.wavelengthVac[c.line])));
    expect(seen).toContain(4959);
  });

  test('every sentence ends as one and has no unfinished number', () => {
    for (const { candidates } of naming.features) {
      for (const { evidence } of candidates) for (const { sentence } of evidence) expect(sentence).toMatch(/\S\.$/);
      for (const { evidence } of candidates) for (const { sentence } of evidence) expect(sentence).not.toMatch(/NaN|Infinity|undefined/);
    }
  });

  test('a strong predicted line without a feature is listed as missing', () => {
    const without = marks.filter((m) => m.air !== 4958.91);
    const missing = name(without).missing.map((m) => Math.round(airFromVacuum(data.lines.wavelengthVac[m.line])));
    expect(missing).toContain(4959);
  });
});

describe('verdicts', () => {
  const marks = nebula({ seed: 8 });
  const at = (air: number) => marks.findIndex((m) => m.air === air);

  test('a rejected name is never proposed again', () => {
    const k = at(4658.05);
    const first = name(marks).features[k].candidates[0];
    const again = name(marks, {}, [{ mark: k, not: [first.lines] }]).features[k];
    expect(again.candidates.every((c) => c.lines.join() !== first.lines.join())).toBe(true);
  });

  test('an accepted name is certain and marked as yours', () => {
    const k = at(4740.17);
    const second = name(marks).features[k].candidates[1];
    const fixed = name(marks, {}, [{ mark: k, lines: second.lines }]).features[k];
    expect(fixed.candidates[0].lines).toEqual(second.lines);
    expect(fixed.candidates[0].probability).toBe(1);
    expect(fixed.candidates[0].evidence.map((e) => e.kind)).toContain('verdict');
  });

  test('a feature declared nameless has no candidates', () => {
    expect(name(marks, {}, [{ mark: 3, none: true }]).features[3]).toMatchObject({ candidates: [], noneProbability: 1 });
  });
});

describe('little to go by', () => {
  test('one line says that it cannot settle a redshift and offers several', () => {
    const [line] = nebula({ z: 0.2, list: '[O III] 5006.84 100' });
    const naming = name([line]);
    expect(naming.redshifts.length).toBeGreaterThan(2);
    expect(naming.redshifts[0].probability).toBeLessThan(0.9);
    expect(naming.remarks.map((r) => r.code)).toContain('redshift-unsure');
  });

  test('no feature at all is no error', () => {
    expect(name([]).features).toEqual([]);
  });

  test('an aborted run ends before the names are weighed', () => {
    const stop = new AbortController();
    stop.abort();
    expect(() => nameMarks(nebula(), data, DEFAULT_NAMING_SETTINGS, [], { signal: stop.signal })).toThrow(/abort/i);
  });

  test('spikes are never named', () => {
    const marks = nebula().map((m, k) => ({ ...m, artefact: k === 5 }));
    expect(name(marks).features[5].candidates).toEqual([]);
  });

  test('a given redshift is kept', () => {
    expect(name(nebula({ z: 0.01 }), { z: 0.01 }).z).toBe(0.01);
  });

  test('an absorption feature is weighed against absorption families only', () => {
    const marks = [...nebula(), { ...nebula()[0], ion: 'Na I', air: 5889.95, wavelength: 5891.58, flux: -3, fluxErr: 0.1 }];
    const naming = name(marks);
    for (const { lines } of naming.features[marks.length - 1].candidates)
      expect(['telluric', 'interstellar']).toContain(data.lines.nature(lines[0]));
    expect(naming.features[marks.length - 1].candidates.length).toBeGreaterThan(0);
  });
});
