import type { PlacedBasis } from '../basis/contracted-gaussian';
import { type Quartet, withQuartets } from './coulomb-quartets';
import { packedPair } from './orbital-integrals';
import { type ShellPair, shellPairs } from './shell-pair';

export interface ElectronRepulsionOptions {
  /**
   * hartree; the integrals of two pairs of blocks of shells are left at zero if the Schwarz inequality bounds all of
   * them by less. The default keeps energies right to 1e-9 hartree with margin.
   */
  readonly schwarzThreshold?: number;
}

export const ELECTRON_REPULSION_DEFAULTS: Required<ElectronRepulsionOptions> = Object.freeze({
  schwarzThreshold: 1e-13,
});

/** Pairs of primitives are skipped at a smaller size than quartets, since up to some thousand add up in one integral. */
const PRIMITIVE_TO_QUARTET_THRESHOLD = 1e-4;

/**
 * Electron-repulsion integrals (μν|λσ) = ∬ μ(1)ν(1) r₁₂⁻¹ λ(2)σ(2), chemists' order.
 *
 * @param basis - n functions; centres in bohr, exponents in bohr⁻²
 * @returns 8-fold packed, index `packedPair(packedPair(μ, ν), packedPair(λ, σ))`, in hartree; of length m(m + 1)/2
 * with m = n(n + 1)/2
 *
 * Source: kernel, see {@link coulombQuartet}; screening |(ab|cd)|² ≤ (ab|ab)(cd|cd): M. Häser, R. Ahlrichs,
 * J. Comput. Chem. 10, 104 (1989).
 * Accuracy: 2e-13 hartree, or relative for integrals above 1 hartree, checked in tests/engine/integrals/electron-repulsion.test.ts.
 * Cost: O(n⁴/8) time and memory. Integrals of one centre stay the same along a scan, but are only 8–17 % of the work
 * (N2, H2O; 6-31G to cc-pVTZ): they are made again.
 */
export function electronRepulsionTensor(
  basis: PlacedBasis,
  options: ElectronRepulsionOptions = ELECTRON_REPULSION_DEFAULTS,
): Float64Array {
  const { schwarzThreshold } = { ...ELECTRON_REPULSION_DEFAULTS, ...options };
  const pairCount = (basis.functionCount * (basis.functionCount + 1)) / 2;
  const tensor = new Float64Array((pairCount * (pairCount + 1)) / 2);
  const primitiveThreshold = schwarzThreshold * PRIMITIVE_TO_QUARTET_THRESHOLD;
  const pairs = shellPairs(basis);
  withQuartets(pairs, (quartet) => {
    const bounds = pairs.map((pair, place) => schwarzBound(pair, place, quartet));
    const places = pairs.map(productPlaces);
    for (let i = 0; i < pairs.length; i++) {
      for (let j = 0; j <= i; j++) {
        if (bounds[i] * bounds[j] < schwarzThreshold) continue;
        const [bra, ket] = betterOrder(pairs, i, j);
        scatterInto(tensor, quartet(bra, ket, primitiveThreshold), places[bra], places[ket]);
      }
    }
  });
  return tensor;
}

/** (ab|cd) = (cd|ab): the bra's primitives are taken two at a time, so that an odd one is half lost. */
function betterOrder(pairs: readonly ShellPair[], i: number, j: number): readonly [number, number] {
  const steps = (bra: ShellPair, ket: ShellPair) => ((bra.primitiveCount + 1) >> 1) * ket.primitiveCount;
  return steps(pairs[i], pairs[j]) <= steps(pairs[j], pairs[i]) ? [i, j] : [j, i];
}

/** √ of the largest (ab|ab) of the pair. */
function schwarzBound({ productCount }: ShellPair, place: number, quartet: Quartet): number {
  const block = quartet(place, place, 0);
  let largest = 0;
  for (let product = 0; product < productCount; product++) {
    largest = Math.max(largest, Math.abs(block[product * productCount + product]));
  }
  return Math.sqrt(largest);
}

/** packed index of each function product of the pair */
function productPlaces({ members, productCount }: ShellPair): Int32Array {
  const places = new Int32Array(productCount);
  let at = 0;
  for (const { first, second } of members) {
    for (let i = 0; i < first.functionCount; i++) {
      for (let j = 0; j < second.functionCount; j++) {
        places[at++] = packedPair(first.firstFunction + i, second.firstFunction + j);
      }
    }
  }
  return places;
}

function scatterInto(
  tensor: Float64Array,
  block: Float64Array,
  braPlaces: Int32Array,
  ketPlaces: Int32Array,
): void {
  let at = 0;
  for (let i = 0; i < braPlaces.length; i++) {
    const bra = braPlaces[i];
    const row = triangle(bra);
    for (let j = 0; j < ketPlaces.length; j++) {
      const ket = ketPlaces[j];
      tensor[ket <= bra ? row + ket : triangle(ket) + bra] = block[at++];
    }
  }
}

/** Where a row of a packed lower triangle begins. */
function triangle(row: number): number {
  // as integers: no array holds 2³¹ numbers
  return Math.imul(row, row + 1) >>> 1;
}
