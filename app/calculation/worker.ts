import { parentPort } from 'node:worker_threads';
import { acceptHelpers } from '#engine';
import type { HelpWanted } from './helpers';
import type { WorkerStart } from './messages';
import { giveWay } from './priority';
import { serve } from './serve';

const port = parentPort;
if (!port) throw new Error('This file runs as a worker thread only.');
giveWay();
// what it is to serve comes first, and requests after it
port.once('message', (start: WorkerStart) => {
  acceptHelpers({
    most: start.helpers ?? 0,
    start: (memory, control) =>
      port.postMessage({ kind: 'helpWanted', memory, control } satisfies HelpWanted),
  });
  serve(
    {
      post: (reply) => port.postMessage(reply),
      onMessage: (listener) => void port.on('message', listener),
    },
    start,
  );
});
