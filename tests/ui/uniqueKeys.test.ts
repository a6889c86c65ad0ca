import { expect, it } from 'vitest';
import { uniqueKeys } from '../../src/ui/parts/uniqueKeys.ts';

it('members that say the same get keys of their own, and the others keep theirs', () => {
  const keys = uniqueKeys(['H I 6562.80', 'N II 6583.45', 'H I 6562.80'], (label) => label).map(({ key }) => key);
  expect(keys).toEqual(['H I 6562.80', 'N II 6583.45', 'H I 6562.80 (2)']);
});
