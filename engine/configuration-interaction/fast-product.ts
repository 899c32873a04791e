import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import type { KernelMemory } from '../kernels/kernel-memory';
import { COLUMN_TASKS, mostThreads, ROW_TASKS, runTasks } from '../kernels/thread-team';
import type { BareProduct } from './hamiltonian-product';
import { layProductLists, laySectorPlan, type ProductLists } from './product-plan';
import type { Sector } from './sector';
import { mirror } from './spin-flip';

/** From here on a product takes milliseconds, and threads are worth waking for it. */
const MANY_DETERMINANTS = 50_000;

/**
 * H·c by the kernels of engine/kernels/assembly/determinant-product.ts: for a block of alpha strings, the electrons
 * of beta spin among themselves and with those of alpha spin; then, for blocks of beta strings, those of alpha spin.
 * Symmetry leaves only the integrals that it allows; a vector with a parity under the exchange of spins needs only
 * the part of the product below the diagonal.
 */
export function prepareFastProduct(
  sectors: readonly Sector[],
  integrals: OrbitalIntegrals,
  orbitalIrreps: readonly number[] | undefined,
  memory: KernelMemory,
): BareProduct {
  let lists: ProductLists | undefined;
  return (sector, vector, product, parity) => {
    lists ??= layProductLists(memory, sectors[0], integrals, orbitalIrreps);
    const { columnTaskCount, rowTaskCount } = lists;
    memory.scope(() => {
      const plan = laySectorPlan(lists!, sector, mostThreads(), parity !== 0);
      const isLarge = sector.dimension >= MANY_DETERMINANTS;
      plan.vector.set(vector);
      runTasks(memory, ROW_TASKS, plan.plan, rowTaskCount, isLarge);
      runTasks(memory, COLUMN_TASKS, plan.plan, columnTaskCount, isLarge);
      if (parity !== 0) mirror(sector, plan.product, parity);
      product.set(plan.product);
    });
  };
}
