import { type DeterminantSpace, rowLength } from './determinant-space';
import { occupiedOrbitals } from './determinants';
import type { SingleReplacements } from './replacements';
import { highestRank, type StringSpace, stringAt } from './string-space';

/** A rotation of the orbitals p and q: |p⟩ → cos|p⟩ + sin|q⟩, |q⟩ → cos|q⟩ − sin|p⟩. */
interface PlaneRotation {
  readonly p: number;
  readonly q: number;
  readonly cosine: number;
  readonly sine: number;
}

/** Elements below this are taken for zero when a map is taken apart. */
const NEGLIGIBLE = 1e-13;

/** Does a space hold all determinants, so that every map of the orbitals stays within it? */
export function isFullSpace({ alpha, beta, maximumRank }: DeterminantSpace): boolean {
  const isFull = ({ orbitalCount, electrons, maximumRank: rank }: StringSpace) =>
    rank === highestRank(orbitalCount, electrons, Number.POSITIVE_INFINITY);
  return isFull(alpha) && isFull(beta) && maximumRank === alpha.maximumRank + beta.maximumRank;
}

/**
 * What an orthogonal map of the orbitals, |q⟩ → Σ over p of |p⟩·map(p, q), does to full-CI vectors. The map is taken
 * apart into rotations of two orbitals and signs; a rotation couples a string with one of the two orbitals occupied
 * to one other string only.
 *
 * @param map - n×n row-major, orthogonal
 * @returns product ← map·vector
 */
export function orbitalMap(
  space: DeterminantSpace,
  map: Float64Array,
): (vector: Float64Array, product: Float64Array) => void {
  const { rotations, signs } = planeRotations(map, space.orbitalCount);
  const ofAlpha = stringSigns(space.alpha, signs);
  const ofBeta = stringSigns(space.beta, signs);
  return (vector, product) => {
    for (let row = 0; row < space.beta.count; row++) {
      const start = space.rows.start[row];
      const length = rowLength(space.rows, row);
      for (let a = 0; a < length; a++) product[start + a] = ofBeta[row] * ofAlpha[a] * vector[start + a];
    }
    for (const rotation of rotations) rotateInPlace(space, rotation, product);
  };
}

/** map = R(1)…R(K)·diag(signs); in the order of application, R(K) first. */
function planeRotations(map: Float64Array, n: number) {
  const rest = map.slice();
  const rotations: PlaneRotation[] = [];
  for (let p = 0; p < n; p++) {
    for (let q = p + 1; q < n; q++) {
      const below = rest[q * n + p];
      if (Math.abs(below) < NEGLIGIBLE) continue;
      const size = Math.hypot(rest[p * n + p], below);
      const [cosine, sine] = [rest[p * n + p] / size, below / size];
      for (let k = 0; k < n; k++) {
        const [first, second] = [rest[p * n + k], rest[q * n + k]];
        rest[p * n + k] = cosine * first + sine * second;
        rest[q * n + k] = cosine * second - sine * first;
      }
      rotations.unshift({ p, q, cosine, sine });
    }
  }
  return { rotations, signs: Array.from({ length: n }, (_, p) => (rest[p * n + p] < 0 ? -1 : 1)) };
}

function stringSigns(strings: StringSpace, signs: readonly number[]): Int8Array {
  return Int8Array.from({ length: strings.count }, (_, string) =>
    occupiedOrbitals(stringAt(strings, string)).reduce((product, p) => product * signs[p], 1),
  );
}

function rotateInPlace(
  { orbitalCount: n, alphaReplacements, betaReplacements, rows, alpha, beta }: DeterminantSpace,
  { p, q, cosine, sine }: PlaneRotation,
  vector: Float64Array,
): void {
  const turn = (ofP: number, ofQ: number, signedSine: number) => {
    const [first, second] = [vector[ofP], vector[ofQ]];
    vector[ofP] = cosine * first - signedSine * second;
    vector[ofQ] = cosine * second + signedSine * first;
  };
  const entries = ({ byPairStart }: SingleReplacements) =>
    [byPairStart[q * n + p], byPairStart[q * n + p + 1]] as const;
  const [betaFirst, betaEnd] = entries(betaReplacements);
  for (let k = betaFirst; k < betaEnd; k++) {
    const fromP = rows.start[betaReplacements.pairSource[k]];
    const fromQ = rows.start[betaReplacements.pairTarget[k]];
    const signedSine = sine * betaReplacements.pairSign[k];
    for (let a = 0; a < alpha.count; a++) turn(fromP + a, fromQ + a, signedSine);
  }
  const { pairSource, pairTarget, pairSign } = alphaReplacements;
  const [first, end] = entries(alphaReplacements);
  for (let row = 0; row < beta.count; row++) {
    const start = rows.start[row];
    for (let k = first; k < end; k++) turn(start + pairSource[k], start + pairTarget[k], sine * pairSign[k]);
  }
}
