import { expect, it } from 'vitest';
import { strokeName, strokeText } from '../../src/ui/keyStrokes.ts';

const stroke = (key: string, held: Partial<Parameters<typeof strokeName>[0]> = {}) =>
  strokeName({ key, ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...held });

it('a stroke has one name whatever the keyboard', () => {
  expect(stroke('U', { shiftKey: true })).toBe('u');
  expect(stroke('?', { shiftKey: true })).toBe('?');
  expect(stroke('z', { ctrlKey: true })).toBe('Mod+z');
  expect(stroke('Z', { metaKey: true, shiftKey: true })).toBe('Mod+Shift+z');
  expect(stroke('ArrowRight')).toBe('ArrowRight');
});

it('keys are printed as they stand on the keyboard', () => {
  expect(strokeText('Mod+Shift+z', false)).toBe('Ctrl Shift Z');
  expect(strokeText('Mod+Shift+z', true)).toBe('⌘⇧Z');
  expect(strokeText('+', false)).toBe('+');
  expect(strokeText('ArrowLeft', false)).toBe('←');
});
