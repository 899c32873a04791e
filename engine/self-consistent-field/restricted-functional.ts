import { coulombExchangeInto } from '../integrals/coulomb-exchange';
import { congruence, dot, multiply, multiplyLeftTransposed, transpose } from '../linear-algebra/dense';
import {
  columnRange,
  fockCommutator,
  type MeanFieldFunctional,
  type MeanFieldPoint,
  type StartingPoint,
  startingDensities,
} from './mean-field';
import type { MeanFieldProblem } from './mean-field-problem';
import { rotateOrbitals } from './orbital-rotation';
import { buildDensity, diagonaliseFock } from './orbitals';
import type { Orthogonalisation } from './orthogonalisation';
import { semicanonical } from './semicanonical';

/** A closed-shell determinant with what its energy and its derivatives need. */
export interface RestrictedPoint extends MeanFieldPoint {
  /** n×m, occupied orbitals first; diagonal in F within the occupied and within the virtual orbitals */
  readonly coefficients: Float64Array;
  /** diagonal of the Fock matrix in these orbitals */
  readonly orbitalEnergies: Float64Array;
  /** of one spin */
  readonly density: Float64Array;
}

/**
 * Energy of a closed-shell determinant as a function of orbital rotations κ(a,i) (virtual × occupied):
 * E(κ) = E + g·κ + ½ κ·Hκ + … with g = 4F(a,i) and
 * H = 4[δ(ε_a − ε_i) + 4(ai|bj) − (ab|ij) − (aj|bi)], the real singlet orbital Hessian.
 *
 * Source: R. Seeger, J. A. Pople, J. Chem. Phys. 66, 3045 (1977); T. Helgaker, P. Jørgensen, J. Olsen,
 * Molecular Electronic-Structure Theory, sec. 10.1 and 10.2.
 */
export class RestrictedFunctional implements MeanFieldFunctional<RestrictedPoint> {
  readonly hessianScale = 4;
  readonly orbitalCount: number;
  private readonly coulomb: Float64Array;
  private readonly exchange: Float64Array;
  private readonly ofSinglePairs = new WeakMap<RestrictedPoint, VirtualFields>();

  constructor(
    readonly problem: MeanFieldProblem,
    readonly occupied: number,
    readonly orthogonalisation: Orthogonalisation,
  ) {
    this.orbitalCount = orthogonalisation.orbitalCount;
    this.coulomb = new Float64Array(problem.functionCount ** 2);
    this.exchange = new Float64Array(problem.functionCount ** 2);
  }

  /** F = h + 2J − K of a one-spin density, and the energy of that density. */
  fockAndEnergy(density: Float64Array): { fock: Float64Array; energy: number } {
    const { coreHamiltonian, repulsion, functionCount, nuclearRepulsion } = this.problem;
    coulombExchangeInto(density, repulsion, functionCount, this.coulomb, this.exchange);
    const fock = coreHamiltonian.map((h, i) => h + 2 * this.coulomb[i] - this.exchange[i]);
    return { fock, energy: nuclearRepulsion + dot(density, coreHamiltonian) + dot(density, fock) };
  }

  startingFock(start: StartingPoint): Float64Array | undefined {
    const densities = startingDensities(start, this.problem);
    return densities && this.fockAndEnergy(densities.alpha).fock;
  }

  aufbau(fock: Float64Array): Float64Array {
    const { transformation } = this.orthogonalisation;
    return diagonaliseFock(fock, transformation, this.problem.functionCount, this.orbitalCount).coefficients;
  }

  commutator({ fock, density }: RestrictedPoint): Float64Array {
    return fockCommutator(
      fock,
      density,
      this.problem.overlap,
      this.problem.functionCount,
      this.orthogonalisation,
    );
  }

  evaluate(coefficients: Float64Array): RestrictedPoint {
    const density = buildDensity(coefficients, this.problem.functionCount, this.orbitalCount, this.occupied);
    return new EvaluatedPoint(this, coefficients, density, this.fockAndEnergy(density));
  }

  rotate(point: RestrictedPoint, rotation: Float64Array): Float64Array {
    return rotateOrbitals(
      point.coefficients,
      rotation,
      this.problem.functionCount,
      this.orbitalCount,
      this.occupied,
    );
  }

  hessianProduct(point: RestrictedPoint, x: Float64Array): Float64Array {
    return this.responseProduct(point, x, 'singlet').map((value) => this.hessianScale * value);
  }

  /**
   * (A + B)x of the singlet or triplet orbital Hessian:
   * (ε_a − ε_i)x + [4(ai|bj)] − (ab|ij) − (aj|bi), the bracket for singlets only.
   */
  responseProduct(point: RestrictedPoint, x: Float64Array, spin: 'singlet' | 'triplet'): Float64Array {
    const { functionCount: n } = this.problem;
    const m = this.orbitalCount;
    const o = this.occupied;
    const virtual = m - o;
    const coulombFactor = spin === 'singlet' ? 2 : 0;
    const product =
      o === 1
        ? this.singlePairResponse(point, x, coulombFactor)
        : this.response(
            columnRange(point.coefficients, n, m, 0, o),
            columnRange(point.coefficients, n, m, o, m),
            x,
            coulombFactor,
          );
    for (let a = 0; a < virtual; a++) {
      for (let i = 0; i < o; i++) {
        product[a * o + i] += (point.orbitalEnergies[o + a] - point.orbitalEnergies[i]) * x[a * o + i];
      }
    }
    return product;
  }

  /** The field of the density that x changes, between virtual and occupied orbitals. */
  private response(
    occupiedPart: Float64Array,
    virtualPart: Float64Array,
    x: Float64Array,
    coulombFactor: number,
  ): Float64Array {
    const { functionCount: n, repulsion } = this.problem;
    const o = this.occupied;
    const virtual = this.orbitalCount - o;
    const half = multiply(
      virtualPart,
      multiply(x, transpose(occupiedPart, n, o), virtual, o, n),
      n,
      virtual,
      n,
    );
    const change = new Float64Array(n * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) change[i * n + j] = half[i * n + j] + half[j * n + i];
    coulombExchangeInto(change, repulsion, n, this.coulomb, this.exchange);
    const field = this.coulomb.map((j, i) => coulombFactor * j - this.exchange[i]);
    return multiplyLeftTransposed(virtualPart, multiply(field, occupiedPart, n, n, o), virtual, n, o);
  }

  /** The same of a single pair i: all that it takes, (ab|ii) and (ai|bi), is in the fields of the pair's own density. */
  private singlePairResponse(point: RestrictedPoint, x: Float64Array, coulombFactor: number): Float64Array {
    const { coulomb, exchange } = this.virtualFields(point);
    const virtual = x.length;
    const product = new Float64Array(virtual);
    for (let a = 0; a < virtual; a++) {
      for (let b = 0; b < virtual; b++) {
        const place = a * virtual + b;
        product[a] += ((2 * coulombFactor - 1) * exchange[place] - coulomb[place]) * x[b];
      }
    }
    return product;
  }

  private virtualFields(point: RestrictedPoint): VirtualFields {
    const known = this.ofSinglePairs.get(point);
    if (known) return known;
    const { functionCount: n, repulsion } = this.problem;
    const m = this.orbitalCount;
    const virtualPart = columnRange(point.coefficients, n, m, 1, m);
    coulombExchangeInto(point.density, repulsion, n, this.coulomb, this.exchange);
    const [coulomb, exchange] = [this.coulomb, this.exchange].map((field) =>
      congruence(field, virtualPart, n, m - 1),
    );
    this.ofSinglePairs.set(point, { coulomb, exchange });
    return { coulomb, exchange };
  }
}

/** J and K of a density among the virtual orbitals. */
interface VirtualFields {
  readonly coulomb: Float64Array;
  readonly exchange: Float64Array;
}

/** Extrapolated iterations need energy and Fock matrix only: the rest is worked out when it is first asked for. */
class EvaluatedPoint implements RestrictedPoint {
  readonly fock: Float64Array;
  readonly energy: number;
  #semicanonical: ReturnType<typeof semicanonical> | undefined;
  #gradient: Float64Array | undefined;

  constructor(
    private readonly functional: RestrictedFunctional,
    private readonly given: Float64Array,
    readonly density: Float64Array,
    { fock, energy }: { fock: Float64Array; energy: number },
  ) {
    this.fock = fock;
    this.energy = energy;
  }

  get coefficients(): Float64Array {
    return this.turned.orbitals;
  }

  get orbitalEnergies(): Float64Array {
    return this.turned.orbitalEnergies;
  }

  get gradient(): Float64Array {
    const { problem, orbitalCount: m } = this.functional;
    if (this.#gradient) return this.#gradient;
    const inOrbitals = congruence(this.fock, this.coefficients, problem.functionCount, m);
    this.#gradient = this.ofExcitations((a, i) => 4 * inOrbitals[a * m + i]);
    return this.#gradient;
  }

  get curvature(): Float64Array {
    const { orbitalEnergies } = this;
    return this.ofExcitations((a, i) => 4 * (orbitalEnergies[a] - orbitalEnergies[i]));
  }

  private get turned(): ReturnType<typeof semicanonical> {
    const { problem, orbitalCount, occupied } = this.functional;
    this.#semicanonical ??= semicanonical(this.fock, this.given, problem.functionCount, orbitalCount, [
      occupied,
    ]);
    return this.#semicanonical;
  }

  /** virtual × occupied */
  private ofExcitations(value: (a: number, i: number) => number): Float64Array {
    const { orbitalCount: m, occupied: o } = this.functional;
    const values = new Float64Array((m - o) * o);
    for (let a = o; a < m; a++) {
      for (let i = 0; i < o; i++) values[(a - o) * o + i] = value(a, i);
    }
    return values;
  }
}
