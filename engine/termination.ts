import type { StageListener } from './stages';

/** Why an iteration stopped. Only `converged` makes the numbers final. */
export type Termination =
  | { readonly kind: 'converged' }
  | { readonly kind: 'iterationLimit'; readonly limit: number }
  | { readonly kind: 'stagnated'; readonly iterationsWithoutProgress: number }
  | { readonly kind: 'notFinite'; readonly quantity: string }
  | { readonly kind: 'cancelled' };

/** The caller's hand on a long calculation. The engine has no clock and no threads of its own. */
export interface RunControl {
  /** asked between iterations; true ends the work with `cancelled` */
  isCancelled(): boolean;
  report(progress: { readonly stage: string; readonly iteration: number; readonly residual: number }): void;
  /** for a profile of where the time goes */
  readonly onStage?: StageListener;
}

/** Never cancels, reports to nobody. */
export const UNATTENDED: RunControl = { isCancelled: () => false, report: () => undefined };
