import { atomicBench } from './atomicBench.ts';
import { blockingBench } from './blockingBench.ts';
import { deskBench } from './deskBench.ts';
import { identifyBench } from './identifyBench.ts';
import { namingBench } from './namingBench.ts';
import { physicsBench } from './physicsBench.ts';
import { plasmaBench } from './plasmaBench.ts';
import { readersBench } from './readersBench.ts';
import { reliabilityBench } from './reliabilityBench.ts';
import { seededBench } from './seededBench.ts';

// `npm run bench`: speed and quality of each part, beside a rival's in the same run where there is one. Never a test: figures depend on the machine.

for (const [title, bench] of [
  ['line list', atomicBench],
  ['level populations', physicsBench],
  ['reading', readersBench],
  ['naming', namingBench],
  ['naming a simulated nebula', identifyBench],
  ['what names claim and what is right', reliabilityBench],
  ['moving about the spectrum', deskBench],
  ['keeping the page alive while the worker computes', blockingBench],
  ['the gas', plasmaBench],
  ['measuring, beside a script of numpy and scipy', seededBench],
] as const) {
  process.stdout.write(`\n${title}\n`);
  for (const line of await bench()) process.stdout.write(`  ${line}\n`);
}
