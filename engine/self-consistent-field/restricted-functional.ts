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
    const { functionCount: n } = this.problem;
    const m = this.orbitalCount;
    const o = this.occupied;
    const density = buildDensity(coefficients, n, m, o);
    const { fock, energy } = this.fockAndEnergy(density);
    const { orbitals, orbitalEnergies } = semicanonical(fock, coefficients, n, m, [o]);
    const inOrbitals = congruence(fock, orbitals, n, m);
    const gradient = new Float64Array((m - o) * o);
    const curvature = new Float64Array((m - o) * o);
    for (let a = o; a < m; a++) {
      for (let i = 0; i < o; i++) {
        gradient[(a - o) * o + i] = 4 * inOrbitals[a * m + i];
        curvature[(a - o) * o + i] = 4 * (orbitalEnergies[a] - orbitalEnergies[i]);
      }
    }
    return { coefficients: orbitals, orbitalEnergies, fock, density, energy, gradient, curvature };
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
    const { functionCount: n, repulsion } = this.problem;
    const m = this.orbitalCount;
    const o = this.occupied;
    const virtual = m - o;
    const occupiedPart = columnRange(point.coefficients, n, m, 0, o);
    const virtualPart = columnRange(point.coefficients, n, m, o, m);
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
    const coulombFactor = spin === 'singlet' ? 2 : 0;
    const field = this.coulomb.map((j, i) => coulombFactor * j - this.exchange[i]);
    const product = multiplyLeftTransposed(
      virtualPart,
      multiply(field, occupiedPart, n, n, o),
      virtual,
      n,
      o,
    );
    for (let a = 0; a < virtual; a++) {
      for (let i = 0; i < o; i++) {
        product[a * o + i] += (point.orbitalEnergies[o + a] - point.orbitalEnergies[i]) * x[a * o + i];
      }
    }
    return product;
  }
}
