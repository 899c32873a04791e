import { addScaledInto, dot, maximumAbsolute } from '../linear-algebra/dense';
import type { RunControl, Termination } from '../termination';

/** A set of orbitals with the energy's derivatives by rotations from it. */
export interface RotationPoint {
  readonly coefficients: Float64Array;
  readonly energy: number;
  readonly gradient: Float64Array;
  /** diagonal of the orbital-energy part of the Hessian, the preconditioner */
  readonly curvature: Float64Array;
}

/** An energy as a function of orbital rotations, with exact Hessian products. */
export interface RotationFunctional<P extends RotationPoint> {
  evaluate(coefficients: Float64Array): P;
  rotate(point: P, rotation: Float64Array): Float64Array;
  hessianProduct(point: P, x: Float64Array): Float64Array;
  /** the Hessian over its value per pair of spin orbitals: 4 for closed shells, 2 with spins apart */
  readonly hessianScale: number;
}

const INITIAL_RADIUS = 0.4;
const LARGEST_RADIUS = 1;
const SMALLEST_RADIUS = 1e-7;
const INNER_ITERATIONS = 60;
/** Keeps the preconditioner positive where an occupied orbital lies above a virtual one. */
const SMALLEST_CURVATURE = 0.1;
/** Energy differences below this are rounding: a step there is judged by its gradient alone. */
const ENERGY_NOISE = 1e-11;

/**
 * Lowers the energy by trust-region Newton steps on orbital rotations, each solved by truncated conjugate
 * gradients that follow negative curvature to the edge of the region. The energy never rises beyond rounding,
 * so that it ends in a minimum where extrapolation swings.
 *
 * Source: T. Steihaug, SIAM J. Numer. Anal. 20, 626 (1983); J. Nocedal, S. J. Wright, Numerical Optimization,
 * algorithm 7.2 and sec. 4.1.
 */
export function minimiseOverRotations<P extends RotationPoint>(
  functional: RotationFunctional<P>,
  start: P,
  options: { readonly gradientTolerance: number; readonly maximumIterations: number },
  control: RunControl,
): { readonly point: P; readonly iterations: number; readonly termination: Termination } {
  let point = start;
  let radius = INITIAL_RADIUS;
  for (let iteration = 0; iteration < options.maximumIterations; iteration++) {
    const residual = maximumAbsolute(point.gradient);
    control.report({ stage: 'orbitals', iteration, residual });
    if (residual <= options.gradientTolerance)
      return { point, iterations: iteration, termination: { kind: 'converged' } };
    if (!Number.isFinite(residual)) {
      return {
        point,
        iterations: iteration,
        termination: { kind: 'notFinite', quantity: 'orbital gradient' },
      };
    }
    if (control.isCancelled()) return { point, iterations: iteration, termination: { kind: 'cancelled' } };

    const { step, predicted } = trustRegionStep(functional, point, radius);
    const trial = functional.evaluate(functional.rotate(point, step));
    const gained = point.energy - trial.energy;
    const withinNoise = Math.abs(gained) < ENERGY_NOISE && maximumAbsolute(trial.gradient) < residual;
    const ratio = gained / predicted;
    if (ratio > 0.1 || withinNoise) {
      point = trial;
      if (ratio > 0.75 && !withinNoise) radius = Math.min(LARGEST_RADIUS, 2 * radius);
    }
    if (ratio < 0.25 && !withinNoise) radius *= 0.35;
    if (radius < SMALLEST_RADIUS) {
      return {
        point,
        iterations: iteration + 1,
        termination: { kind: 'stagnated', iterationsWithoutProgress: 1 },
      };
    }
  }
  return {
    point,
    iterations: options.maximumIterations,
    termination: { kind: 'iterationLimit', limit: options.maximumIterations },
  };
}

/** Step within the radius (in the preconditioner's norm) and the energy it should gain. */
function trustRegionStep<P extends RotationPoint>(
  functional: RotationFunctional<P>,
  point: P,
  radius: number,
): { step: Float64Array; predicted: number } {
  const scale = point.curvature.map((value) => Math.max(Math.abs(value), SMALLEST_CURVATURE));
  const step = new Float64Array(point.gradient.length);
  const imageOfStep = new Float64Array(step.length);
  const residual = point.gradient.slice();
  let preconditioned = residual.map((value, i) => value / scale[i]);
  let direction = preconditioned.map((value) => -value);
  let weight = dot(residual, preconditioned);
  // Superlinear convergence: solve more exactly as the gradient falls.
  const target = weight * Math.min(0.01, weight);

  for (let inner = 0; inner < INNER_ITERATIONS; inner++) {
    const image = functional.hessianProduct(point, direction);
    const curvature = dot(direction, image);
    const length = curvature > 0 ? weight / curvature : Number.POSITIVE_INFINITY;
    const toEdge = distanceToEdge(step, direction, scale, radius);
    const taken = Math.min(length, toEdge);
    addScaledInto(step, taken, direction);
    addScaledInto(imageOfStep, taken, image);
    if (taken === toEdge) break;
    addScaledInto(residual, taken, image);
    preconditioned = residual.map((value, i) => value / scale[i]);
    const nextWeight = dot(residual, preconditioned);
    if (nextWeight <= target) break;
    const beta = nextWeight / weight;
    weight = nextWeight;
    direction = direction.map((value, i) => beta * value - preconditioned[i]);
  }
  return { step, predicted: -dot(point.gradient, step) - 0.5 * dot(step, imageOfStep) };
}

/** Positive t at which ‖step + t·direction‖ in the scaled norm reaches the radius. */
function distanceToEdge(
  step: Float64Array,
  direction: Float64Array,
  scale: Float64Array,
  radius: number,
): number {
  let ss = 0;
  let sd = 0;
  let dd = 0;
  for (let i = 0; i < step.length; i++) {
    ss += scale[i] * step[i] * step[i];
    sd += scale[i] * step[i] * direction[i];
    dd += scale[i] * direction[i] * direction[i];
  }
  return (-sd + Math.sqrt(Math.max(0, sd * sd + dd * (radius * radius - ss)))) / dd;
}
