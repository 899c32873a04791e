import { buildDeterminantSpace } from '../../engine/configuration-interaction/determinant-space';
import type { prepareFastProduct } from '../../engine/configuration-interaction/fast-product';
import { preparePlainProduct } from '../../engine/configuration-interaction/plain-product';
import { buildSectors, putSector, takeSector } from '../../engine/configuration-interaction/sector';
import { makeEvenOrOdd } from '../../engine/configuration-interaction/spin-flip';
import type { OrbitalIntegrals } from '../../engine/integrals/orbital-integrals';
import { scratchMemory } from '../../engine/kernels/kernel-memory';
import { randomArray, seededRandom } from './random';

/**
 * Largest deviation of a product from the plain one over all sectors, relative to the largest element.
 *
 * @param species - representation of every orbital; undefined: no symmetry
 * @param parity - of the vectors under the exchange of spins; 0: none
 */
export function productDeviation(
  integrals: OrbitalIntegrals,
  [alpha, beta, rank]: readonly [number, number, number],
  species: readonly number[] | undefined,
  parity: number,
  prepare: typeof prepareFastProduct,
): number {
  const space = buildDeterminantSpace(integrals.orbitalCount, alpha, beta, rank);
  const sectors = buildSectors(space, species);
  const plain = preparePlainProduct(space, integrals);
  const memory = scratchMemory();
  return memory.scope(() => {
    const fast = prepare(sectors, integrals, species, memory);
    let largest = 0;
    let scale = 0;
    for (const sector of sectors) {
      const vector = randomArray(sector.dimension, seededRandom(sector.irrep + 1));
      if (parity !== 0) makeEvenOrOdd(sector, vector, parity);
      const product = new Float64Array(sector.dimension).fill(Number.NaN);
      fast(sector, vector, product, parity);
      const whole = new Float64Array(space.dimension);
      putSector(sector, vector, whole);
      const ofWhole = new Float64Array(space.dimension);
      plain(whole, ofWhole, 0);
      takeSector(sector, ofWhole).forEach((value, i) => {
        // not a number must not pass
        if (!(Math.abs(product[i] - value) <= largest)) largest = Math.abs(product[i] - value);
        scale = Math.max(scale, Math.abs(value));
      });
    }
    return scale === 0 ? largest : largest / scale;
  });
}
