/** Where in the user's material something was found; every field is optional and means what its name says (rows, lines and columns count from 1). */
export interface Place {
  readonly file?: string;
  /** FITS header-data unit, 0 = primary. */
  readonly hdu?: number;
  /** Name of a column or keyword, or its number from 1. */
  readonly column?: string | number;
  readonly row?: number;
  /** Line of a text file. */
  readonly line?: number;
  /** Offset in the file. */
  readonly byte?: number;
  /** The offending line, card or value itself, at most 120 characters. */
  readonly excerpt?: string;
}

/** Something wrong with, or assumed about, the user's material. Plain data: it crosses a worker unchanged. */
export interface Problem {
  /** Stable kebab-case word for tests and for looking up, e.g. `no-wavelength-column`. */
  readonly code: string;
  readonly where: Place;
  /** What is there, as the end of the sentence "found ...". */
  readonly found: string;
  /** What would have been right, as the end of the sentence "expected ...". */
  readonly expected?: string;
  /** What the user can do, one imperative sentence. */
  readonly doThis?: string;
}

/** A problem that did not stop the work: an assumption, a repair the user should know of, a partial failure. */
export interface Remark extends Problem {
  readonly weight: 'note' | 'warning';
}

/** The thin error that carries a problem inside the core; at the worker's door it becomes data again. */
export class ProblemError extends Error {
  readonly problem: Problem;
  constructor(problem: Problem) {
    super(wordProblem(problem));
    this.name = 'ProblemError';
    this.problem = problem;
  }
}

/** The one place where a problem is put into words: place, what was found, what was expected, what to do. One line. */
export function wordProblem(problem: Problem): string {
  const place = wordPlace(problem.where);
  const sentences = [`${place ? `${place}: ` : ''}${problem.found}`];
  if (problem.expected) sentences.push(`expected ${problem.expected}`);
  const excerpt = problem.where.excerpt ? ` [${problem.where.excerpt}]` : '';
  return `${sentences.join('; ')}${excerpt}.${problem.doThis ? ` ${problem.doThis}` : ''}`;
}

/** "lantern.fits, HDU 1, column FLUX, row 12"; empty when nothing is known. */
export function wordPlace(place: Place): string {
  const parts: string[] = [];
  if (place.file) parts.push(place.file);
  if (place.hdu !== undefined) parts.push(`HDU ${place.hdu}`);
  if (place.line !== undefined) parts.push(`line ${place.line}`);
  if (place.column !== undefined) parts.push(`column ${place.column}`);
  if (place.row !== undefined) parts.push(`row ${place.row}`);
  if (place.byte !== undefined) parts.push(`byte ${place.byte}`);
  return parts.join(', ');
}
