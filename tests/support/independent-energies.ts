import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { PlacedBasis } from '../../engine/basis/contracted-gaussian';
import { molecularIntegrals } from '../../engine/calculation/molecular-integrals';
import type { Molecule } from '../../engine/molecule/molecule';
import { lowestEigenvalue, type SparseSymmetric } from './lowest-eigenvalue';

/*
 * Energies by other means than the engine's: Roothaan's equations with one effective Fock operator and level shifts,
 * solved with ml-matrix, and CI over a list of determinants whose elements follow the Slater–Condon rules one by one.
 * Only the integrals over basis functions are the engine's, which have tests of their own. For s and p functions of
 * atoms on the z axis; labels of the reflections x → −x and y → −y are 0 (s, pz), 1 (px), 2 (py), and multiply by XOR.
 */

const LABELS = [0, 1, 2] as const;

/** Numbers of doubly and of singly occupied orbitals of each label. */
export interface Occupations {
  readonly closed: readonly [number, number, number];
  readonly open: readonly [number, number, number];
}

export interface IndependentEnergies {
  /** RHF, ROHF for open shells */
  readonly meanField: number;
  readonly singlesDoubles: number;
  readonly full: number;
}

interface Orbital {
  readonly label: number;
  /** electrons in it */
  readonly occupation: 0 | 1 | 2;
  readonly coefficients: readonly number[];
}

const triangle = (i: number, j: number) => (i > j ? (i * (i + 1)) / 2 + j : (j * (j + 1)) / 2 + i);

type Repulsion = (p: number, q: number, r: number, s: number) => number;

/**
 * @param frozen - doubly occupied orbitals, the lowest, that CI leaves alone
 * @param withFull - whether full CI is small enough to be wanted
 */
export function independentEnergies(
  molecule: Molecule,
  basis: PlacedBasis,
  occupations: Occupations,
  frozen = 0,
  withFull = true,
): IndependentEnergies {
  const { problem } = molecularIntegrals(molecule, basis);
  const n = problem.functionCount;
  const core = Matrix.from1DArray(n, n, problem.coreHamiltonian);
  const overlap = Matrix.from1DArray(n, n, problem.overlap);
  const repulsion: Repulsion = (p, q, r, s) => problem.repulsion[triangle(triangle(p, q), triangle(r, s))]!;
  const labels = basis.shells.flatMap(({ angularMomentum }) => (angularMomentum === 0 ? [0] : [1, 2, 0]));
  const { orbitals, electronic } = selfConsistentField(core, overlap, repulsion, labels, occupations);
  const meanField = electronic + problem.nuclearRepulsion;
  const ci = activeHamiltonian(core, repulsion, orbitals, frozen);
  const lowest = (rank: number) =>
    lowestEigenvalue(hamiltonian(ci, rank)) + ci.coreEnergy + problem.nuclearRepulsion;
  const singlesDoubles = lowest(2);
  return { meanField, singlesDoubles, full: withFull ? lowest(Number.POSITIVE_INFINITY) : Number.NaN };
}

/** Level shifts of open and empty orbitals, hartree: the iteration then keeps the orbitals that it has filled. */
const OPEN_SHIFT = 0.4;
const EMPTY_SHIFT = 0.8;
const GRADIENT_TOLERANCE = 1e-8;
const MOST_ITERATIONS = 2000;

function selfConsistentField(
  core: Matrix,
  overlap: Matrix,
  repulsion: Repulsion,
  labels: readonly number[],
  { closed, open }: Occupations,
): { readonly orbitals: readonly Orbital[]; readonly electronic: number } {
  const n = labels.length;
  const start = LABELS.map((label) => startOrbitals(core, overlap, labels, label));
  let blocks = start;
  for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
    const density = (counts: readonly number[]) => {
      const sum = Matrix.zeros(n, n);
      for (const [label, block] of blocks.entries()) {
        for (let k = 0; k < counts[label]!; k++) {
          const column = block.subMatrix(0, n - 1, k, k);
          sum.add(column.mmul(column.transpose()));
        }
      }
      return sum;
    };
    const alpha = density(LABELS.map((label) => closed[label] + open[label]));
    const beta = density(closed);
    const [fockAlpha, fockBeta] = fockMatrices(core, alpha, beta, repulsion);
    const electronic =
      (contract(alpha, Matrix.add(core, fockAlpha)) + contract(beta, Matrix.add(core, fockBeta))) / 2;
    let gradient = 0;
    const next = blocks.map((block, label) => {
      const size = block.columns;
      if (size === 0) return block;
      const [fa, fb] = [fockAlpha, fockBeta].map((fock) => block.transpose().mmul(fock).mmul(block));
      const kind = (k: number) => (k < closed[label]! ? 2 : k < closed[label]! + open[label]! ? 1 : 0);
      const effective = Matrix.zeros(size, size);
      for (let p = 0; p < size; p++) {
        for (let q = 0; q < size; q++) {
          const [a, b] = [fa!.get(p, q), fb!.get(p, q)];
          const kinds = kind(p) + kind(q);
          // closed–open: the beta operator; open–empty: the alpha one; all else: their mean
          const isMixed = kind(p) !== kind(q);
          const value = isMixed && kinds === 3 ? b : isMixed && kinds === 1 ? a : (a + b) / 2;
          const shift = p === q ? (kind(p) === 1 ? OPEN_SHIFT : kind(p) === 0 ? EMPTY_SHIFT : 0) : 0;
          effective.set(p, q, value + shift);
          if (isMixed) gradient = Math.max(gradient, Math.abs(value));
        }
      }
      return block.mmul(sortedVectors(effective));
    });
    if (gradient < GRADIENT_TOLERANCE) {
      return { orbitals: collect(blocks, closed, open, [fockAlpha, fockBeta]), electronic };
    }
    blocks = next;
  }
  throw new Error('plain self-consistent field did not converge');
}

/** Orbitals by label, each filled ones first; the doubly occupied ones by energy, so that the core comes first. */
function collect(
  blocks: readonly Matrix[],
  closed: readonly number[],
  open: readonly number[],
  [fockAlpha, fockBeta]: readonly [Matrix, Matrix],
): readonly Orbital[] {
  const all = blocks.flatMap((block, label) =>
    Array.from({ length: block.columns }, (_, k) => {
      const coefficients = block.getColumn(k);
      const occupation = k < closed[label]! ? 2 : k < closed[label]! + open[label]! ? 1 : 0;
      const column = Matrix.columnVector(coefficients);
      const energy = column.transpose().mmul(Matrix.add(fockAlpha, fockBeta)).mmul(column).get(0, 0) / 2;
      return { label, occupation, coefficients, energy } as const;
    }),
  );
  return all.sort((a, b) => b.occupation - a.occupation || a.energy - b.energy);
}

/** Of the core Hamiltonian, over the functions of one label. */
function startOrbitals(core: Matrix, overlap: Matrix, labels: readonly number[], label: number): Matrix {
  const own = labels.flatMap((other, index) => (other === label ? [index] : []));
  if (own.length === 0) return Matrix.zeros(labels.length, 0);
  const within = (matrix: Matrix) => matrix.selection(own, own);
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(within(overlap), {
    assumeSymmetric: true,
  });
  const inverseRoot = eigenvectorMatrix
    .mmul(Matrix.diag(realEigenvalues.map((value) => value ** -0.5)))
    .mmul(eigenvectorMatrix.transpose());
  const vectors = inverseRoot.mmul(sortedVectors(inverseRoot.mmul(within(core)).mmul(inverseRoot)));
  const all = Matrix.zeros(labels.length, own.length);
  for (const [row, index] of own.entries()) all.setRow(index, vectors.getRow(row));
  return all;
}

function sortedVectors(symmetric: Matrix): Matrix {
  const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(symmetric, {
    assumeSymmetric: true,
  });
  const order = realEigenvalues.map((_, k) => k).sort((a, b) => realEigenvalues[a]! - realEigenvalues[b]!);
  return eigenvectorMatrix.selection(
    order.map((_, k) => k),
    order,
  );
}

const contract = (a: Matrix, b: Matrix) => Matrix.mul(a, b).sum();

function fockMatrices(core: Matrix, alpha: Matrix, beta: Matrix, repulsion: Repulsion): [Matrix, Matrix] {
  const n = core.rows;
  const fock = [core.clone(), core.clone()] as [Matrix, Matrix];
  for (let p = 0; p < n; p++) {
    for (let q = 0; q <= p; q++) {
      let [a, b] = [0, 0];
      for (let r = 0; r < n; r++) {
        for (let s = 0; s < n; s++) {
          const coulomb = (alpha.get(r, s) + beta.get(r, s)) * repulsion(p, q, r, s);
          const exchange = repulsion(p, r, q, s);
          a += coulomb - alpha.get(r, s) * exchange;
          b += coulomb - beta.get(r, s) * exchange;
        }
      }
      for (const [matrix, value] of [
        [fock[0], a],
        [fock[1], b],
      ] as const) {
        matrix.set(p, q, matrix.get(p, q) + value);
        if (p !== q) matrix.set(q, p, matrix.get(q, p) + value);
      }
    }
  }
  return fock;
}

/** What CI needs over its orbitals. */
interface ActiveHamiltonian {
  readonly labels: readonly number[];
  readonly occupations: readonly number[];
  readonly oneElectron: readonly (readonly number[])[];
  readonly repulsion: Repulsion;
  /** of the frozen orbitals */
  readonly coreEnergy: number;
}

function activeHamiltonian(
  core: Matrix,
  overFunctions: Repulsion,
  orbitals: readonly Orbital[],
  frozen: number,
): ActiveHamiltonian {
  const m = orbitals.length;
  const tensor = transform(overFunctions, orbitals);
  const repulsion: Repulsion = (p, q, r, s) => tensor[((p * m + q) * m + r) * m + s]!;
  const coefficients = new Matrix(orbitals.map((orbital) => [...orbital.coefficients]));
  const bare = coefficients.mmul(core).mmul(coefficients.transpose());
  const filled = Array.from({ length: frozen }, (_, k) => k);
  const field = (p: number, q: number) =>
    filled.reduce((sum, k) => sum + 2 * repulsion(p, q, k, k) - repulsion(p, k, k, q), bare.get(p, q));
  const active = orbitals.map((_, p) => p).slice(frozen);
  return {
    labels: active.map((p) => orbitals[p]!.label),
    occupations: active.map((p) => orbitals[p]!.occupation),
    oneElectron: active.map((p) => active.map((q) => field(p, q))),
    repulsion: (p, q, r, s) => repulsion(p + frozen, q + frozen, r + frozen, s + frozen),
    coreEnergy: filled.reduce((sum, k) => sum + bare.get(k, k) + field(k, k), 0),
  };
}

/** One index after the other; all four sums in full. */
function transform(overFunctions: Repulsion, orbitals: readonly Orbital[]): Float64Array {
  const m = orbitals.length;
  let tensor = new Float64Array(m ** 4);
  for (let index = 0; index < tensor.length; index++) {
    const s = index % m;
    const r = Math.trunc(index / m) % m;
    const q = Math.trunc(index / m ** 2) % m;
    tensor[index] = overFunctions(Math.trunc(index / m ** 3), q, r, s);
  }
  // the first index is summed over and becomes the last, four times
  for (let pass = 0; pass < 4; pass++) {
    const next = new Float64Array(m ** 4);
    for (let rest = 0; rest < m ** 3; rest++) {
      for (let p = 0; p < m; p++) {
        let sum = 0;
        for (let mu = 0; mu < m; mu++) sum += orbitals[p]!.coefficients[mu]! * tensor[mu * m ** 3 + rest]!;
        next[rest * m + p] = sum;
      }
    }
    tensor = next;
  }
  return tensor;
}

/** Occupied orbitals of each spin as bits. */
interface Determinant {
  readonly alpha: number;
  readonly beta: number;
}

function bitCount(bits: number): number {
  // in pairs, in fours, in bytes, then all four bytes at once
  const pairs = bits - ((bits >>> 1) & 0x55555555);
  const fours = (pairs & 0x33333333) + ((pairs >>> 2) & 0x33333333);
  return (((fours + (fours >>> 4)) & 0x0f0f0f0f) * 0x01010101) >>> 24;
}

const lowestBit = (bits: number) => 31 - Math.clz32(bits & -bits);

function positions(bits: number): number[] {
  const found: number[] = [];
  for (let rest = bits; rest !== 0; rest &= rest - 1) found.push(lowestBit(rest));
  return found;
}

/** Smaller elements are rounding, hartree. */
const SMALLEST_ELEMENT = 1e-14;

/** All determinants of the reference's label, up to a rank of excitation, with the elements that are not zero. */
function hamiltonian(active: ActiveHamiltonian, maximumRank: number): SparseSymmetric {
  const { occupations, labels } = active;
  const bitsWhere = (least: number) =>
    occupations.reduce((bits, occupation, p) => (occupation >= least ? bits | (1 << p) : bits), 0);
  const reference = { alpha: bitsWhere(1), beta: bitsWhere(2) };
  const labelOf = (bits: number) => positions(bits).reduce((label, p) => label ^ labels[p]!, 0);
  const strings = (like: number) =>
    Array.from({ length: 1 << labels.length }, (_, bits) => bits)
      .filter((bits) => bitCount(bits) === bitCount(like))
      .map((bits) => ({ bits, label: labelOf(bits), rank: bitCount(bits & ~like) }));
  const [ofAlpha, ofBeta] = [strings(reference.alpha), strings(reference.beta)];
  const whole = labelOf(reference.alpha) ^ labelOf(reference.beta);
  const determinants: Determinant[] = ofAlpha.flatMap((alpha) =>
    ofBeta
      .filter(({ label, rank }) => (label ^ alpha.label) === whole && rank + alpha.rank <= maximumRank)
      .map((beta) => ({ alpha: alpha.bits, beta: beta.bits })),
  );
  const diagonal = determinants.map((determinant) => energyOf(active, determinant));
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  const alphas = Int32Array.from(determinants, ({ alpha }) => alpha);
  const betas = Int32Array.from(determinants, ({ beta }) => beta);
  for (let i = 0; i < alphas.length; i++) {
    for (let j = 0; j < i; j++) {
      const differences = bitCount(alphas[i]! ^ alphas[j]!) + bitCount(betas[i]! ^ betas[j]!);
      if (differences > 4) continue;
      const [left, right] = [determinants[i]!, determinants[j]!];
      const value = differences === 2 ? single(active, left, right) : double(active, left, right);
      if (Math.abs(value) < SMALLEST_ELEMENT) continue;
      rows.push(i);
      columns.push(j);
      values.push(value);
    }
  }
  return { diagonal, rows, columns, values };
}

function energyOf({ oneElectron, repulsion }: ActiveHamiltonian, { alpha, beta }: Determinant): number {
  const [up, down] = [positions(alpha), positions(beta)];
  let energy = 0;
  for (const [own, other] of [
    [up, down],
    [down, up],
  ]) {
    for (const p of own!) {
      energy += oneElectron[p]![p]!;
      for (const q of own!) energy += (repulsion(p, p, q, q) - repulsion(p, q, q, p)) / 2;
      for (const q of other!) energy += repulsion(p, p, q, q) / 2;
    }
  }
  return energy;
}

/** Sign of a†(to) a(from) on a string: electrons that stand between the two. */
function replacementSign(bits: number, from: number, to: number): number {
  const [low, high] = from < to ? [from, to] : [to, from];
  const between = bits & ((1 << high) - 1) & ~((1 << (low + 1)) - 1);
  return bitCount(between) % 2 === 0 ? 1 : -1;
}

function single(
  { oneElectron, repulsion }: ActiveHamiltonian,
  left: Determinant,
  right: Determinant,
): number {
  const isAlpha = left.alpha !== right.alpha;
  const [to, from] = isAlpha ? [left.alpha, right.alpha] : [left.beta, right.beta];
  const other = isAlpha ? right.beta : right.alpha;
  const [i, a] = [lowestBit(from & ~to), lowestBit(to & ~from)];
  let value = oneElectron[i]![a]!;
  for (const k of positions(from)) value += repulsion(i, a, k, k) - repulsion(i, k, k, a);
  for (const k of positions(other)) value += repulsion(i, a, k, k);
  return replacementSign(from, i, a) * value;
}

function double({ repulsion }: ActiveHamiltonian, left: Determinant, right: Determinant): number {
  if (left.alpha !== right.alpha && left.beta !== right.beta) {
    const [i, a] = [lowestBit(right.alpha & ~left.alpha), lowestBit(left.alpha & ~right.alpha)];
    const [j, b] = [lowestBit(right.beta & ~left.beta), lowestBit(left.beta & ~right.beta)];
    return replacementSign(right.alpha, i, a) * replacementSign(right.beta, j, b) * repulsion(i, a, j, b);
  }
  const [to, from] = left.alpha === right.alpha ? [left.beta, right.beta] : [left.alpha, right.alpha];
  const [i, j] = positions(from & ~to) as [number, number];
  const [a, b] = positions(to & ~from) as [number, number];
  const between = (from & ~(1 << i)) | (1 << a);
  const sign = replacementSign(from, i, a) * replacementSign(between, j, b);
  return sign * (repulsion(i, a, j, b) - repulsion(i, b, j, a));
}
