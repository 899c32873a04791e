import { describeBasisUsed, type PreparedStudy } from '#engine';
import { PROGRAM } from './program';
import { sha256 } from './sha256';

/**
 * Names everything that a point's numbers depend on: two runs with the same key compute the same points.
 *
 * Title and notes do not count, so that they can be reworded while a study is half done.
 *
 * @returns SHA-256 in hexadecimal
 */
export function studyKey(prepared: PreparedStudy): string {
  const { title: _title, notes: _notes, ...study } = prepared.study;
  const { harmonics, shells } = describeBasisUsed(prepared);
  return sha256(canonicalJson({ study, program: PROGRAM, harmonics, shells }));
}

/** JSON with the keys of every object in alphabetical order. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
}
