import { openHelpers } from '../../app/calculation/helpers';
import { buildDeterminantSpace } from '../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../engine/configuration-interaction/hamiltonian-product';
import { makeEvenOrOdd } from '../../engine/configuration-interaction/spin-flip';
import { KernelMemory, scratchMemory } from '../../engine/kernels/kernel-memory';
import { acceptHelpers, helpedTasks } from '../../engine/kernels/thread-team';
import { inForm } from '../support/kernel-forms';
import { randomArray, seededRandom } from '../support/random';
import { randomOrbitalIntegrals } from '../support/random-orbital-integrals';
import { connections } from './connections';
import { callsPerSecond, fastestCall, type Measurement } from './measure';

/** Of water in 6-31G, in the order of the orbital energies. */
const IRREPS = [0, 0, 2, 0, 1, 0, 2, 2, 0, 1, 0, 2, 0];
const ELECTRONS_OF_ONE_SPIN = 5;

const NAME = `full-CI product, ${2 * ELECTRONS_OF_ONE_SPIN} electrons in ${IRREPS.length} orbitals`;

/** Ten electrons in thirteen orbitals. */
export async function hamiltonianProducts(): Promise<Measurement[]> {
  const bare = measure('without symmetry', undefined, 0);
  const { yardstick } = bare;
  return [
    bare,
    measure('with the exchange of spins', undefined, 1, yardstick),
    measure('with that and four representations', IRREPS, 1, yardstick),
    ...(await onTwoThreads()),
  ];
}

/** Twelve electrons in sixteen orbitals, 64 million determinants; takes minutes, and 1.3 GB. */
export function largeProduct(): Measurement[] {
  const perConnection = (orbitals: number, electrons: number) => {
    const space = buildDeterminantSpace(orbitals, electrons, electrons, Number.POSITIVE_INFINITY);
    const memory = new KernelMemory();
    const [{ apply }] = prepareHamiltonianProduct(
      space,
      randomOrbitalIntegrals(orbitals, 1),
      undefined,
      memory,
    ).sectors;
    // vectors of this size stand in the memory of the kernels, as the eigensolver's do
    const [vector, product] = [memory.float64(space.dimension).view, memory.float64(space.dimension).view];
    vector.set(randomArray(space.dimension, seededRandom(2)));
    return (space.dimension * connections(orbitals, electrons)) / fastestCall(() => apply(vector, product));
  };
  return [
    {
      name: 'full-CI product, 12 electrons in 16 orbitals',
      ours: perConnection(16, 6),
      yardstick: perConnection(IRREPS.length, ELECTRONS_OF_ONE_SPIN),
      unit: 'connections/s',
      against: `the same of ${2 * ELECTRONS_OF_ONE_SPIN} electrons in ${IRREPS.length} orbitals`,
    },
  ];
}

function measure(
  what: string,
  irreps: readonly number[] | undefined,
  parity: number,
  plainRate?: number,
): Measurement {
  const rate = () => withProduct(irreps, parity, callsPerSecond);
  return {
    name: `${NAME}, ${what}`,
    ours: inForm('fast', rate),
    yardstick: plainRate ?? inForm('plain', rate),
    unit: 'products/s',
    against: 'plain TypeScript without symmetry',
  };
}

/** With a thread beside this one, as a computing thread has it for a point large enough. */
async function onTwoThreads(): Promise<Measurement[]> {
  const rates = () => [0, 1].map((parity) => withProduct(undefined, parity, callsPerSecond));
  const alone = rates();
  const helpers = openHelpers((reason) => {
    throw new Error(reason);
  });
  let shared: SharedArrayBuffer | undefined;
  acceptHelpers({
    most: 1,
    start: (memory, control) => {
      shared = control;
      helpers.wanted({ kind: 'helpWanted', memory, control });
    },
  });
  helpers.allow(1);
  try {
    // the first product asks for the helper, which takes a while to come
    while (!shared || helpedTasks(shared) === 0) {
      withProduct(undefined, 0, (apply) => apply());
      await new Promise((resolve) => setTimeout(resolve, 100));
    }
    const together = rates();
    return ['without symmetry', 'with the exchange of spins'].map((what, k) => ({
      name: `${NAME}, ${what}, two threads`,
      ours: together[k] ?? Number.NaN,
      yardstick: alone[k] ?? Number.NaN,
      unit: 'products/s',
      against: 'the same on one thread',
    }));
  } finally {
    helpers.end();
    acceptHelpers({ most: 0, start: () => undefined });
  }
}

/** What `work` makes of a call of the product with a vector that has a parity under the exchange of spins, or none. */
function withProduct<Result>(
  irreps: readonly number[] | undefined,
  parity: number,
  work: (apply: () => void) => Result,
): Result {
  const integrals = randomOrbitalIntegrals(IRREPS.length, 1, { species: irreps ?? [] });
  const space = buildDeterminantSpace(
    IRREPS.length,
    ELECTRONS_OF_ONE_SPIN,
    ELECTRONS_OF_ONE_SPIN,
    Number.POSITIVE_INFINITY,
  );
  return scratchMemory().scope(() => {
    const [{ sector, apply }] = prepareHamiltonianProduct(space, integrals, irreps).sectors;
    const vector = randomArray(sector.dimension, seededRandom(2));
    if (parity !== 0) makeEvenOrOdd(sector, vector, parity);
    const product = new Float64Array(sector.dimension);
    return work(() => apply(vector, product));
  });
}
