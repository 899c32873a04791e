import type { Block, KernelMemory } from '../kernels/kernel-memory';
import { type ProductInto, rowsAt } from '../kernels/matrix-product';
import { secularEquationKernels } from '../kernels/secular-equation';
import { diagonaliseTridiagonal, EigenvaluesNotConverged } from './implicit-ql';

/** Rows of a part that is not divided further. */
const SMALLEST_DIVIDED = 16;
/** What is neglected, beside the largest number of the problem at hand. */
const NEGLIGIBLE = 8 * Number.EPSILON;

/** An eigenvector of one part of the matrix lies in the rows of the first half, of both halves, or of the second. */
enum Support {
  First,
  Both,
  Second,
}

/**
 * Eigenvalues and eigenvectors of a tridiagonal matrix by division into halves, whose solutions are joined by an
 * update of rank one. Joining costs products of matrices, and what hardly changes is left out of them.
 *
 * Sources: J. J. M. Cuppen, Numer. Math. 36, 177 (1981); what is left out: J. J. Dongarra, D. C. Sorensen, SIAM J.
 * Sci. Stat. Comput. 8, s139 (1987).
 */
export class DividedTridiagonal {
  readonly #n: number;
  readonly #d: Float64Array;
  readonly #e: Float64Array;
  readonly #memory: KernelMemory;
  readonly #productInto: ProductInto;
  /** n×n: an eigenvector a row, within the rows and columns of its part */
  readonly #vectors: Block<Float64Array>;

  /**
   * @param diagonal - becomes the eigenvalues, in the order of the vectors
   * @param offDiagonal - element i stands beside the diagonal elements i − 1 and i
   * @param productInto - in the memory given
   */
  constructor(
    diagonal: Float64Array,
    offDiagonal: Float64Array,
    memory: KernelMemory,
    productInto: ProductInto,
  ) {
    this.#n = diagonal.length;
    this.#d = diagonal;
    this.#e = offDiagonal;
    this.#memory = memory;
    this.#productInto = productInto;
    this.#vectors = memory.float64(this.#n ** 2);
  }

  /**
   * @returns n×n, an eigenvector a row
   * @throws EigenvaluesNotConverged
   */
  solve(): Block<Float64Array> {
    this.#vectors.view.fill(0);
    this.#solvePart(0, this.#n);
    return this.#vectors;
  }

  #solvePart(low: number, high: number): void {
    if (high - low <= SMALLEST_DIVIDED) {
      this.#solveSmall(low, high);
      return;
    }
    const middle = (low + high) >> 1;
    const coupling = Math.abs(this.#e[middle]);
    this.#d[middle - 1] -= coupling;
    this.#d[middle] -= coupling;
    this.#solvePart(low, middle);
    this.#solvePart(middle, high);
    this.#memory.scope(() => this.#join(low, middle, high));
  }

  #solveSmall(low: number, high: number): void {
    const size = high - low;
    const d = this.#d.slice(low, high);
    const e = this.#e.slice(low, high);
    e[0] = 0;
    const columns = new Float64Array(size * size);
    for (let i = 0; i < size; i++) columns[i * size + i] = 1;
    diagonaliseTridiagonal(d, e, columns, size);
    this.#d.set(d, low);
    for (let i = 0; i < size; i++) {
      for (let k = 0; k < size; k++) {
        this.#vectors.view[(low + k) * this.#n + low + i] = columns[i * size + k];
      }
    }
  }

  #join(low: number, middle: number, high: number): void {
    const n = this.#n;
    const z = this.#vectors.view;
    const size = high - low;
    // the update is ρ·u·uᵀ with a unit vector u, over the eigenvectors of the two parts
    const rho = 2 * Math.abs(this.#e[middle]);
    const u = new Float64Array(size);
    for (let i = low; i < middle; i++) u[i - low] = z[i * n + middle - 1] / Math.SQRT2;
    const sign = this.#e[middle] < 0 ? -1 : 1;
    for (let i = middle; i < high; i++) u[i - low] = (sign * z[i * n + middle]) / Math.SQRT2;

    const { kept, unchanged, support } = this.#deflate(low, middle, high, u, rho);
    if (kept.length === 0) return;
    const k = kept.length;
    const memory = this.#memory;
    const work = memory.float64(2 * k);
    const d = memory.float64(k);
    const weights = memory.float64(k);
    const values = memory.float64(k);
    const position = memory.int32(k);
    const inner = memory.float64(k * k);
    kept.forEach((i, place) => {
      d.view[place] = this.#d[low + i];
      weights.view[place] = u[i];
    });
    // grouped by support, so that every half is a product without the zeros
    const grouped = [Support.First, Support.Both, Support.Second].flatMap((wanted) =>
      Array.from(kept.keys()).filter((place) => support[kept[place]] === wanted),
    );
    grouped.forEach((place, to) => {
      position.view[place] = to;
    });
    const { solveSecular, secularVectors } = secularEquationKernels(memory);
    const missed = solveSecular(
      work.address,
      d.address,
      weights.address,
      rho,
      k,
      values.address,
      inner.address,
    );
    if (missed >= 0) throw new EigenvaluesNotConverged(`eigenvalue ${low + missed} of ${n}`);
    secularVectors(work.address, d.address, weights.address, k, position.address, inner.address);

    // what the products read must be elsewhere than what they write
    const firstCount = kept.filter((i) => support[i] !== Support.Second).length;
    const secondStart = kept.filter((i) => support[i] === Support.First).length;
    const rows = grouped.map((place) => (low + kept[place]) * n);
    const first = memory.float64(firstCount * (middle - low));
    for (let i = 0; i < firstCount; i++) {
      first.view.set(z.subarray(rows[i] + low, rows[i] + middle), i * (middle - low));
    }
    const second = memory.float64((k - secondStart) * (high - middle));
    for (let i = secondStart; i < k; i++) {
      second.view.set(z.subarray(rows[i] + middle, rows[i] + high), (i - secondStart) * (high - middle));
    }
    const untouched = memory.float64(unchanged.length * size);
    const untouchedValues = unchanged.map((i) => this.#d[low + i]);
    unchanged.forEach((i, place) => {
      untouched.view.set(z.subarray((low + i) * n + low, (low + i) * n + high), place * size);
    });

    const target = this.#vectors.address + 8 * (low * n);
    this.#productInto(
      rowsAt(target + 8 * low, n),
      rowsAt(inner.address, k),
      rowsAt(first.address, middle - low),
      k,
      firstCount,
      middle - low,
    );
    this.#productInto(
      rowsAt(target + 8 * middle, n),
      rowsAt(inner.address + 8 * secondStart, k),
      rowsAt(second.address, high - middle),
      k,
      k - secondStart,
      high - middle,
    );
    this.#d.set(values.view, low);
    untouchedValues.forEach((value, place) => {
      this.#d[low + k + place] = value;
      z.set(untouched.view.subarray(place * size, (place + 1) * size), (low + k + place) * n + low);
    });
  }

  /**
   * Which eigenvectors of the parts the update changes, by rising eigenvalue, and which stay. Of two with nearly
   * equal values one can be turned so that it stays.
   */
  #deflate(
    low: number,
    middle: number,
    high: number,
    u: Float64Array,
    rho: number,
  ): { kept: number[]; unchanged: number[]; support: Uint8Array } {
    const d = this.#d.subarray(low, high);
    const size = high - low;
    const support = new Uint8Array(size).fill(Support.Second).fill(Support.First, 0, middle - low);
    let largest = rho;
    for (let i = 0; i < size; i++) largest = Math.max(largest, Math.abs(d[i]));
    const tolerance = NEGLIGIBLE * largest;
    const order = Array.from(d.keys()).sort((a, b) => d[a] - d[b]);
    const kept: number[] = [];
    const unchanged: number[] = [];
    let previous = -1;
    for (const i of order) {
      if (rho * Math.abs(u[i]) <= tolerance) {
        unchanged.push(i);
        continue;
      }
      if (previous >= 0) {
        const length = Math.hypot(u[i], u[previous]);
        const cosine = u[i] / length;
        const sine = -u[previous] / length;
        if (Math.abs((d[i] - d[previous]) * cosine * sine) <= tolerance) {
          u[i] = length;
          u[previous] = 0;
          this.#rotateRows(low + previous, low + i, low, high, cosine, sine);
          const lower = d[previous] * cosine ** 2 + d[i] * sine ** 2;
          d[i] = d[previous] * sine ** 2 + d[i] * cosine ** 2;
          d[previous] = lower;
          if (support[previous] !== support[i]) support[i] = Support.Both;
          unchanged.push(previous);
        } else {
          kept.push(previous);
        }
      }
      previous = i;
    }
    if (previous >= 0) kept.push(previous);
    return { kept, unchanged, support };
  }

  #rotateRows(p: number, q: number, low: number, high: number, cosine: number, sine: number): void {
    const z = this.#vectors.view;
    const rowP = p * this.#n;
    const rowQ = q * this.#n;
    for (let i = low; i < high; i++) {
      const a = z[rowP + i];
      const b = z[rowQ + i];
      z[rowP + i] = cosine * a + sine * b;
      z[rowQ + i] = cosine * b - sine * a;
    }
  }
}
