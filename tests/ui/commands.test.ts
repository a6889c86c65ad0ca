import { describe, expect, it } from 'vitest';
import { COMMANDS, commandNamed } from '../../src/ui/commands.ts';
import { words } from '../../src/ui/words.ts';

describe('the command table', () => {
  it('no two commands share a key', () => {
    const keys = COMMANDS.flatMap((command) => command.keys);
    expect(keys.length).toBeGreaterThan(25);
    expect(keys.filter((key, k) => keys.indexOf(key) !== k)).toEqual([]);
  });

  it('no two commands share a name or a label', () => {
    const names = COMMANDS.map((command) => command.name);
    const labels = COMMANDS.map((command) => `${command.group} ${command.label}`);
    expect(new Set(names).size).toBe(names.length);
    expect(new Set(labels).size).toBe(labels.length);
  });

  it('every command has a key, a label and a group that the help prints', () => {
    for (const command of COMMANDS) {
      expect(command.keys.length).toBeGreaterThan(0);
      expect(command.label).not.toBe('');
      expect(Object.keys(words.commandGroups)).toContain(command.group);
    }
  });

  it('leaves the keys of the browser alone: no Mod key but those of undo, redo, pick all and copy', () => {
    const withMod = COMMANDS.flatMap((command) => command.keys).filter((key) => key.startsWith('Mod+'));
    expect(withMod.sort()).toEqual(['Mod+Shift+z', 'Mod+a', 'Mod+c', 'Mod+y', 'Mod+z']);
  });

  it('on an empty desk only opening and the keys can be run', () => {
    expect(COMMANDS.filter((command) => command.canRun()).map((command) => command.name)).toEqual(['show-keys', 'open']);
    expect(() => commandNamed('no such thing')).toThrow(RangeError);
  });
});
