import { describe, expect, it } from 'vitest';
import { bytesSource, readLineList } from '../../src/readers/index.ts';

const read = (text: string) => readLineList(bytesSource('lines.csv', new TextEncoder().encode(text)));

describe('a list of measured lines', () => {
  it('gives its columns in the order of the file, with the stated medium', async () => {
    const list = await read(
      '# vacuum wavelengths in Angstrom\nwavelength,flux,wavelength_err,flux_err,fwhm\n5008.24,300,0.02,1,2.5\n4862.7,100,0.03,,2.4\n',
    );
    expect(Array.from(list.wavelength)).toEqual([5008.24, 4862.7]);
    expect(Array.from(list.flux)).toEqual([300, 100]);
    expect(Array.from(list.wavelengthErr ?? [])).toEqual([0.02, 0.03]);
    expect(Array.from(list.fluxErr ?? [])).toEqual([1, Number.NaN]);
    expect(Array.from(list.fwhm ?? [])).toEqual([2.5, 2.4]);
    expect([list.medium, list.mediumStated]).toEqual(['vacuum', true]);
  });

  it('needs only wavelength and flux, and may have one line only', async () => {
    const list = await read('wavelength,flux\n5006.84,300\n');
    expect(Array.from(list.wavelength)).toEqual([5006.84]);
    expect(list.fluxErr).toBeUndefined();
    expect(list.mediumStated).toBe(false);
    expect(list.remarks.map((r) => r.code)).toContain('medium-assumed');
  });

  it('turns nanometres, errors and widths into Angstrom', async () => {
    const list = await read('wavelength_nm,flux,wavelength_err,fwhm\n500.684,300,0.002,0.25\n486.1,100,0.002,0.25\n');
    expect(list.wavelength[0]).toBeCloseTo(5006.84, 9);
    expect(list.wavelengthErr?.[0]).toBeCloseTo(0.02, 9);
    expect(list.fwhm?.[0]).toBeCloseTo(2.5, 9);
  });

  it('keeps lines without a flux and leaves out those without a wavelength', async () => {
    const list = await read('wavelength,flux\n5006.84,nan\n,3\n4861.3,100\n');
    expect(Array.from(list.wavelength)).toEqual([5006.84, 4861.3]);
    expect(list.flux[0]).toBeNaN();
  });

  it('reads centroid columns among others', async () => {
    const list = await read('line,centroid,centroid_err,flux,flux_err,ew\n1,5006.84,0.01,300,1,-50\n2,4861.33,0.01,100,1,-20\n');
    expect(Array.from(list.wavelength)).toEqual([5006.84, 4861.33]);
    expect(Array.from(list.wavelengthErr ?? [])).toEqual([0.01, 0.01]);
    expect(Array.from(list.fluxErr ?? [])).toEqual([1, 1]);
  });

  it('says which column is missing', async () => {
    await expect(read('name,strength\n1,2\n3,4\n')).rejects.toThrow(/wavelength/);
  });
});
