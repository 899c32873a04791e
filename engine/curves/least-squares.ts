import { Matrix, solve } from 'ml-matrix';
import type { Termination } from '../termination';

/** Values of a model and their derivatives at one set of parameters. */
export interface ModelValues {
  /** model minus data, m values */
  readonly residuals: readonly number[];
  /** m rows of derivatives of the residuals by each of the n parameters */
  readonly derivatives: readonly (readonly number[])[];
}

export interface LeastSquaresFit {
  readonly parameters: readonly number[];
  readonly residuals: readonly number[];
  readonly iterations: number;
  readonly termination: Termination;
}

const MOST_ITERATIONS = 500;
/** Done when a step changes each parameter by less than this fraction of its scale. */
const STEP_TOLERANCE = 1e-11;
const FIRST_DAMPING = 1e-3;
/** Up to here the step is close to the full one. */
const LIGHT_DAMPING = 1;
/** Damping by which every step is tiny and downhill; if even that does not help, rounding has been reached. */
const LARGEST_DAMPING = 1e12;

/**
 * Least squares by damped Gauss–Newton steps. Each step solves the damped linear problem by orthogonal transformation
 * of the stacked matrix, not by normal equations, which would square its condition.
 *
 * Source: D. W. Marquardt, J. Soc. Ind. Appl. Math. 11, 431 (1963).
 *
 * @param evaluate - residuals and derivatives; may return values that are not finite, such steps are refused
 * @param start - n parameters, with finite residuals, at most as many as residuals
 * @returns the parameters with the smallest sum found; `stagnated` where no step makes it smaller any more
 */
export function fitLeastSquares(
  evaluate: (parameters: readonly number[]) => ModelValues,
  start: readonly number[],
): LeastSquaresFit {
  let parameters = start;
  let values = evaluate(parameters);
  let sum = sumOfSquares(values.residuals);
  let damping = FIRST_DAMPING;
  const finish = (termination: Termination, iterations: number): LeastSquaresFit => ({
    parameters,
    residuals: values.residuals,
    iterations,
    termination,
  });
  if (!Number.isFinite(sum)) return finish({ kind: 'notFinite', quantity: 'residuals at the start' }, 0);
  for (let iteration = 1; iteration <= MOST_ITERATIONS; iteration++) {
    const { step, scaledLength } = dampedStep(values, damping);
    const trial = parameters.map((value, k) => value + step[k]);
    const isTiny =
      scaledLength <= STEP_TOLERANCE * Math.sqrt(sum) ||
      step.every((change, k) => Math.abs(change) <= STEP_TOLERANCE * Math.abs(trial[k]));
    const trialValues = evaluate(trial);
    const trialSum = sumOfSquares(trialValues.residuals);
    const isBetter = trialSum < sum;
    if (isBetter) [parameters, values, sum] = [trial, trialValues, trialSum];
    // a step made short by damping says nothing about the minimum
    if (isTiny && damping <= LIGHT_DAMPING) return finish({ kind: 'converged' }, iteration);
    damping *= isBetter ? 0.1 : 10;
    if (damping > LARGEST_DAMPING)
      return finish({ kind: 'stagnated', iterationsWithoutProgress: 1 }, iteration);
  }
  return finish({ kind: 'iterationLimit', limit: MOST_ITERATIONS }, MOST_ITERATIONS);
}

function sumOfSquares(residuals: readonly number[]): number {
  return residuals.reduce((sum, r) => sum + r * r, 0);
}

/** Parameters are measured in units in which each column of derivatives has length one. */
function dampedStep(
  { residuals, derivatives }: ModelValues,
  damping: number,
): { step: number[]; scaledLength: number } {
  const [m, n] = [residuals.length, derivatives[0].length];
  const scale = Array.from({ length: n }, (_, k) => Math.hypot(...derivatives.map((row) => row[k])) || 1);
  const stacked = new Matrix(m + n, n);
  derivatives.forEach((row, i) => {
    row.forEach((value, k) => {
      stacked.set(i, k, value / scale[k]);
    });
  });
  for (let k = 0; k < n; k++) stacked.set(m + k, k, Math.sqrt(damping));
  const right = Matrix.columnVector([...residuals.map((r) => -r), ...new Array<number>(n).fill(0)]);
  const scaled = solve(stacked, right).to1DArray();
  return { step: scaled.map((value, k) => value / scale[k]), scaledLength: Math.hypot(...scaled) };
}
