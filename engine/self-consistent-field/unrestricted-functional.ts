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

/** A determinant with orbitals of its own for each spin; arrays hold the alpha part, then the beta part. */
export interface UnrestrictedPoint extends MeanFieldPoint {
  readonly orbitalEnergies: Float64Array;
  readonly density: Float64Array;
}

const SPINS = [0, 1] as const;

/**
 * Energy of a determinant with different orbitals for different spins, as a function of rotations κσ(a,i) of each
 * spin's virtual into its occupied orbitals, alpha rotations first: g = 2Fσ(a,i) and
 * H = 2[δσσ′δ(ε_a − ε_i) + 2(ai|bj) − δσσ′((ab|ij) + (aj|bi))].
 *
 * Source: J. A. Pople, R. K. Nesbet, J. Chem. Phys. 22, 571 (1954); R. Seeger, J. A. Pople, J. Chem. Phys. 66, 3045
 * (1977).
 */
export class UnrestrictedFunctional implements MeanFieldFunctional<UnrestrictedPoint> {
  readonly hessianScale = 2;
  readonly orbitalCount: number;
  private readonly coulomb: Float64Array;
  private readonly exchange: Float64Array;

  constructor(
    readonly problem: MeanFieldProblem,
    /** alpha and beta electrons */
    readonly occupied: readonly [number, number],
    readonly orthogonalisation: Orthogonalisation,
  ) {
    this.orbitalCount = orthogonalisation.orbitalCount;
    this.coulomb = new Float64Array(problem.functionCount ** 2);
    this.exchange = new Float64Array(problem.functionCount ** 2);
  }

  startingFock(start: StartingPoint): Float64Array | undefined {
    const densities = startingDensities(start, this.problem);
    return densities && this.fock(join(densities.alpha, densities.beta));
  }

  aufbau(fock: Float64Array): Float64Array {
    const { functionCount: n } = this.problem;
    const [alpha, beta] = halves(fock).map(
      (part) =>
        diagonaliseFock(part, this.orthogonalisation.transformation, n, this.orbitalCount).coefficients,
    );
    return join(alpha, beta);
  }

  commutator({ fock, density }: UnrestrictedPoint): Float64Array {
    const focks = halves(fock);
    const densities = halves(density);
    const [alpha, beta] = SPINS.map((spin) =>
      fockCommutator(
        focks[spin],
        densities[spin],
        this.problem.overlap,
        this.problem.functionCount,
        this.orthogonalisation,
      ),
    );
    return join(alpha, beta);
  }

  evaluate(coefficients: Float64Array): UnrestrictedPoint {
    const { functionCount: n, coreHamiltonian, nuclearRepulsion } = this.problem;
    const m = this.orbitalCount;
    const parts = halves(coefficients);
    const density = join(
      ...(SPINS.map((spin) => buildDensity(parts[spin], n, m, this.occupied[spin])) as [
        Float64Array,
        Float64Array,
      ]),
    );
    const fock = this.fock(density);
    const [alphaDensity, betaDensity] = halves(density);
    const energy =
      nuclearRepulsion +
      0.5 * (dot(alphaDensity, coreHamiltonian) + dot(betaDensity, coreHamiltonian) + dot(density, fock));

    const spins = SPINS.map((spin) => {
      const o = this.occupied[spin];
      const spinFock = halves(fock)[spin];
      const { orbitals, orbitalEnergies } = semicanonical(spinFock, parts[spin], n, m, [o]);
      const inOrbitals = congruence(spinFock, orbitals, n, m);
      const gradient = new Float64Array((m - o) * o);
      const curvature = new Float64Array((m - o) * o);
      for (let a = o; a < m; a++) {
        for (let i = 0; i < o; i++) {
          gradient[(a - o) * o + i] = 2 * inOrbitals[a * m + i];
          curvature[(a - o) * o + i] = 2 * (orbitalEnergies[a] - orbitalEnergies[i]);
        }
      }
      return { orbitals, orbitalEnergies, gradient, curvature };
    });
    const [alpha, beta] = spins;
    return {
      energy,
      fock,
      density,
      coefficients: join(alpha.orbitals, beta.orbitals),
      orbitalEnergies: join(alpha.orbitalEnergies, beta.orbitalEnergies),
      gradient: join(alpha.gradient, beta.gradient),
      curvature: join(alpha.curvature, beta.curvature),
    };
  }

  rotate(point: UnrestrictedPoint, rotation: Float64Array): Float64Array {
    const { functionCount: n } = this.problem;
    const parts = halves(point.coefficients);
    const rotations = this.bySpin(rotation);
    const [alpha, beta] = SPINS.map((spin) =>
      rotateOrbitals(parts[spin], rotations[spin], n, this.orbitalCount, this.occupied[spin]),
    );
    return join(alpha, beta);
  }

  hessianProduct(point: UnrestrictedPoint, x: Float64Array): Float64Array {
    const { functionCount: n } = this.problem;
    const m = this.orbitalCount;
    const parts = halves(point.coefficients);
    const energies = halves(point.orbitalEnergies);
    const rotations = this.bySpin(x);
    const blocks = SPINS.map((spin) => ({
      occupied: columnRange(parts[spin], n, m, 0, this.occupied[spin]),
      virtual: columnRange(parts[spin], n, m, this.occupied[spin], m),
    }));
    const changes = SPINS.map((spin) => {
      const { occupied, virtual } = blocks[spin];
      const o = this.occupied[spin];
      const v = m - o;
      const half = multiply(virtual, multiply(rotations[spin], transpose(occupied, n, o), v, o, n), n, v, n);
      return half.map((value, k) => value + half[(k % n) * n + Math.floor(k / n)]);
    });
    const field = this.field(join(changes[0], changes[1]));
    const [alpha, beta] = SPINS.map((spin) => {
      const { occupied, virtual } = blocks[spin];
      const o = this.occupied[spin];
      const v = m - o;
      const product = multiplyLeftTransposed(
        virtual,
        multiply(halves(field)[spin], occupied, n, n, o),
        v,
        n,
        o,
      );
      for (let a = 0; a < v; a++) {
        for (let i = 0; i < o; i++) {
          product[a * o + i] += (energies[spin][o + a] - energies[spin][i]) * rotations[spin][a * o + i];
        }
      }
      return product;
    });
    return join(alpha, beta).map((value) => this.hessianScale * value);
  }

  /** Fσ = h + J[Dα + Dβ] − K[Dσ]. */
  private fock(density: Float64Array): Float64Array {
    const { coreHamiltonian } = this.problem;
    return this.field(density).map((value, k) => value + coreHamiltonian[k % coreHamiltonian.length]);
  }

  /** J[Dα + Dβ] − K[Dσ] of each spin. */
  private field(density: Float64Array): Float64Array {
    const { functionCount: n, repulsion } = this.problem;
    const field = new Float64Array(2 * n * n);
    for (const spin of SPINS) {
      coulombExchangeInto(halves(density)[spin], repulsion, n, this.coulomb, this.exchange);
      for (let k = 0; k < n * n; k++) {
        field[k] += this.coulomb[k];
        field[n * n + k] += this.coulomb[k];
        field[spin * n * n + k] -= this.exchange[k];
      }
    }
    return field;
  }

  private bySpin(rotation: Float64Array): readonly [Float64Array, Float64Array] {
    const alphaLength = (this.orbitalCount - this.occupied[0]) * this.occupied[0];
    return [rotation.subarray(0, alphaLength), rotation.subarray(alphaLength)];
  }
}

/** The alpha and the beta half. */
export function halves(pair: Float64Array): readonly [Float64Array, Float64Array] {
  const half = pair.length / 2;
  return [pair.subarray(0, half), pair.subarray(half)];
}

function join(alpha: Float64Array, beta: Float64Array): Float64Array {
  const pair = new Float64Array(alpha.length + beta.length);
  pair.set(alpha);
  pair.set(beta, alpha.length);
  return pair;
}
