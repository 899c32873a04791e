import { freemem } from 'node:os';
import process from 'node:process';
import { explainStudy, type PreparedStudy, type StudyExplanation } from '#engine';
import { wholeStudy } from '../study/whole-study';
import { usualWorkers } from './workers';

/** Of what is free now: the rest is for whatever else the machine is doing. */
const SHARE_OF_FREE = 0.8;
/** Of a worker by itself: Node's engine, the program's code, the basis-set library, results on their way. */
export const WORKER_BYTES = 70e6;
/** Of the program beside its workers. */
const PROGRAM_BYTES = 100e6;

/** Bytes that all points under way may take together on this machine, now. */
export function memoryBudget(): number {
  return SHARE_OF_FREE * availableMemory();
}

/** Where Node can tell (from 20.13), memory that the system could free counts, and so does a container's limit. */
function availableMemory(): number {
  const { availableMemory: available } = process as { availableMemory?: () => number };
  return available?.() ?? freemem();
}

/** What the whole program takes with so many workers. */
export function programBytes(explanation: StudyExplanation, workers: number): number {
  return PROGRAM_BYTES + workers * (WORKER_BYTES + wholeStudy(explanation).bytes);
}

export interface Workers {
  readonly count: number;
  /** why it is fewer than wanted, as a sentence for the user */
  readonly notice?: string;
}

/**
 * How many points can be under way at the same time: no more than their memory allows.
 *
 * @param wanted - default: as usual
 */
export function affordableWorkers(
  prepared: PreparedStudy,
  wanted: number = usualWorkers(),
  budget: number = memoryBudget(),
): Workers {
  const points = Math.min(wanted, prepared.coordinates.length);
  const { bytes } = wholeStudy(explainStudy(prepared));
  const count = Math.max(1, Math.min(points, Math.floor(budget / (bytes + WORKER_BYTES))));
  if (count === points) return { count: wanted };
  return {
    count,
    notice: `Computing ${count} instead of ${points} points at a time: one may take ${gigabytes(bytes)}, and ${gigabytes(budget)} of memory can be used now.`,
  };
}

function gigabytes(bytes: number): string {
  return `${(bytes / 1e9).toFixed(1)} GB`;
}
