import type { PointResult, StudyResults } from '#engine';
import type { Events, SerializedError, StudyCheck } from '../../contract/requests';
import type { StudyDraft } from './draft';
import type { Catalogue, Notice, Run, View, WindowState } from './window-state';

export type Action =
  | { readonly kind: 'draft/replaced'; readonly draft: StudyDraft }
  | { readonly kind: 'draft/edited'; readonly change: (draft: StudyDraft) => StudyDraft }
  | { readonly kind: 'check/received'; readonly result: StudyCheck }
  | { readonly kind: 'run/started'; readonly run: Pick<Run, 'study' | 'sentence' | 'text' | 'total'> }
  | {
      readonly kind: 'run/advanced';
      readonly points: readonly { readonly index: number; readonly point: PointResult }[];
      readonly progress: Events['calculation:progress'] | undefined;
    }
  | { readonly kind: 'run/finished'; readonly outcome: Events['calculation:finished']['outcome'] }
  | { readonly kind: 'run/refused'; readonly error: SerializedError }
  | {
      readonly kind: 'results/opened';
      readonly results: StudyResults;
      readonly sentence: string;
      readonly text: string;
    }
  | { readonly kind: 'view/changed'; readonly change: Partial<View> }
  | { readonly kind: 'catalogue/received'; readonly catalogue: Partial<Catalogue> }
  | { readonly kind: 'notice/shown'; readonly notice: Notice }
  | { readonly kind: 'notice/dismissed' };

/** The window's next state. Pure: what happens outside is the controller's. */
export function reduce(state: WindowState, action: Action): WindowState {
  switch (action.kind) {
    case 'draft/replaced':
      return { ...state, draft: action.draft, check: { kind: 'pending' } };
    case 'draft/edited': {
      const last = state.check.kind === 'judged' ? state.check.result : state.check.last;
      return {
        ...state,
        draft: action.change(state.draft),
        check: { kind: 'pending', ...(last !== undefined && { last }) },
      };
    }
    case 'check/received':
      return { ...state, check: { kind: 'judged', result: action.result } };
    case 'run/started':
      return { ...withRun(state, started(action.run)), view: { ...state.view, cursor: undefined } };
    case 'run/advanced':
      return updateRun(state, (run) => ({
        ...run,
        points: withPoints(run.points, action.points),
        progress: action.progress ?? run.progress,
      }));
    case 'run/finished':
      return updateRun(state, (run) => finished(run, action.outcome));
    case 'run/refused':
      return updateRun(state, (run) => ({ ...run, status: 'failed', error: action.error }));
    case 'results/opened':
      return { ...withRun(state, opened(action)), view: { ...state.view, cursor: undefined } };
    case 'view/changed':
      return { ...state, view: { ...state.view, ...action.change } };
    case 'catalogue/received':
      return { ...state, catalogue: { ...state.catalogue, ...action.catalogue } };
    case 'notice/shown':
      return { ...state, notice: action.notice };
    case 'notice/dismissed':
      return { ...state, notice: undefined };
  }
}

const withRun = (state: WindowState, run: Run): WindowState => ({ ...state, run });

const updateRun = (state: WindowState, change: (run: Run) => Run): WindowState =>
  state.run === undefined ? state : { ...state, run: change(state.run) };

const started = (run: Pick<Run, 'study' | 'sentence' | 'text' | 'total'>): Run => ({
  ...run,
  status: 'computing',
  points: Array.from({ length: run.total }, () => undefined),
  progress: undefined,
  results: undefined,
  error: undefined,
});

const opened = ({
  results,
  sentence,
  text,
}: {
  readonly results: StudyResults;
  readonly sentence: string;
  readonly text: string;
}): Run => ({
  status: 'opened',
  study: results.study,
  sentence,
  text,
  points: results.points,
  total: results.points.length,
  progress: undefined,
  results,
  error: undefined,
});

function withPoints(
  points: Run['points'],
  arrived: readonly { readonly index: number; readonly point: PointResult }[],
): Run['points'] {
  const next = [...points];
  for (const { index, point } of arrived) next[index] = point;
  return next;
}

function finished(run: Run, outcome: Events['calculation:finished']['outcome']): Run {
  switch (outcome.kind) {
    case 'done':
      return { ...run, status: 'done', results: outcome.results, points: outcome.results.points };
    case 'cancelled':
      return { ...run, status: 'cancelled' };
    case 'failed':
      return { ...run, status: 'failed', error: outcome.error };
  }
}
