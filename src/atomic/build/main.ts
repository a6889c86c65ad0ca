// `npm run data`: compiles src/atomic/tables into public/atomic.bin and makes the sample spectrum. No network, no clock: the same tables and seed give the same bytes.
import { mkdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { loadAtomicData } from '../loadAtomicData.ts';
import { buildBundle } from './buildBundle.ts';
import { lanternNebula } from './lanternNebula.ts';
import { readTables } from './readTables.ts';

const target = fileURLToPath(new URL('../../../public/atomic.bin', import.meta.url));
const tables = readTables();
const bytes = buildBundle(tables);
writeFileSync(target, bytes);
const compressed = gzipSync(bytes, { level: 9 }).length;
console.log(`${tables.files.size} tables -> public/atomic.bin: ${bytes.length} bytes, ${compressed} compressed`);

const samples = fileURLToPath(new URL('../../../public/samples/', import.meta.url));
mkdirSync(samples, { recursive: true });
const sample = lanternNebula(loadAtomicData(bytes));
writeFileSync(`${samples}lantern-nebula.csv`, sample);
console.log(`public/samples/lantern-nebula.csv: ${sample.length} bytes`);
