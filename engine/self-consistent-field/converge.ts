import { maximumAbsolute } from '../linear-algebra/dense';
import type { RunControl, Termination } from '../termination';
import { CommutatorExtrapolation } from './convergence-acceleration';
import type { MeanFieldFunctional, MeanFieldPoint, StartingPoint } from './mean-field';
import type { SelfConsistencyOptions } from './mean-field-problem';
import { minimiseOverRotations } from './minimiser';
import { lowestRotationHessian } from './stability';

export interface Converged<P extends MeanFieldPoint> {
  readonly point: P;
  /** largest element of the commutator in orthonormal functions, hartree */
  readonly residual: number;
  readonly termination: Termination;
  /** of all attempts together */
  readonly iterations: number;
  /** lowest eigenvalue of the orbital Hessian per pair of spin orbitals, hartree; absent with nothing to rotate */
  readonly stability?: number;
}

/** An eigenvalue of the orbital Hessian below this is a way down, not rounding. */
export const INSTABILITY = -1e-5;
/** Times that a way down is followed before the best so far is taken. */
const DESCENTS = 6;
/** First step along an unstable direction, in radians of rotation; large enough to leave the saddle. */
export const DESCENT_STEP = 0.2;
/** Fock matrices that differ by no more than this, hartree, are those of one determinant. */
const SAME_FOCK = 1e-5;
/**
 * An iteration whose Fock matrix is this near, hartree, to that of a known minimum whose Hessian is at least so steep is
 * inside its basin: rotations beside it are a hundredth of those at which the energy stops being a parabola.
 */
const NEARBY_FOCK = 1e-3;
const STEEP = 0.05;
/** Of two solutions the later one wins only if it is lower by more than this, hartree. */
const DISTINCT = 1e-9;

/**
 * From each start converges the lowest determinant it leads to, follows every instability of this kind of
 * Hartree–Fock down, and keeps the lowest of all.
 *
 * @param starts - at least one that can be used
 * @throws RangeError if none can
 */
export function convergeLowest<P extends MeanFieldPoint>(
  functional: MeanFieldFunctional<P>,
  starts: readonly StartingPoint[],
  options: SelfConsistencyOptions,
  control: RunControl,
  stage: string,
): Converged<P> {
  const attempt = new Attempt(functional, options, control, stage);
  let best: Converged<P> | undefined;
  for (const start of starts) {
    const fock = functional.startingFock(start);
    if (fock === undefined) continue;
    const found = attempt.descend(fock, best);
    if (best === undefined || isBetter(found, best)) best = found;
  }
  if (best === undefined) throw new RangeError('convergeLowest: no usable starting point');
  return { ...best, iterations: attempt.iterations };
}

function isBetter<P extends MeanFieldPoint>(one: Converged<P>, other: Converged<P>): boolean {
  const converged = one.termination.kind === 'converged';
  if (converged !== (other.termination.kind === 'converged')) return converged;
  return one.point.energy < other.point.energy - DISTINCT;
}

function isSame<P extends MeanFieldPoint>(one: Converged<P>, other: Converged<P>): boolean {
  return (
    one.termination.kind === 'converged' &&
    other.termination.kind === 'converged' &&
    Math.abs(one.point.energy - other.point.energy) <= DISTINCT &&
    areWithin(SAME_FOCK, one.point.fock, other.point.fock)
  );
}

/** Whether further iterations from here would end in the known determinant. */
function leadsTo<P extends MeanFieldPoint>({ fock }: P, known: Converged<P>): boolean {
  const { termination, stability = 0, point } = known;
  return termination.kind === 'converged' && stability >= STEEP && areWithin(NEARBY_FOCK, fock, point.fock);
}

function areWithin(distance: number, one: Float64Array, other: Float64Array): boolean {
  for (let i = 0; i < one.length; i++) if (!(Math.abs(one[i] - other[i]) <= distance)) return false;
  return true;
}

/** Convergence of one problem from several starts, counting iterations over all. */
class Attempt<P extends MeanFieldPoint> {
  iterations = 0;

  constructor(
    private readonly functional: MeanFieldFunctional<P>,
    private readonly options: SelfConsistencyOptions,
    private readonly control: RunControl,
    private readonly stage: string,
  ) {}

  /**
   * From a Fock matrix to a determinant that no rotation lowers.
   *
   * @param known - such a determinant: one start more that leads to it needs no more than the iterations up to it
   */
  descend(firstFock: Float64Array, known?: Converged<P>): Converged<P> {
    let current = this.converge(firstFock, known);
    if (known?.stability !== undefined && isSame(current, known)) return known;
    if (this.isKnownToBeStable(current)) return current;
    for (let descent = 0; descent < DESCENTS; descent++) {
      if (current.termination.kind !== 'converged' || current.point.gradient.length === 0) return current;
      const { value, vector } = lowestRotationHessian(this.functional, current.point, this.control);
      current = { ...current, stability: value };
      if (value > INSTABILITY) return current;
      const displaced = this.functional.rotate(
        current.point,
        vector.map((component) => DESCENT_STEP * component),
      );
      const lower = this.minimise(this.functional.evaluate(displaced));
      if (!isBetter(lower, current)) return current;
      current = lower;
    }
    return current;
  }

  private isKnownToBeStable({ termination, point }: Converged<P>): boolean {
    const { stableEnergy } = this.options;
    return (
      termination.kind === 'converged' &&
      stableEnergy !== undefined &&
      Math.abs(point.energy - stableEnergy) <= DISTINCT
    );
  }

  /**
   * Extrapolated iterations; where they do not settle, the minimiser from the lowest determinant met.
   *
   * @param known - taken for the end as soon as they come near it
   */
  private converge(firstFock: Float64Array, known?: Converged<P>): Converged<P> {
    const extrapolation = new CommutatorExtrapolation();
    let fock = firstFock;
    let lowest: P | undefined;
    let previousEnergy = Number.POSITIVE_INFINITY;
    for (let iteration = 1; iteration <= this.options.extrapolatedIterations; iteration++) {
      this.iterations++;
      const point = this.functional.evaluate(this.functional.aufbau(fock));
      if (known && leadsTo(point, known)) return known;
      const error = this.functional.commutator(point);
      const residual = maximumAbsolute(error);
      this.control.report({ stage: this.stage, iteration, residual });
      const ended = (termination: Termination) => ({
        point,
        residual,
        termination,
        iterations: this.iterations,
      });
      if (!Number.isFinite(point.energy + residual)) return ended({ kind: 'notFinite', quantity: 'energy' });
      const change = Math.abs(point.energy - previousEnergy);
      if (residual <= this.options.gradientTolerance && change <= this.options.energyTolerance) {
        return ended({ kind: 'converged' });
      }
      if (this.control.isCancelled()) return ended({ kind: 'cancelled' });
      if (lowest === undefined || point.energy < lowest.energy) lowest = point;
      previousEnergy = point.energy;
      fock = extrapolation.extrapolate(point.fock, error);
    }
    return this.minimise(lowest!);
  }

  private minimise(start: P): Converged<P> {
    const { point, iterations, termination } = minimiseOverRotations(
      this.functional,
      start,
      // a gradient element is at least twice the commutator's
      {
        gradientTolerance: 2 * this.options.gradientTolerance,
        maximumIterations: this.options.minimiserIterations,
      },
      this.control,
    );
    this.iterations += iterations;
    const residual = maximumAbsolute(this.functional.commutator(point));
    return { point, termination, residual, iterations: this.iterations };
  }
}
