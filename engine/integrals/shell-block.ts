import type { PlacedBasis, PlacedShell } from '../basis/contracted-gaussian';
import type { Vector3 } from '../molecule/molecule';
import { cartesianCount } from './cartesian-components';

/**
 * Cartesian functions that a block may hold (three s and p shells, or four p shells), so that the tables over two
 * pairs of blocks, which grow with the fourth power of this, stay below a megabyte.
 */
const LARGEST_BLOCK = 12;

/**
 * Shells of one atom made of the same primitive exponents: rows of a general contraction, or the s and p shell of a
 * shared-exponent set. Whatever depends on exponents alone is made once for all of them.
 */
export interface ShellBlock {
  /** bohr */
  readonly centre: Vector3;
  /** bohr⁻² */
  readonly exponents: Float64Array;
  readonly shells: readonly PlacedShell[];
}

/** Two shells whose function products, first × second row-major, stand together in a pair of blocks. */
export interface PairMember {
  readonly first: PlacedShell;
  readonly second: PlacedShell;
}

/**
 * Every shell of the basis in one block, in the order of the blocks' first shells.
 *
 * Only equal lists of exponents are put together. A list that is part of another, as the outer primitive of a
 * correlation-consistent set, would save its few primitives at the price of contracting over zeros for all others.
 */
export function groupShells({ shells }: PlacedBasis): ShellBlock[] {
  const blocks: PlacedShell[][] = [];
  for (const shell of shells) {
    const block = blocks.find((members) => belongs(shell, members));
    if (block) block.push(shell);
    else blocks.push([shell]);
  }
  return blocks.map(blockOfShells);
}

/** @param shells - at least one, all of one centre and the same exponents in the same order */
export function blockOfShells(shells: readonly PlacedShell[]): ShellBlock {
  return { centre: shells[0].centre, exponents: shells[0].exponents, shells };
}

/** All pairs of a shell of the first block with one of the second, each once if it is the same block. */
export function pairMembers(first: ShellBlock, second: ShellBlock): PairMember[] {
  return first.shells.flatMap((shell, i) =>
    (first === second ? second.shells.slice(0, i + 1) : second.shells).map((partner) => ({
      first: shell,
      second: partner,
    })),
  );
}

function belongs(shell: PlacedShell, members: readonly PlacedShell[]): boolean {
  const { atom, exponents } = members[0];
  if (shell.atom !== atom || shell.exponents.length !== exponents.length) return false;
  const size = [shell, ...members].reduce((sum, member) => sum + cartesianCount(member.angularMomentum), 0);
  return size <= LARGEST_BLOCK && exponents.every((exponent, i) => exponent === shell.exponents[i]);
}
