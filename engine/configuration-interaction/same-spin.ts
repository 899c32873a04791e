import { packedPair, type SameSpinIntegrals } from '../integrals/orbital-integrals';
import { moveElectron, occupiedOrbitals, replacementPhase } from './determinants';
import { repulsion } from './matrix-elements';
import { countSameSpinEntries, type SingleReplacements } from './replacements';
import { placeOf, rankCounts, type StringSpace, stringAt } from './string-space';

/**
 * Factors smaller than this, in hartree, are left out of matrix–vector products: it drops what symmetry makes
 * zero but for rounding. Even a thousand of them side by side move an energy by less than 1e-11.
 */
export const NEGLIGIBLE_FACTOR = 1e-14;

/**
 * The Hamiltonian among electrons of one spin, H = Σ h(pq) a†p aq + ½ Σ (pq|rs) a†p a†r as aq, as a sparse
 * matrix over strings; without the core energy.
 */
export interface SameSpinHamiltonian {
  /** entries of row I: `rowStart[I]` … `rowStart[I + 1]` */
  readonly rowStart: Int32Array;
  readonly column: Int32Array;
  readonly value: Float64Array;
}

export function buildSameSpinHamiltonian(
  space: StringSpace,
  replacements: SingleReplacements,
  integrals: SameSpinIntegrals,
): SameSpinHamiltonian {
  const n = space.orbitalCount;
  const capacity = countSameSpinEntries(space.electrons, n - space.electrons, rankCounts(space));
  const rowStart = new Int32Array(space.count + 1);
  const column = new Int32Array(capacity);
  const value = new Float64Array(capacity);
  let entries = 0;
  const add = (place: number, element: number) => {
    if (Math.abs(element) < NEGLIGIBLE_FACTOR) return;
    column[entries] = place;
    value[entries++] = element;
  };

  for (let row = 0; row < space.count; row++) {
    const string = stringAt(space, row);
    const occupied = occupiedOrbitals(string);
    add(row, stringEnergy(occupied, integrals));
    for (let entry = replacements.byStringStart[row]; entry < replacements.byStringStart[row + 1]; entry++) {
      const p = Math.trunc(replacements.pair[entry] / n);
      const q = replacements.pair[entry] % n;
      if (p === q) continue;
      add(replacements.source[entry], replacements.sign[entry] * singleFactor(p, q, occupied, integrals));
    }
    addDoubles(space, string, occupied, integrals, add);
    rowStart[row + 1] = entries;
  }
  return {
    rowStart,
    column: column.slice(0, entries),
    value: value.slice(0, entries),
  };
}

/** Σᵢ (i|h|i) + Σ over pairs [(ii|jj) − (ij|ji)]. */
export function stringEnergy(occupied: readonly number[], integrals: SameSpinIntegrals): number {
  let energy = 0;
  for (const i of occupied) {
    energy += integrals.oneElectron[i * integrals.orbitalCount + i];
    for (const j of occupied) {
      if (j < i) energy += repulsion(integrals, i, i, j, j) - repulsion(integrals, i, j, j, i);
    }
  }
  return energy;
}

/** (p|h|q) + Σₖ [(pq|kk) − (pk|kq)]; k = p drops out of itself. */
function singleFactor(
  p: number,
  q: number,
  occupied: readonly number[],
  integrals: SameSpinIntegrals,
): number {
  const { twoElectron } = integrals;
  const pq = packedPair(p, q);
  let element = integrals.oneElectron[p * integrals.orbitalCount + q];
  for (const k of occupied) {
    if (k === p) continue;
    element += twoElectron[packedPair(pq, packedPair(k, k))];
    element -= twoElectron[packedPair(packedPair(p, k), packedPair(k, q))];
  }
  return element;
}

/** p < r leave the row's string, q < s enter: ±[(pq|rs) − (ps|rq)]. */
function addDoubles(
  space: StringSpace,
  string: Int32Array,
  occupied: readonly number[],
  integrals: SameSpinIntegrals,
  add: (place: number, element: number) => void,
): void {
  const n = space.orbitalCount;
  const empty: number[] = [];
  for (let q = 0; q < n; q++) if (((string[q >> 5] >>> (q & 31)) & 1) === 0) empty.push(q);
  const once = new Int32Array(space.words);
  const twice = new Int32Array(space.words);
  for (let i = 1; i < occupied.length; i++) {
    for (let j = 0; j < i; j++) {
      const r = occupied[i];
      const p = occupied[j];
      for (let a = 0; a < empty.length; a++) {
        const q = empty[a];
        once.set(string);
        moveElectron(once, p, q);
        const firstPhase = replacementPhase(string, p, q);
        for (let b = a + 1; b < empty.length; b++) {
          const s = empty[b];
          twice.set(once);
          moveElectron(twice, r, s);
          const place = placeOf(space, twice);
          if (place < 0) continue;
          const phase = firstPhase * replacementPhase(once, r, s);
          add(place, phase * (repulsion(integrals, p, q, r, s) - repulsion(integrals, p, s, r, q)));
        }
      }
    }
  }
}
