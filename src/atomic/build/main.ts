// `npm run data`: compiles src/atomic/tables into public/atomic.bin and makes the sample spectra. No network, no clock: the same tables and seed give the same bytes.
import { mkdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { loadAtomicData } from '../loadAtomicData.ts';
import { referencesJson } from './bibliography.ts';
import { buildBundle } from './buildBundle.ts';
import { readTables } from './readTables.ts';
import { SAMPLE_RECIPES } from './sampleRecipes.ts';
import { sampleSpectrum } from './sampleSpectrum.ts';

const target = fileURLToPath(new URL('../../../public/atomic.bin', import.meta.url));
const tables = readTables();
const bytes = buildBundle(tables);
writeFileSync(target, bytes);
const compressed = gzipSync(bytes, { level: 9 }).length;
console.log(`${tables.files.size} tables -> public/atomic.bin: ${bytes.length} bytes, ${compressed} compressed`);

const references = referencesJson(tables.files.get('sources.bib') ?? '');
writeFileSync(fileURLToPath(new URL('../../../public/references.json', import.meta.url)), references);
console.log(`public/references.json: ${references.length} bytes`);

const samples = fileURLToPath(new URL('../../../public/samples/', import.meta.url));
mkdirSync(samples, { recursive: true });
const data = loadAtomicData(bytes);
for (const recipe of SAMPLE_RECIPES) {
  const sample = sampleSpectrum(data, recipe);
  writeFileSync(`${samples}${recipe.file}`, sample);
  console.log(`public/samples/${recipe.file}: ${sample.length} bytes`);
}
