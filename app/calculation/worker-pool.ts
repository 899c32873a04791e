import type { SerializedError } from '../contract/requests';
import type { Finding, WorkerRequest } from './messages';
import type { WorkerConnection } from './worker-thread';

/** A piece of a calculation that one worker does, and another can take over where it was left. */
export interface Task {
  /** what is still to be done */
  request(): WorkerRequest;
  accept(finding: Finding): void;
  /** names what is being computed now, to follow “while computing” */
  current(): string;
}

export interface WorkerPool {
  /** resolves when all tasks are done; rejects with the first failure, or with PoolClosed */
  perform(tasks: readonly Task[]): Promise<void>;
  /** ends every worker at once, whatever it is doing */
  close(): void;
}

/** Why tasks were left undone: somebody closed the pool. */
export class PoolClosed extends Error {}

/** A calculation that cannot go on: a refusal met on the way, or a worker that died. */
export class CalculationFailure extends Error {
  override readonly name = 'CalculationFailure';
  readonly error: SerializedError;

  constructor(error: SerializedError) {
    super(error.message);
    this.error = error;
  }
}

/**
 * Workers that share out tasks: the next free worker takes the next task in order.
 *
 * A worker that dies (out of memory, say) is replaced, and a fresh one takes the task over. If that one dies at the
 * same place too, the calculation fails, because a third try would most likely end the same way.
 *
 * @param size - most workers at a time; they are started when first needed
 * @param onFinding - sees every finding before its task does
 */
export function openPool(
  size: number,
  start: () => WorkerConnection,
  onFinding: (finding: Finding) => void = () => undefined,
): WorkerPool {
  const workers = new Set<WorkerConnection>();
  const idle: WorkerConnection[] = [];
  const busy = new Set<WorkerConnection>();
  let rejectAsClosed: () => void = () => undefined;
  const closed = new Promise<never>((_, reject) => {
    rejectAsClosed = () => reject(new PoolClosed());
  });
  closed.catch(() => undefined); // nobody may be waiting for it

  /** What no worker uses may help those that compute. */
  function shareOut(): void {
    for (const worker of busy) worker.allowHelpers?.(Math.floor((size - busy.size) / busy.size));
  }

  /** Resolves with the reason if the worker died, else with undefined when it is free again. */
  function converse(worker: WorkerConnection, task: Task): Promise<string | undefined> {
    return new Promise((resolve, reject) => {
      worker.listen({
        onReply: (reply) => {
          if (reply.kind === 'failed') return reject(new CalculationFailure(failedAt(task, reply.error)));
          if (reply.kind === 'free') {
            idle.push(worker);
            return resolve(undefined);
          }
          try {
            onFinding(reply);
            task.accept(reply);
          } catch (error) {
            reject(error);
          }
        },
        onDeath: (reason) => {
          workers.delete(worker);
          if (idle.includes(worker)) idle.splice(idle.indexOf(worker), 1);
          resolve(reason);
        },
      });
      worker.post(task.request());
    });
  }

  async function carryOut(task: Task): Promise<void> {
    let lastDeathAt: string | undefined;
    for (;;) {
      const worker = idle.pop() ?? start();
      workers.add(worker);
      busy.add(worker);
      shareOut();
      const reason = await converse(worker, task);
      busy.delete(worker);
      shareOut();
      if (reason === undefined) return;
      const place = task.current();
      if (place === lastDeathAt) throw new CalculationFailure(workerDied(place, reason));
      lastDeathAt = place;
    }
  }

  return {
    async perform(tasks) {
      const queue = [...tasks];
      const work = async () => {
        for (let task = queue.shift(); task; task = queue.shift()) await carryOut(task);
      };
      const lanes = Array.from({ length: Math.min(size, tasks.length) }, work);
      await Promise.race([Promise.all(lanes), closed]);
    },
    close() {
      rejectAsClosed();
      for (const worker of workers) worker.end();
      workers.clear();
    },
  };
}

function failedAt(task: Task, error: SerializedError): SerializedError {
  return { ...error, message: `${error.message} This happened while computing ${task.current()}.` };
}

function workerDied(place: string, reason: string): SerializedError {
  return {
    code: 'calculation.workerDied',
    place: '',
    message: `The computing thread ended twice while computing ${place}: ${reason}.`,
    remedy:
      'If memory ran out, use fewer workers, a smaller basis set or a smaller CI level; else report it with the study.',
  };
}
