import { Worker } from 'node:worker_threads';
import { expect, it } from 'vitest';
import { HELPER_FILE } from '../../../app/calculation/program';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { acceptHelpers, allowHelpers, helpedTasks } from '../../../engine/kernels/thread-team';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

it('independent: a product shared among three threads is that of one, to the last bit', async () => {
  const integrals = randomOrbitalIntegrals(13, 3);
  const space = buildDeterminantSpace(13, 3, 3, Number.POSITIVE_INFINITY);
  const vector = randomArray(space.dimension, seededRandom(4));
  const productOf = () => {
    const product = new Float64Array(space.dimension);
    prepareHamiltonianProduct(space, integrals).apply(vector, product);
    return product;
  };
  const alone = productOf();

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
    expect(productOf()).toEqual(alone);
    allowHelpers(shared!, 2);
    await Promise.all(helpers.map((helper) => new Promise((resolve) => helper.once('online', resolve))));
    for (let time = 0; time < 3; time++) expect(productOf()).toEqual(alone);
    expect(helpedTasks(shared!)).toBeGreaterThan(0);
  } finally {
    await Promise.all(helpers.map((helper) => helper.terminate()));
    acceptHelpers({ most: 0, start: () => undefined });
  }
});
