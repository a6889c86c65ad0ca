/** Value of a card; strings keep their trailing blanks. */
export type CardValue = string | number | boolean;

/** A header: keywords with values and comments, and the running text of COMMENT and HISTORY. */
export interface Header {
  readonly cards: ReadonlyMap<string, { readonly value: CardValue; readonly comment: string }>;
  readonly texts: readonly string[];
  /** Cards that could not be understood. */
  readonly unreadable: readonly string[];
}

/** The value of a keyword as text without trailing blanks; empty when it is not there. */
export function textOf(header: Header, keyword: string): string {
  const value = header.cards.get(keyword)?.value;
  return value === undefined ? '' : typeof value === 'boolean' ? (value ? 'T' : 'F') : String(value).trim();
}

/** The value of a keyword as a number; numbers written as strings are taken too. Undefined when there is none. */
export function numberOf(header: Header, keyword: string): number | undefined {
  const value = header.cards.get(keyword)?.value;
  if (typeof value === 'number') return value;
  if (typeof value !== 'string' || value.trim() === '') return undefined;
  const number = Number(value.trim().replace(/[dD]/, 'e'));
  return Number.isFinite(number) ? number : undefined;
}

export const logicalOf = (header: Header, keyword: string): boolean | undefined => {
  const value = header.cards.get(keyword)?.value;
  if (typeof value === 'boolean') return value;
  if (typeof value === 'string')
    return /^(t|true|yes|y|1)$/i.test(value.trim()) ? true : /^(f|false|no|n|0)$/i.test(value.trim()) ? false : undefined;
  return typeof value === 'number' ? value !== 0 : undefined;
};

export const commentOf = (header: Header, keyword: string): string => header.cards.get(keyword)?.comment ?? '';

const CARD = 80;

/** Takes cards one after another; CONTINUE cards lengthen the string before them (FITS 4.0, section 4.2.1.2). */
export function headerBuilder(): { add(card: string): void; header: Header } {
  const cards = new Map<string, { value: CardValue; comment: string }>();
  const texts: string[] = [];
  const unreadable: string[] = [];
  let last = '';
  const put = (keyword: string, value: CardValue, comment: string) => {
    // of two cards with one keyword the first counts
    if (!cards.has(keyword)) cards.set(keyword, { value, comment });
  };

  function add(card: string): void {
    const keyword = card.slice(0, 8).trimEnd();
    if (keyword === 'CONTINUE') {
      const before = cards.get(last);
      const more = stringValue(card.slice(8));
      if (before && typeof before.value === 'string' && before.value.trimEnd().endsWith('&') && more) {
        cards.set(last, { value: before.value.trimEnd().slice(0, -1) + more.value, comment: before.comment + more.comment });
      }
      return;
    }
    last = '';
    if (keyword === 'COMMENT' || keyword === 'HISTORY' || keyword === '') {
      const text = card.slice(8).trim();
      if (text !== '') texts.push(text);
      return;
    }
    if (keyword === 'HIERARCH') {
      const at = card.indexOf('=');
      const parsed = at > 0 ? cardValue(card.slice(at + 1)) : undefined;
      if (!parsed) return void unreadable.push(card.trimEnd());
      last = card.slice(8, at).trim();
      put(last, parsed.value, parsed.comment);
      return;
    }
    if (card.slice(8, 10) !== '= ' && card[8] !== '=') {
      if (/[^A-Z0-9_-]/.test(keyword) || card.slice(8).trim() !== '') unreadable.push(card.trimEnd());
      return;
    }
    const parsed = cardValue(card.slice(9));
    if (!parsed) {
      if (card.slice(9).split('/')[0].trim() !== '') unreadable.push(card.trimEnd());
      return;
    }
    last = keyword;
    put(keyword, parsed.value, parsed.comment);
  }

  return { add, header: { cards, texts, unreadable } };
}

function stringValue(text: string): { value: string; comment: string } | undefined {
  const quoted = /^\s*'((?:[^']|'')*)'\s*(?:\/(.*))?/.exec(text.padEnd(CARD));
  return quoted ? { value: quoted[1].replaceAll("''", "'"), comment: (quoted[2] ?? '').trim() } : undefined;
}

function cardValue(text: string): { value: CardValue; comment: string } | undefined {
  const quoted = stringValue(text);
  if (quoted) return quoted;
  const slash = text.indexOf('/');
  const bare = (slash < 0 ? text : text.slice(0, slash)).trim();
  const comment = slash < 0 ? '' : text.slice(slash + 1).trim();
  if (bare === 'T') return { value: true, comment };
  if (bare === 'F') return { value: false, comment };
  if (/^'/.test(bare)) return { value: bare.slice(1), comment };
  if (!/^[+-]?(\d+\.?\d*|\.\d+)([eEdD][+-]?\d+)?$/.test(bare)) return undefined;
  return { value: Number(bare.replace(/[dD]/, 'e')), comment };
}
