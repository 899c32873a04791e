import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import type { Block, KernelMemory } from '../kernels/kernel-memory';
import {
  type PlacedMatrix,
  type ProductInto,
  productIn,
  rowsAt,
  transposed,
} from '../kernels/matrix-product';
import { addScaledInto, dot } from '../linear-algebra/dense';
import { readAmplitudes, writeProduct } from './closed-shell-amplitudes';
import { type ClosedShellIntegrals, layClosedShellIntegrals } from './closed-shell-integrals';
import type { PairList } from './closed-shell-orbitals';
import {
  type ClosedShellPlaces,
  closedShellPlaces,
  type ParticlePairPlaces,
  particlePairPlaces,
} from './closed-shell-places';
import { type ClosedShellRoom, takeClosedShellRoom } from './closed-shell-room';
import { isClosedShellSpace } from './closed-shell-spin';
import type { DeterminantSpace } from './determinant-space';
import type { BareProduct } from './hamiltonian-product';
import type { Sector } from './sector';
import { makeEvenOrOdd } from './spin-flip';
import { IRREPS } from './string-classes';

type Numbers = Block<Float64Array>;

/** Whether `prepareClosedShellProduct` knows the space: single and double excitations of a closed shell. */
export function isClosedShellDoubles(space: DeterminantSpace, integrals: OrbitalIntegrals): boolean {
  return isClosedShellSpace(space) && !integrals.beta;
}

/**
 * H·c over the single and double excitations of a closed shell, as dense products over amplitudes instead of lists over
 * determinants. It serves vectors of every representation and spin; one without parity under the exchange of spins is
 * divided into its even and its odd part. With i, j, k, l holes, a, b, c, d particles, f the Fock matrix, y the single
 * excitations and D the double ones of one spin, U(ia, jb) those of which a is of that spin and b of the other, and p
 * the parity, which makes U(jb, ia) = p·U(ia, jb):
 *
 *   y′(ia) = f(ia)·c₀ + Σ f(ab) y(ib) − Σ f(ij) y(ja) + Σ [(1 + p)(ia|jb) − (ij|ab)] y(jb)
 *            + Σ f(jb) E(ia, jb) + Σ (ab|jc) E(ib, jc) − Σ (ji|kb) E(ja, kb),  E = U + D
 *   U′(ia, jb) = Y(ia, jb) + X(ib, ja) + p·[Y(jb, ia) + X(ja, ib)] + Σ (ac|bd) U(ic, jd) + Σ (ki|lj) U(ka, lb)
 *   D′(ia, jb) = W(ia, jb) − W(ib, ja) − W(ja, ib) + W(jb, ia)
 *                + Σ over c > d of [(ac|bd) − (ad|bc)] D(ic, jd) + Σ over k > l of [(ki|lj) − (kj|li)] D(ka, lb)
 *
 * in the field of the reference, whose energy is added to all. Here, with K of `ClosedShellIntegrals.exchange`, into
 * which half of f has gone (it comes twice), J = (ia|jb) and N(ia, jb) = U(ib, ja),
 *
 *   Y = Z − U·K,  W = Z − D·K,  X = −N·K,
 *   Z(ia, jb) = Σ E(ia, kc) J(kc, jb) + Σ (ca|jb) y(ic) − Σ (ki|jb) y(ka) + y(ia) f(jb) + ½ c₀ J(ia, jb).
 *
 * What two particles do to each other is taken apart by the symmetry of their pair, which makes two matrices of a
 * quarter of the size each.
 *
 * Cost: about o²v⁴/2 + 4·o³v³ + 4·o²v³ multiplications for o holes and v particles, less by the order of the point group;
 * a table of v⁴/2 + 2·o²v² + o·v³ numbers in kernel memory, less likewise.
 *
 * The equations are the matrix elements by Slater's rules (A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, tables 2.3
 * and 2.4) over spin orbitals, summed over the spins. Dense products over amplitudes: W. Meyer, J. Chem. Phys. 64, 2901
 * (1976).
 */
export function prepareClosedShellProduct(
  sectors: readonly Sector[],
  integrals: OrbitalIntegrals,
  orbitalIrreps: readonly number[] | undefined,
  memory: KernelMemory,
): BareProduct {
  let tables: Tables | undefined;
  const places = new Map<Sector, ClosedShellPlaces>();
  const ofParity = (sector: Sector, vector: Float64Array, product: Float64Array, parity: 1 | -1) => {
    tables ??= layTables(memory, integrals, sectors[0].space.alpha.electrons, orbitalIrreps);
    let ofSector = places.get(sector);
    if (!ofSector) {
      ofSector = closedShellPlaces(sector, tables.integrals, tables.particlePairs);
      places.set(sector, ofSector);
    }
    const { productInto } = tables;
    memory.scope(() => {
      const room = takeClosedShellRoom(memory, tables!.integrals, sector.irrep, parity);
      readAmplitudes(room, ofSector, vector);
      // an odd vector has nothing of the reference
      const { reference } = ofSector;
      const ofReference = reference === undefined || parity < 0 ? 0 : vector[reference];
      multiply(room, productInto, ofReference);
      writeProduct(room, ofSector, product);
      if (reference !== undefined) product[reference] = parity < 0 ? 0 : referencePart(room);
    });
    addScaledInto(product, tables.integrals.referenceEnergy, vector);
  };
  return (sector, vector, product, parity) => {
    if (parity === 1 || parity === -1) {
      ofParity(sector, vector, product, parity);
      return;
    }
    const ofPart = new Float64Array(vector.length);
    product.fill(0);
    for (const sign of [1, -1] as const) {
      const part = vector.slice();
      makeEvenOrOdd(sector, part, sign);
      ofParity(sector, part, ofPart, sign);
      addScaledInto(product, 1, ofPart);
    }
  };
}

/** What all products share. */
interface Tables {
  readonly integrals: ClosedShellIntegrals;
  readonly particlePairs: readonly ParticlePairPlaces[];
  readonly productInto: ProductInto;
}

function layTables(...given: Parameters<typeof layClosedShellIntegrals>): Tables {
  const [memory] = given;
  const integrals = layClosedShellIntegrals(...given);
  return { integrals, particlePairs: particlePairPlaces(integrals), productInto: productIn(memory) };
}

/** All parts of the product but that of the reference and the reference energy. */
function multiply(room: ClosedShellRoom, productInto: ProductInto, ofReference: number): void {
  multiplyLadders(room, productInto);
  forEachMatrix(room, (ofRow, rows, columns, at) => {
    const coulomb = rowsAt(room.integrals.coulomb[ofRow ^ room.irrep].address, columns);
    productInto(at(room.ofOpposite), at(room.both), coulomb, rows, columns, columns);
  });
  singlesToDoubles(room, productInto);
  doublesToSingles(room, productInto);
  coupleOneExcitation(room, ofReference);
  room.ofSame.view.set(room.ofOpposite.view);
  forEachMatrix(room, (ofRow, rows, columns, at) => {
    const exchange = rowsAt(room.integrals.exchange[ofRow ^ room.irrep].address, columns);
    const subtracted = { factor: -1, isAdded: true };
    productInto(at(room.ofOpposite), at(room.opposite), exchange, rows, columns, columns, subtracted);
    productInto(at(room.ofSame), at(room.same), exchange, rows, columns, columns, subtracted);
    productInto(at(room.ofExchanged), at(room.exchanged), exchange, rows, columns, columns, { factor: -1 });
  });
}

/** Calls for every matrix over single excitations that has elements. */
function forEachMatrix(
  { integrals: { singles }, irrep, layout: { start } }: ClosedShellRoom,
  take: (ofRow: number, rows: number, columns: number, at: (matrix: Numbers) => PlacedMatrix) => void,
): void {
  singles.size.forEach((rows, ofRow) => {
    const columns = singles.size[ofRow ^ irrep];
    if (rows === 0 || columns === 0) return;
    take(ofRow, rows, columns, ({ address }) => rowsAt(address + 8 * start[ofRow], columns));
  });
}

/** Two particles, or two holes, interact. */
function multiplyLadders({ integrals, irrep, pairs }: ClosedShellRoom, productInto: ProductInto): void {
  for (const kind of ['symmetric', 'antisymmetric'] as const) {
    const { holePairs, particlePairs, amplitudes, results } = pairs[kind];
    particlePairs.size.forEach((columns, h) => {
      const e = h ^ irrep;
      const rowsOfEqualSpin = kind === 'antisymmetric' ? integrals.holePairs.antisymmetric.size[e] : 0;
      const rows = holePairs.size[e] + rowsOfEqualSpin;
      if (rows === 0 || columns === 0) return;
      const [from, to] = [amplitudes[h], results[h]].map(({ address }) => address);
      const ofParticles = rowsAt(integrals.ofParticles[kind][h].address, columns);
      productInto(rowsAt(to, columns), rowsAt(from, columns), ofParticles, rows, columns, columns);
      const addHoles = (list: PairList, firstRow: number) => {
        const matrices = integrals.ofHoles[list.isStrict ? 'antisymmetric' : 'symmetric'];
        const count = list.size[e];
        const [source, target] = [from, to].map((address) =>
          rowsAt(address + 8 * firstRow * columns, columns),
        );
        productInto(target, rowsAt(matrices[e].address, count), source, count, count, columns, {
          isAdded: true,
        });
      };
      addHoles(holePairs, 0);
      if (rowsOfEqualSpin > 0) addHoles(integrals.holePairs.antisymmetric, holePairs.size[e]);
    });
  }
}

/** Y(ia, jb) += Σ_c y(ic)·(ca|jb) − Σ_k y(ka)·(ki|jb), y of single excitations. */
function singlesToDoubles(room: ClosedShellRoom, productInto: ProductInto): void {
  const { integrals, irrep, layout } = room;
  const { holes, particles, singles } = integrals;
  const ofSingles = (hole: number) => room.singles.address + 8 * singles.start[irrep][hole];
  forEachHoleRun(room, (ofI, firstI, countI, ofRow, countA, address) => {
    const columns = layout.stride[ofRow];
    const ofC = ofI ^ irrep;
    const ofA = ofI ^ ofRow;
    const countC = particles.counts[ofC];
    const target = address(room.ofOpposite);
    const isAdded = true;
    productInto(
      rowsAt(target, countA * columns),
      rowsAt(ofSingles(firstI), countC),
      rowsAt(integrals.particlesWithSingle[ofC][ofA].address, countA * columns),
      countI,
      countC,
      countA * columns,
      { isAdded },
    );
    const ofK = ofA ^ irrep;
    const countK = holes.counts[ofK];
    for (let i = 0; i < countI; i++) {
      const source = integrals.holesWithSingle[ofK][ofI].address + 8 * i * columns;
      productInto(
        rowsAt(target + 8 * i * countA * columns, columns),
        transposed(rowsAt(ofSingles(holes.start[ofK]), countA)),
        rowsAt(source, countI * columns),
        countA,
        countK,
        columns,
        { factor: -1, isAdded },
      );
    }
  });
}

/** The way back: y(ia) ← Σ (ab|jc)·(U + D)(ib, jc) − Σ (ji|kb)·(U + D)(ja, kb). */
function doublesToSingles(room: ClosedShellRoom, productInto: ProductInto): void {
  const { integrals, irrep, layout } = room;
  const { holes, particles, singles } = integrals;
  const isAdded = true;
  room.ofSingles.view.fill(0);
  forEachHoleRun(room, (ofI, firstI, countI, ofRow, countB, address) => {
    const columns = layout.stride[ofRow];
    const [ofA, ofB] = [ofI ^ irrep, ofI ^ ofRow];
    const countA = particles.counts[ofA];
    productInto(
      rowsAt(room.ofSingles.address + 8 * singles.start[irrep][firstI], countA),
      rowsAt(address(room.both), countB * columns),
      transposed(rowsAt(integrals.particlesWithSingle[ofA][ofB].address, countB * columns)),
      countI,
      countB * columns,
      countA,
      { isAdded },
    );
  });
  // here the run is of j and a, and i has what representation is left
  forEachHoleRun(room, (ofJ, _firstJ, countJ, ofRow, countA, address) => {
    const columns = layout.stride[ofRow];
    const ofI = ofJ ^ ofRow ^ irrep;
    const countI = holes.counts[ofI];
    for (let j = 0; j < countJ; j++) {
      productInto(
        rowsAt(room.ofSingles.address + 8 * singles.start[irrep][holes.start[ofI]], countA),
        rowsAt(integrals.holesWithSingle[ofJ][ofI].address + 8 * j * countI * columns, columns),
        transposed(rowsAt(address(room.both) + 8 * j * countA * columns, columns)),
        countI,
        columns,
        countA,
        { factor: -1, isAdded },
      );
    }
  });
}

/** Calls for the rows (ia), by representations of i and of the pair: side by side for all these i and a. */
function forEachHoleRun(
  { integrals: { holes, particles, singles }, irrep, layout: { start, stride, runs } }: ClosedShellRoom,
  take: (
    ofHole: number,
    first: number,
    count: number,
    ofRow: number,
    particleCount: number,
    address: (matrix: Numbers) => number,
  ) => void,
): void {
  holes.counts.forEach((count, ofHole) => {
    if (count === 0) return;
    const first = holes.start[ofHole];
    for (let ofRow = 0; ofRow < IRREPS; ofRow++) {
      const particleCount = particles.counts[ofHole ^ ofRow];
      if (particleCount === 0 || singles.size[ofRow ^ irrep] === 0) continue;
      const place = start[ofRow] + runs[ofRow][first] * stride[ofRow];
      take(ofHole, first, count, ofRow, particleCount, ({ address }) => address + 8 * place);
    }
  });
}

/** Single excitations with each other and the reference; f between holes and particles; the reference with doubles. */
function coupleOneExcitation(room: ClosedShellRoom, ofReference: number): void {
  const { integrals, irrep, parity, layout } = room;
  const { holes, particles, singles, fockBetween, fockOfHoles, fockOfParticles } = integrals;
  const [source, target] = [room.singles.view, room.ofSingles.view];
  const count = singles.size[irrep];
  const [coulomb, exchange] = [integrals.coulomb[irrep].view, integrals.exchange[irrep].view];
  const columns = singles.size[0];
  for (let row = 0; row < count; row++) {
    const start = layout.start[irrep] + row * columns;
    for (let column = 0; column < count; column++) {
      const place = row * count + column;
      target[row] += ((1 + parity) * coulomb[place] - exchange[place]) * source[column];
    }
    for (let column = 0; column < columns; column++) {
      target[row] += room.both.view[start + column] * fockBetween[column];
      room.ofOpposite.view[start + column] += source[row] * fockBetween[column];
    }
  }
  for (let i = 0; i < holes.count; i++) {
    const ofA = holes.irreps[i] ^ irrep;
    const run = singles.start[irrep];
    for (let a = 0; a < particles.counts[ofA]; a++) {
      const row = (particles.start[ofA] + a) * particles.count + particles.start[ofA];
      let sum = 0;
      for (let b = 0; b < particles.counts[ofA]; b++) sum += fockOfParticles[row + b] * source[run[i] + b];
      for (let j = holes.start[holes.irreps[i]]; j < holes.start[holes.irreps[i] + 1]; j++) {
        sum -= fockOfHoles[i * holes.count + j] * source[run[j] + a];
      }
      target[run[i] + a] += sum / 2;
    }
  }
  if (ofReference === 0) return;
  addScaledInto(target, ofReference, fockBetween);
  forEachCoulombBlock(room, (block, start) => {
    const { view } = room.ofOpposite;
    for (let k = 0; k < block.length; k++) view[start + k] += 0.5 * ofReference * block[k];
  });
}

/** What single and double excitations bring to the reference. */
function referencePart(room: ClosedShellRoom): number {
  let sum = 2 * dot(room.integrals.fockBetween, room.singles.view);
  forEachCoulombBlock(room, (block, start) => {
    sum += dot(block, room.both.view.subarray(start, start + block.length));
  });
  return sum;
}

function forEachCoulombBlock(
  { integrals: { coulomb }, layout: { start } }: ClosedShellRoom,
  take: (block: Float64Array, start: number) => void,
): void {
  coulomb.forEach(({ view }, g) => {
    take(view, start[g]);
  });
}
