import type { NamedColumn } from './headerNames.ts';

const PAIR = /(?:^|[{,\s])(name|unit|datatype|subtype|description)\s*:\s*('(?:[^']|'')*'|"(?:[^"\\]|\\.)*"|[^,}\n]+)/g;

/**
 * The columns an ECSV header declares (Enhanced Character-Separated Values, APE 6), in order.
 *
 * Only what is needed is taken out of the YAML, so that headers which are not quite YAML are read too.
 */
export function ecsvColumns(comments: readonly string[]): NamedColumn[] {
  const yaml = comments.map((line) => line.replace(/^\s*#\s?/, ''));
  const start = yaml.findIndex((line) => /^datatype\s*:/.test(line));
  if (start < 0) return [];
  const columns: NamedColumn[] = [];
  let item = '';
  const close = () => {
    const column = item && columnOf(item);
    if (column) columns.push(column);
    item = '';
  };
  for (const line of yaml.slice(start + 1)) {
    if (/^\s*-\s/.test(line)) {
      close();
      item = line.replace(/^\s*-\s/, '');
    } else if (/^\S/.test(line)) break;
    else item += `\n${line}`;
  }
  close();
  return columns;
}

function columnOf(item: string): NamedColumn | undefined {
  const found = new Map<string, string>();
  for (const [, key, value] of item.matchAll(PAIR)) if (!found.has(key)) found.set(key, unquote(value.trim()));
  const name = found.get('name');
  if (name === undefined) return undefined;
  const description = found.get('description');
  return { name, unit: found.get('unit') ?? '', ...(description ? { description } : {}) };
}

function unquote(value: string): string {
  if (value.startsWith("'")) return value.slice(1, -1).replaceAll("''", "'");
  if (value.startsWith('"')) return value.slice(1, -1).replace(/\\(.)/g, '$1');
  return value;
}
