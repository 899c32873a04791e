import type {
  BasisDescription,
  BasisSetEntry,
  PointResult,
  SerializedEngineError,
  Study,
  StudyExplanation,
  StudyResults,
} from '#engine';

/** An error as it crosses from the host to the window. */
export interface SerializedError {
  readonly code: string;
  readonly place: string;
  readonly message: string;
  readonly remedy: string;
}

export type Reply<T> =
  | { readonly ok: true; readonly value: T }
  | { readonly ok: false; readonly error: SerializedError };

/** One thing wrong with a study, with its place as a path (`scan.count`, `molecule.atoms[1].element`, or a line of the text). */
export interface StudyIssue {
  readonly code: string;
  readonly place: string;
  readonly message: string;
  readonly remedy: string;
}

export type StudyCheck =
  | {
      readonly ok: true;
      readonly study: Study;
      readonly sentence: string;
      readonly explanation: StudyExplanation;
    }
  | { readonly ok: false; readonly issues: readonly StudyIssue[] };

export interface SampleSummary {
  /** file name without its endings */
  readonly id: string;
  readonly title: string;
  readonly sentence: string;
}

export type BasisSummary = BasisSetEntry;

export interface ProgramDescription {
  readonly version: string;
  readonly host: 'desktop' | 'browser';
  readonly workers: number;
}

/** What a report can be saved as. */
export type ReportPart =
  | 'html'
  | 'pdf'
  | 'markdown'
  | 'latex'
  | 'figureSvg'
  | 'figurePdf'
  | 'figurePng'
  | 'pointsCsv'
  | 'pointsJson'
  /** one file a table */
  | 'tableCsv';

export interface ReportOptions {
  /** of the figure files, from 40 to 500; default in the window: 85 */
  readonly widthMillimetres?: number | undefined;
  /** default: what suits the width */
  readonly heightMillimetres?: number | undefined;
  /** whether the study sentence stands in the picture of the figure files; default true */
  readonly hasCaption?: boolean | undefined;
}

export interface MadeFile {
  /** as on the command line, relative to the folder chosen */
  readonly name: string;
  readonly base64: string;
}

/** Everything that the window can ask of its host: one signature a request, for every host. */
export interface Requests {
  'program:describe': () => ProgramDescription;
  'samples:list': () => readonly SampleSummary[];
  /** text of the sample's study file */
  'samples:open': (request: { readonly id: string }) => { readonly name: string; readonly text: string };
  'basis:list': () => readonly BasisSummary[];
  'basis:show': (request: { readonly name: string }) => BasisDescription;
  'study:check': (request: { readonly text: string }) => StudyCheck;
  /** starts computing; points arrive as events with the returned id */
  'calculation:start': (request: { readonly text: string }) => {
    readonly id: number;
    readonly points: number;
  };
  /** the files of one part of the report of some results */
  'report:make': (request: {
    /** texts of results files, each with its name without endings; several are compared */
    readonly results: readonly { readonly name: string; readonly text: string }[];
    readonly part: ReportPart;
    readonly options?: ReportOptions | undefined;
  }) => { readonly files: readonly MadeFile[] };
  'calculation:cancel': (request: { readonly id: number }) => { readonly cancelled: boolean };
}

/** Everything that the host tells the window unasked. */
export interface Events {
  'calculation:point': { readonly id: number; readonly index: number; readonly point: PointResult };
  'calculation:progress': {
    readonly id: number;
    readonly done: number;
    readonly total: number;
    /** absent until it can be estimated */
    readonly secondsLeft?: number;
    /** what is being done now, e.g. "points", "minima" */
    readonly stage: string;
    /** of a study in several bases, which one this is of */
    readonly basis?: { readonly name: string; readonly number: number; readonly of: number };
  };
  'calculation:finished': {
    readonly id: number;
    readonly outcome:
      | { readonly kind: 'done'; readonly results: StudyResults }
      | { readonly kind: 'cancelled' }
      | { readonly kind: 'failed'; readonly error: SerializedError };
  };
}

export type RequestName = keyof Requests;
export type EventName = keyof Events;

/** What a host implements. */
export type Handlers = {
  readonly [C in RequestName]: (
    ...args: Parameters<Requests[C]>
  ) => ReturnType<Requests[C]> | Promise<ReturnType<Requests[C]>>;
};

/** What the window holds: the same requests, with replies that carry errors as data. */
export interface HostConnection {
  request<C extends RequestName>(
    name: C,
    ...args: Parameters<Requests[C]>
  ): Promise<Reply<ReturnType<Requests[C]>>>;
  /** returns the function that ends the subscription */
  subscribe<E extends EventName>(name: E, listener: (event: Events[E]) => void): () => void;
}

export type { SerializedEngineError };
