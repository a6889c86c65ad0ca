import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { type Analysis, createEngine, type Engine, loadAtomicData, type RunControl } from '../../src/engine/index.ts';
import { applyChange, changeSettings, declare, EMPTY_DOCUMENT, openSource, reject, type SessionDocument } from '../../src/session/index.ts';

const data = loadAtomicData(new Uint8Array(readFileSync(new URL('../../public/atomic.bin', import.meta.url))));
const bytes = readFileSync(new URL('../../public/samples/lantern-nebula.csv', import.meta.url));
let engine: Engine;
let analysis: Analysis;

const analyse = ({ settings, verdicts }: SessionDocument, control?: RunControl) => engine.analyse(settings, verdicts, control);
const pointed = (feature: Analysis['features'][number]) => ({ at: feature.at, atErr: feature.atErr, label: `feature ${feature.number}` });
const named = (label: string) => {
  const found = analysis.features.find(({ name }) => name?.label === label);
  if (!found) throw new Error(`no ${label}`);
  return found;
};
const ratioOf = (gas: Analysis['gas'], label: string) => gas.diagnostics.find((each) => each.label.startsWith(label));

beforeAll(async () => {
  engine = createEngine(data, () => 0);
  const read = async (start: number, end: number) => new Uint8Array(bytes.subarray(start, end));
  await engine.open({ name: 'lantern-nebula.csv', size: bytes.length, read }, 'spectrum');
  analysis = await analyse(EMPTY_DOCUMENT);
});

describe('the gas of an analysis', () => {
  test('gives every feature of the object a corrected intensity, and none to light of the sky', () => {
    const { table, features, gas } = analysis;
    expect(gas.intensities?.length).toBeGreaterThan(100);
    for (const row of table.rows) {
      const isObject = row.flux > 0 && row.nature !== 'sky' && features[row.feature - 1].measured.artefact === undefined;
      expect(row.intensityHbeta100 !== undefined, `feature ${row.feature} ${row.ion}`).toBe(isObject);
    }
    const blue = table.rows.find(
      ({ ion, wavelengthLab }) => ion === '[O II]' && wavelengthLab?.[0] === named('[O II] 3726.03').name?.transitions[0].wavelengthLab,
    );
    expect((blue?.intensityHbeta100 ?? 0) / (blue?.fluxHbeta100 ?? 1)).toBeGreaterThan(1.2);
  });

  test('takes accepted names and likely ones of open features; accepted ones alone when told so', async () => {
    expect(analysis.gas.accepted).toBe(0);
    expect(analysis.gas.probable).toBeGreaterThan(100);
    const strict = changeSettings(EMPTY_DOCUMENT, { ...EMPTY_DOCUMENT.settings, gas: { leastProbability: 1.5 } }, 'accepted names only');
    const { gas } = await analyse(applyChange(EMPTY_DOCUMENT, strict));
    expect(gas.probable).toBe(0);
    expect(gas.reddening.ended).toBe('none');
  });

  test('a rejected name takes its ratio with it', async () => {
    const auroral = named('[N II] 5754.59');
    expect(ratioOf(analysis.gas, '[N II] 5755')).toBeDefined();
    const name = auroral.candidates[0];
    const { gas } = await analyse(applyChange(EMPTY_DOCUMENT, reject(EMPTY_DOCUMENT, pointed(auroral), name)));
    expect(ratioOf(gas, '[N II] 5755')).toBeUndefined();
  });

  test('is told before the names are weighed anew, and is the same afterwards where no other name changes', async () => {
    await analyse(EMPTY_DOCUMENT);
    const heard: string[] = [];
    let early: Analysis['gas'] | undefined;
    const document = applyChange(EMPTY_DOCUMENT, declare(EMPTY_DOCUMENT, pointed(named('[O III] 4363.21')), 'unidentified'));
    const after = await analyse(document, {
      gas: (gas) => {
        heard.push('gas told');
        early = gas;
      },
      progress: ({ stage, share }) => {
        if (share === 0) heard.push(stage);
      },
    });
    expect(heard.indexOf('gas told')).toBeGreaterThan(-1);
    expect(heard.indexOf('gas told')).toBeLessThan(heard.indexOf('naming'));
    expect(early && ratioOf(early, '[O III] 4363')).toBeUndefined();
    expect(ratioOf(after.gas, '[O III] 4363')).toBeUndefined();
  });

  test('c(H beta) of the samples comes back within three errors, under the law and the case B they were made with', async () => {
    for (const [file, truth] of [
      ['lantern-nebula', 0.42],
      ['heron-marsh', 0.61],
      ['kiln-nebula', 0.17],
    ] as const) {
      const content = readFileSync(new URL(`../../public/samples/${file}.csv`, import.meta.url));
      const other = createEngine(data, () => 0);
      const read = async (start: number, end: number) => new Uint8Array(content.subarray(start, end));
      await other.open({ name: `${file}.csv`, size: content.length, read }, 'spectrum');
      const { gas } = await other.analyse({ ...EMPTY_DOCUMENT.settings, gas: { curve: 'ccm89', te: 10_000, ne: 10_000 } }, []);
      const { value = Number.NaN, err = 0 } = gas.reddening.cHbeta ?? {};
      expect(err, file).toBeLessThan(0.004);
      expect(Math.abs(value - truth), file).toBeLessThan(3 * err);
    }
  });

  test('what belongs to one spectrum alone does not go over to the next one', () => {
    const settings = { ...EMPTY_DOCUMENT.settings, gas: { curve: 'ccm89' as const, rV: 4, te: 9000, ne: 50, cHbeta: 1, stellarEwA: 2 } };
    const source = (name: string) => ({ kind: 'spectrum' as const, name, size: 1 });
    const document = applyChange(
      { ...EMPTY_DOCUMENT, source: source('a.csv'), settings },
      openSource({ ...EMPTY_DOCUMENT, source: source('a.csv'), settings }, source('b.csv')),
    );
    expect(document.settings.gas).toEqual({ curve: 'ccm89', rV: 4 });
  });
});
