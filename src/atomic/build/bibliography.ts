/** Citations by key, from `sources.bib`. */
export interface Bibliography {
  /** Keys joined with `+` -> their citations; throws when a key has no entry: nothing is built on an unnamed source. */
  readonly citations: (keys: string, where: string) => readonly string[];
}

function field(entry: string, name: string): string {
  const m = new RegExp(`\\b${name}\\s*=\\s*\\{([^{}]*)\\}`).exec(entry);
  return m ? m[1].replace(/\s+/g, ' ').trim() : '';
}

function citation(entry: string): string {
  const [author, year, journal, volume, pages, title] = ['author', 'year', 'journal', 'volume', 'pages', 'title'].map((f) =>
    field(entry, f),
  );
  const place = [journal, volume && pages ? `${volume}, ${pages}` : volume || pages].filter((t) => t !== '').join(' ');
  const head = [author, year].filter((t) => t !== '').join(' ');
  const identifier = field(entry, 'doi') ? `doi:${field(entry, 'doi')}` : field(entry, 'bibcode');
  return [head, place || title, place ? '' : identifier].filter((t) => t !== '').join(', ');
}

/** Every citation as the line list prints it, with the BibTeX entries that stand for it: `public/references.json`. */
export function referencesJson(text: string): string {
  const entries: Record<string, string[]> = {};
  for (const entry of text.split(/^@/m).slice(1)) {
    // BibTeX wants "and" between authors; the tables print commas
    const bibtex = `@${entry.replace(/\n%[\s\S]*$/, '').trim()}`.replace(/author=\{[^}]*\}/, (authors) =>
      authors.replaceAll(/\., (?=[A-Z])/g, '. and '),
    );
    (entries[citation(entry)] ??= []).push(bibtex);
  }
  const sorted = Object.fromEntries(Object.entries(entries).sort(([a], [b]) => (a < b ? -1 : 1)));
  return `${JSON.stringify(sorted, null, 0)}\n`;
}

/** Reads BibTeX entries with plain `{...}` fields (no nesting), as `sources.bib` is written. */
export function readBibliography(text: string): Bibliography {
  const entries = new Map<string, string>();
  for (const entry of text.split(/^@/m).slice(1)) {
    const m = /^\w+\{([^,]+),/.exec(entry);
    if (!m) throw new Error(`sources.bib: entry without a key: ${entry.slice(0, 40)}`);
    if (entries.has(m[1])) throw new Error(`sources.bib: ${m[1]} stands twice`);
    entries.set(m[1], citation(entry));
  }
  return {
    citations: (keys, where) =>
      keys.split('+').map((key) => {
        const found = entries.get(key);
        if (found === undefined || found === '') throw new Error(`${where}: source "${key}" has no entry in sources.bib`);
        return found;
      }),
  };
}
