import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { coulombExchangeInto } from '../../engine/integrals/coulomb-exchange';
import { transformTwoElectron } from '../../engine/integrals/orbital-transformation';
import { KernelMemory } from '../../engine/kernels/kernel-memory';
import { productIn, rowsAt } from '../../engine/kernels/matrix-product';
import { multiply } from '../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../engine/linear-algebra/symmetric-eigen';
import { inForm } from '../support/kernel-forms';
import { randomArray, randomSymmetric, seededRandom } from '../support/random';
import { callsPerSecond, fastestCall, type Measurement } from './measure';
import { vectorLimit } from './vector-limit';

const SECONDS = 0.3;

export function denseAlgebra(): Measurement[] {
  const limit = vectorLimit();
  return [
    ...[128, 256].flatMap((n) => products(n, limit)),
    ...[100, 200, 400].map(eigenproblem),
    transformation(60),
    transformation(100),
    coulombExchange(60),
  ];
}

function products(n: number, limit: number): Measurement[] {
  const random = seededRandom(n);
  const a = randomArray(n * n, random);
  const b = randomArray(n * n, random);
  const target = new Float64Array(n * n);
  const rate = (work: () => void) => callsPerSecond(work, SECONDS) * 2 * n ** 3;
  const unit = 'operations/s';
  const name = `dense product, n = ${n}`;
  const ours = rate(productInKernelMemory(a, b, n));
  const blocked = rate(() => blockedProductInto(target, a, b, n));
  const [left, right] = [a, b].map((matrix) => Matrix.from1DArray(n, n, Array.from(matrix)));
  return [
    { name, ours, yardstick: blocked, unit, against: 'blocked TypeScript' },
    { name: `${name}, of the limit`, ours, yardstick: limit, unit, against: 'the limit of 128-bit vectors' },
    {
      name: `${name}, as a function of arrays`,
      ours: rate(() => multiply(a, b, n, n, n)),
      yardstick: rate(() => left.mmul(right)),
      unit,
      against: 'ml-matrix',
    },
  ];
}

/** As the eigenproblem and the transformation use it, which keep their matrices there. */
function productInKernelMemory(a: Float64Array, b: Float64Array, n: number): () => void {
  const memory = new KernelMemory();
  const productInto = productIn(memory);
  const [left, right, product] = [a, b, a].map((matrix) => {
    const block = memory.float64(n * n);
    block.view.set(matrix);
    return rowsAt(block.address, n);
  });
  return () => productInto(product, left, right, n, n, n);
}

/** C = A·B the way one would write it by hand for speed: blocks for the cache, four terms for each read of C. */
function blockedProductInto(c: Float64Array, a: Float64Array, b: Float64Array, n: number): void {
  const block = 64;
  c.fill(0);
  for (let k0 = 0; k0 < n; k0 += block) {
    const end = Math.min(k0 + block, n);
    for (let i = 0; i < n; i++) {
      const row = i * n;
      let k = k0;
      for (; k + 4 <= end; k += 4) {
        const [f0, f1, f2, f3] = [a[row + k], a[row + k + 1], a[row + k + 2], a[row + k + 3]];
        const b0 = k * n;
        const b1 = b0 + n;
        const b2 = b1 + n;
        const b3 = b2 + n;
        for (let j = 0; j < n; j++) {
          c[row + j] += f0 * b[b0 + j] + f1 * b[b1 + j] + f2 * b[b2 + j] + f3 * b[b3 + j];
        }
      }
      for (; k < end; k++) for (let j = 0; j < n; j++) c[row + j] += a[row + k] * b[k * n + j];
    }
  }
}

function eigenproblem(n: number): Measurement {
  const matrix = randomSymmetric(n, seededRandom(n));
  const forLibrary = Matrix.from1DArray(n, n, Array.from(matrix));
  return {
    name: `symmetric eigenproblem, n = ${n}`,
    ours: callsPerSecond(() => symmetricEigen(matrix, n), SECONDS),
    yardstick: callsPerSecond(
      () => new EigenvalueDecomposition(forLibrary, { assumeSymmetric: true }),
      SECONDS,
    ),
    unit: '1/s',
    against: 'ml-matrix',
  };
}

/** Packed integrals of no molecule, for work whose time does not depend on the values. */
function packedIntegrals(n: number): Float64Array {
  const pairs = (n * (n + 1)) / 2;
  return Float64Array.from({ length: (pairs * (pairs + 1)) / 2 }, (_, i) => 1 / (1 + (i % 97)));
}

function transformation(n: number): Measurement {
  const repulsion = packedIntegrals(n);
  const orbitals = randomArray(n * n, seededRandom(n));
  const work = () => transformTwoElectron(repulsion, orbitals, n, n);
  return {
    name: `transformation to orbitals, ${n} functions`,
    // long enough for the optimising compiler; of the plain form one call is
    ours: callsPerSecond(work, 5 * SECONDS),
    yardstick: 1 / inForm('plain', () => fastestCall(work, 5 * SECONDS)),
    unit: '1/s',
    against: 'the TypeScript form',
  };
}

function coulombExchange(n: number): Measurement {
  const repulsion = packedIntegrals(n);
  const density = randomSymmetric(n, seededRandom(n));
  const [coulomb, exchange] = [new Float64Array(n * n), new Float64Array(n * n)];
  const work = () => coulombExchangeInto(density, repulsion, n, coulomb, exchange);
  return {
    name: `Coulomb and exchange matrices, ${n} functions`,
    ours: callsPerSecond(work, SECONDS) * repulsion.length,
    yardstick: inForm('plain', () => callsPerSecond(work, SECONDS)) * repulsion.length,
    unit: 'integrals/s',
    against: 'the TypeScript form',
  };
}
