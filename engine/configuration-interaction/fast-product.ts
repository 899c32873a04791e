import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { determinantProductKernels } from '../kernels/determinant-product';
import type { KernelMemory } from '../kernels/kernel-memory';
import type { BareProduct } from './hamiltonian-product';
import { layProductLists, laySectorPlan, type ProductLists } from './product-plan';
import type { Sector } from './sector';
import { mirror } from './spin-flip';

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
  const kernels = determinantProductKernels(memory);
  return (sector, vector, product, parity) => {
    lists ??= layProductLists(memory, sectors[0], integrals, orbitalIrreps);
    const { columnTaskCount, rowTaskCount } = lists;
    memory.scope(() => {
      const plan = laySectorPlan(lists!, sector, 1, parity !== 0);
      plan.vector.set(vector);
      for (let task = 0; task < rowTaskCount; task++) kernels.rowTask(plan.plan, task, 0);
      for (let task = 0; task < columnTaskCount; task++) kernels.columnTask(plan.plan, task, 0);
      if (parity !== 0) mirror(sector, plan.product, parity);
      product.set(plan.product);
    });
  };
}
