import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';

// spelt in parts, so that this file does not contain what it looks for
const WORDS = [
  'lect' + 'ure',
  'tran' + 'script',
  'course' + 'work',
  'prof' + 'essor',
  'home' + 'work',
  'problem' + ' set',
];
const PATTERN = new RegExp(`\\b(?:${WORDS.join('|')})s?\\b`, 'i');
/** Text of other people, or of machines. */
const NOT_OURS = /^(?:package-lock\.json|LICENSE)$|\.(?:png|woff2?|ttf|wasm)$/;

it('no file of the project speaks of teaching', () => {
  const files = execFileSync('git', ['ls-files'], { encoding: 'utf8' })
    .split('\n')
    .filter((name) => name !== '');
  const ours = files.filter((name) => !NOT_OURS.test(name));
  expect(ours.length).toBeGreaterThan(50);
  expect(ours.filter((name) => PATTERN.test(name) || PATTERN.test(readFileSync(name, 'utf8')))).toEqual([]);
});

it.each(WORDS)('the pattern finds “%s”', (word) => {
  expect(`As the ${word} says`).toMatch(PATTERN);
});
