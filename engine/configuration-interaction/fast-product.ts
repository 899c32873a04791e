import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import type { KernelMemory } from '../kernels/kernel-memory';
import {
  COLUMN_TASKS,
  FULL_COLUMN_TASKS,
  FULL_ROW_TASKS,
  mostThreads,
  ROW_TASKS,
  runTasks,
} from '../kernels/thread-team';
import { layFullProductLists, layFullProductPlan } from './full-product-plan';
import type { BareProduct } from './hamiltonian-product';
import { layProductLists, laySectorPlan } from './product-plan';
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
  return prepareTasks(memory, [ROW_TASKS, COLUMN_TASKS], laySectorPlan, () =>
    layProductLists(memory, sectors[0], integrals, orbitalIrreps),
  );
}

/**
 * The same by the kernels of engine/kernels/assembly/full-product.ts, which do more arithmetic, but dense: faster where
 * no symmetry thins out the integrals.
 *
 * @param sector - of full CI, with all determinants in it
 */
export function prepareFullProduct(
  sector: Sector,
  integrals: OrbitalIntegrals,
  memory: KernelMemory,
): BareProduct {
  return prepareTasks(memory, [FULL_ROW_TASKS, FULL_COLUMN_TASKS], layFullProductPlan, () =>
    layFullProductLists(memory, sector, integrals),
  );
}

interface TaskCounts {
  readonly rowTaskCount: number;
  readonly columnTaskCount: number;
}

/** What a plan is made for. */
export interface PlannedProduct {
  readonly sector: Sector;
  /** addresses of the vectors in the memory of the lists */
  readonly vector: number;
  readonly product: number;
  /** threads that may need working room */
  readonly threads: number;
  /** only the part of the product below the diagonal is wanted */
  readonly isMirrored: boolean;
}

/** Rows, then columns; lists are laid when the first product needs them. Vectors that stand in the memory stay there. */
function prepareTasks<Lists extends TaskCounts>(
  memory: KernelMemory,
  [rows, columns]: readonly [number, number],
  layPlan: (lists: Lists, planned: PlannedProduct) => number,
  layLists: () => Lists,
): BareProduct {
  let lists: Lists | undefined;
  return (sector, vector, product, parity) => {
    lists ??= layLists();
    const { rowTaskCount, columnTaskCount } = lists;
    memory.scope(() => {
      const [from, to] = [vector, product].map((numbers) => {
        const address = memory.addressOf(numbers);
        return address === undefined ? memory.float64(sector.dimension) : { address, view: numbers };
      });
      if (from.view !== vector) from.view.set(vector);
      const plan = layPlan(lists!, {
        sector,
        vector: from.address,
        product: to.address,
        threads: mostThreads(),
        isMirrored: parity !== 0,
      });
      const isLarge = sector.dimension >= MANY_DETERMINANTS;
      runTasks(memory, rows, plan, rowTaskCount, isLarge);
      runTasks(memory, columns, plan, columnTaskCount, isLarge);
      if (parity !== 0) mirror(sector, to.view, parity);
      if (to.view !== product) product.set(to.view);
    });
  };
}
