import { betaPart, type OrbitalIntegrals, packedPair } from '../integrals/orbital-integrals';
import { type KernelMemory, placeInt32 } from '../kernels/kernel-memory';
import type { PlannedProduct } from './fast-product';
import type { SingleReplacements } from './replacements';
import { cutTasks, layRowTasks, type RowTasks } from './row-tasks';
import { buildSameSpinHamiltonian, NEGLIGIBLE_FACTOR, type SameSpinHamiltonian } from './same-spin';
import type { Sector } from './sector';
import { countUpToRank, IRREPS, type StringClasses } from './string-classes';

/*
 * What engine/kernels/assembly/determinant-product.ts works on: lists of replacements and integrals in a kernel
 * memory, once for all sectors of a space. Fields stand in the order of the classes there.
 */

/** Numbers that the kernels sum side by side. */
const WIDTH = 8;
const PACKED_BYTES = 8 * WIDTH;
/** Rows of one row task: enough for several stretches of one pair of orbitals. */
const ROWS_AT_ONCE = 64;
/** Beside the packed rows a thread has two sums, addresses of 2·WIDTH rows, and WIDTH signs. */
const THREAD_BYTES = 2 * PACKED_BYTES + 2 * 4 * WIDTH + PACKED_BYTES;

/** Lists in a kernel memory that do not depend on the sector. */
export interface ProductLists extends RowTasks {
  readonly memory: KernelMemory;
  readonly maximumRank: number;
  readonly alpha: number;
  readonly beta: number;
  readonly integrals: number;
  readonly integralRowBytes: number;
  readonly columnTasks: number;
  readonly columnTaskCount: number;
  /** strings of the largest representation, of either spin */
  readonly mostStrings: number;
}

export function layProductLists(
  memory: KernelMemory,
  { space, alpha, beta }: Pick<Sector, 'space' | 'alpha' | 'beta'>,
  integrals: OrbitalIntegrals,
  orbitalIrreps: readonly number[] | undefined,
): ProductLists {
  // in a whole space ranks forbid nothing, and all strings of a representation are alike
  const isWhole = space.maximumRank >= space.alpha.maximumRank + space.beta.maximumRank;
  const pairIrreps = irrepsOfPairs(space.orbitalCount, orbitalIrreps);
  const layStrings = (
    classes: StringClasses,
    replacements: SingleReplacements,
    hamiltonian: SameSpinHamiltonian,
  ) => laySpin(memory, classes, isWhole, replacements, hamiltonian, pairIrreps);
  const isSame = alpha === beta && !integrals.beta;
  const alphaAddress = layStrings(
    alpha,
    space.alphaReplacements,
    buildSameSpinHamiltonian(space.alpha, space.alphaReplacements, integrals),
  );
  const betaAddress = isSame
    ? alphaAddress
    : layStrings(
        beta,
        space.betaReplacements,
        buildSameSpinHamiltonian(space.beta, space.betaReplacements, betaPart(integrals)),
      );
  const columnTasks = cutTasks(alpha, isWhole, WIDTH);
  return {
    memory,
    maximumRank: isWhole ? 0 : space.maximumRank,
    alpha: alphaAddress,
    beta: betaAddress,
    ...layIntegrals(memory, integrals),
    ...layRowTasks(memory, beta, isWhole, space.betaReplacements, pairIrreps, { rowsAtOnce: ROWS_AT_ONCE }),
    columnTasks: placeInt32(memory, columnTasks.flat()),
    columnTaskCount: columnTasks.length,
    mostStrings: Math.max(...[...alpha.members, ...beta.members].map((members) => members.length)),
  };
}

/** Takes the working room of the threads in the memory of the lists. @returns the address of the plan */
export function laySectorPlan(
  lists: ProductLists,
  { sector, vector, product, threads, isMirrored }: PlannedProduct,
): number {
  const { memory } = lists;
  const rowStart = placeInt32(
    memory,
    sector.rowStart.flatMap((starts) => Array.from(starts.subarray(0, -1))),
  );
  const scratchBytes = THREAD_BYTES + PACKED_BYTES * lists.mostStrings;
  const scratch = memory.float64((threads * scratchBytes) / 8);
  return placeInt32(memory, [
    lists.maximumRank,
    sector.irrep,
    Number(isMirrored),
    vector,
    product,
    rowStart,
    lists.integrals,
    lists.integralRowBytes,
    lists.beta,
    lists.alpha,
    lists.rowTasks,
    lists.groups,
    lists.entrySource,
    lists.entryTarget,
    lists.entrySign,
    lists.columnTasks,
    scratch.address,
    scratchBytes,
  ]);
}

/** Representation of each ordered pair of orbitals. */
function irrepsOfPairs(n: number, irreps: readonly number[] | undefined): Uint8Array {
  return Uint8Array.from({ length: n * n }, (_, pair) =>
    irreps ? irreps[Math.trunc(pair / n)] ^ irreps[pair % n] : 0,
  );
}

/** (pq|rs) with both signs, pq of beta and rs of alpha electrons. */
function layIntegrals(memory: KernelMemory, { orbitalCount: n, twoElectron, beta }: OrbitalIntegrals) {
  const pairs = (n * (n + 1)) / 2;
  const { address, view } = memory.float64(2 * pairs * pairs);
  for (let pq = 0; pq < pairs; pq++) {
    for (let rs = 0; rs < pairs; rs++) {
      const integral = beta ? beta.mixed[rs * pairs + pq] : twoElectron[packedPair(pq, rs)];
      const kept = Math.abs(integral) < NEGLIGIBLE_FACTOR ? 0 : integral;
      view[2 * (pq * pairs + rs)] = kept;
      view[2 * (pq * pairs + rs) + 1] = -kept;
    }
  }
  return { integrals: address, integralRowBytes: 16 * pairs };
}

/** Strings of one spin with the Hamiltonian among them and the single replacements that lead to each. */
function laySpin(
  memory: KernelMemory,
  classes: StringClasses,
  isWhole: boolean,
  replacements: SingleReplacements,
  hamiltonian: SameSpinHamiltonian,
  pairIrreps: Uint8Array,
): number {
  const { strings, members, irreps, places } = classes;
  const order = members.flatMap((ofIrrep) => Array.from(ofIrrep));
  const rankOf = (string: number) => (isWhole ? 0 : strings.ranks[string]);
  const ranks = isWhole ? 1 : strings.maximumRank + 1;
  const irrepStart = Int32Array.from({ length: IRREPS + 1 });
  members.forEach((ofIrrep, h) => {
    irrepStart[h + 1] = irrepStart[h] + ofIrrep.length;
  });
  const upToRank = Array.from({ length: IRREPS * ranks }, (_, k) =>
    countUpToRank(classes, Math.trunc(k / ranks), isWhole ? strings.maximumRank : k % ranks),
  );

  const energies = memory.int32(3 * hamiltonian.column.length);
  const factor = new Float64Array(1);
  const words = new Int32Array(factor.buffer);
  let entries = 0;
  const energyRuns = memory.int32(4 * strings.count);
  order.forEach((string, i) => {
    energyRuns.view[4 * i] = entries;
    for (let run = 0; run < 3; run++) {
      for (let entry = hamiltonian.rowStart[string]; entry < hamiltonian.rowStart[string + 1]; entry++) {
        const other = hamiltonian.column[entry];
        // what symmetry makes zero but for rounding
        if (irreps[other] !== irreps[string]) continue;
        if (Math.max(0, rankOf(other) - rankOf(string)) !== run) continue;
        factor[0] = hamiltonian.value[entry];
        energies.view[3 * entries] = PACKED_BYTES * places[other];
        energies.view[3 * entries + 1] = words[0];
        energies.view[3 * entries++ + 2] = words[1];
      }
      energyRuns.view[4 * i + run + 1] = entries;
    }
  });

  const singles = memory.int32(2 * replacements.pair.length);
  let listed = 0;
  const singleRuns = memory.int32(IRREPS * 4 * strings.count);
  const n = strings.orbitalCount;
  for (let irrep = 0; irrep < IRREPS; irrep++) {
    order.forEach((string, i) => {
      const runs = 4 * (irrep * strings.count + i);
      singleRuns.view[runs] = listed;
      for (let run = 0; run < 3; run++) {
        const end = replacements.byStringStart[string + 1];
        for (let entry = replacements.byStringStart[string]; entry < end; entry++) {
          const pair = replacements.pair[entry];
          const other = replacements.source[entry];
          if (pairIrreps[pair] !== irrep || rankOf(other) - rankOf(string) + 1 !== run) continue;
          const place = 2 * packedPair(Math.trunc(pair / n), pair % n) + Number(replacements.sign[entry] < 0);
          singles.view[2 * listed] = PACKED_BYTES * places[other];
          singles.view[2 * listed++ + 1] = 8 * place;
        }
        singleRuns.view[runs + run + 1] = listed;
      }
    });
  }

  return placeInt32(memory, [
    strings.count,
    ranks,
    placeInt32(memory, irrepStart),
    placeInt32(memory, upToRank),
    placeInt32(memory, order.map(rankOf)),
    energyRuns.address,
    energies.address,
    singleRuns.address,
    singles.address,
  ]);
}
