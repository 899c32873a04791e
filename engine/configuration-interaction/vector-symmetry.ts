import { addScaledInto, dot } from '../linear-algebra/dense';
import type { DistinguishingOperator } from './degenerate-states';
import { type DeterminantSpace, rowLength } from './determinant-space';
import { isOccupied, moveElectron, occupiedOrbitals, replacementPhase } from './determinants';
import { isFullSpace, orbitalMap } from './orbital-map';
import { stringIrreps } from './string-classes';
import { placeOf, type StringSpace, stringAt } from './string-space';

/** What is known of the symmetry of the orbitals that many-electron functions are made of. */
export interface OrbitalSpecies {
  /**
   * number of each orbital's representation, 0 … 7; a product of orbitals has the exclusive or of the numbers. Absent
   * where orbitals mix representations
   */
  readonly irreps?: readonly number[];
  /**
   * ⟨p|R|q⟩ of the operations whose characters make the bits of the numbers, n×n row-major; they label full CI also
   * over orbitals that mix representations
   */
  readonly operations?: readonly Float64Array[];
  /** of linear molecules: ⟨p| ∂/∂φ |q⟩ about the axis, n×n antisymmetric, row-major */
  readonly axialRotation?: Float64Array;
}

/** Symmetry of one state. */
export interface VectorSymmetry {
  /** weight of each of the 8 representations; sum 1 */
  readonly irrepWeights: Float64Array;
  /**
   * of linear molecules: expectation value of the squared angular momentum about the axis; too small where the
   * rotation leads out of the space, as in truncated CI over an unequally filled π shell
   */
  readonly axialSquare?: number;
}

/** product ← operator·vector, projected on the space. */
type VectorOperator = (vector: Float64Array, product: Float64Array) => void;

/** Elements of the axial rotation below this are rounding, and would only cost time. */
const NO_ROTATION = 1e-10;
/** A part of this squared norm is rounding. */
const NOTHING = 1e-24;
/** Numbers of representations and squared angular momenta are whole. */
const WHOLE = 0.1;

/** How vectors over many-electron functions behave under the operations that the orbitals follow. */
export class SpaceSymmetry {
  /**
   * @param operations - commuting operations of order two, whose characters make the bits of representations
   * @param rotate - ∂/∂φ about the axis of a linear molecule
   * @param irreps - representation of each function, where each has one
   */
  constructor(
    private readonly operations: readonly VectorOperator[],
    private readonly rotate: VectorOperator | undefined,
    private readonly irreps?: Uint8Array,
  ) {}

  /** @param vector - of norm 1 */
  describe(vector: Float64Array): VectorSymmetry {
    const irrepWeights = new Float64Array(8);
    const { irreps } = this;
    if (irreps) {
      for (let i = 0; i < vector.length; i++) irrepWeights[irreps[i]] += vector[i] ** 2;
    } else {
      this.split(vector, (part, irrep) => {
        irrepWeights[irrep] = dot(part, part);
      });
    }
    if (!this.rotate) return { irrepWeights };
    const turned = new Float64Array(vector.length);
    this.rotate(vector, turned);
    return { irrepWeights, axialSquare: dot(turned, turned) };
  }

  /** Operators that make degenerate states of different symmetry definite. */
  distinguishingOperators(): DistinguishingOperator[] {
    const { rotate } = this;
    const byIrrep: DistinguishingOperator = {
      tolerance: WHOLE,
      apply: (vector, product) => {
        product.fill(0);
        this.split(vector, (part, irrep) => {
          addScaledInto(product, irrep, part);
        });
      },
    };
    if (!rotate) return [byIrrep];
    return [
      byIrrep,
      {
        tolerance: WHOLE,
        apply: (vector, product) => {
          const turned = new Float64Array(vector.length);
          rotate(vector, turned);
          rotate(turned, product);
          for (let i = 0; i < product.length; i++) product[i] = -product[i];
        },
      },
    ];
  }

  /** Hands over the part of a vector in each representation, one after the other so that few are held at a time. */
  private split(
    vector: Float64Array,
    take: (part: Float64Array, irrep: number) => void,
    bit = 0,
    irrep = 0,
  ): void {
    if (dot(vector, vector) < NOTHING) return;
    if (bit === this.operations.length) {
      take(vector, irrep);
      return;
    }
    const image = new Float64Array(vector.length);
    this.operations[bit](vector, image);
    const part = new Float64Array(vector.length);
    for (const sign of [1, -1]) {
      for (let i = 0; i < part.length; i++) part[i] = (vector[i] + sign * image[i]) / 2;
      this.split(part, take, bit + 1, sign > 0 ? irrep : irrep | (1 << bit));
    }
  }
}

/** Representations have numbers of so many bits. */
const BITS = 3;

/** @returns undefined where the orbitals mix representations, and the space does not hold all determinants */
export function determinantSymmetry(
  space: DeterminantSpace,
  species: OrbitalSpecies,
): SpaceSymmetry | undefined {
  const rotate = species.axialRotation && determinantRotation(space, species.axialRotation);
  if (!species.irreps) {
    if (!species.operations || !isFullSpace(space)) return undefined;
    return new SpaceSymmetry(
      species.operations.map((operation) => orbitalMap(space, operation)),
      rotate,
    );
  }
  const ofAlpha = stringIrreps(space.alpha, species.irreps);
  const ofBeta = stringIrreps(space.beta, species.irreps);
  const irreps = new Uint8Array(space.dimension);
  for (let row = 0; row < space.beta.count; row++) {
    const start = space.rows.start[row];
    const length = rowLength(space.rows, row);
    for (let a = 0; a < length; a++) irreps[start + a] = ofAlpha[a] ^ ofBeta[row];
  }
  return new SpaceSymmetry(characters(irreps), rotate, irreps);
}

/** The operations where every function belongs to a representation: signs. */
function characters(irreps: Uint8Array): VectorOperator[] {
  return Array.from({ length: BITS }, (_, bit) => (vector, product) => {
    for (let i = 0; i < vector.length; i++) product[i] = (irreps[i] >> bit) & 1 ? -vector[i] : vector[i];
  });
}

/**
 * Of single excitations from a closed shell that the operations leave as it is, row-major occupied × virtual:
 * (∂/∂φ·t)(ia) = Σ over b of K(ab) t(ib) + Σ over j of K(ij) t(ja).
 */
export function singlesSymmetry(
  occupied: number,
  virtuals: number,
  { irreps, axialRotation }: OrbitalSpecies,
): SpaceSymmetry | undefined {
  if (!irreps) return undefined;
  const n = occupied + virtuals;
  const ofExcitations = Uint8Array.from({ length: occupied * virtuals }, (_, ia) => {
    return irreps[Math.trunc(ia / virtuals)] ^ irreps[occupied + (ia % virtuals)];
  });
  const rotate: VectorOperator = (vector, product) => {
    product.fill(0);
    for (let i = 0; i < occupied; i++) {
      for (let a = 0; a < virtuals; a++) {
        let sum = 0;
        for (let b = 0; b < virtuals; b++) {
          sum += axialRotation![(occupied + a) * n + occupied + b] * vector[i * virtuals + b];
        }
        for (let j = 0; j < occupied; j++) sum += axialRotation![i * n + j] * vector[j * virtuals + a];
        product[i * virtuals + a] = sum;
      }
    }
  };
  return new SpaceSymmetry(characters(ofExcitations), axialRotation && rotate, ofExcitations);
}

function determinantRotation(space: DeterminantSpace, rotation: Float64Array): VectorOperator {
  const ofAlpha = stringRotation(space.alpha, rotation);
  const ofBeta = space.beta === space.alpha ? ofAlpha : stringRotation(space.beta, rotation);
  const { rows } = space;
  return (vector, product) => {
    product.fill(0);
    ofBeta.factor.forEach((factor, k) => {
      const [source, target] = [ofBeta.source[k], ofBeta.target[k]];
      const [from, to] = [rows.start[source], rows.start[target]];
      const length = Math.min(rowLength(rows, source), rowLength(rows, target));
      for (let a = 0; a < length; a++) product[to + a] += factor * vector[from + a];
    });
    const { source, target, factor } = ofAlpha;
    for (let row = 0; row < space.beta.count; row++) {
      const start = rows.start[row];
      const length = rowLength(rows, row);
      // targets rise
      for (let k = 0; k < factor.length && target[k] < length; k++) {
        if (source[k] >= length) continue;
        product[start + target[k]] += factor[k] * vector[start + source[k]];
      }
    }
  };
}

/**
 * Elements of the axial rotation between strings, by rising target; few, as it joins representations that differ by that
 * of Rz only.
 */
function stringRotation(strings: StringSpace, rotation: Float64Array) {
  const n = strings.orbitalCount;
  const partners = Array.from({ length: n }, (_, p) =>
    Array.from({ length: n }, (_, q) => q).filter((q) => isElement(rotation[p * n + q])),
  );
  const target: number[] = [];
  const source: number[] = [];
  const factor: number[] = [];
  const moved = new Int32Array(strings.words);
  for (let place = 0; place < strings.count; place++) {
    const string = stringAt(strings, place);
    for (const p of occupiedOrbitals(string)) {
      for (const q of partners[p]) {
        if (isOccupied(string, q)) continue;
        moved.set(string);
        moveElectron(moved, p, q);
        const from = placeOf(strings, moved);
        if (from < 0) continue;
        target.push(place);
        source.push(from);
        factor.push(replacementPhase(string, p, q) * rotation[p * n + q]);
      }
    }
  }
  return { target, source, factor };
}

function isElement(value: number): boolean {
  return Math.abs(value) > NO_ROTATION;
}
