import { MECHANISMS } from '../bundleFormat.ts';
import type { LineList } from '../lineList.ts';

/** Relatives of a line, itself among them, the strongest first, unknown strengths last. Lines of the sky have none. */
export interface Relatives {
  readonly sharingUpperLevel: (line: number) => Uint32Array;
  readonly sharingMultiplet: (line: number) => Uint32Array;
  /** Of one ion and fed by the same mechanism: a recombination line tells nothing of a collisional one of the same name. */
  readonly sharingIon: (line: number) => Uint32Array;
}

const OWN_FRAME = new Set(['sky', 'telluric', 'interstellar']);

/** Sorts a list's lines into their groups, once; each later question is one slice of an array. */
export function relativesOf(lines: LineList): Relatives {
  const byStrength = Uint32Array.from({ length: lines.count }, (_, line) => line)
    .filter((line) => !OWN_FRAME.has(lines.nature(line)))
    .sort((p, q) => (lines.logStrength[p] === lines.logStrength[q] ? p - q : lines.logStrength[q] > lines.logStrength[p] ? 1 : -1));
  const kindOf = (line: number) => 1 + lines.ion[line] * MECHANISMS.length + MECHANISMS.indexOf(lines.mechanism(line));
  return {
    sharingUpperLevel: groupsBy(byStrength, (line) => lines.upperId[line]),
    sharingMultiplet: groupsBy(byStrength, (line) => lines.multiplet[line]),
    sharingIon: groupsBy(byStrength, kindOf),
  };
}

/** Counting sort: the members of all groups in one array, with the start of each group. Group 0 means none. */
function groupsBy(ordered: Uint32Array, groupOf: (line: number) => number): (line: number) => Uint32Array {
  const most = ordered.reduce((largest, line) => Math.max(largest, groupOf(line)), 0);
  const starts = new Uint32Array(most + 2);
  for (const line of ordered) starts[groupOf(line) + 1]++;
  for (let group = 0; group <= most; group++) starts[group + 1] += starts[group];
  const next = starts.slice();
  const members = new Uint32Array(ordered.length);
  for (const line of ordered) members[next[groupOf(line)]++] = line;
  return (line) => {
    const group = groupOf(line);
    return group > 0 && group <= most ? members.subarray(starts[group], starts[group + 1]) : members.subarray(0, 0);
  };
}
