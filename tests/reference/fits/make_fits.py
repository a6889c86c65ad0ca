"""Writes small spectra with astropy, one file a layout, and what astropy reads back from each into expected.json.

Run by hand: /usr/bin/python3 tests/reference/fits/make_fits.py   (astropy 5.2.1 and numpy of Debian 12 wrote the committed files)
Wavelengths on image axes come from astropy.wcs, that is WCSLIB. Numbers are printed so that they read back to the bit.
"""
import gzip
import json
import os
import warnings

import numpy as np
from astropy.io import fits
from astropy.io.votable import from_table, writeto
from astropy.table import MaskedColumn, Table
from astropy.wcs import WCS

warnings.simplefilter('ignore')
here = os.path.dirname(os.path.abspath(__file__))
rng = np.random.default_rng(4)
N = 40
wave = 3500.0 + 2.5 * np.arange(N)
flux = (1 + rng.random(N)) * 1e-15
err = 0.02 * flux
expected = {}


def say(name, wavelength, flux_values, choices=None, error=None, masked=None, medium=None, unit=None, digits=None):
    numbers = lambda values: [None if not np.isfinite(v) else float(v) for v in np.asarray(values, dtype=np.float64)]
    entry = {'file': name, 'choices': choices or {}, 'wavelength': numbers(wavelength), 'flux': numbers(flux_values)}
    if error is not None:
        entry['fluxErr'] = numbers(error)
    if masked is not None:
        entry['masked'] = [int(m) for m in masked]
    if medium:
        entry['medium'] = medium
    if unit:
        entry['fluxUnit'] = unit
    if digits:
        entry['relative'] = digits  # allowed relative difference in wavelength; absent = to the bit
    expected.setdefault(name, []).append(entry)


def put(name, *hdus):
    fits.HDUList(list(hdus)).writeto(os.path.join(here, name), overwrite=True)
    return fits.open(os.path.join(here, name))


# 1 one sample a row: doubles, floats, unsigned 16 and 32 bits, a mask
columns = fits.ColDefs([
    fits.Column('WAVE', 'D', unit='Angstrom', array=wave),
    fits.Column('FLUX', 'E', unit='erg/s/cm2/Angstrom', array=flux),
    fits.Column('FLUX_ERR', 'E', unit='erg/s/cm2/Angstrom', array=err),
    fits.Column('DQ', 'J', bzero=2147483648, array=np.where(np.arange(N) == 7, 4, 0).astype(np.uint32)),
    fits.Column('ID', 'K', array=np.arange(N, dtype=np.int64) + 2**40),
])
back = put('samples.fits', fits.PrimaryHDU(), fits.BinTableHDU.from_columns(columns, name='SPEC'))[1].data
say('samples.fits', back['WAVE'], back['FLUX'], error=back['FLUX_ERR'], masked=back['DQ'] != 0, unit='erg/s/cm2/Angstrom')

# 2 whole numbers with TSCAL, TZERO and TNULL; micrometres
stored = np.round(flux / 1e-18).astype(np.int16)
stored[3] = -32768
columns = fits.ColDefs([
    fits.Column('lambda', 'E', unit='um', array=wave / 1e4),
    fits.Column('flux', 'I', null=-32768, array=stored),
    fits.Column('level', 'B', array=np.arange(N, dtype=np.uint8)),
])
table = fits.BinTableHDU.from_columns(columns)
table.header['TSCAL2'] = 1e-18
table.header['TZERO2'] = 2.5e-16
put('scaled.fits', fits.PrimaryHDU(), table)
raw = fits.open(os.path.join(here, 'scaled.fits'))[1].data
values = np.where(stored == -32768, np.nan, stored.astype(np.float64) * 1e-18 + 2.5e-16)
say('scaled.fits', np.asarray(raw['lambda'], dtype=np.float64) * 1e4, values)

# 3 one row whose cells hold the spectrum, nanometres, inverse variance
columns = fits.ColDefs([
    fits.Column('LAMBDA', f'{N}D', unit='nm', array=[wave / 10]),
    fits.Column('SPEC', f'{N}E', array=[flux * 1e15]),
    fits.Column('IVAR', f'{N}E', array=[1 / (err * 1e15) ** 2]),
])
back = put('cells.fits', fits.PrimaryHDU(), fits.BinTableHDU.from_columns(columns))[1].data
say('cells.fits', back['LAMBDA'][0] * 10, back['SPEC'][0], error=1 / np.sqrt(np.asarray(back['IVAR'][0], dtype=np.float64)))

# 4 three rows of 16-bit and logical cells: orders
orders = np.array([wave, wave + 90, wave + 180])
columns = fits.ColDefs([
    fits.Column('ORDER', 'I', array=[31, 30, 29]),
    fits.Column('NAME', '6A', array=['blue', 'middle', 'red']),
    fits.Column('WAVELENGTH', f'{N}D', unit='Angstroms', array=orders),
    fits.Column('FLUX', f'{N}I', array=np.round(np.array([flux, flux * 2, flux * 3]) * 1e18).astype(np.int16)),
    fits.Column('ERROR', f'{N}E', array=np.array([err, err, err]) * 1e18),
    fits.Column('MASK', f'{N}L', array=np.array([np.arange(N) == 4] * 3)),
])
back = put('rows.fits', fits.PrimaryHDU(), fits.BinTableHDU.from_columns(columns))[1].data
for row in (1, 2, 3):
    say('rows.fits', back['WAVELENGTH'][row - 1], back['FLUX'][row - 1], {'row': row}, error=back['ERROR'][row - 1], masked=back['MASK'][row - 1])

# 5 variable-length cells, 32-bit and 64-bit pointers
def ragged(*parts):
    out = np.empty(len(parts), dtype=object)
    for k, part in enumerate(parts):
        out[k] = np.asarray(part, dtype=np.float64)
    return out
columns = fits.ColDefs([
    fits.Column('WAVE', 'PD()', unit='Angstrom', array=ragged(wave, wave[:25])),
    fits.Column('FLUX', 'QD()', array=ragged(flux, flux[:25] * 2)),
])
back = put('variable.fits', fits.PrimaryHDU(), fits.BinTableHDU.from_columns(columns))[1].data
for row in (1, 2):
    say('variable.fits', back['WAVE'][row - 1], back['FLUX'][row - 1], {'row': row})

# 6 ASCII table
columns = fits.ColDefs([
    fits.Column('WAVE', 'F10.3', unit='Angstrom', array=wave, ascii=True),
    fits.Column('FLUX', 'E15.7', array=flux, ascii=True),
    fits.Column('N', 'I5', array=np.arange(N), ascii=True),
])
back = put('ascii.fits', fits.PrimaryHDU(), fits.TableHDU.from_columns(columns))[1].data
say('ascii.fits', back['WAVE'], back['FLUX'])

# 7 image axes of FITS WCS paper III, worked out by WCSLIB
def axis(name, cards, medium, turn, data=None, relative=None):
    header = fits.Header()
    for key, value in cards.items():
        header[key] = value
    data = flux.astype(np.float32) if data is None else data
    hdu = fits.PrimaryHDU(data, header)
    back = put(name, hdu)[0]
    world = WCS(back.header).sub(['spectral']).pixel_to_world_values(np.arange(N)) if turn else None
    lam = turn(np.asarray(world)) if turn else None
    values = np.asarray(back.data, dtype=np.float64).reshape(-1)
    if lam[0] > lam[-1]:
        lam, values = lam[::-1], values[::-1]
    say(name, lam, values, medium=medium, digits=relative)

C = 299792458.0
H = 6.62607015e-34
metres = lambda w: w * 1e10
axis('wave.fits', {'CTYPE1': 'WAVE', 'CUNIT1': 'Angstrom', 'CRPIX1': 1.0, 'CRVAL1': 3500.0, 'CDELT1': 2.5}, 'vacuum', metres, relative=1e-14)
axis('awav.fits', {'CTYPE1': 'AWAV', 'CUNIT1': 'nm', 'CRPIX1': 10.5, 'CRVAL1': 500.0, 'CDELT1': 0.25}, 'air', metres, relative=1e-14)
axis('wavelog.fits', {'CTYPE1': 'WAVE-LOG', 'CUNIT1': 'Angstrom', 'CRPIX1': 5.0, 'CRVAL1': 5000.0, 'CDELT1': 1.5}, 'vacuum', metres, relative=1e-13)
axis('freq.fits', {'CTYPE1': 'FREQ', 'CUNIT1': 'THz', 'CRPIX1': 1.0, 'CRVAL1': 450.0, 'CDELT1': 0.5}, 'vacuum', lambda f: C / f * 1e10, relative=1e-13)
axis('wavef2w.fits', {'CTYPE1': 'WAVE-F2W', 'CUNIT1': 'Angstrom', 'CRPIX1': 3.0, 'CRVAL1': 6000.0, 'CDELT1': 4.0}, 'vacuum', metres, relative=1e-12)
axis('freqw2f.fits', {'CTYPE1': 'FREQ-W2F', 'CUNIT1': 'Hz', 'CRPIX1': 3.0, 'CRVAL1': 5e14, 'CDELT1': 2e11}, 'vacuum', lambda f: C / f * 1e10, relative=1e-12)
axis('ener.fits', {'CTYPE1': 'ENER', 'CUNIT1': 'eV', 'CRPIX1': 1.0, 'CRVAL1': 2.0, 'CDELT1': 0.01}, 'vacuum', lambda e: H * C / e * 1e10, relative=1e-7)  # WCSLIB turns eV into J with an older constant
axis('wavn.fits', {'CTYPE1': 'WAVN', 'CUNIT1': 'cm-1', 'CRPIX1': 1.0, 'CRVAL1': 15000.0, 'CDELT1': 10.0}, 'vacuum', lambda k: 1e10 / k, relative=1e-13)
rest = {'RESTWAV': 6564.61e-10}
axis('vopt.fits', {'CTYPE1': 'VOPT', 'CUNIT1': 'km/s', 'CRPIX1': 20.0, 'CRVAL1': 0.0, 'CDELT1': 10.0, **rest}, 'vacuum', lambda v: 6564.61 * (1 + v / C), relative=1e-13)
axis('vrad.fits', {'CTYPE1': 'VRAD', 'CUNIT1': 'km/s', 'CRPIX1': 20.0, 'CRVAL1': 0.0, 'CDELT1': 10.0, **rest}, 'vacuum', lambda v: 6564.61 / (1 - v / C), relative=1e-13)
axis('velo.fits', {'CTYPE1': 'VELO', 'CUNIT1': 'km/s', 'CRPIX1': 20.0, 'CRVAL1': 0.0, 'CDELT1': 10.0, **rest}, 'vacuum', lambda v: 6564.61 * np.sqrt((1 + v / C) / (1 - v / C)), relative=1e-13)
axis('cube.fits', {'CTYPE1': 'RA---TAN', 'CTYPE2': 'DEC--TAN', 'CTYPE3': 'WAVE', 'CUNIT3': 'um', 'CRPIX1': 1.0, 'CRPIX2': 1.0, 'CRPIX3': 1.0, 'CRVAL1': 10.0, 'CRVAL2': 10.0, 'CRVAL3': 1.2, 'CDELT1': 1e-4, 'CDELT2': 1e-4, 'CDELT3': 0.001, 'CUNIT1': 'deg', 'CUNIT2': 'deg'}, 'vacuum', metres, data=flux.astype(np.float64).reshape(N, 1, 1), relative=1e-14)

# 8 older habits: log10 axis with DC-FLAG, 16-bit samples with BSCALE, BZERO and BLANK
stored = np.round(flux / 1e-18 - 1500).astype(np.int16)
hdu = fits.PrimaryHDU(stored)
for key, value in {'CTYPE1': 'LINEAR', 'DC-FLAG': 1, 'CRVAL1': 3.55, 'CD1_1': 1e-4, 'CRPIX1': 1.0, 'BLANK': int(stored[5])}.items():
    hdu.header[key] = value
hdu.header['BSCALE'] = 1e-18
hdu.header['BZERO'] = 1.5e-15
put('log10.fits', hdu)
values = np.where(stored == stored[5], np.nan, stored.astype(np.float64) * 1e-18 + 1.5e-15)
# numpy's and JavaScript's 10**x may differ in the last bits
say('log10.fits', 10.0 ** (3.55 + 1e-4 * np.arange(N)), values, digits=1e-15 * 4)

# 9 images side by side: wavelength, flux, inverse variance, mask; a long BUNIT over CONTINUE cards, a HIERARCH card
unit = '10**-17 erg/(s cm2 Angstrom) per something that makes the string longer than one card can hold'
parts = [fits.ImageHDU(wave, name='B_WAVELENGTH'), fits.ImageHDU((flux * 1e17).astype(np.float32), name='B_FLUX'), fits.ImageHDU((1 / (err * 1e17) ** 2).astype(np.float32), name='B_IVAR'), fits.ImageHDU((np.arange(N) == 9).astype(np.int32), name='B_MASK')]
parts[0].header['BUNIT'] = 'Angstrom'
parts[1].header['BUNIT'] = unit
parts[1].header['HIERARCH ESO QC VRAD BARYCOR'] = 12.5
back = put('units.fits', fits.PrimaryHDU(), *parts)
say('units.fits', back['B_WAVELENGTH'].data, back['B_FLUX'].data, error=1 / np.sqrt(np.asarray(back['B_IVAR'].data, dtype=np.float64)), unit=unit)

# 10 a stack: rows of one image, and columns of one image
stack = np.array([flux, flux * 2, flux * 3])
hdu = fits.PrimaryHDU(stack)
for key, value in {'CTYPE1': 'LAMBDA', 'CUNIT1': 'Angstroms', 'CRVAL1': 3500.0, 'CDELT1': 2.5}.items():
    hdu.header[key] = value
back = put('stack.fits', hdu)[0].data
for row in (1, 2, 3):
    say('stack.fits', wave, back[row - 1], {'row': row})
back = put('columns.fits', fits.PrimaryHDU(np.array([wave, flux, err]).T))[0].data
say('columns.fits', back[:, 0], back[:, 1])

# 11 64-bit unsigned and signed samples
big = np.arange(N, dtype=np.uint64) + np.uint64(2**63 + 2**20)
hdu = fits.PrimaryHDU(big)
for key, value in {'CTYPE1': 'WAVE', 'CUNIT1': 'Angstrom', 'CRVAL1': 3500.0, 'CDELT1': 2.5, 'CRPIX1': 1.0}.items():
    hdu.header[key] = value
put('uint64.fits', hdu)
say('uint64.fits', wave, big.astype(np.float64), digits=1e-14)

# 12 packed
with open(os.path.join(here, 'samples.fits'), 'rb') as plain, open(os.path.join(here, 'samples.fits.gz'), 'wb') as packed:
    packed.write(gzip.compress(plain.read(), mtime=0))
expected['samples.fits.gz'] = [{**expected['samples.fits'][0], 'file': 'samples.fits.gz'}]

# 12b echelle orders side by side: fluxes, variances and wavelengths as two-dimensional images, glued names
two = lambda a, b: np.array([a, b])
parts = [fits.ImageHDU(two(flux, flux * 2), name='GREEN_SCI_FLUX1'), fits.ImageHDU(two(err**2, err**2), name='GREEN_SCI_VAR1'), fits.ImageHDU(two(wave, wave + 3000), name='GREEN_SCI_WAVE1'), fits.ImageHDU(two(flux, flux), name='GREEN_SKY_FLUX1')]
parts[2].header['BUNIT'] = 'Angstrom'
back = put('echelle.fits', fits.PrimaryHDU(), *parts)
for row in (1, 2):
    say('echelle.fits', back['GREEN_SCI_WAVE1'].data[row - 1], back['GREEN_SCI_FLUX1'].data[row - 1], {'row': row}, error=np.sqrt(back['GREEN_SCI_VAR1'].data[row - 1]))

# 12c DATA and STAT (variance), air wavelengths
header = fits.Header({'CTYPE1': 'AWAV', 'CUNIT1': 'Angstrom', 'CRPIX1': 1.0, 'CRVAL1': 4750.0, 'CDELT1': 1.25, 'BUNIT': '10**(-20)*erg/s/cm**2/Angstrom'})
back = put('stat.fits', fits.PrimaryHDU(), fits.ImageHDU(flux * 1e15, header, name='DATA'), fits.ImageHDU((err * 1e15) ** 2, header, name='STAT'))
say('stat.fits', 4750.0 + 1.25 * np.arange(N), back['DATA'].data, error=np.sqrt(back['STAT'].data), medium='air', unit='10**(-20)*erg/s/cm**2/Angstrom')

# 12d WAT cards: a Chebyshev order (numpy.polynomial), a log-linear and a linear one with a redshift to take out
spec = 'wtype=multispec spec1 = "1 31 2 0. 0. 40 0. 1. 2. 1. 0. 1 4 1. 40. 5500. 150. 3. 0.25" spec2 = "2 30 1 3.6 0.0001 40 0. 1. 2." spec3 = "3 29 0 6000. 2.5 40 0.001 1. 2."'
hdu = fits.PrimaryHDU(np.array([flux, flux * 2, flux * 3]))
for key, value in {'WCSDIM': 2, 'CTYPE1': 'MULTISPE', 'CTYPE2': 'MULTISPE', 'CD1_1': 1.0, 'CD2_2': 1.0, 'WAT0_001': 'system=multispec', 'WAT1_001': 'wtype=multispec label=Wavelength units=angstroms'}.items():
    hdu.header[key] = value
for k in range(0, len(spec), 68):
    hdu.header[f'WAT2_{k // 68 + 1:03d}'] = spec[k:k + 68]
back = put('wat.fits', hdu)[0].data
pixel = np.arange(1, N + 1)
say('wat.fits', np.polynomial.chebyshev.chebval((2 * pixel - 41) / 39, [5500, 150, 3, 0.25]), back[0], {'order': 1}, digits=1e-15)
say('wat.fits', 10 ** (3.6 + 1e-4 * np.arange(N)), back[1], {'order': 2}, digits=4e-15)
say('wat.fits', (6000 + 2.5 * np.arange(N)) / 1.001, back[2], {'order': 3}, digits=1e-15)

# 13 ECSV and VOTable by astropy.table
table = Table({'wavelength': wave / 1e4, 'flux': MaskedColumn(flux, mask=np.arange(N) == 11), 'flux_err': err, 'name': ['a b'] * N}, meta={'comments': ['made for tests']})
table['wavelength'].unit = 'um'
table['flux'].unit = 'erg / (Angstrom s cm2)'
table.write(os.path.join(here, 'table.ecsv'), format='ascii.ecsv', overwrite=True)
table.write(os.path.join(here, 'comma.ecsv'), format='ascii.ecsv', delimiter=',', overwrite=True)
values = np.where(np.arange(N) == 11, np.nan, flux)
for name in ('table.ecsv', 'comma.ecsv'):
    say(name, np.array([float(repr(w)) for w in wave / 1e4]) * 1e4, values, error=err, unit='erg / (Angstrom cm2 s)')
del table['name']
for form in ('tabledata', 'binary', 'binary2'):
    name = f'{form}.vot'
    document = from_table(table)
    writeto(document, os.path.join(here, name), tabledata_format=form)
    say(name, (wave / 1e4) * 1e4, values, error=err)

with open(os.path.join(here, 'expected.json'), 'w') as out:
    json.dump([entry for name in expected for entry in expected[name]], out, indent=None, separators=(',', ':'))
    out.write('\n')
