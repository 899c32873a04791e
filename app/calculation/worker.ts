import { parentPort, workerData } from 'node:worker_threads';
import type { WorkerStart } from './messages';
import { giveWay } from './priority';
import { serve } from './serve';

const port = parentPort;
if (!port) throw new Error('This file runs as a worker thread only.');
giveWay();
serve(
  {
    post: (reply) => port.postMessage(reply),
    onMessage: (listener) => void port.on('message', listener),
  },
  workerData as WorkerStart,
);
