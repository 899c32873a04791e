import type { PlacedBasis } from '../basis/contracted-gaussian';
import { cartesianComponents } from '../integrals/cartesian-components';
import { multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import type { Molecule } from '../molecule/molecule';
import type { AtomicCharges } from './result';

/** Charges of the density of all electrons, or of the alpha and beta electrons apart; n×n over functions. */
export type ChargesOf = (densities: readonly Float64Array[]) => AtomicCharges;

/**
 * Shares the electrons of a density out among the atoms, ghosts included. Mulliken gives an atom Σ (DS)(μ,μ) over its
 * functions, Löwdin Σ (S^½ D S^½)(μ,μ). Both depend on the basis set, Mulliken's the more the more diffuse it is.
 * Löwdin's would depend on the axes too if Cartesian functions from d on were each normalised to 1: here they have
 * the weights with which a rotation mixes them orthogonally.
 *
 * @param overlap - n×n over the functions of `basis`
 *
 * Source: R. S. Mulliken, J. Chem. Phys. 23, 1833 (1955); P.-O. Löwdin, J. Chem. Phys. 18, 365 (1950).
 * Cost: O(n³) once, O(n³) for each density.
 */
export function atomicCharges(molecule: Molecule, basis: PlacedBasis, overlap: Float64Array): ChargesOf {
  const n = basis.functionCount;
  const weights = rotationWeights(basis);
  const weighted = (matrix: Float64Array, power: 1 | -1) =>
    matrix.map((value, place) => value * (weights[Math.floor(place / n)] * weights[place % n]) ** power);
  const root = squareRoot(weighted(overlap, 1), n);
  const atomOf = basis.shells.flatMap(({ atom, functionCount }) => Array<number>(functionCount).fill(atom));
  const populations = (density: Float64Array) => {
    const half = multiply(root, weighted(density, -1), n, n, n);
    return {
      mulliken: byAtom(diagonalOfProduct(density, overlap, n), atomOf, molecule.atoms.length),
      loewdin: byAtom(diagonalOfProduct(half, root, n), atomOf, molecule.atoms.length),
    };
  };
  return (densities) => {
    const parts = densities.map(populations);
    const charges = (kind: 'mulliken' | 'loewdin') =>
      molecule.atoms.map(({ nuclearCharge }, atom) =>
        parts.reduce((charge, part) => charge - part[kind][atom], nuclearCharge),
      );
    const [alpha, beta] = parts;
    const spins = (kind: 'mulliken' | 'loewdin') =>
      molecule.atoms.map((_, atom) => alpha[kind][atom] - beta[kind][atom]);
    return {
      mulliken: charges('mulliken'),
      loewdin: charges('loewdin'),
      ...(beta && { spin: { mulliken: spins('mulliken'), loewdin: spins('loewdin') } }),
    };
  };
}

/**
 * Factors of the functions that make a shell's transform orthogonally under rotations: 1 for spherical ones; for
 * x^a y^b z^c, normalised to 1, √(l!/(a! b! c!)) over √((2l − 1)!!/((2a − 1)!! (2b − 1)!! (2c − 1)!!)).
 */
function rotationWeights({ shells, harmonics }: PlacedBasis): readonly number[] {
  return shells.flatMap(({ angularMomentum: l, functionCount }) => {
    if (harmonics === 'spherical') return Array<number>(functionCount).fill(1);
    const overOdd = (k: number): number => (k < 2 ? 1 : (k / (2 * k - 1)) * overOdd(k - 1));
    return cartesianComponents(l).map(([a, b, c]) =>
      Math.sqrt(overOdd(l) / (overOdd(a) * overOdd(b) * overOdd(c))),
    );
  });
}

/** Diagonal of A·B, B symmetric. */
function diagonalOfProduct(a: Float64Array, b: Float64Array, n: number): Float64Array {
  const diagonal = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) diagonal[i] += a[i * n + j] * b[i * n + j];
  }
  return diagonal;
}

function byAtom(values: Float64Array, atomOf: readonly number[], atoms: number): number[] {
  const sums = Array<number>(atoms).fill(0);
  for (const [i, value] of values.entries()) sums[atomOf[i]] += value;
  return sums;
}

/** S^½ of a positive semidefinite matrix; eigenvalues that rounding made negative count as 0. */
function squareRoot(matrix: Float64Array, n: number): Float64Array {
  const { values, vectors } = symmetricEigen(matrix, n);
  const scaled = new Float64Array(n * n);
  const transposed = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      scaled[i * n + j] = vectors[i * n + j] * Math.sqrt(Math.max(0, values[j]));
      transposed[j * n + i] = vectors[i * n + j];
    }
  }
  return multiply(scaled, transposed, n, n, n);
}
