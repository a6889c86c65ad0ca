export const USAGE = `linewright: names the emission lines of thin, glowing gas

  linewright table SPECTRUM... [options]   measures and names; one row a feature
  linewright name LINES.csv... [options]   names lines measured elsewhere (columns wavelength, flux; optional wavelength_err, flux_err, fwhm)
  linewright gas FILE... [options]         what the named lines say: reddening, temperature, density, abundances, density ladder, kinematics
  linewright read SPECTRUM [--hdu N] [--row K] [--order K]
                                           the samples as CSV on stdout, how they were read as one JSON line on stderr
  linewright limits ION... [--te K] [--ne CM3]
                                           lifetimes, critical densities and survival of an ion's thin-gas lines

  linewright paper SPECTRUM... --out DIR [options]
                                           one ZIP a spectrum: tables in every format, figures, methods, references, provenance, session
  linewright differences FIRST.json SECOND.json [SPECTRUM]
                                           verdicts and settings in which two session files differ; with the spectrum also how probable the names are

  --out DIR              one file a spectrum in DIR instead of stdout
  --format FORMAT        csv (default), latex, deluxetable, mrt, votable, ecsv, fits or json
  --design DESIGN        letter, atlas (default) or appendix: columns of the printed formats
  --z Z | --velocity KMS redshift, or velocity in the optical convention; without either it is found from the lines
  --medium air|vacuum    medium of the wavelengths, where the file does not say
  --resolution R         lambda / FWHM of the instrument
  --width A              FWHM of the instrument in Angstrom, where it is the same everywhere
  --kind KIND            unknown (default), hii-region, planetary-nebula, nova-shell, shocked-gas, narrow-line-galaxy
  --threshold SIGMA      a feature is kept from this signal to noise on (default 4.5)
  --te K, --ne CM3       electron temperature and density at which critical densities and companions are stated
  --curve LAW            ccm89-odonnell94 (default), ccm89 or fitzpatrick99: the reddening law; --rv R its A(V)/E(B-V) (default 3.1)
  --chbeta C             logarithmic extinction at H beta, where it is not to be taken from the hydrogen lines
  --hdu N, --row K, --order K   which spectrum of the file
  --lines OWN.csv        your own lines beside the bundled ones (columns ion, wavelength_air or wavelength_vac ...)
  --limit W,W            three-sigma limits of unseen lines at these wavelengths (Angstrom), on stderr
  --timings              seconds of each stage on stderr

Names are proposals: atomic data have errors, and the astronomer decides.
`;
