import { readFileSync } from 'node:fs';
import { createEngine, loadAtomicData } from '../../src/engine/index.ts';
import { DEFAULT_GAS_SETTINGS, describeGas } from '../../src/plasma/index.ts';
import { bundled } from '../atomic/bundledData.ts';
import { SOME_GAS, simulatedGas } from '../plasma/simulatedGas.ts';

const ROUNDS = 30;
const REALIZATIONS = 200;
const SAMPLE = new URL('../../public/samples/kiln-nebula.csv', import.meta.url);

/** Milliseconds of the gas stage at each change of a setting, and how often a known gas comes back. */
export async function plasmaBench(): Promise<string[]> {
  const data = loadAtomicData(new Uint8Array(readFileSync(new URL('../../public/atomic.bin', import.meta.url))));
  const engine = createEngine(data, () => performance.now() / 1000);
  const bytes = readFileSync(SAMPLE);
  const read = async (start: number, end: number) => new Uint8Array(bytes.subarray(start, end));
  await engine.open({ name: 'kiln-nebula.csv', size: bytes.length, read }, 'spectrum');
  const times: number[] = [];
  let features = 0;
  for (let round = 0; round < ROUNDS; round++) {
    const { timings, features: found } = await engine.analyse(
      { reading: {}, measure: {}, naming: {}, gas: { rV: 3.1 + round / 1000 } },
      [],
    );
    times.push(1000 * (timings.find(({ stage }) => stage === 'gas')?.seconds ?? Number.NaN));
    features = found.length;
  }
  const later = times.slice(1).sort((a, b) => a - b);
  return [
    `the gas of ${features} features, 200 draws: first ${times[0].toFixed(0)} ms, then median ${later[later.length >> 1].toFixed(0)} ms, slowest ${later[later.length - 1].toFixed(0)} ms (budget 100)`,
    recovery(),
  ];
}

/** How often each quantity of the simulated nebula lies within its one-sigma interval. */
function recovery(): string {
  const hits = new Map<string, number>();
  const count = (name: string, hit: boolean) => hits.set(name, (hits.get(name) ?? 0) + (hit ? 1 : 0));
  for (let seed = 1; seed <= REALIZATIONS; seed++) {
    const gas = describeGas(simulatedGas({ ...SOME_GAS, seed }), {
      data: bundled,
      settings: DEFAULT_GAS_SETTINGS,
      startTe: 1e4,
      startNe: 1e3,
    });
    const c = gas.reddening.cHbeta;
    count('c(Hbeta)', c !== undefined && Math.abs(c.value - SOME_GAS.cHbeta) <= c.err);
    for (const zone of ['low', 'medium'] as const)
      for (const name of ['te', 'ne'] as const) {
        const estimate = gas.zones.find((each) => each.zone === zone)?.[name].estimate;
        const truth = SOME_GAS[zone][name];
        count(`${name} ${zone}`, estimate?.ended === 'value' && estimate.low <= truth && truth <= estimate.high);
      }
  }
  const shares = [...hits].map(([name, n]) => `${name} ${(n / REALIZATIONS).toFixed(2)}`);
  return `a nebula of known gas within one sigma, ${REALIZATIONS} draws of the noise: ${shares.join(', ')} (0.68 expected)`;
}
