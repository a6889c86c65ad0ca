// `npm run data`: compiles src/atomic/tables into public/atomic.bin. No network, no clock: the same tables give the same bytes.
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { buildBundle } from './buildBundle.ts';
import { readTables } from './readTables.ts';

const target = fileURLToPath(new URL('../../../public/atomic.bin', import.meta.url));
const tables = readTables();
const bytes = buildBundle(tables);
writeFileSync(target, bytes);
const compressed = gzipSync(bytes, { level: 9 }).length;
console.log(`${tables.files.size} tables -> public/atomic.bin: ${bytes.length} bytes, ${compressed} compressed`);
