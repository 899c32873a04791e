import { coulombExchangeInto } from '../integrals/coulomb-exchange';
import { congruence, dot, multiply, multiplyRightTransposed } from '../linear-algebra/dense';
import {
  type MeanFieldFunctional,
  type MeanFieldPoint,
  type StartingPoint,
  startingDensities,
} from './mean-field';
import type { MeanFieldProblem } from './mean-field-problem';
import { rotateByGenerator } from './orbital-rotation';
import { buildDensity, diagonaliseFock } from './orbitals';
import type { Orthogonalisation } from './orthogonalisation';
import { semicanonical } from './semicanonical';

/** A high-spin determinant with one set of orbitals: doubly occupied, then singly occupied (alpha), then empty. */
export interface RestrictedOpenPoint extends MeanFieldPoint {
  readonly orbitalEnergies: Float64Array;
  /** over functions, alpha and beta */
  readonly densities: readonly [Float64Array, Float64Array];
  /** Fock matrices over the orbitals, alpha and beta */
  readonly orbitalFocks: readonly [Float64Array, Float64Array];
}

const SPINS = [0, 1] as const;

/**
 * Energy of a high-spin open-shell determinant as a function of rotations between its three classes of orbitals,
 * with the exact Hessian. With Z = [κ, D], Fσ and Dσ of each spin over the orbitals and G the two-electron field of
 * a density, E(κ) = E + tr F[κ, D] + ½ tr F[κ, [κ, D]] + ½ tr Z·G[Z], summed over spins.
 *
 * Orbital energies are the diagonal of (Fα + Fβ)/2, which is diagonal within each class.
 *
 * Source: C. C. J. Roothaan, Rev. Mod. Phys. 32, 179 (1960); the second-order form: T. Helgaker, P. Jørgensen,
 * J. Olsen, Molecular Electronic-Structure Theory, sec. 10.1.
 */
export class RestrictedOpenFunctional implements MeanFieldFunctional<RestrictedOpenPoint> {
  readonly hessianScale = 2;
  readonly orbitalCount: number;
  /** rotations (to, from) between classes, in the order of gradient and rotation vectors */
  private readonly pairs: readonly (readonly [number, number])[];
  private readonly coulomb: Float64Array;
  private readonly exchange: Float64Array;

  constructor(
    readonly problem: MeanFieldProblem,
    /** alpha and beta electrons, alpha ≥ beta */
    readonly occupied: readonly [number, number],
    readonly orthogonalisation: Orthogonalisation,
  ) {
    const m = orthogonalisation.orbitalCount;
    this.orbitalCount = m;
    this.pairs = Array.from({ length: m }, (_, p) => p).flatMap((p) =>
      Array.from({ length: p }, (_, q) => q)
        .filter((q) => this.classOf(p) !== this.classOf(q))
        .map((q) => [p, q] as const),
    );
    this.coulomb = new Float64Array(problem.functionCount ** 2);
    this.exchange = new Float64Array(problem.functionCount ** 2);
  }

  startingFock(start: StartingPoint): Float64Array | undefined {
    const densities = startingDensities(start, this.problem);
    if (!densities) return undefined;
    const [alpha, beta] = this.fields([densities.alpha, densities.beta]);
    return this.problem.coreHamiltonian.map((h, k) => h + 0.5 * (alpha[k] + beta[k]));
  }

  aufbau(fock: Float64Array): Float64Array {
    const { functionCount: n } = this.problem;
    return diagonaliseFock(fock, this.orthogonalisation.transformation, n, this.orbitalCount).coefficients;
  }

  evaluate(coefficients: Float64Array): RestrictedOpenPoint {
    const { functionCount: n, coreHamiltonian, nuclearRepulsion } = this.problem;
    const m = this.orbitalCount;
    const densities = SPINS.map((spin) => buildDensity(coefficients, n, m, this.occupied[spin])) as [
      Float64Array,
      Float64Array,
    ];
    const focks = this.fields(densities).map((field) => field.map((value, k) => value + coreHamiltonian[k]));
    const energy = SPINS.reduce<number>(
      (sum, spin) => sum + 0.5 * (dot(densities[spin], coreHamiltonian) + dot(densities[spin], focks[spin])),
      nuclearRepulsion,
    );
    const mean = focks[0].map((value, k) => 0.5 * (value + focks[1][k]));
    const [alphaCount, betaCount] = this.occupied;
    const { orbitals, orbitalEnergies } = semicanonical(mean, coefficients, n, m, [betaCount, alphaCount]);
    const orbitalFocks = focks.map((fock) => congruence(fock, orbitals, n, m)) as [
      Float64Array,
      Float64Array,
    ];
    const gradient = new Float64Array(this.pairs.length);
    const curvature = new Float64Array(this.pairs.length);
    this.pairs.forEach(([p, q], k) => {
      for (const spin of SPINS) {
        const moved = this.occupation(q, spin) - this.occupation(p, spin);
        const fock = orbitalFocks[spin];
        gradient[k] += 2 * moved * fock[p * m + q];
        curvature[k] += 2 * moved * (fock[p * m + p] - fock[q * m + q]);
      }
    });
    return {
      energy,
      coefficients: orbitals,
      orbitalEnergies,
      densities,
      orbitalFocks,
      fock: this.effectiveFock(orbitals, orbitalFocks),
      gradient,
      curvature,
    };
  }

  /** Half the gradient as an antisymmetric matrix over the orthonormal functions. */
  commutator(point: RestrictedOpenPoint): Float64Array {
    const { functionCount: n, overlap } = this.problem;
    const m = this.orbitalCount;
    const inOrbitals = this.generator(point.gradient.map((value) => value / 2));
    // orbitals over the orthonormal functions: XᵀSC, an orthogonal matrix
    const half = multiply(overlap, point.coefficients, n, n, m);
    const turn = new Float64Array(m * m);
    const x = this.orthogonalisation.transformation;
    for (let i = 0; i < n; i++) {
      for (let a = 0; a < m; a++)
        for (let b = 0; b < m; b++) turn[a * m + b] += x[i * m + a] * half[i * m + b];
    }
    return multiplyRightTransposed(multiply(turn, inOrbitals, m, m, m), turn, m, m, m);
  }

  rotate(point: RestrictedOpenPoint, rotation: Float64Array): Float64Array {
    return rotateByGenerator(
      point.coefficients,
      this.generator(rotation),
      this.problem.functionCount,
      this.orbitalCount,
    );
  }

  hessianProduct(point: RestrictedOpenPoint, x: Float64Array): Float64Array {
    const { functionCount: n } = this.problem;
    const m = this.orbitalCount;
    const kappa = this.generator(x);
    const changes = SPINS.map((spin) =>
      kappa.map(
        (value, k) => value * (this.occupation(k % m, spin) - this.occupation(Math.floor(k / m), spin)),
      ),
    );
    const fields = this.fields(
      changes.map((change) =>
        multiplyRightTransposed(multiply(point.coefficients, change, n, m, m), point.coefficients, n, m, n),
      ) as [Float64Array, Float64Array],
    );
    const product = new Float64Array(x.length);
    for (const spin of SPINS) {
      const fock = point.orbitalFocks[spin];
      const zf = multiply(changes[spin], fock, m, m, m);
      const fx = multiply(fock, kappa, m, m, m);
      const response = congruence(fields[spin], point.coefficients, n, m);
      this.pairs.forEach(([p, q], k) => {
        const moved = this.occupation(q, spin) - this.occupation(p, spin);
        // element (q,p) of ½([Z, F] + [D, [F, κ]]) + [D, G[Z]]; [Z, F] = ZF − (ZF)ᵀ and [F, κ] = Fκ + (Fκ)ᵀ
        const first = zf[q * m + p] - zf[p * m + q];
        const second = moved * (fx[q * m + p] + fx[p * m + q]);
        product[k] += 2 * (0.5 * (first + second) + moved * response[q * m + p]);
      });
    }
    return product;
  }

  /** J[Dα + Dβ] − K[Dσ] of each spin, over functions. */
  private fields(densities: readonly [Float64Array, Float64Array]): [Float64Array, Float64Array] {
    const { functionCount: n, repulsion } = this.problem;
    const fields: [Float64Array, Float64Array] = [new Float64Array(n * n), new Float64Array(n * n)];
    for (const spin of SPINS) {
      coulombExchangeInto(densities[spin], repulsion, n, this.coulomb, this.exchange);
      for (let k = 0; k < n * n; k++) {
        fields[0][k] += this.coulomb[k];
        fields[1][k] += this.coulomb[k];
        fields[spin][k] -= this.exchange[k];
      }
    }
    return fields;
  }

  /**
   * One matrix whose aufbau orbitals are stationary: Fα between singly occupied and empty, Fβ between doubly and
   * singly occupied, their mean elsewhere; over functions, SC·R·CᵀS.
   */
  private effectiveFock(
    orbitals: Float64Array,
    [alpha, beta]: readonly [Float64Array, Float64Array],
  ): Float64Array {
    const { functionCount: n, overlap } = this.problem;
    const m = this.orbitalCount;
    const effective = alpha.map((value, k) => {
      const classes = [this.classOf(Math.floor(k / m)), this.classOf(k % m)].sort((a, b) => a - b).join();
      if (classes === '1,2') return value;
      return classes === '0,1' ? beta[k] : 0.5 * (value + beta[k]);
    });
    const dual = multiply(overlap, orbitals, n, n, m);
    return multiplyRightTransposed(multiply(dual, effective, n, m, m), dual, n, m, n);
  }

  /** 0 doubly occupied, 1 singly, 2 empty. */
  private classOf(p: number): number {
    if (p < this.occupied[1]) return 0;
    return p < this.occupied[0] ? 1 : 2;
  }

  private occupation(p: number, spin: 0 | 1): number {
    return p < this.occupied[spin] ? 1 : 0;
  }

  private generator(rotation: Float64Array): Float64Array {
    const m = this.orbitalCount;
    const generator = new Float64Array(m * m);
    this.pairs.forEach(([p, q], k) => {
      generator[p * m + q] = rotation[k];
      generator[q * m + p] = -rotation[k];
    });
    return generator;
  }
}
