import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { Termination } from '../termination';
import { FIT_START } from './slater-fit-start';
import { bestOverlap, type SlaterFunction } from './slater-overlap';
import { preciseOverlap } from './slater-overlap-precise';

/** Slater functions that are fitted together: 1s alone; 2s with 2p, 3s with 3p on shared exponents. */
export type SlaterShell = '1s' | '2sp' | '3sp';

/** Gaussians that stand for a Slater function of exponent 1. */
export interface SlaterFit {
  /** falling (unless the fit did not converge), bohr⁻² */
  readonly exponents: readonly number[];
  /** by angular momentum (s, then p if the shell has it); multiply normalised primitives, the sum is normalised */
  readonly coefficients: readonly (readonly number[])[];
  /** Σ over the functions of ∫(Slater − fit)² dr³ */
  readonly squaredError: number;
  readonly iterations: number;
  readonly termination: Termination;
}

const ITERATION_LIMIT = 200;
/** Newton's error falls quadratically: after a step of this size in ln α what remains is below rounding. */
const LAST_STEP = 1e-7;
/** No step moves an exponent by more than a factor e. */
const LONGEST_STEP = 1;
/** Keeps steps finite where the sum is flat; at the minima the curvatures in ln α are 1e-6 and more. */
const SMALLEST_CURVATURE = 1e-10;

/** Rounding of the sum of overlaps: the gain of the last steps is below it. */
const ROUNDING = 4e-15;

const FUNCTIONS: Readonly<Record<SlaterShell, readonly SlaterFunction[]>> = {
  '1s': [{ principal: 1, angularMomentum: 0 }],
  '2sp': [
    { principal: 2, angularMomentum: 0 },
    { principal: 2, angularMomentum: 1 },
  ],
  '3sp': [
    { principal: 3, angularMomentum: 0 },
    { principal: 3, angularMomentum: 1 },
  ],
};

/**
 * Least-squares fit of n Gaussians to the Slater functions of a shell, exponent 1.
 *
 * At fixed norm ∫(φ − φ')² = 2 − 2⟨φ|φ'⟩, so what is maximised over the shared exponents is the sum of the
 * overlaps, with the best coefficients for each set of exponents (`bestOverlap`): by Newton's method in ln α with
 * exact second derivatives, shortened where a step does not climb; a last step with the slope in higher precision
 * (`preciseOverlap`) brings the digits that doubles cannot give.
 *
 * @param gaussians - n, from 1 to 6
 * @param start - first exponents, bohr⁻², all different; default: close to the best of all minima
 *
 * Source: W. J. Hehre, R. F. Stewart, J. A. Pople, J. Chem. Phys. 51, 2657 (1969); 3s, 3p: W. J. Hehre,
 * R. Ditchfield, R. F. Stewart, J. A. Pople, J. Chem. Phys. 52, 2769 (1970).
 * Accuracy: 1e-15 relative in exponents, 1e-15 absolute in coefficients, checked in slater-fit.test.ts.
 */
export function fitSlaterShell(
  shell: SlaterShell,
  gaussians: number,
  start: readonly number[] = FIT_START[shell][gaussians - 1],
): SlaterFit {
  let logarithms = start.map(Math.log);
  let current = totalOverlap(shell, logarithms);
  if (current === undefined) throw new RangeError('starting exponents of a fit must differ');
  let fraction = 1;
  let termination: Termination = { kind: 'iterationLimit', limit: ITERATION_LIMIT };
  let iterations = 0;
  while (termination.kind === 'iterationLimit' && iterations < ITERATION_LIMIT) {
    iterations++;
    const step = climbingStep(current).map((component) => fraction * component);
    const trial = logarithms.map((value, i) => value + step[i]);
    const next = totalOverlap(shell, trial);
    if (next && next.value > current.value - ROUNDING) {
      if (fraction === 1 && Math.max(...step.map(Math.abs)) < LAST_STEP) termination = { kind: 'converged' };
      logarithms = trial;
      current = next;
      fraction = Math.min(1, 2 * fraction);
    } else {
      fraction /= 4;
    }
  }
  const rough = logarithms.map(Math.exp);
  if (termination.kind !== 'converged') {
    const squaredError = 2 * (FUNCTIONS[shell].length - current.value);
    return { exponents: rough, coefficients: current.coefficients, squaredError, iterations, termination };
  }
  const lastStep = climbingStep({ gradient: precise(shell, rough).gradient, hessian: current.hessian });
  const exponents = rough.map((exponent, i) => exponent * Math.exp(lastStep[i])).sort((a, b) => b - a);
  const { coefficients, squaredError } = precise(shell, exponents);
  return { exponents, coefficients, squaredError, iterations, termination };
}

/** Slope, coefficients and error of a shell's fit with the digits that doubles lose, see `preciseOverlap`. */
function precise(shell: SlaterShell, exponents: readonly number[]) {
  const parts = FUNCTIONS[shell].map((target) => preciseOverlap(target, exponents));
  const slope = (j: number) => parts.reduce((sum, part) => sum + part.gradient[j], 0);
  return {
    gradient: Matrix.columnVector(exponents.map((_, j) => slope(j))),
    coefficients: parts.map((part) => part.coefficients),
    squaredError: parts.reduce((sum, part) => sum + 2 * part.deficit, 0),
  };
}

interface TotalOverlap {
  readonly value: number;
  readonly gradient: Matrix;
  readonly hessian: Matrix;
  readonly coefficients: readonly (readonly number[])[];
}

/** Sum of the best overlaps of a shell's functions, with derivatives by ln α; undefined where two exponents meet. */
function totalOverlap(shell: SlaterShell, logarithms: readonly number[]): TotalOverlap | undefined {
  const n = logarithms.length;
  const exponents = logarithms.map(Math.exp);
  let value = 0;
  const gradient = Matrix.zeros(n, 1);
  const hessian = Matrix.zeros(n, n);
  const coefficients: (readonly number[])[] = [];
  for (const target of FUNCTIONS[shell]) {
    const best = bestOverlap(target, exponents);
    if (best === undefined) return undefined;
    value += best.value;
    gradient.add(best.gradient);
    hessian.add(best.hessian);
    coefficients.push(best.coefficients);
  }
  return { value, gradient, hessian, coefficients };
}

/**
 * Newton's step with the sign of every curvature made that of a maximum, so that it climbs from anywhere; cut to
 * LONGEST_STEP.
 */
function climbingStep({ gradient, hessian }: Pick<TotalOverlap, 'gradient' | 'hessian'>): number[] {
  const { eigenvectorMatrix, realEigenvalues } = new EigenvalueDecomposition(hessian, {
    assumeSymmetric: true,
  });
  const along = eigenvectorMatrix.transpose().mmul(gradient).to1DArray();
  const scaled = along.map((slope, i) => slope / Math.max(Math.abs(realEigenvalues[i]), SMALLEST_CURVATURE));
  const step = eigenvectorMatrix.mmul(Matrix.columnVector(scaled)).to1DArray();
  const length = Math.max(...step.map(Math.abs));
  return length > LONGEST_STEP ? step.map((component) => (component * LONGEST_STEP) / length) : step;
}
