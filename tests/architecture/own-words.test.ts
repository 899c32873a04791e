import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
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
/** What is installed, built, or written by a machine. */
const NOT_OURS = new Set(['.git', 'node_modules', 'out', 'packages-built', 'package-lock.json']);

it('no file of the project speaks of teaching', () => {
  const top = readdirSync('.', { withFileTypes: true }).filter(({ name }) => !NOT_OURS.has(name));
  const below = top
    .filter((entry) => entry.isDirectory())
    .flatMap(({ name }) => readdirSync(name, { recursive: true, withFileTypes: true }));
  const files = [...top, ...below]
    .filter((entry) => entry.isFile())
    .map(({ parentPath, name }) => join(parentPath, name));
  expect(files.length).toBeGreaterThan(50);
  expect(files.filter((path) => PATTERN.test(path) || PATTERN.test(readFileSync(path, 'utf8')))).toEqual([]);
});

it.each(WORDS)('the pattern finds “%s”', (word) => {
  expect(`As the ${word} says`).toMatch(PATTERN);
});
