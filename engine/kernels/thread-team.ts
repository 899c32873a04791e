import { determinantProductKernels } from './determinant-product';
import { fullProductKernels } from './full-product';
import { KernelMemory } from './kernel-memory';
import { vectorAlgebraKernels } from './vector-algebra';
import type { WasmMemory } from './web-assembly';

/*
 * Tasks of one kernel shared among threads. The thread that leads takes part, and waits at the end for those that
 * others still have; helpers may come late, or not at all. Tasks of one kernel touch nothing in common, so that
 * results do not depend on who takes which.
 *
 * The host starts the helpers. It alone learns when one of them dies in the middle of a task: the leader would wait for
 * ever, so the host must end the leader too.
 */

/** Kernels whose tasks can be shared, by number; each is called with an argument, the task and the thread. */
const SHARED = [
  (memory: KernelMemory) => determinantProductKernels(memory).rowTask,
  (memory: KernelMemory) => determinantProductKernels(memory).columnTask,
  (memory: KernelMemory) => vectorAlgebraKernels(memory).dotTask,
  (memory: KernelMemory) => vectorAlgebraKernels(memory).combineTask,
  (memory: KernelMemory) => vectorAlgebraKernels(memory).rotateTask,
  (memory: KernelMemory) => fullProductKernels(memory).rowTask,
  (memory: KernelMemory) => fullProductKernels(memory).columnTask,
] as const;
export const ROW_TASKS = 0;
export const COLUMN_TASKS = 1;
export const VECTOR_DOTS = 2;
export const VECTOR_COMBINATIONS = 3;
export const VECTOR_ROTATIONS = 4;
export const FULL_ROW_TASKS = 5;
export const FULL_COLUMN_TASKS = 6;

/** Words that leader, helpers and host share. */
const ROUND = 0;
/** round and next task in one word: a helper that comes late cannot take a task for one of another round */
const NEXT = 1;
/** round and number of tasks */
const COUNT = 2;
const DONE = 3;
const KERNEL = 4;
const ARGUMENT = 5;
/** helpers that may take part, as the host says */
const ALLOWED = 6;
/** tasks that helpers have done, ever */
const HELPED = 7;
const WORDS = 8;

const TASK_BITS = 20;
const MOST_TASKS = (1 << TASK_BITS) - 1;
const ROUNDS = 1 << (32 - TASK_BITS);

/** What the host gives a thread that may have helpers. */
export interface HelperHost {
  /** helpers that there may ever be */
  readonly most: number;
  /** Starts helpers that call `helpThread`; called once, when there is enough to do. Returns at once. */
  start(memory: WasmMemory, control: SharedArrayBuffer): void;
}

let host: HelperHost | undefined;
let control: Int32Array | undefined;

/** Says that this thread may have helpers. */
export function acceptHelpers(given: HelperHost): void {
  host = given;
}

/** Threads that may take part in the tasks of one kernel: room for so many must be there. */
export function mostThreads(): number {
  return 1 + (host?.most ?? 0);
}

/** How many helpers may take part from now on. For the host, at any time. */
export function allowHelpers(shared: SharedArrayBuffer, count: number): void {
  Atomics.store(new Int32Array(shared), ALLOWED, count);
}

/** How many tasks helpers have done so far. */
export function helpedTasks(shared: SharedArrayBuffer): number {
  return Atomics.load(new Int32Array(shared), HELPED);
}

/**
 * Does all tasks of a kernel, with helpers if there are any.
 *
 * @param isLarge - whether helpers are worth starting, and waking
 */
export function runTasks(
  memory: KernelMemory,
  kernel: number,
  argument: number,
  count: number,
  isLarge: boolean,
): void {
  const run = SHARED[kernel](memory);
  if (!host || !isLarge || host.most === 0 || count > MOST_TASKS) {
    for (let task = 0; task < count; task++) run(argument, task, 0);
    return;
  }
  if (!control) {
    control = new Int32Array(new SharedArrayBuffer(4 * WORDS));
    host.start(memory.wasm, control.buffer as SharedArrayBuffer);
  }
  const round = (control[ROUND] + 1) % ROUNDS;
  control[KERNEL] = kernel;
  control[ARGUMENT] = argument;
  Atomics.store(control, DONE, 0);
  Atomics.store(control, COUNT, (round << TASK_BITS) | count);
  Atomics.store(control, NEXT, round << TASK_BITS);
  Atomics.store(control, ROUND, round);
  Atomics.notify(control, ROUND);
  takeTasks(control, memory, 0);
  for (let done = Atomics.load(control, DONE); done < count; done = Atomics.load(control, DONE)) {
    Atomics.wait(control, DONE, done);
  }
}

/** A helper's whole life: waits for tasks and takes part. Never returns. */
export function helpThread(wasm: WasmMemory, shared: SharedArrayBuffer, helper: number): never {
  const memory = new KernelMemory(wasm);
  const words = new Int32Array(shared);
  for (let round = 0; ; ) {
    if (helper < Atomics.load(words, ALLOWED)) takeTasks(words, memory, helper + 1);
    Atomics.wait(words, ROUND, round);
    round = Atomics.load(words, ROUND);
  }
}

/** Takes tasks of the present round until none is left. */
function takeTasks(words: Int32Array, memory: KernelMemory, thread: number): void {
  for (;;) {
    const taken = Atomics.add(words, NEXT, 1);
    const count = Atomics.load(words, COUNT);
    const [round, task] = [taken >>> TASK_BITS, taken & MOST_TASKS];
    if (round !== count >>> TASK_BITS || task >= (count & MOST_TASKS)) return;
    SHARED[words[KERNEL]](memory)(words[ARGUMENT], task, thread);
    if (thread > 0) Atomics.add(words, HELPED, 1);
    Atomics.add(words, DONE, 1);
    Atomics.notify(words, DONE);
  }
}
