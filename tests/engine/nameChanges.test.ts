import { expect, test } from 'vitest';
import { createEngine, type FeatureView } from '../../src/engine/index.ts';
import { bytesSource } from '../../src/readers/index.ts';
import { accept, applyChange, EMPTY_DOCUMENT } from '../../src/session/index.ts';
import { bundled } from '../atomic/bundledData.ts';

// [Fe III] 4658 alone beside C IV 4658: what is said of one line of an ion is heard by its others.
const LIST = `wavelength,flux,wavelength_err,flux_err
4340.46,46,.3,1
4658.15,.6,.3,.05
4701.6,.25,.3,.05
4861.33,100,.3,1
4881.1,.3,.3,.05
4958.91,120,.3,1
5006.84,360,.3,2
5270.5,.3,.3,.05
5590.0,8,.3,.05
5875.66,14,.3,.2
6562.8,285,.3,2
6583.45,60,.3,1
6716.44,20,.3,1
`;

const open = async () => {
  const engine = createEngine(bundled, () => 0);
  await engine.open(bytesSource('list.csv', new TextEncoder().encode(LIST)), 'guess');
  const first = await engine.analyse(EMPTY_DOCUMENT.settings, []);
  const at = (wavelength: number): FeatureView =>
    first.features.reduce((x, y) => (Math.abs(x.centroid - wavelength) < Math.abs(y.centroid - wavelength) ? x : y));
  return { engine, first, at };
};

test('a verdict lists the names of other features that it changed, and not its own', async () => {
  const { engine, first, at } = await open();
  expect(first.changes).toEqual([]);
  const feature = at(5006.84);
  const wrong = feature.candidates.find((c) => !c.label.startsWith('[O III]'));
  if (!wrong) throw new Error('no second candidate');
  const change = accept(EMPTY_DOCUMENT, { at: feature.at, atErr: feature.atErr, label: 'feature' }, wrong);
  const { settings, verdicts } = applyChange(EMPTY_DOCUMENT, change);
  const { changes, features } = await engine.analyse(settings, verdicts);
  expect(changes.map((c) => c.feature)).not.toContain(feature.number - 1);
  for (const { feature: k, to } of changes) expect(to?.label).toBe(features[k].name?.label);
  const same = await engine.analyse(settings, verdicts);
  expect(same.changes).toEqual([]);
});

test('a bright feature that no line explains is listed with what it would imply', async () => {
  const { first } = await open();
  const { unnamed, features, missing } = first;
  expect(unnamed.map(({ feature }) => Math.round(features[feature].centroid))).toContain(5590);
  for (const { implies } of [...unnamed, ...missing]) expect(implies).toMatch(/^[A-Z].*\S\.$/);
});
