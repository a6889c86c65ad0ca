import type { MethodFacts } from './methods.ts';

/**
 * Everything a later reader needs to do it again, as JSON: versions, file hash, settings, counts, what was assumed.
 *
 * @param date ISO 8601, of the export; absent = left out, so that the same session gives the same bytes
 */
export function provenanceJson({ citations, ...facts }: MethodFacts, date?: string): string {
  return `${JSON.stringify({ format: 'linewright-provenance', version: 1, ...(date ? { date } : {}), ...facts, citations: [...new Set(citations)].sort() }, null, 1)}\n`;
}
