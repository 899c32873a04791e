import type { PlacedBasis } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { cartesianCount } from './cartesian-components';
import { HERMITE_BATCH, HermiteCoulombArguments, hermiteCoulombInto } from './hermite-coulomb';
import { hermiteStart } from './hermite-index';
import { placeSymmetric } from './separable-operator';
import { type ShellPair, shellPairs } from './shell-pair';

/** A point charge: in e, at a place in bohr. */
export interface PointCharge {
  readonly charge: number;
  readonly position: Vector3;
}

/** Pair factors hold √2 π^(5/4)/p; attraction to a point charge needs 2π/p. */
const ATTRACTION_FROM_PAIR_PREFACTOR = Math.SQRT2 * Math.PI ** -0.25;

/**
 * Nuclear-attraction matrix over contracted Gaussians: V(μ,ν) = −Σ_C Z_C ⟨μ| 1/|r − R_C| |ν⟩.
 *
 * @param basis - n functions; centres in bohr, exponents in bohr⁻²
 * @param nuclei - charges in e, positions in bohr; charge 0 (a ghost) costs nothing
 * @returns n×n symmetric, row-major Float64Array of length n², in hartree
 *
 * Source: L. E. McMurchie, E. R. Davidson, J. Comput. Phys. 26, 218 (1978).
 * Cost: O(n² · nuclei); allocates n².
 */
export function nuclearAttractionMatrix(basis: PlacedBasis, nuclei: readonly PointCharge[]): Float64Array {
  const n = basis.functionCount;
  const matrix = new Float64Array(n * n);
  const charged = nuclei.filter(({ charge }) => charge !== 0);
  const batch = new HermiteCoulombArguments();
  const pairs = shellPairs(basis);
  const highestDegree = pairs.reduce((highest, { layout }) => Math.max(highest, layout.degree), 0);
  const hermite = new Float64Array(HERMITE_BATCH * hermiteStart(highestDegree + 1));
  for (const pair of pairs) {
    const columns = attractionColumns(pair, charged, batch, hermite);
    const block = new Float64Array(pair.productCount);
    for (let product = 0; product < pair.productCount; product++) {
      for (let entry = pair.rowStart[product]; entry < pair.rowStart[product + 1]; entry++) {
        block[product] += pair.values[entry] * columns[pair.columns[entry]];
      }
    }
    let start = 0;
    for (const { first, second } of pair.members) {
      const end = start + first.functionCount * second.functionCount;
      placeSymmetric(matrix, n, block.subarray(start, end), first, second);
      start = end;
    }
  }
  return matrix;
}

/** Attraction of every Hermite column of the pair, contracted over primitives and nuclei; the last two are for work. */
function attractionColumns(
  pair: ShellPair,
  nuclei: readonly PointCharge[],
  batch: HermiteCoulombArguments,
  hermite: Float64Array,
): Float64Array {
  const { degree, factorDegrees, columnStart, columnCount } = pair.layout;
  const width = hermiteStart(degree + 1);
  const columns = new Float64Array(columnCount);
  const total = pair.primitiveCount * nuclei.length;
  for (let start = 0; start < total; start += HERMITE_BATCH) {
    const count = Math.min(HERMITE_BATCH, total - start);
    for (let k = 0; k < count; k++) {
      const i = Math.floor((start + k) / nuclei.length);
      const { charge, position } = nuclei[(start + k) % nuclei.length];
      batch.exponent[k] = pair.exponents[i];
      batch.x[k] = pair.centreX[i] - position[0];
      batch.y[k] = pair.centreY[i] - position[1];
      batch.z[k] = pair.centreZ[i] - position[2];
      batch.prefactor[k] = -charge * ATTRACTION_FROM_PAIR_PREFACTOR;
    }
    hermiteCoulombInto(degree, batch, count, hermite);
    for (let k = 0; k < count; k++) {
      const factors = Math.floor((start + k) / nuclei.length) * factorDegrees.length;
      for (let factor = 0; factor < factorDegrees.length; factor++) {
        const value = pair.factors[factors + factor];
        const source = k * width + hermiteStart(factorDegrees[factor]);
        const length = cartesianCount(factorDegrees[factor]);
        for (let index = 0; index < length; index++) {
          columns[columnStart[factor] + index] += value * hermite[source + index];
        }
      }
    }
  }
  return columns;
}
