import { buildDeterminantSpace } from '../../engine/configuration-interaction/determinant-space';
import {
  prepareHamiltonianProduct,
  type SectorProduct,
} from '../../engine/configuration-interaction/hamiltonian-product';
import { makeEvenOrOdd } from '../../engine/configuration-interaction/spin-flip';
import { scratchMemory } from '../../engine/kernels/kernel-memory';
import { inForm } from '../support/kernel-forms';
import { randomArray, seededRandom } from '../support/random';
import { randomOrbitalIntegrals } from '../support/random-orbital-integrals';
import { callsPerSecond, type Measurement } from './measure';

/** Of water in 6-31G, in the order of the orbital energies. */
const IRREPS = [0, 0, 2, 0, 1, 0, 2, 2, 0, 1, 0, 2, 0];
const ELECTRONS_OF_ONE_SPIN = 5;

/** Ten electrons in thirteen orbitals; one thread. */
export function hamiltonianProducts(): Measurement[] {
  const bare = measure('without symmetry', undefined, 0);
  const { yardstick } = bare;
  return [
    bare,
    measure('with the exchange of spins', undefined, 1, yardstick),
    measure('with that and four representations', IRREPS, 1, yardstick),
  ];
}

function measure(
  what: string,
  irreps: readonly number[] | undefined,
  parity: number,
  plainRate?: number,
): Measurement {
  const orbitals = IRREPS.length;
  const integrals = randomOrbitalIntegrals(orbitals, 1, { species: irreps ?? [] });
  const space = buildDeterminantSpace(
    orbitals,
    ELECTRONS_OF_ONE_SPIN,
    ELECTRONS_OF_ONE_SPIN,
    Number.POSITIVE_INFINITY,
  );
  const rate = () =>
    scratchMemory().scope(() =>
      productRate(prepareHamiltonianProduct(space, integrals, irreps).sectors[0], parity),
    );
  return {
    name: `full-CI product, 10 electrons in ${orbitals} orbitals, ${what}`,
    ours: inForm('fast', rate),
    yardstick: plainRate ?? inForm('plain', rate),
    unit: 'products/s',
    against: 'plain TypeScript without symmetry',
  };
}

function productRate({ sector, apply }: SectorProduct, parity: number): number {
  const vector = randomArray(sector.dimension, seededRandom(2));
  if (parity !== 0) makeEvenOrOdd(sector, vector, parity);
  const product = new Float64Array(sector.dimension);
  return callsPerSecond(() => apply(vector, product));
}
