import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { loadAtomicData } from '../../src/atomic/index.ts';
import { bundled } from './bundledData.ts';

const bytes = new Uint8Array(readFileSync(new URL('../../public/atomic.bin', import.meta.url)));

it('bytes that are no bundle are refused', () => {
  expect(() => loadAtomicData(new Uint8Array(0))).toThrow(RangeError);
  expect(() => loadAtomicData(new TextEncoder().encode('<!doctype html><title>not found</title>'))).toThrow('not a bundle of atomic data');
});

it('a bundle of another schema is refused with both numbers', () => {
  const other = new TextEncoder().encode('{"schema":99}');
  const made = new Uint8Array(12 + other.length);
  made.set(bytes.subarray(0, 8));
  new DataView(made.buffer).setUint32(8, other.length, true);
  made.set(other, 12);
  expect(() => loadAtomicData(made)).toThrow('atomic data of schema 99, this program reads 1');
});

it('a slice that does not start on a multiple of eight opens all the same', () => {
  const shifted = new Uint8Array(bytes.length + 3);
  shifted.set(bytes, 3);
  const data = loadAtomicData(shifted.subarray(3));
  expect(data.lines.wavelengthVac).toEqual(bundled.lines.wavelengthVac);
});

it('the bundle tells which tables it was made from', () => {
  expect(bundled.inputsHash).toMatch(/^[0-9a-f]{64}$/);
  expect(bundled.version).toBe(`1-${bundled.inputsHash.slice(0, 8)}`);
});

it('the bundle stays inside its size budget', async () => {
  const { gzipSync } = await import('node:zlib');
  expect(gzipSync(bytes, { level: 9 }).length).toBeLessThan(700_000);
});
