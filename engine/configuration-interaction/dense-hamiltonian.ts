import { betaPart, type OrbitalIntegrals, packedPair } from '../integrals/orbital-integrals';
import { type DeterminantSpace, rowLength } from './determinant-space';
import type { SingleReplacements } from './replacements';
import { buildSameSpinHamiltonian, NEGLIGIBLE_FACTOR } from './same-spin';
import { putSector, type Sector } from './sector';

/**
 * H among the determinants of each sector as a whole matrix, d×d row-major, without the core energy: for few
 * determinants cheaper than lists of what H joins, and what a direct diagonalisation needs anyway.
 *
 * Per determinant, every pair of an alpha and a beta replacement gives one element, and those that leave the other
 * spin alone come from the Hamiltonian of electrons of one spin.
 *
 * @param orbitalIrreps - as of `prepareHamiltonianProduct`; what they forbid is left out
 *
 * Cost: determinants × alpha singles × beta singles; 8·d² bytes a sector.
 */
export function buildDenseHamiltonians(
  space: DeterminantSpace,
  sectors: readonly Sector[],
  integrals: OrbitalIntegrals,
  orbitalIrreps: readonly number[] | undefined,
): ReadonlyMap<Sector, Float64Array> {
  const matrices = sectors.map(({ dimension }) => new Float64Array(dimension * dimension));
  const { sectorOf, placeOf } = locate(space, sectors);
  const { rows, alpha, beta, alphaReplacements, betaReplacements, orbitalCount: n } = space;
  const alphaHamiltonian = buildSameSpinHamiltonian(alpha, alphaReplacements, integrals);
  const betaHamiltonian =
    alpha === beta && !integrals.beta
      ? alphaHamiltonian
      : buildSameSpinHamiltonian(beta, betaReplacements, betaPart(integrals));
  const alphaPairs = describePairs(alphaReplacements, n, orbitalIrreps);
  const betaPairs = describePairs(betaReplacements, n, orbitalIrreps);
  const mixedStride = (n * (n + 1)) / 2;

  const add = (row: number, column: number, value: number) => {
    const sector = sectorOf[row];
    // rounding may leave a little of what symmetry forbids
    if (sectorOf[column] !== sector) return;
    matrices[sector][placeOf[row] * sectors[sector].dimension + placeOf[column]] += value;
  };

  for (let i = 0; i < beta.count; i++) {
    const length = rowLength(rows, i);
    for (let a = 0; a < length; a++) {
      const row = rows.start[i] + a;
      for (let e = alphaHamiltonian.rowStart[a]; e < alphaHamiltonian.rowStart[a + 1]; e++) {
        const b = alphaHamiltonian.column[e];
        if (b < length) add(row, rows.start[i] + b, alphaHamiltonian.value[e]);
      }
      for (let e = betaHamiltonian.rowStart[i]; e < betaHamiltonian.rowStart[i + 1]; e++) {
        const j = betaHamiltonian.column[e];
        if (a < rowLength(rows, j)) add(row, rows.start[j] + a, betaHamiltonian.value[e]);
      }
    }
    for (let f = betaReplacements.byStringStart[i]; f < betaReplacements.byStringStart[i + 1]; f++) {
      const j = betaReplacements.source[f];
      const lengthOfSource = rowLength(rows, j);
      const rs = betaPairs.packed[f];
      for (let a = 0; a < length; a++) {
        const row = rows.start[i] + a;
        const matrix = matrices[sectorOf[row]];
        const offset = placeOf[row] * sectors[sectorOf[row]].dimension;
        for (let e = alphaReplacements.byStringStart[a]; e < alphaReplacements.byStringStart[a + 1]; e++) {
          const b = alphaReplacements.source[e];
          if (alphaPairs.irreps[e] !== betaPairs.irreps[f] || b >= lengthOfSource) continue;
          const pq = alphaPairs.packed[e];
          const integral = integrals.beta
            ? integrals.beta.mixed[pq * mixedStride + rs]
            : integrals.twoElectron[packedPair(pq, rs)];
          if (Math.abs(integral) < NEGLIGIBLE_FACTOR) continue;
          matrix[offset + placeOf[rows.start[j] + b]] +=
            alphaReplacements.sign[e] * betaReplacements.sign[f] * integral;
        }
      }
    }
  }
  return new Map(sectors.map((sector, k) => [sector, matrices[k]]));
}

/** product ← matrix·vector for a square matrix. */
export function applyDense(matrix: Float64Array, vector: Float64Array, product: Float64Array): void {
  const n = vector.length;
  for (let i = 0, place = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += matrix[place++] * vector[j];
    product[i] = sum;
  }
}

/** In which sector each determinant of the space is, and where in it. */
function locate(space: DeterminantSpace, sectors: readonly Sector[]) {
  const sectorOf = new Int32Array(space.dimension);
  const placeOf = new Int32Array(space.dimension);
  const whole = new Float64Array(space.dimension);
  sectors.forEach((sector, k) => {
    // numbered from 1, as what lies outside the sector stays 0
    putSector(
      sector,
      Float64Array.from({ length: sector.dimension }, (_, place) => place + 1),
      whole.fill(0),
    );
    whole.forEach((number, place) => {
      if (number === 0) return;
      sectorOf[place] = k;
      placeOf[place] = number - 1;
    });
  });
  return { sectorOf, placeOf };
}

/** Of every replacement, in order of the string: the packed pair of its orbitals and their common representation. */
function describePairs(
  { pair }: SingleReplacements,
  n: number,
  orbitalIrreps: readonly number[] | undefined,
) {
  const packed = new Int32Array(pair.length);
  const irreps = new Uint8Array(pair.length);
  for (let entry = 0; entry < pair.length; entry++) {
    const p = Math.trunc(pair[entry] / n);
    const q = pair[entry] % n;
    packed[entry] = packedPair(p, q);
    if (orbitalIrreps) irreps[entry] = orbitalIrreps[p] ^ orbitalIrreps[q];
  }
  return { packed, irreps };
}
