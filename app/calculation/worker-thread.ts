import { Worker } from 'node:worker_threads';
import { compileLater } from './compile-later';
import { type HelpWanted, openHelpers, type StartHelper, startHelperThread } from './helpers';
import type { WorkerReply, WorkerRequest, WorkerStart } from './messages';
import { WORKER_FILE } from './program';

/** The owner's side of a worker. */
export interface WorkerConnection {
  post(request: WorkerRequest): void;
  /** replaces the listeners given before */
  listen(listeners: { onReply(reply: WorkerReply): void; onDeath(reason: string): void }): void;
  /** how many threads may help it from now on */
  allowHelpers?(count: number): void;
  /** ends the worker at once, in the middle of whatever it computes, and without `onDeath` */
  end(): void;
}

export type StartWorker = (start: WorkerStart) => WorkerConnection;

/** Threads that have read the program, or are about to, and wait for what to compute; they keep no process alive. */
const ahead = new Set<Worker>();

/** Starts threads for workers to come, so that they read the program while this one reads the study. */
export function startThreadsAhead(count: number): void {
  while (ahead.size < count) {
    const thread = newThread();
    thread.unref();
    ahead.add(thread);
    // a worker that gets none of these starts a thread of its own, and tells what is wrong with it
    thread.on('error', () => undefined);
    thread.once('exit', () => ahead.delete(thread));
  }
}

/** Ends those of them that no worker has taken, but for so many. */
export function endThreadsAhead(left = 0): void {
  for (const thread of [...ahead].slice(left)) {
    ahead.delete(thread);
    void thread.terminate();
  }
}

function newThread(): Worker {
  compileLater();
  return new Worker(WORKER_FILE);
}

function takeThread(): Worker {
  const [thread] = ahead;
  if (!thread) return newThread();
  ahead.delete(thread);
  thread.ref();
  return thread;
}

/** Starts a worker as a thread of this process, from the built file. */
export const startWorkerThread: StartWorker = (start) => startComputing(start, startHelperThread);

/** The same, with helpers of the caller's. */
export function startComputing(start: WorkerStart, startHelper: StartHelper): WorkerConnection {
  const thread = takeThread();
  thread.postMessage(start);
  let reason: string | undefined;
  let onReply: (reply: WorkerReply) => void = () => undefined;
  let onDeath: (reason: string) => void = () => undefined;
  const end = (why: string) => {
    reason = why;
    void thread.terminate();
  };
  const helpers = openHelpers(end, startHelper);
  thread.on('message', (reply: WorkerReply | HelpWanted) => {
    if (reply.kind === 'helpWanted') helpers.wanted(reply);
    else onReply(reply);
  });
  thread.on('messageerror', (error) => end(error.message));
  // `exit` follows `error`, so that a death is told once
  thread.on('error', (error) => {
    reason = error.message;
  });
  thread.on('exit', (code) => {
    helpers.end();
    onDeath(reason ?? `it ended with status ${code}`);
  });
  return {
    post: (request) => thread.postMessage(request),
    listen: (listeners) => {
      ({ onReply, onDeath } = listeners);
    },
    allowHelpers: helpers.allow,
    end: () => {
      onReply = onDeath = () => undefined;
      void thread.terminate();
    },
  };
}
