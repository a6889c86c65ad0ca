import { bytesSource, readSpectrum } from '../../src/readers/index.ts';

let seed = 12_345;
const random = () => {
  seed = (seed * 1_103_515_245 + 12_345) % 2_147_483_648;
  return seed / 2_147_483_648;
};

function largeCsv(rows: number): Uint8Array {
  const lines = ['wavelength,flux,flux_err'];
  for (let i = 0; i < rows; i++)
    lines.push(`${(3500 + i * 0.02).toFixed(4)},${(random() * 1e-15).toExponential(6)},${(random() * 1e-17).toExponential(4)}`);
  return new TextEncoder().encode(lines.join('\n'));
}

function largeTable(rows: number): Uint8Array {
  const card = (text: string) => text.padEnd(80);
  const header = (cards: string[]) => [...cards.map(card), card('END')].join('').padEnd(Math.ceil((cards.length + 1) / 36) * 2880);
  const primary = header([
    'SIMPLE  =                    T',
    'BITPIX  =                    8',
    'NAXIS   =                    0',
    'EXTEND  =                    T',
  ]);
  const table = header([
    "XTENSION= 'BINTABLE'",
    'BITPIX  =                    8',
    'NAXIS   =                    2',
    'NAXIS1  =                   16',
    `NAXIS2  = ${String(rows).padStart(20)}`,
    'PCOUNT  =                    0',
    'GCOUNT  =                    1',
    'TFIELDS =                    3',
    "TTYPE1  = 'WAVE    '",
    "TFORM1  = 'D       '",
    "TUNIT1  = 'Angstrom'",
    "TTYPE2  = 'FLUX    '",
    "TFORM2  = 'E       '",
    "TTYPE3  = 'ERR     '",
    "TFORM3  = 'E       '",
  ]);
  const head = new TextEncoder().encode(primary + table);
  const bytes = new Uint8Array(head.length + Math.ceil((rows * 16) / 2880) * 2880);
  bytes.set(head);
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < rows; i++) {
    view.setFloat64(head.length + i * 16, 3500 + i * 0.004);
    view.setFloat32(head.length + i * 16 + 8, 1 + random());
    view.setFloat32(head.length + i * 16 + 12, 0.1);
  }
  return bytes;
}

/** Seconds to read large files made in memory from a seed: the first read and the best of five. */
export async function readersBench(): Promise<string[]> {
  const lines: string[] = [];
  for (const [name, bytes, limitS] of [
    ['CSV of 300 000 rows', largeCsv(300_000), 1],
    ['FITS table of 1 500 000 rows', largeTable(1_500_000), 0.5],
  ] as const) {
    const times: number[] = [];
    for (let k = 0; k < 5; k++) {
      const start = performance.now();
      const { spectrum } = await readSpectrum(bytesSource('bench', bytes), {});
      times.push((performance.now() - start) / 1000);
      if (spectrum.wavelength.length < 100_000) throw new Error('not all samples were read');
    }
    lines.push(`${name}: first ${times[0].toFixed(3)} s, best ${Math.min(...times).toFixed(3)} s (limit ${limitS} s)`);
  }
  return lines;
}
