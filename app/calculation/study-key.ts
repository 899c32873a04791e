import { readFileSync } from 'node:fs';
import process from 'node:process';
import { type BasisDescription, describeBasisUsed, type PointCarry, type PreparedStudy } from '#engine';
import type { LimitRequest, WorkerRequest } from './messages';
import { PROGRAM, WORKER_FILE } from './program';
import { sha256 } from './sha256';

/**
 * Names everything that a point's numbers depend on: two runs with the same key compute the same points.
 *
 * The code that computes counts too, so that points of two builds of one version are never mixed, and so does the
 * version of Node, whose functions of real numbers may differ in their last bit. Title and notes do not, so that
 * they can be reworded while a study is half done.
 *
 * @returns SHA-256 in hexadecimal
 */
export function studyKey(prepared: PreparedStudy): string {
  const { title: _title, notes: _notes, ...study } = prepared.study;
  return sha256(canonicalJson({ study, ...basisUsed(prepared), computedBy: computedBy() }));
}

/**
 * Names everything that what a worker answers depends on, whichever study asks for it: of the scan only the
 * geometry counts, and what a point starts from.
 */
export function requestKeys(prepared: PreparedStudy): (request: CacheableRequest) => string {
  const { title: _title, notes: _notes, scan, findings = {}, ...study } = prepared.study;
  // whether a basis is the study's own or a further one makes no difference
  const { bases: _bases, ...asked } = findings;
  const common = canonicalJson({ study, asked, ...basisUsed(prepared), computedBy: computedBy() });
  return (request) => {
    const geometry =
      'level' in request
        ? { scan }
        : { scanned: scan?.coordinate, atoms: prepared.geometryAt(request.coordinate) };
    // what the program made itself always has its keys in the same order
    return sha256(common + JSON.stringify({ geometry, request }, (_, part: unknown) => numbersAsHash(part)));
  };
}

/** One point, or what a whole request of another kind asks for. */
export type CacheableRequest =
  | { readonly kind: 'point'; readonly coordinate: number | null; readonly guess: PointCarry | undefined }
  | (Omit<Extract<WorkerRequest, { kind: 'follow' }>, 'index' | 'basis'> & {
      readonly coordinate: number | null;
    })
  | Omit<Extract<WorkerRequest, { kind: 'minimum' }>, 'basis'>
  | (LimitRequest & { readonly bases: readonly BasisDescription[] });

function numbersAsHash(part: unknown): unknown {
  if (!(part instanceof Float64Array)) return part;
  return sha256(new Uint8Array(part.buffer, part.byteOffset, part.byteLength));
}

function basisUsed(prepared: PreparedStudy) {
  const { harmonics, shells } = describeBasisUsed(prepared);
  return { harmonics, shells };
}

let code: string | undefined;

/** Of the built code that computes. */
export function codeKey(): string {
  code ??= sha256(readFileSync(WORKER_FILE));
  return code;
}

function computedBy() {
  return { ...PROGRAM, code: codeKey(), node: process.version };
}

/** JSON with the keys of every object in alphabetical order. */
export function canonicalJson(value: unknown): string {
  return JSON.stringify(value, (_, part: unknown) =>
    typeof part === 'object' && part !== null && !Array.isArray(part)
      ? Object.fromEntries(Object.entries(part).sort(([a], [b]) => (a < b ? -1 : 1)))
      : part,
  );
}
