/*
 * Coulomb and exchange matrices in 128-bit vectors, as in engine/integrals/coulomb-exchange.ts, which says what they
 * are. Numbers are addresses unless their type says otherwise; matrices are n×n, row-major.
 */
import { at, put } from './shared/numbers';

/**
 * Adds what the rows first ≤ pair < end of the packed integrals give; what is on the wrong side of the diagonal is
 * left there, to be added to its mirror image at the end.
 *
 * @param integrals - those rows, one after another
 */
export function addRows(
  integrals: usize,
  first: i32,
  end: i32,
  n: i32,
  density: usize,
  coulomb: usize,
  exchange: usize,
): void {
  const bytes = (<usize>n) << 3;
  let i = 0;
  while (((i + 1) * (i + 2)) >> 1 <= first) i++;
  let j = first - ((i * (i + 1)) >> 1);
  let row = integrals;
  for (let pair = first; pair < end; pair++) {
    addRow(row, i, j, bytes, density, coulomb, exchange);
    row += <usize>(pair + 1) << 3;
    if (j === i) {
      i++;
      j = 0;
    } else {
      j++;
    }
  }
}

/** All (ij|kl) of one pair ij. */
function addRow(
  integrals: usize,
  i: i32,
  j: i32,
  bytes: usize,
  density: usize,
  coulomb: usize,
  exchange: usize,
): void {
  const densityI = density + <usize>i * bytes;
  const densityJ = density + <usize>j * bytes;
  const exchangeI = exchange + <usize>i * bytes;
  const exchangeJ = exchange + <usize>j * bytes;
  // equal indices stand for fewer than eight integrals
  const weight: f64 = i === j ? 0.5 : 1;
  const weights = f64x2.splat(weight);
  const twiceIJ = 2 * at(densityI, j);
  const twiceIJs = f64x2.splat(twiceIJ);
  let coulombs = f64x2.splat(0);
  let coulombIJ: f64 = 0;
  let densityK = density;
  let coulombK = coulomb;
  for (let k = 0; k <= i; k++) {
    const last = k === i ? j : k;
    const densityIK = at(densityI, k);
    const densityJK = at(densityJ, k);
    const densityIKs = f64x2.splat(densityIK);
    const densityJKs = f64x2.splat(densityJK);
    let exchangesI = f64x2.splat(0);
    let exchangesJ = exchangesI;
    let l = 0;
    for (; l + 2 <= last; l += 2) {
      const place = (<usize>l) << 3;
      const values = f64x2.mul(weights, v128.load(integrals + place));
      coulombs = f64x2.add(coulombs, f64x2.mul(values, v128.load(densityK + place)));
      v128.store(
        coulombK + place,
        f64x2.add(v128.load(coulombK + place), f64x2.mul(values, twiceIJs)),
      );
      exchangesI = f64x2.add(exchangesI, f64x2.mul(values, v128.load(densityJ + place)));
      exchangesJ = f64x2.add(exchangesJ, f64x2.mul(values, v128.load(densityI + place)));
      // one after the other: for i = j they are the same
      v128.store(
        exchangeI + place,
        f64x2.add(v128.load(exchangeI + place), f64x2.mul(values, densityJKs)),
      );
      v128.store(
        exchangeJ + place,
        f64x2.add(v128.load(exchangeJ + place), f64x2.mul(values, densityIKs)),
      );
    }
    let exchangeIK = f64x2.extract_lane(exchangesI, 0) + f64x2.extract_lane(exchangesI, 1);
    let exchangeJK = f64x2.extract_lane(exchangesJ, 0) + f64x2.extract_lane(exchangesJ, 1);
    for (; l <= last; l++) {
      let value = weight * at(integrals, l);
      if (k === l) value *= 0.5;
      if (l === j && k === i) value *= 0.5;
      coulombIJ += value * at(densityK, l);
      put(coulombK, l, at(coulombK, l) + value * twiceIJ);
      exchangeIK += value * at(densityJ, l);
      exchangeJK += value * at(densityI, l);
      put(exchangeI, l, at(exchangeI, l) + value * densityJK);
      put(exchangeJ, l, at(exchangeJ, l) + value * densityIK);
    }
    put(exchangeI, k, at(exchangeI, k) + exchangeIK);
    put(exchangeJ, k, at(exchangeJ, k) + exchangeJK);
    integrals += <usize>(last + 1) << 3;
    densityK += bytes;
    coulombK += bytes;
  }
  coulombIJ += f64x2.extract_lane(coulombs, 0) + f64x2.extract_lane(coulombs, 1);
  const target = coulomb + <usize>i * bytes;
  put(target, j, at(target, j) + 2 * coulombIJ);
}
