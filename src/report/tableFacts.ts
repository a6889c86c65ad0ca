import type { LineTable } from './lineTable.ts';

/** The facts of a table that are not in its rows, as key and value with a meaning, for formats that carry such. */
export function tableFacts(table: LineTable): { readonly key: string; readonly value: string | number; readonly meaning: string }[] {
  const facts: { key: string; value: string | number; meaning: string }[] = [
    { key: 'title', value: table.title, meaning: 'source of the spectrum' },
    { key: 'medium', value: table.medium, meaning: `wavelengths in ${table.medium}${table.mediumStated ? '' : ' (assumed)'}` },
    { key: 'redshift', value: table.z, meaning: 'redshift of the rest frame' },
    { key: 'redshift_err', value: table.zErr, meaning: 'its error' },
    { key: 'electron_temperature', value: table.te, meaning: 'K, for the critical densities' },
    { key: 'source_sha256', value: table.sha256, meaning: 'SHA-256 of the source file' },
    { key: 'line_list', value: table.atomicVersion, meaning: 'edition of the line list' },
    { key: 'caution', value: 'names are proposals unless the verdict says accepted', meaning: 'caution' },
  ];
  if (table.resolvingPower !== undefined)
    facts.push({ key: 'resolving_power', value: table.resolvingPower, meaning: 'lambda / FWHM of the instrument' });
  return facts;
}
