import { expect, test } from 'vitest';
import { nearestWord, ProblemError, wordProblem } from '../../src/problems/index.ts';

test('a problem is one line: place, found, expected, excerpt, what to do', () => {
  const problem = {
    code: 'bad-number',
    where: { file: 'a.csv', line: 12, column: 'flux', excerpt: '5000, abc' },
    found: '"abc" is no number',
    expected: 'a number',
    doThis: 'Mend the line.',
  };
  expect(wordProblem(problem)).toBe('a.csv, line 12, column flux: "abc" is no number; expected a number [5000, abc]. Mend the line.');
  expect(new ProblemError(problem).message).toBe(wordProblem(problem));
});

test('the nearest word is offered only when it is near', () => {
  expect(nearestWord('lamda', ['flux', 'lambda'])).toBe('lambda');
  expect(nearestWord('LAMBDA', ['flux', 'lambda'])).toBe('lambda');
  expect(nearestWord('temperature', ['flux', 'lambda'])).toBeUndefined();
});
