import { Worker } from 'node:worker_threads';
import type { WorkerReply, WorkerRequest, WorkerStart } from './messages';
import { WORKER_FILE } from './program';

/** The owner's side of a worker. */
export interface WorkerConnection {
  post(request: WorkerRequest): void;
  /** replaces the listeners given before */
  listen(listeners: { onReply(reply: WorkerReply): void; onDeath(reason: string): void }): void;
  /** ends the worker at once, in the middle of whatever it computes, and without `onDeath` */
  end(): void;
}

export type StartWorker = (start: WorkerStart) => WorkerConnection;

/** Starts a worker as a thread of this process, from the built file. */
export const startWorkerThread: StartWorker = (start) => {
  const thread = new Worker(WORKER_FILE, { workerData: start });
  let reason: string | undefined;
  let onReply: (reply: WorkerReply) => void = () => undefined;
  let onDeath: (reason: string) => void = () => undefined;
  thread.on('message', (reply: WorkerReply) => onReply(reply));
  thread.on('messageerror', (error) => {
    reason = error.message;
    void thread.terminate();
  });
  // `exit` follows `error`, so that a death is told once
  thread.on('error', (error) => {
    reason = error.message;
  });
  thread.on('exit', (code) => onDeath(reason ?? `it ended with status ${code}`));
  return {
    post: (request) => thread.postMessage(request),
    listen: (listeners) => {
      ({ onReply, onDeath } = listeners);
    },
    end: () => {
      onReply = onDeath = () => undefined;
      void thread.terminate();
    },
  };
};
