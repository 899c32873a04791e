import * as engine from '#engine';
import type { SerializedError } from '../contract/requests';
import type { WorkerReply, WorkerRequest, WorkerStart } from './messages';

/** A worker's side of its connection, whatever carries the messages. */
export interface ServerPort {
  post(reply: WorkerReply): void;
  onMessage(listener: (request: WorkerRequest) => void): void;
}

/** Computes what is asked for, one request after the other, with the study that the worker was started for. */
export function serve(port: ServerPort, { study, basisFileText }: WorkerStart): void {
  const preparation = engine.prepareStudy(study, basisFileText === undefined ? {} : { basisFileText });
  port.onMessage((request) => {
    try {
      if (!preparation.ok)
        throw preparation.errors[0] ?? new Error('The study was refused without a reason.');
      compute(preparation.prepared, request, port);
      port.post({ kind: 'free' });
    } catch (error) {
      port.post({ kind: 'failed', error: asData(error) });
    }
  });
}

function compute(prepared: engine.PreparedStudy, request: WorkerRequest, port: ServerPort): void {
  let last = performance.now();
  const secondsSinceLast = () => {
    const before = last;
    last = performance.now();
    return (last - before) / 1000;
  };
  if (request.kind === 'minimum') {
    const { level, points, left } = request;
    const findings = engine.findLevelMinimum(prepared, level, points, left);
    port.post({ kind: 'minimum', level, findings, seconds: secondsSinceLast() });
    return;
  }
  if (request.kind === 'follow') {
    const { index, own, neighbours } = request;
    const followed = engine.followNeighbours(prepared, coordinateOf(prepared, index), own, neighbours);
    port.post({ kind: 'followed', index, followed, seconds: secondsSinceLast() });
    return;
  }
  let { guess } = request;
  for (const index of request.indices) {
    const coordinate = coordinateOf(prepared, index);
    const { result, carry } = engine.computePoint(prepared, coordinate, { guess });
    guess = carry;
    port.post({ kind: 'point', index, result, carry, seconds: secondsSinceLast() });
  }
}

function coordinateOf(prepared: engine.PreparedStudy, index: number): number | null {
  const coordinate = prepared.coordinates[index];
  if (coordinate === undefined) throw new RangeError(`The study has no point ${index}.`);
  return coordinate;
}

function asData(error: unknown): SerializedError {
  if (error instanceof engine.EngineError) {
    const { code, place, message, remedy } = error;
    return { code, place, message, remedy };
  }
  return {
    code: 'internal',
    place: '',
    message: `Something failed inside the program: ${error instanceof Error ? error.message : String(error)}`,
    remedy: 'Please report this together with the study.',
  };
}
