import { ProblemError } from '../../problems/index.ts';

/** Receives a document piece by piece; names come without their prefix. */
export interface XmlHandler {
  open(name: string, attributes: ReadonlyMap<string, string>): void;
  close(name: string): void;
  /** Text between tags, entities resolved, CDATA as it is. */
  text(text: string): void;
}

const ENTITIES: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

/**
 * Walks through an XML document once. Only what tables need: elements, attributes, text, CDATA; comments, processing instructions and
 * document types are skipped, and no entity but the five of XML and numbers is resolved (so that none can grow).
 *
 * @throws ProblemError where a tag does not end
 */
export function walkXml(xml: string, file: string, handler: XmlHandler): void {
  let at = 0;
  while (at < xml.length) {
    const tag = xml.indexOf('<', at);
    if (tag < 0) {
      handler.text(resolve(xml.slice(at)));
      return;
    }
    if (tag > at) handler.text(resolve(xml.slice(at, tag)));
    const next = xml[tag + 1];
    if (next === '!') {
      if (xml.startsWith('<!--', tag)) at = after(xml, '-->', tag, file);
      else if (xml.startsWith('<![CDATA[', tag)) {
        const end = after(xml, ']]>', tag, file);
        handler.text(xml.slice(tag + 9, end - 3));
        at = end;
      } else at = afterDoctype(xml, tag, file);
    } else if (next === '?') at = after(xml, '?>', tag, file);
    else {
      const end = endOfTag(xml, tag, file);
      if (next === '/') handler.close(localName(xml.slice(tag + 2, end - 1).trim()));
      else {
        const isEmpty = xml[end - 2] === '/';
        const body = xml.slice(tag + 1, isEmpty ? end - 2 : end - 1);
        const name = /^[^\s/>]+/.exec(body)?.[0] ?? '';
        handler.open(localName(name), attributesOf(body.slice(name.length)));
        if (isEmpty) handler.close(localName(name));
      }
      at = end;
    }
  }
}

const localName = (name: string) => name.slice(name.indexOf(':') + 1).toUpperCase();

function after(xml: string, mark: string, from: number, file: string): number {
  const end = xml.indexOf(mark, from);
  if (end < 0) throw unended(xml, from, file);
  return end + mark.length;
}

function afterDoctype(xml: string, from: number, file: string): number {
  const close = xml.indexOf('>', from);
  const bracket = xml.indexOf('[', from);
  if (bracket > 0 && bracket < close) return after(xml, ']>', from, file);
  return after(xml, '>', from, file);
}

function endOfTag(xml: string, from: number, file: string): number {
  let quote = '';
  for (let i = from + 1; i < xml.length; i++) {
    const c = xml[i];
    if (quote) {
      if (c === quote) quote = '';
    } else if (c === '"' || c === "'") quote = c;
    else if (c === '>') return i + 1;
  }
  throw unended(xml, from, file);
}

function attributesOf(text: string): ReadonlyMap<string, string> {
  const attributes = new Map<string, string>();
  if (text.trim() === '') return attributes;
  // bounded words keep a tag of one endless word from costing the square of its length
  for (const [, name, double, single] of text.matchAll(/(?:^|\s)([^\s=]{1,100})\s*=\s*(?:"([^"]*)"|'([^']*)')/g))
    attributes.set(name.slice(name.indexOf(':') + 1), resolve(double ?? single));
  return attributes;
}

function resolve(text: string): string {
  if (!text.includes('&')) return text;
  return text.replace(/&(?:#(\d{1,7})|#x([0-9a-f]{1,6})|(\w+));/gi, (whole, decimal, hex, name) => {
    if (name !== undefined) return ENTITIES[name] ?? whole;
    const code = decimal !== undefined ? Number(decimal) : Number.parseInt(hex, 16);
    return code > 0 && code < 0x110000 ? String.fromCodePoint(code) : whole;
  });
}

const unended = (xml: string, from: number, file: string) =>
  new ProblemError({
    code: 'broken-xml',
    where: { file, line: lineOf(xml, from), excerpt: xml.slice(from, from + 80).replace(/\s+/g, ' ') },
    found: 'a tag that does not end',
    expected: 'a whole XML document',
    doThis: 'Fetch the file again: it is cut or damaged.',
  });

function lineOf(xml: string, at: number): number {
  let line = 1;
  for (let i = xml.indexOf('\n'); i >= 0 && i < at; i = xml.indexOf('\n', i + 1)) line++;
  return line;
}
