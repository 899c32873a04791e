import type { RunControl, Termination } from '../termination';

/** A smooth function of a few variables. */
export interface SmoothFunction {
  /** Infinity where the function does not exist */
  value(x: readonly number[]): number;
  /** first derivatives, and second derivatives along each variable, which need not be accurate */
  derivatives(x: readonly number[]): { readonly gradient: number[]; readonly curvature: number[] };
}

export interface QuasiNewtonOptions {
  /** largest element of the gradient within the bounds */
  readonly gradientTolerance: number;
  readonly maximumIterations: number;
  /** largest change of a variable in one step */
  readonly longestStep: number;
  /** rounding noise of the value, relative: a rise by less is none */
  readonly noise: number;
  /** by variable */
  readonly lowest: readonly number[];
  readonly highest: readonly number[];
  readonly control: RunControl;
  readonly stage: string;
}

export interface QuasiNewtonResult {
  readonly x: readonly number[];
  readonly value: number;
  /** largest element of the gradient within the bounds */
  readonly residual: number;
  readonly iterations: number;
  readonly termination: Termination;
}

/** A step must lower the value by this part of what the slope promises. */
const SUFFICIENT_DECREASE = 1e-4;
const SMALLEST_CURVATURE = 0.05;
/** Halvings of a step before it is given up. */
const HALVINGS = 25;

/**
 * A minimum within bounds, by the quasi-Newton method of Broyden, Fletcher, Goldfarb and Shanno with backtracking:
 * no accepted step raises the value. A variable that pushes against its bound rests there.
 *
 * Source: J. Nocedal, S. J. Wright, Numerical Optimization, 2nd ed. (2006), algorithms 3.1 and 6.1.
 */
export function minimiseQuasiNewton(
  target: SmoothFunction,
  start: readonly number[],
  options: QuasiNewtonOptions,
): QuasiNewtonResult {
  const { lowest, highest, control } = options;
  const clamp = (x: readonly number[]) => x.map((xi, i) => Math.min(Math.max(xi, lowest[i]), highest[i]));
  let x = clamp(start);
  let value = target.value(x);
  let { gradient, curvature } = target.derivatives(x);
  let inverseHessian: number[][] = [];
  let resting: string | undefined;
  for (let iteration = 1; ; iteration++) {
    const isFree = x.map((xi, i) => !(gradient[i] > 0 ? xi <= lowest[i] : xi >= highest[i]));
    const freeGradient = gradient.map((gi, i) => (isFree[i] ? gi : 0));
    if (isFree.join() !== resting) {
      // what was learnt with other variables at rest holds for them only
      resting = isFree.join();
      inverseHessian = diagonalInverse(curvature);
    }
    const residual = Math.max(0, ...freeGradient.map(Math.abs));
    const ended = (termination: Termination): QuasiNewtonResult => ({
      x,
      value,
      residual,
      iterations: iteration,
      termination,
    });
    control.report({ stage: options.stage, iteration, residual });
    if (!Number.isFinite(value + residual)) return ended({ kind: 'notFinite', quantity: 'energy' });
    if (residual <= options.gradientTolerance) return ended({ kind: 'converged' });
    if (control.isCancelled()) return ended({ kind: 'cancelled' });
    if (iteration >= options.maximumIterations) {
      return ended({ kind: 'iterationLimit', limit: options.maximumIterations });
    }
    let next = lowerPoint(target, { x, value, freeGradient, inverseHessian, isFree }, clamp, options);
    if (!next) {
      // the approximate Hessian may be at fault, the plain curvatures cannot be
      inverseHessian = diagonalInverse(curvature);
      next = lowerPoint(target, { x, value, freeGradient, inverseHessian, isFree }, clamp, options);
      if (!next) return ended({ kind: 'stagnated', iterationsWithoutProgress: 1 });
    }
    const after = target.derivatives(next.x);
    const step = next.x.map((xi, i) => xi - x[i]);
    const change = after.gradient.map((gi, i) => (isFree[i] ? gi - gradient[i] : 0));
    updateInverseHessian(inverseHessian, step, change);
    ({ x, value } = next);
    ({ gradient, curvature } = after);
  }
}

interface Place {
  readonly x: readonly number[];
  readonly value: number;
  /** zero for variables that rest at a bound */
  readonly freeGradient: readonly number[];
  readonly inverseHessian: readonly (readonly number[])[];
  readonly isFree: readonly boolean[];
}

/** Backtracks along the quasi-Newton direction; undefined where no step lowers the value. */
function lowerPoint(
  target: SmoothFunction,
  { x, value, freeGradient, inverseHessian, isFree }: Place,
  clamp: (x: readonly number[]) => number[],
  { longestStep, noise }: QuasiNewtonOptions,
): { readonly x: number[]; readonly value: number } | undefined {
  const direction = inverseHessian.map((row, i) => (isFree[i] ? -product(row, freeGradient) : 0));
  const slope = product(direction, freeGradient);
  if (!(slope < 0)) return undefined;
  let length = Math.min(1, longestStep / Math.max(...direction.map(Math.abs)));
  for (let halving = 0; halving < HALVINGS; halving++) {
    const next = clamp(x.map((xi, i) => xi + length * direction[i]));
    const nextValue = target.value(next);
    if (nextValue <= value + SUFFICIENT_DECREASE * length * slope + noise * Math.abs(value)) {
      return { x: next, value: nextValue };
    }
    length /= 2;
  }
  return undefined;
}

function diagonalInverse(curvature: readonly number[]): number[][] {
  return curvature.map((c, i) =>
    curvature.map((_, j) => (i === j ? 1 / Math.max(Math.abs(c), SMALLEST_CURVATURE) : 0)),
  );
}

/** H ← (1 − ρsyᵀ)H(1 − ρysᵀ) + ρssᵀ, ρ = 1/(s·y), where the curvature s·y along the step is positive. */
function updateInverseHessian(h: number[][], step: readonly number[], change: readonly number[]): void {
  const curvature = product(step, change);
  const scale = Math.sqrt(product(step, step) * product(change, change));
  if (!(curvature > 1e-8 * scale)) return;
  const hy = h.map((row) => product(row, change));
  const factor = (1 + product(change, hy) / curvature) / curvature;
  for (let i = 0; i < step.length; i++) {
    for (let j = 0; j < step.length; j++) {
      h[i][j] += factor * step[i] * step[j] - (hy[i] * step[j] + step[i] * hy[j]) / curvature;
    }
  }
}

function product(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, value, i) => sum + value * b[i], 0);
}
