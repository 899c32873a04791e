/** Pieces of a calculation that a profile tells apart. A level of the study is one too: all that is done for it alone. */
export type Stage =
  | 'integrals'
  | 'self-consistency'
  | 'stability'
  | 'scale factors'
  | 'symmetry'
  | 'transformation'
  | 'CI model space'
  | 'CI product'
  | { readonly level: string };

/** Told when a stage begins and when it ends; stages nest. The engine has no clock: the listener keeps the time. */
export type StageListener = (stage: Stage, moment: 'begins' | 'ends') => void;

/** Does `work` as a stage. Where nobody listens, this costs nothing beyond the call. */
export function inStage<T>(
  { onStage }: { readonly onStage?: StageListener | undefined },
  stage: Stage,
  work: () => T,
): T {
  if (!onStage) return work();
  onStage(stage, 'begins');
  try {
    return work();
  } finally {
    onStage(stage, 'ends');
  }
}
