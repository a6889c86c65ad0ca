/** Citations as the line list prints them -> BibTeX entries: the contents of `public/references.json`. */
export type References = Readonly<Record<string, readonly string[]>>;

/** Entries of the methods, by the words that the methods paragraph cites them with. Volumes and pages from memory. */
export const METHOD_REFERENCES = {
  'Ciddor (1996)': '@article{ciddor1996, author={Ciddor, P. E.}, year={1996}, journal={Appl. Opt.}, volume={35}, pages={1566}}',
  'Eilers (2003)': '@article{eilers2003, author={Eilers, P. H. C.}, year={2003}, journal={Anal. Chem.}, volume={75}, pages={3631}}',
  'Stoehr et al. (2008)':
    '@inproceedings{stoehr2008, author={Stoehr, F. and others}, year={2008}, title={DER\\_SNR: A Simple and General Spectroscopic Signal-to-Noise Measurement Algorithm}, booktitle={ASP Conf. Ser.}, volume={394}, pages={505}}',
  'Marquardt (1963)':
    '@article{marquardt1963, author={Marquardt, D. W.}, year={1963}, journal={J. Soc. Ind. Appl. Math.}, volume={11}, pages={431}}',
  'Schwarz (1978)': '@article{schwarz1978, author={Schwarz, G.}, year={1978}, journal={Ann. Stat.}, volume={6}, pages={461}}',
  'Storey & Hummer (1995)':
    '@article{storeyHummer1995, author={Storey, P. J. and Hummer, D. G.}, year={1995}, journal={MNRAS}, volume={272}, pages={41}}',
  'Cardelli, Clayton & Mathis (1989)':
    '@article{cardelli1989, author={Cardelli, J. A. and Clayton, G. C. and Mathis, J. S.}, year={1989}, journal={ApJ}, volume={345}, pages={245}}',
  "O'Donnell (1994)": "@article{odonnell1994, author={O'Donnell, J. E.}, year={1994}, journal={ApJ}, volume={422}, pages={158}}",
  'Fitzpatrick (1999)': '@article{fitzpatrick1999, author={Fitzpatrick, E. L.}, year={1999}, journal={PASP}, volume={111}, pages={63}}',
  'Osterbrock & Ferland (2006)':
    '@book{osterbrockFerland2006, author={Osterbrock, D. E. and Ferland, G. J.}, year={2006}, title={Astrophysics of Gaseous Nebulae and Active Galactic Nuclei}, publisher={University Science Books}}',
} as const satisfies Record<string, string>;

export type MethodReference = keyof typeof METHOD_REFERENCES;

/** BibTeX of exactly the methods and atomic data that were used, every entry once; citations without an entry (estimates, common practice) as comments. */
export function bibtex(references: References, citations: readonly string[], methods: readonly MethodReference[]): string {
  const entries = new Map<string, string>();
  const add = (entry: string) => entries.set(/^@\w+\{([^,]+),/.exec(entry)?.[1] ?? entry, entry);
  for (const method of methods) add(METHOD_REFERENCES[method]);
  const unknown: string[] = [];
  for (const citation of citations) {
    const found = references[citation];
    if (!found) unknown.push(citation);
    else found.forEach(add);
  }
  const sorted = [...entries].sort(([a], [b]) => (a < b ? -1 : 1)).map(([, entry]) => entry);
  return `${[...sorted, ...[...new Set(unknown)].sort().map((text) => `% ${text}`)].join('\n')}\n`;
}
