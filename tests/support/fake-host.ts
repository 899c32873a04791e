import type { PointResult, Study } from '#engine';
import type {
  EventName,
  Events,
  HostConnection,
  RequestName,
  Requests,
  StudyCheck,
} from '../../app/contract/requests';
import { parseStudy } from '../../app/study/parse-study';
import { studySentence } from '../../app/study/sentence';
import { serialiseStudy } from '../../app/study/serialise';
import { sampleResults, sampleStudy } from './sample-results';

/** A host without an engine: samples, checks of form only, and points when the test says so. */
export interface FakeHost extends HostConnection {
  /** requests so far, oldest first */
  readonly requests: readonly { readonly name: RequestName; readonly payload: unknown }[];
  emit<E extends EventName>(name: E, event: Events[E]): void;
  /** the next point of the calculation, or its end */
  emitNextPoint(): void;
}

interface FakeHostOptions {
  /** of one point, as the explanation says */
  readonly secondsPerPoint?: number;
  readonly levels?: readonly string[];
  /** changes a point before it is posted */
  readonly alter?: (point: PointResult, index: number) => PointResult;
}

export function createFakeHost({
  secondsPerPoint = 0.01,
  levels = ['RHF', 'CISD', 'FCI'],
  alter = (point) => point,
}: FakeHostOptions = {}): FakeHost {
  const listeners = new Map<EventName, Set<(event: never) => void>>();
  const requests: { name: RequestName; payload: unknown }[] = [];
  let id = 0;
  let next = 0;
  const results = sampleResults(levels);
  const points = results.points.map(alter);

  const emit: FakeHost['emit'] = (name, event) => {
    for (const listener of listeners.get(name) ?? []) listener(event as never);
  };

  const check = (text: string): StudyCheck => {
    const read = parseStudy(text);
    if (!read.ok) return read;
    return {
      ok: true,
      study: read.study,
      sentence: studySentence(read.study),
      explanation: explain(read.study, secondsPerPoint),
    };
  };

  const handlers: {
    readonly [C in RequestName]: (...args: Parameters<Requests[C]>) => ReturnType<Requests[C]>;
  } = {
    'program:describe': () => ({ version: '0.1.0', host: 'browser', workers: 2 }),
    'samples:list': () => [
      { id: 'h2', title: 'Hydrogen', sentence: studySentence(sampleStudy) },
      { id: 'water', title: 'Water', sentence: 'Pull both O–H bonds of H₂O together.' },
    ],
    'samples:open': (request) => ({
      name: `${request.id}.study.json`,
      text: serialiseStudy({ ...sampleStudy, levels }),
    }),
    'basis:list': () => [
      {
        name: 'STO-3G',
        elements: ['H', 'He', 'Li', 'O'],
        description: 'three Gaussians for each Slater function',
      },
      { name: 'STO-6G', elements: ['H', 'He'], description: 'six Gaussians for each Slater function' },
    ],
    'basis:show': () => results.basis,
    'study:check': ({ text }) => check(text),
    'calculation:start': () => {
      id += 1;
      next = 0;
      return { id, points: points.length };
    },
    'report:make': ({ part }) => ({
      files: [{ name: `h2.report.${part}`, base64: btoa(`a report as ${part}`) }],
    }),
    'calculation:cancel': () => ({ cancelled: true }),
  };

  return {
    requests,
    emit,
    emitNextPoint() {
      const point = points[next];
      if (point === undefined) {
        emit('calculation:finished', { id, outcome: { kind: 'done', results: { ...results, points } } });
        return;
      }
      emit('calculation:point', { id, index: next, point });
      next += 1;
      emit('calculation:progress', {
        id,
        done: next,
        total: points.length,
        secondsLeft: (points.length - next) * secondsPerPoint,
        stage: 'points',
      });
    },
    async request(name, ...args) {
      requests.push({ name, payload: args[0] });
      const handle = handlers[name] as (...payload: typeof args) => ReturnType<Requests[typeof name]>;
      return { ok: true, value: handle(...args) };
    },
    subscribe(name, listener) {
      const ofName = listeners.get(name) ?? new Set();
      listeners.set(name, ofName);
      ofName.add(listener);
      return () => ofName.delete(listener);
    },
  };
}

const explain = (study: Study, seconds: number) => ({
  formula: 'H₂',
  electrons: 2,
  points: study.scan === undefined ? 1 : 'count' in study.scan ? study.scan.count : study.scan.values.length,
  functions: 2,
  frozenOrbitals: 0,
  repulsionIntegrals: 6,
  pointSeconds: seconds,
  afterwardsSeconds: 0,
  levels: study.levels.map((level) => ({
    level,
    ...(level.includes('CI') && { determinants: 4 }),
    bytes: 1000,
    seconds: seconds / study.levels.length,
  })),
});
