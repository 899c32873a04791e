import { type OrbitalIntegrals, packedPair } from '../integrals/orbital-integrals';
import { kernelForm } from '../kernels/form';
import { type KernelMemory, scratchMemory } from '../kernels/kernel-memory';
import { addScaledInto } from '../linear-algebra/dense';
import { isClosedShellDoubles, prepareClosedShellProduct } from './closed-shell-product';
import { applyDense, buildDenseHamiltonians } from './dense-hamiltonian';
import type { DeterminantSpace } from './determinant-space';
import { prepareFastProduct, prepareFullProduct } from './fast-product';
import { preparePlainProduct } from './plain-product';
import { buildSectors, isWholeSpace, putSector, type Sector, takeSector } from './sector';
import { EXACT_PARITY, makeEvenOrOdd, NEAR_PARITY, spinFlipParity } from './spin-flip';
import { isTwoElectronSpace, prepareTwoElectronProduct } from './two-electron-product';

/** The product H·c over the determinants of one representation, which H does not join with others. */
export interface SectorProduct {
  readonly sector: Sector;
  /** product ← H·vector; core energy included */
  apply(vector: Float64Array, product: Float64Array): void;
  /** Makes a vector that is nearly even or odd under the exchange of alpha and beta exactly so, in place. */
  restoreSpinFlip(vector: Float64Array): void;
  /** What of a vector is even and what is odd under that exchange; the vector itself where there is none. */
  spinFlipParts(vector: Float64Array): readonly Float64Array[];
  /** H as a whole matrix without the core energy, where the determinants are so few that it was built */
  readonly matrix?: Float64Array;
}

export interface HamiltonianProduct {
  readonly space: DeterminantSpace;
  /** one of all determinants where the representations of the orbitals are not known */
  readonly sectors: readonly SectorProduct[];
  /** product ← H·vector over the whole space; core energy included */
  apply(vector: Float64Array, product: Float64Array): void;
}

/**
 * Determinants up to which the fast form builds the matrix and multiplies by it: laying lists for the kernels would take
 * longer than they save.
 */
export const FEW_DETERMINANTS = 1000;
/**
 * Integrals that symmetry forbids may be this large, in hartree, before the symmetry is not relied upon. They are left
 * out, which moves an energy by their square over an excitation energy.
 */
const FORBIDDEN = 1e-7;

/**
 * The product H·c over determinants, for each representation by itself.
 *
 * @param orbitalIrreps - representation of each orbital, 0 … 7, multiplied by exclusive or; absent where not known
 * @param memory - for the lists of the fast form; to be called inside its scope
 */
export function prepareHamiltonianProduct(
  space: DeterminantSpace,
  integrals: OrbitalIntegrals,
  orbitalIrreps?: readonly number[],
  memory: KernelMemory = scratchMemory(),
): HamiltonianProduct {
  const irreps = orbitalIrreps && isSymmetric(integrals, orbitalIrreps) ? orbitalIrreps : undefined;
  const isFast = kernelForm() === 'fast';
  const sectors = buildSectors(space, irreps);
  const dense =
    isFast && space.dimension <= FEW_DETERMINANTS
      ? buildDenseHamiltonians(space, sectors, integrals, irreps)
      : undefined;
  const prepare = (): BareProduct => {
    if (!isFast) return overSectors(space, preparePlainProduct(space, integrals));
    if (isTwoElectronSpace(space, integrals)) return prepareTwoElectronProduct(space, integrals);
    if (isClosedShellDoubles(space, integrals)) {
      return prepareClosedShellProduct(sectors, integrals, irreps, memory);
    }
    if (isFullWithoutSymmetry(space, sectors)) return prepareFullProduct(sectors[0], integrals, memory);
    return prepareFastProduct(sectors, integrals, irreps, memory);
  };
  const product: BareProduct = dense
    ? (sector, vector, result) => applyDense(dense.get(sector)!, vector, result)
    : prepare();
  /** the exchange of alpha and beta is a symmetry of H */
  const isFlippable = space.alpha === space.beta && !integrals.beta;
  const ofSectors = sectors.map(
    (sector): SectorProduct => ({
      sector,
      ...(dense && { matrix: dense.get(sector)! }),
      apply(vector, result) {
        // all of a whole matrix is multiplied by in any case
        const parity = isFlippable && !dense ? spinFlipParity(sector, vector, EXACT_PARITY) : 0;
        product(sector, vector, result, parity);
        addScaledInto(result, integrals.coreEnergy, vector);
      },
      restoreSpinFlip(vector) {
        if (!isFlippable) return;
        const parity = spinFlipParity(sector, vector, NEAR_PARITY);
        if (parity !== 0) makeEvenOrOdd(sector, vector, parity);
      },
      spinFlipParts(vector) {
        if (!isFlippable) return [vector];
        return [1, -1].map((parity) => {
          const part = vector.slice();
          makeEvenOrOdd(sector, part, parity);
          return part;
        });
      },
    }),
  );
  return {
    space,
    sectors: ofSectors,
    apply(vector, result) {
      if (isWholeSpace(sectors[0])) {
        ofSectors[0].apply(vector, result);
        return;
      }
      result.fill(0);
      for (const { sector, apply } of ofSectors) {
        const part = takeSector(sector, vector);
        if (part.every((value) => value === 0)) continue;
        const ofPart = new Float64Array(sector.dimension);
        apply(part, ofPart);
        putSector(sector, ofPart, result);
      }
    },
  };
}

/** Full CI without symmetry, and enough beta electrons for a pair of their orbitals to lead to many strings. */
function isFullWithoutSymmetry(
  { maximumRank, alpha, beta }: DeterminantSpace,
  sectors: readonly Sector[],
): boolean {
  const isFull = maximumRank === alpha.maximumRank + beta.maximumRank;
  return isFull && sectors.length === 1 && beta.electrons > 1;
}

/** H·c of one sector without the core energy. */
export type BareProduct = (
  sector: Sector,
  vector: Float64Array,
  product: Float64Array,
  parity: number,
) => void;

function overSectors(space: DeterminantSpace, apply: ReturnType<typeof preparePlainProduct>): BareProduct {
  return (sector, vector, product, parity) => {
    const whole = new Float64Array(space.dimension);
    putSector(sector, vector, whole);
    const ofWhole = new Float64Array(space.dimension);
    apply(whole, ofWhole, parity);
    product.set(takeSector(sector, ofWhole));
  };
}

/** Do the integrals vanish that the representations forbid? */
function isSymmetric(
  { orbitalCount: n, oneElectron, twoElectron, beta }: OrbitalIntegrals,
  irreps: readonly number[],
): boolean {
  if (beta) return false;
  for (let p = 0; p < n; p++) {
    for (let q = 0; q <= p; q++) {
      const pairIrrep = irreps[p] ^ irreps[q];
      if (pairIrrep !== 0 && Math.abs(oneElectron[p * n + q]) > FORBIDDEN) return false;
      for (let r = 0; r <= p; r++) {
        for (let s = 0; s <= r; s++) {
          if ((irreps[r] ^ irreps[s]) === pairIrrep) continue;
          if (Math.abs(twoElectron[packedPair(packedPair(p, q), packedPair(r, s))]) > FORBIDDEN) return false;
        }
      }
    }
  }
  return true;
}
