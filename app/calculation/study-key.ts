import { readFileSync } from 'node:fs';
import { describeBasisUsed, type PreparedStudy } from '#engine';
import { PROGRAM, WORKER_FILE } from './program';
import { sha256 } from './sha256';

/**
 * Names everything that a point's numbers depend on: two runs with the same key compute the same points.
 *
 * The code that computes counts too, so that points of two builds of one version are never mixed. Title and notes
 * do not, so that they can be reworded while a study is half done.
 *
 * @returns SHA-256 in hexadecimal
 */
export function studyKey(prepared: PreparedStudy): string {
  const { title: _title, notes: _notes, ...study } = prepared.study;
  const { harmonics, shells } = describeBasisUsed(prepared);
  const code = sha256(readFileSync(WORKER_FILE));
  return sha256(canonicalJson({ study, program: PROGRAM, code, harmonics, shells }));
}

/** JSON with the keys of every object in alphabetical order. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
}
