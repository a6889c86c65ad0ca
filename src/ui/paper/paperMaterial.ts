import { bibtex, citedMethods, knownDesign, type MethodFacts, type PaperMaterial, type References } from '../../report/index.ts';
import { writeSession } from '../../session/index.ts';
import { desk } from '../desk/deskStore.ts';

let loaded: Promise<References> | undefined;

/** The references that come with the program, fetched once. */
function references(): Promise<References> {
  loaded ??= fetch(new URL('references.json', document.baseURI)).then(async (response) => {
    if (!response.ok) throw new Error(`references.json: ${response.status} ${response.statusText}`);
    return (await response.json()) as References;
  });
  loaded.catch(() => {
    loaded = undefined;
  });
  return loaded;
}

/** BibTeX of what was used. */
export const referencesOf = async (methods: MethodFacts) => bibtex(await references(), methods.citations, citedMethods(methods));

/** All that the archive of the paper is made from; undefined while nothing is open. */
export async function paperMaterial(): Promise<PaperMaterial | undefined> {
  const { analysis, samples, history, paperFigures, rows } = desk();
  if (!analysis) return undefined;
  const { paper } = history.document.settings;
  const { width, panels, fits } = paperFigures;
  return {
    table: analysis.table,
    design: knownDesign(paper?.design),
    methods: analysis.methods,
    ...(paper?.methods === undefined ? {} : { methodsEdited: paper.methods }),
    references: await references(),
    ...(samples ? { samples } : {}),
    figures: { width, panels },
    fits: fits ? rows.filter((row) => row.feature.verdict?.decision === 'accepted').map((row) => row.feature.number) : [],
    session: writeSession(history),
    gas: analysis.gas,
    date: new Date().toISOString(),
  };
}
