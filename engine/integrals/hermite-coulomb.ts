import { boysFunctionsInto } from '../special-functions/boys-function';
import { cartesianComponents, cartesianIndex } from './cartesian-components';
import { hermiteStart } from './hermite-index';

/** Four shells of angular momentum 4 give Hermite integrals of degree 16. */
const HIGHEST_DEGREE = 16;
/** up to this degree the derivatives are written out */
const CLOSED_FORM_DEGREE = 4;
/** How many integrals are made at once; keeps those of s and p shells in the first-level cache. */
export const HERMITE_BATCH = 36;

/** Arguments of a batch of Hermite Coulomb integrals, {@link HERMITE_BATCH} numbers each. */
export class HermiteCoulombArguments {
  /** a, bohr⁻² */
  readonly exponent = new Float64Array(HERMITE_BATCH);
  readonly x = new Float64Array(HERMITE_BATCH);
  readonly y = new Float64Array(HERMITE_BATCH);
  readonly z = new Float64Array(HERMITE_BATCH);
  readonly prefactor = new Float64Array(HERMITE_BATCH);
}

const boysArguments = new Float64Array(HERMITE_BATCH);
const boysValues = new Float64Array(HERMITE_BATCH * (HIGHEST_DEGREE + 1));
const coordinates = new Float64Array(3);
/** For each index: the axis it is raised along, the index one and two below on it, and the factor of the latter. */
export const HERMITE_RECURSION = buildRecursion();

/**
 * Hermite Coulomb integrals R_tuv = prefactor · ∂^(t+u+v)/∂x^t∂y^u∂z^v F_0(a·(x² + y² + z²)) for all
 * t + u + v ≤ degree and the first `count` arguments.
 *
 * @param degree - 0 … 16
 * @param target - count × hermiteStart(degree + 1), row-major, columns in the order of {@link hermiteStart}
 *
 * Source: L. E. McMurchie, E. R. Davidson, J. Comput. Phys. 26, 218 (1978).
 * Cost: O(degree⁴) an argument; allocates nothing.
 */
export function hermiteCoulombInto(
  degree: number,
  batch: HermiteCoulombArguments,
  count: number,
  target: Float64Array,
): void {
  const { exponent, x, y, z } = batch;
  for (let k = 0; k < count; k++) boysArguments[k] = exponent[k] * (x[k] * x[k] + y[k] * y[k] + z[k] * z[k]);
  boysFunctionsInto(degree, boysArguments, count, boysValues);
  scaleDerivatives(degree, batch, count);
  if (degree <= CLOSED_FORM_DEGREE) expandClosedForm(degree, batch, count, target);
  else for (let k = 0; k < count; k++) expandByRecursion(degree, batch, k, target);
}

/** F_n becomes r_n = prefactor · (−2a)^n F_n. */
function scaleDerivatives(
  degree: number,
  { exponent, prefactor }: HermiteCoulombArguments,
  count: number,
): void {
  for (let k = 0, at = 0; k < count; k++) {
    let scale = prefactor[k];
    const ratio = -2 * exponent[k];
    for (let n = 0; n <= degree; n++) {
      boysValues[at++] *= scale;
      scale *= ratio;
    }
  }
}

/**
 * The derivatives up to fourth order written out: ∂_x r_n = x r_(n+1), so R_x = x r_1, R_xx = x² r_2 + r_1 and so on.
 */
function expandClosedForm(
  degree: number,
  batch: HermiteCoulombArguments,
  count: number,
  target: Float64Array,
): void {
  const width = hermiteStart(degree + 1);
  for (let k = 0; k < count; k++) {
    const offset = k * width;
    const boys = k * (degree + 1);
    target[offset] = boysValues[boys];
    if (degree === 0) continue;
    const x = batch.x[k];
    const y = batch.y[k];
    const z = batch.z[k];
    const r1 = boysValues[boys + 1];
    target[offset + 1] = x * r1;
    target[offset + 2] = y * r1;
    target[offset + 3] = z * r1;
    if (degree === 1) continue;
    const r2 = boysValues[boys + 2];
    const xx = x * x;
    const xy = x * y;
    const xz = x * z;
    const yy = y * y;
    const yz = y * z;
    const zz = z * z;
    target[offset + 4] = xx * r2 + r1;
    target[offset + 5] = xy * r2;
    target[offset + 6] = xz * r2;
    target[offset + 7] = yy * r2 + r1;
    target[offset + 8] = yz * r2;
    target[offset + 9] = zz * r2 + r1;
    if (degree === 2) continue;
    const r3 = boysValues[boys + 3];
    const xOnce = xx * r3 + r2;
    const yOnce = yy * r3 + r2;
    const zOnce = zz * r3 + r2;
    target[offset + 10] = x * (xOnce + 2 * r2);
    target[offset + 11] = y * xOnce;
    target[offset + 12] = z * xOnce;
    target[offset + 13] = x * yOnce;
    target[offset + 14] = xy * z * r3;
    target[offset + 15] = x * zOnce;
    target[offset + 16] = y * (yOnce + 2 * r2);
    target[offset + 17] = z * yOnce;
    target[offset + 18] = y * zOnce;
    target[offset + 19] = z * (zOnce + 2 * r2);
    if (degree === 3) continue;
    const r4 = boysValues[boys + 4];
    const xTwice = xx * r4 + r3;
    const yTwice = yy * r4 + r3;
    const zTwice = zz * r4 + r3;
    const xThrice = xTwice + 2 * r3;
    const yThrice = yTwice + 2 * r3;
    const zThrice = zTwice + 2 * r3;
    target[offset + 20] = xx * (xThrice + 3 * r3) + 3 * r2;
    target[offset + 21] = xy * xThrice;
    target[offset + 22] = xz * xThrice;
    target[offset + 23] = yy * xTwice + xOnce;
    target[offset + 24] = yz * xTwice;
    target[offset + 25] = zz * xTwice + xOnce;
    target[offset + 26] = xy * yThrice;
    target[offset + 27] = xz * yTwice;
    target[offset + 28] = xy * zTwice;
    target[offset + 29] = xz * zThrice;
    target[offset + 30] = yy * (yThrice + 3 * r3) + 3 * r2;
    target[offset + 31] = yz * yThrice;
    target[offset + 32] = zz * yTwice + yOnce;
    target[offset + 33] = yz * zThrice;
    target[offset + 34] = zz * (zThrice + 3 * r3) + 3 * r2;
  }
}

/**
 * R^(n)_(t+1,u,v) = x R^(n+1)_(tuv) + t R^(n+1)_(t−1,u,v), from n = degree down to 0. The parents of an index stand
 * before it, so that going through the indices backwards each step can overwrite the one before.
 */
function expandByRecursion(
  degree: number,
  batch: HermiteCoulombArguments,
  k: number,
  target: Float64Array,
): void {
  const { axis, parent, grandparent, multiplicity } = HERMITE_RECURSION;
  const offset = k * hermiteStart(degree + 1);
  const boys = k * (degree + 1);
  coordinates[0] = batch.x[k];
  coordinates[1] = batch.y[k];
  coordinates[2] = batch.z[k];
  target[offset] = boysValues[boys + degree];
  for (let n = degree - 1; n >= 0; n--) {
    for (let index = hermiteStart(degree - n + 1) - 1; index > 0; index--) {
      target[offset + index] =
        coordinates[axis[index]] * target[offset + parent[index]] +
        multiplicity[index] * target[offset + grandparent[index]];
    }
    target[offset] = boysValues[boys + n];
  }
}

function buildRecursion() {
  const count = hermiteStart(HIGHEST_DEGREE + 1);
  const axis = new Uint8Array(count);
  const parent = new Uint16Array(count);
  const grandparent = new Uint16Array(count);
  const multiplicity = new Float64Array(count);
  let index = 1;
  for (let degree = 1; degree <= HIGHEST_DEGREE; degree++) {
    for (const powers of cartesianComponents(degree)) {
      // the smallest power gives the smallest multiplicity, most often 0
      const raised = [0, 1, 2].filter((a) => powers[a] > 0).sort((a, b) => powers[a] - powers[b])[0];
      const lower = [...powers];
      lower[raised] -= 1;
      axis[index] = raised;
      parent[index] = hermiteStart(degree - 1) + cartesianIndex(lower[1], lower[2]);
      if (lower[raised] > 0) {
        multiplicity[index] = lower[raised];
        lower[raised] -= 1;
        grandparent[index] = hermiteStart(degree - 2) + cartesianIndex(lower[1], lower[2]);
      }
      index++;
    }
  }
  return { axis, parent, grandparent, multiplicity };
}
