import { crc32, deflateSync } from 'node:zlib';
import { expect, test } from 'vitest';
import { withResolution } from '../../src/report/index.ts';

const chunk = (name: string, data: Uint8Array) => {
  const body = Buffer.concat([Buffer.from(name, 'latin1'), data]);
  const [length, check] = [Buffer.alloc(4), Buffer.alloc(4)];
  length.writeUInt32BE(data.length);
  check.writeUInt32BE(crc32(body));
  return Buffer.concat([length, body, check]);
};
const png = new Uint8Array(
  Buffer.concat([
    Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]),
    chunk('IHDR', Uint8Array.of(0, 0, 0, 1, 0, 0, 0, 1, 8, 0, 0, 0, 0)),
    chunk('IDAT', deflateSync(Uint8Array.of(0, 255))),
    chunk('IEND', new Uint8Array(0)),
  ]),
);

test('300 dots an inch are 11811 a metre, in a chunk whose checksum an independent library confirms', () => {
  const printed = Buffer.from(withResolution(png, 300 / 25.4));
  const at = printed.indexOf('pHYs', 0, 'latin1');
  expect(at).toBe(8 + 25 + 4);
  expect([printed.readUInt32BE(at + 4), printed.readUInt32BE(at + 8), printed[at + 12]]).toEqual([11_811, 11_811, 1]);
  expect(printed.readUInt32BE(at + 13)).toBe(crc32(printed.subarray(at, at + 13)));
  expect(printed.subarray(at + 17).equals(Buffer.from(png.subarray(33)))).toBe(true);
});

test('what is no picture is refused', () => {
  expect(() => withResolution(new Uint8Array(40), 1)).toThrow(TypeError);
});
