import * as engine from '#engine';
import { failureOf } from './failure';
import type { Finding, LimitRequest, WorkerReply, WorkerRequest, WorkerStart } from './messages';
import { openCache } from './result-cache';
import { startStageClock } from './stage-clock';
import { type CacheableRequest, requestKeys } from './study-key';

/** A worker's side of its connection, whatever carries the messages. */
export interface ServerPort {
  post(reply: WorkerReply): void;
  onMessage(listener: (request: WorkerRequest) => void): void;
}

/** Computes what is asked for, one request after the other, with the study that the worker was started for. */
export function serve(port: ServerPort, start: WorkerStart): void {
  const preparation = engine.prepareStudy(start.study, start);
  const bases = preparation.ok ? basesOf(preparation.prepared, start) : [];
  port.onMessage((request) => {
    try {
      if (!preparation.ok) throw refusal(preparation.errors);
      for (const finding of findings(request, bases)) port.post(finding);
      port.post({ kind: 'free' });
    } catch (error) {
      port.post({ kind: 'failed', error: failureOf(error) });
    }
  });
}

function refusal([error]: readonly engine.EngineError[]): Error {
  return error ?? new Error('The study was refused without a reason.');
}

/** A study in one of its bases, and the way to answer for it. */
interface Basis {
  readonly prepared: engine.PreparedStudy;
  readonly answer: ReturnType<typeof prepareAnswers>;
}

function basesOf(prepared: engine.PreparedStudy, start: WorkerStart): readonly Basis[] {
  return [prepared, ...prepared.furtherBases].map((inBasis) => ({
    prepared: inBasis,
    answer: prepareAnswers(inBasis, start),
  }));
}

/** One after the other, each as soon as it is there. */
function* findings(request: WorkerRequest, bases: readonly Basis[]): Generator<Finding> {
  if (request.kind === 'limit') {
    yield* limits(request, bases);
    return;
  }
  const basis = bases[request.basis];
  if (!basis) throw new RangeError(`The study has no basis ${request.basis}.`);
  const { prepared, answer } = basis;
  if (request.kind === 'minimum') {
    const { kind, level, points, left } = request;
    const found = answer({ kind, level, points, left }, (control) => ({
      findings: engine.findLevelMinimum(prepared, level, points, left, control),
    }));
    yield { kind: 'minimum', level, ...found };
    return;
  }
  if (request.kind === 'follow') {
    const { index, own, neighbours, kind } = request;
    const coordinate = coordinateOf(prepared, index);
    const found = answer({ kind, coordinate, own, neighbours }, (control) => ({
      followed: engine.followNeighbours(prepared, coordinate, own, neighbours, control),
    }));
    yield { kind: 'followed', index, ...found };
    return;
  }
  let { guess } = request;
  for (const index of request.indices) {
    const coordinate = coordinateOf(prepared, index);
    const from = guess;
    const found = answer({ kind: 'point', coordinate, guess }, (control) =>
      engine.computePoint(prepared, coordinate, { guess: from, control }),
    );
    guess = found.carry;
    yield { kind: 'point', index, ...found };
  }
}

function* limits({ kind, level, curves }: LimitRequest, [own]: readonly Basis[]): Generator<Finding> {
  if (!own) throw new RangeError('A study has a basis of its own.');
  const { prepared, answer } = own;
  const bases = prepared.furtherBases.map(engine.describeBasisUsed);
  const found = answer({ kind, level, curves, bases }, (control) => ({
    limit: engine.basisSetLimitOfCurves(prepared, level, curves, control),
  }));
  yield { kind: 'limit', level, ...found };
}

/** What takes less is computed faster than it is found on a disk. */
const WORTH_KEEPING_SECONDS = 0.002;

/** Answers from the cache where it can, and says how long the answer took. */
function prepareAnswers(prepared: engine.PreparedStudy, { cache: settings, isTimed }: WorkerStart) {
  const cache = settings && { ...openCache(settings), keyOf: requestKeys(prepared) };
  const clock = isTimed ? startStageClock() : undefined;
  const control = { ...engine.UNATTENDED, ...(clock && { onStage: clock.listener }) };

  return <T extends object>(request: CacheableRequest, compute: (control: engine.RunControl) => T) => {
    const began = performance.now();
    const seconds = () => (performance.now() - began) / 1000;
    const key = cache?.keyOf(request) ?? '';
    const kept = cache?.find(key) as T | undefined;
    const level = 'level' in request && { level: request.level };
    if (level) clock?.listener(level, 'begins');
    const found = kept ?? compute(control);
    if (level) clock?.listener(level, 'ends');
    if (!kept && seconds() >= WORTH_KEEPING_SECONDS) cache?.keep(key, found);
    const stages = clock?.take();
    return { ...found, seconds: seconds(), ...(kept && { isKept: true }), ...(stages && { stages }) };
  };
}

function coordinateOf(prepared: engine.PreparedStudy, index: number): number | null {
  const coordinate = prepared.coordinates[index];
  if (coordinate === undefined) throw new RangeError(`The study has no point ${index}.`);
  return coordinate;
}
