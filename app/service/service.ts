import { describeBasis, listBasisSets } from '#engine';
import { PROGRAM } from '../calculation/program';
import { usualWorkers } from '../calculation/workers';
import type { EventName, Events, Handlers, ProgramDescription } from '../contract/requests';
import { createCurrentCalculation } from './current-calculation';
import { Refusal } from './refusal';
import { makeReport } from './reports';
import { listSamples, openSample } from './samples';
import { checkStudy, readStudy } from './studies';

/** Sends an event to the window, by whatever way the host has. */
export type Post = <E extends EventName>(name: E, payload: Events[E]) => void;

export interface ServiceOptions {
  readonly host: ProgramDescription['host'];
  /** threads that compute at the same time; default: as `FARWELL_WORKERS` says, else one for every core */
  readonly workers?: number;
  readonly samplesFolder: string;
  readonly post: Post;
}

export interface Service {
  readonly handlers: Handlers;
  /** ends what is being computed */
  dispose(): void;
}

/** Answers the contract's requests, the same for every host; knows no transport. */
export function createService({
  host,
  workers = usualWorkers(),
  samplesFolder,
  post,
}: ServiceOptions): Service {
  const calculation = createCurrentCalculation(workers, post);
  return {
    handlers: {
      'program:describe': () => ({ version: PROGRAM.version, host, workers }),
      'samples:list': () => listSamples(samplesFolder),
      'samples:open': ({ id }) => openSample(samplesFolder, id),
      'basis:list': () => listBasisSets(),
      'basis:show': ({ name }) => describeBasis(name),
      'study:check': ({ text }) => checkStudy(text),
      'calculation:start': ({ text }) => {
        const read = readStudy(text);
        // the window checks before it starts and shows every issue then; here the first one says enough
        if (!read.ok) throw new Refusal(read.issues[0] ?? UNREADABLE_STUDY);
        return {
          id: calculation.start(read.prepared),
          points: read.prepared.coordinates.length,
        };
      },
      'report:make': (request) => makeReport(request),
      'calculation:cancel': ({ id }) => ({ cancelled: calculation.cancel(id) }),
    },
    dispose: () => calculation.dispose(),
  };
}

const UNREADABLE_STUDY = {
  code: 'study.unreadable',
  place: '',
  message: 'The study cannot be read.',
  remedy: 'Compare it with a sample.',
};
