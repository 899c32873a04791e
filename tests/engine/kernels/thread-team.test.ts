import { Worker } from 'node:worker_threads';
import { expect, it } from 'vitest';
import { HELPER_FILE } from '../../../app/calculation/program';
import {
  buildDeterminantSpace,
  type DeterminantSpace,
  transposeInto,
} from '../../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { acceptHelpers, allowHelpers, helpedTasks } from '../../../engine/kernels/thread-team';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

/** Even under the exchange of alpha and beta. */
function even(space: DeterminantSpace, vector: Float64Array): Float64Array {
  const image = new Float64Array(space.dimension);
  transposeInto(space, vector, image);
  return image.map((value, place) => value + vector[place]);
}

it('independent: products shared among three threads are those of one, to the last bit', async () => {
  const integrals = randomOrbitalIntegrals(13, 3);
  // full CI, and a truncated space: the two kinds of kernels; vectors without parity and with it
  const prepared = [Number.POSITIVE_INFINITY, 5].map((rank) => {
    const space = buildDeterminantSpace(13, 3, 3, rank);
    const vector = randomArray(space.dimension, seededRandom(4));
    return { ...prepareHamiltonianProduct(space, integrals), vectors: [vector, even(space, vector)] };
  });
  const products = () =>
    prepared.flatMap(({ space, apply, vectors }) =>
      vectors.map((vector) => {
        const product = new Float64Array(space.dimension);
        apply(vector, product);
        return product;
      }),
    );
  const alone = products();

  const helpers: Worker[] = [];
  let shared: SharedArrayBuffer | undefined;
  acceptHelpers({
    most: 2,
    start: (memory, control) => {
      shared = control;
      for (const helper of [0, 1]) {
        helpers.push(new Worker(HELPER_FILE, { workerData: { memory, control, helper } }));
      }
    },
  });
  try {
    // the first product starts the helpers, and may be over before they are there
    expect(products()).toEqual(alone);
    allowHelpers(shared!, 2);
    await Promise.all(helpers.map((helper) => new Promise((resolve) => helper.once('online', resolve))));
    for (let time = 0; time < 2; time++) expect(products()).toEqual(alone);
    expect(helpedTasks(shared!)).toBeGreaterThan(0);
  } finally {
    await Promise.all(helpers.map((helper) => helper.terminate()));
    acceptHelpers({ most: 0, start: () => undefined });
  }
});
