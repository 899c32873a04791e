import { add, at, fma, mul, put, times } from './vector';

/*
 * Hermite Coulomb integrals of two primitive quartets at once; formulas and order as in integrals/hermite-coulomb.ts.
 */

/** up to this degree the derivatives are written out */
const CLOSED_FORM_DEGREE: i32 = 4;
/** an entry of the recursion: byte offsets of coordinate, parent and grandparent (i32), 4 bytes free, the factor (f64) */
const STEP_BYTES: usize = 24;

/**
 * R_tuv of both lanes as a row of vectors.
 *
 * @param derivatives - r_0 … r_degree, a row of vectors
 * @param coordinates - x, y, z, a row of vectors
 */
export function hermiteInto(
  degree: i32,
  coordinates: usize,
  derivatives: usize,
  recursion: usize,
  target: usize,
): void {
  if (degree <= CLOSED_FORM_DEGREE) {
    closedFormInto(degree, coordinates, derivatives, target);
    return;
  }
  // the closed form serves the highest derivatives, each step of the recursion takes one derivative off
  closedFormInto(CLOSED_FORM_DEGREE, coordinates, derivatives + ((<usize>(degree - CLOSED_FORM_DEGREE)) << 4), target);
  for (let reached = CLOSED_FORM_DEGREE + 1; reached <= degree; reached++) {
    const count = ((reached + 1) * (reached + 2) * (reached + 3)) / 6;
    let place = target + ((<usize>(count - 1)) << 4);
    let step = recursion + <usize>(count - 1) * STEP_BYTES;
    for (; place > target; place -= 16, step -= STEP_BYTES) {
      const raised = mul(
        v128.load(coordinates + <usize>load<u32>(step)),
        v128.load(target + <usize>load<u32>(step, 4)),
      );
      const lowered = v128.load(target + <usize>load<u32>(step, 8));
      v128.store(place, fma(v128.load64_splat(step, 16), lowered, raised));
    }
    v128.store(target, at(derivatives, degree - reached));
  }
}

function closedFormInto(degree: i32, coordinates: usize, derivatives: usize, target: usize): void {
  const x = at(coordinates, 0);
  const y = at(coordinates, 1);
  const z = at(coordinates, 2);
  put(target, 0, at(derivatives, 0));
  if (degree === 0) return;
  const r1 = at(derivatives, 1);
  put(target, 1, mul(x, r1));
  put(target, 2, mul(y, r1));
  put(target, 3, mul(z, r1));
  if (degree === 1) return;
  const r2 = at(derivatives, 2);
  const xx = mul(x, x);
  const xy = mul(x, y);
  const xz = mul(x, z);
  const yy = mul(y, y);
  const yz = mul(y, z);
  const zz = mul(z, z);
  put(target, 4, fma(xx, r2, r1));
  put(target, 5, mul(xy, r2));
  put(target, 6, mul(xz, r2));
  put(target, 7, fma(yy, r2, r1));
  put(target, 8, mul(yz, r2));
  put(target, 9, fma(zz, r2, r1));
  if (degree === 2) return;
  const r3 = at(derivatives, 3);
  const twice2 = add(r2, r2);
  const xOnce = fma(xx, r3, r2);
  const yOnce = fma(yy, r3, r2);
  const zOnce = fma(zz, r3, r2);
  put(target, 10, mul(x, add(xOnce, twice2)));
  put(target, 11, mul(y, xOnce));
  put(target, 12, mul(z, xOnce));
  put(target, 13, mul(x, yOnce));
  put(target, 14, mul(mul(xy, z), r3));
  put(target, 15, mul(x, zOnce));
  put(target, 16, mul(y, add(yOnce, twice2)));
  put(target, 17, mul(z, yOnce));
  put(target, 18, mul(y, zOnce));
  put(target, 19, mul(z, add(zOnce, twice2)));
  if (degree === 3) return;
  const r4 = at(derivatives, 4);
  const twice3 = add(r3, r3);
  const thrice3 = add(twice3, r3);
  const thrice2 = add(twice2, r2);
  const xTwice = fma(xx, r4, r3);
  const yTwice = fma(yy, r4, r3);
  const zTwice = fma(zz, r4, r3);
  const xThrice = add(xTwice, twice3);
  const yThrice = add(yTwice, twice3);
  const zThrice = add(zTwice, twice3);
  put(target, 20, fma(xx, add(xThrice, thrice3), thrice2));
  put(target, 21, mul(xy, xThrice));
  put(target, 22, mul(xz, xThrice));
  put(target, 23, fma(yy, xTwice, xOnce));
  put(target, 24, mul(yz, xTwice));
  put(target, 25, fma(zz, xTwice, xOnce));
  put(target, 26, mul(xy, yThrice));
  put(target, 27, mul(xz, yTwice));
  put(target, 28, mul(xy, zTwice));
  put(target, 29, mul(xz, zThrice));
  put(target, 30, fma(yy, add(yThrice, thrice3), thrice2));
  put(target, 31, mul(yz, yThrice));
  put(target, 32, fma(zz, yTwice, yOnce));
  put(target, 33, mul(yz, zThrice));
  put(target, 34, fma(zz, add(zThrice, thrice3), thrice2));
}
