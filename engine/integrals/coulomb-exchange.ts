import { coulombExchangeKernels } from '../kernels/coulomb-exchange';
import { kernelForm } from '../kernels/form';
import { scratchMemory } from '../kernels/kernel-memory';

/** Functions below which the plain form is as fast. */
const FEWEST_FAST = 10;
/** Integrals copied to the kernel at a time, 256 KiB, so that they come from the cache when they are used. */
const INTEGRALS_TOGETHER = 32768;

/**
 * Coulomb and exchange matrices of a density:
 * J(μ,ν) = Σ_λσ (μν|λσ) D(λ,σ),  K(μ,ν) = Σ_λσ (μλ|νσ) D(λ,σ).
 *
 * One pass over the packed integrals in memory order; each stands for its up to eight equal ones.
 *
 * @param density - n×n, symmetric, row-major
 * @param repulsion - (μν|λσ), 8-fold packed (see `packedPair`)
 * @param coulomb - n×n, overwritten
 * @param exchange - n×n, overwritten
 *
 * Cost: O(n⁴/8) for each; the fast form takes the integrals through kernel memory in pieces.
 * Symbols: A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, eq. (3.154), J and K parts apart.
 */
export function coulombExchangeInto(
  density: Float64Array,
  repulsion: Float64Array,
  n: number,
  coulomb: Float64Array,
  exchange: Float64Array,
): void {
  halfSums(density, repulsion, n, coulomb, exchange);
  addTransposeInto(coulomb, n, 1);
  addTransposeInto(exchange, n, 1);
}

/**
 * The exchange matrix alone, also of an antisymmetric density.
 *
 * @param parity - 1 if the density is symmetric, −1 if antisymmetric
 */
export function exchangeInto(
  density: Float64Array,
  parity: number,
  repulsion: Float64Array,
  n: number,
  exchange: Float64Array,
): void {
  halfSums(density, repulsion, n, new Float64Array(n * n), exchange);
  addTransposeInto(exchange, n, parity);
}

/** What each integral (ij|kl) gives, without its equal (kl|ij), which gives the transposes. */
function halfSums(
  density: Float64Array,
  repulsion: Float64Array,
  n: number,
  coulomb: Float64Array,
  exchange: Float64Array,
): void {
  if (n >= FEWEST_FAST && kernelForm() === 'fast') fastSums(density, repulsion, n, coulomb, exchange);
  else plainSums(density, repulsion, n, coulomb, exchange);
}

/** Rows of pairs in pieces of many, each a call of the kernel. */
function fastSums(
  density: Float64Array,
  repulsion: Float64Array,
  n: number,
  coulomb: Float64Array,
  exchange: Float64Array,
): void {
  const pairs = (n * (n + 1)) / 2;
  const memory = scratchMemory();
  memory.scope(() => {
    const { addRows } = coulombExchangeKernels(memory);
    const [densityBlock, coulombBlock, exchangeBlock] = [0, 1, 2].map(() => memory.float64(n * n));
    const integrals = memory.float64(Math.min(INTEGRALS_TOGETHER + pairs, repulsion.length));
    densityBlock.view.set(density);
    coulombBlock.view.fill(0);
    exchangeBlock.view.fill(0);
    for (let first = 0, start = 0; first < pairs; ) {
      let end = first;
      let length = 0;
      while (end < pairs && length < INTEGRALS_TOGETHER) length += ++end;
      integrals.view.set(repulsion.subarray(start, start + length));
      addRows(
        integrals.address,
        first,
        end,
        n,
        densityBlock.address,
        coulombBlock.address,
        exchangeBlock.address,
      );
      first = end;
      start += length;
    }
    coulomb.set(coulombBlock.view);
    exchange.set(exchangeBlock.view);
  });
}

function plainSums(
  density: Float64Array,
  repulsion: Float64Array,
  n: number,
  coulomb: Float64Array,
  exchange: Float64Array,
): void {
  coulomb.fill(0);
  exchange.fill(0);
  let place = 0;
  for (let i = 0; i < n; i++) {
    const rowI = i * n;
    for (let j = 0; j <= i; j++) {
      const rowJ = j * n;
      const densityIJ = 2 * density[rowI + j];
      // equal indices stand for fewer than eight integrals
      const weightIJ = i === j ? 0.5 : 1;
      let coulombIJ = 0;
      for (let k = 0; k <= i; k++) {
        const rowK = k * n;
        const last = k === i ? j : k;
        let exchangeIK = 0;
        let exchangeJK = 0;
        const densityIK = density[rowI + k];
        const densityJK = density[rowJ + k];
        for (let l = 0; l <= last; l++) {
          let value = weightIJ * repulsion[place++];
          if (k === l) value *= 0.5;
          if (l === j && k === i) value *= 0.5;
          coulombIJ += value * density[rowK + l];
          coulomb[rowK + l] += value * densityIJ;
          exchangeIK += value * density[rowJ + l];
          exchangeJK += value * density[rowI + l];
          exchange[rowI + l] += value * densityJK;
          exchange[rowJ + l] += value * densityIK;
        }
        exchange[rowI + k] += exchangeIK;
        exchange[rowJ + k] += exchangeJK;
      }
      coulomb[rowI + j] += 2 * coulombIJ;
    }
  }
}

/** A ← A + parity·Aᵀ. */
function addTransposeInto(matrix: Float64Array, n: number, parity: number): void {
  for (let i = 0; i < n; i++) {
    matrix[i * n + i] *= 1 + parity;
    for (let j = 0; j < i; j++) {
      const sum = matrix[i * n + j] + parity * matrix[j * n + i];
      matrix[i * n + j] = sum;
      matrix[j * n + i] = parity * sum;
    }
  }
}
