import type { WorkerRequest } from '../../app/calculation/messages';
import { serve } from '../../app/calculation/serve';
import type { StartWorker } from '../../app/calculation/worker-thread';

/** A worker in this thread: the server itself, with messages cloned and delayed as a thread would. */
export const startHere: StartWorker = (start) => {
  let hasEnded = false;
  let onReply: Parameters<ReturnType<StartWorker>['listen']>[0]['onReply'] = () => undefined;
  let onRequest: (request: WorkerRequest) => void = () => undefined;
  const deliver = <T>(message: T, to: () => (message: T) => void) => {
    const copy = structuredClone(message);
    setImmediate(() => hasEnded || to()(copy));
  };
  serve(
    {
      post: (reply) => deliver(reply, () => onReply),
      onMessage: (listener) => {
        onRequest = listener;
      },
    },
    structuredClone(start),
  );
  return {
    post: (request) => deliver(request, () => onRequest),
    listen: (listeners) => {
      onReply = listeners.onReply;
    },
    end: () => {
      hasEnded = true;
    },
  };
};
