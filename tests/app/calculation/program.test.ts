import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { PROGRAM, WORKER_FILE } from '../../../app/calculation/program';

const root = join(import.meta.dirname, '..', '..', '..');

it('names the program as package.json does', () => {
  const { name, version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as Record<
    string,
    string
  >;
  expect(PROGRAM).toEqual({ name, version });
});

it('finds the worker that the build makes', () => {
  expect(WORKER_FILE).toBe(join(root, 'out', 'worker.js'));
});
