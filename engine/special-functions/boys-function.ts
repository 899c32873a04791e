/** Highest order that the table serves: four shells of angular momentum 5, or 4 and derivatives. */
export const BOYS_MAX_ORDER = 20;

/** Grid points a unit of the argument; the distance to the nearest one is at most 1/64. */
const GRID_DENSITY = 32;
/** Taylor terms: the first one left out is below (1/64)⁷/7! = 5e-17 of the function. */
const TAYLOR_TERMS = 7;
/** Above, erf(√T) differs from 1 by less than 3e-17, and the upward recursion loses nothing for order ≤ 20. */
const TABLE_END = 36;
/** A row holds e^−T, then F_0 … F_(maxOrder + TAYLOR_TERMS − 1). */
const ROW_LENGTH = 1 + BOYS_MAX_ORDER + TAYLOR_TERMS;

const table = buildTable();
/** 1/(2m − 1) at m */
export const INVERSE_ODD = Float64Array.from(
  { length: BOYS_MAX_ORDER + 1 },
  (_, order) => 1 / (2 * order - 1),
);
const singleArgument = new Float64Array(1);

/**
 * Boys function F_m(T) = ∫₀¹ u^(2m) exp(−T u²) du for m = 0 … maxOrder.
 *
 * @param maxOrder - 0 … {@link BOYS_MAX_ORDER}
 * @param argument - T ≥ 0
 * @param target - receives F_0 … F_maxOrder at 0 … maxOrder
 *
 * Method, source and accuracy: see {@link boysFunctionsInto}.
 */
export function boysFunctionInto(maxOrder: number, argument: number, target: Float64Array): void {
  singleArgument[0] = argument;
  boysFunctionsInto(maxOrder, singleArgument, 1, target);
}

/**
 * Boys function of many arguments at once; takes them from an array because a call with a number costs an allocation
 * where it is not inlined.
 *
 * Up to T = 36, Taylor expansion of the highest order about the nearest point of a table, the lower orders by the
 * downward recursion F_(m−1) = (2T F_m + e^−T)/(2m − 1), whose terms are all positive. Above, F_0 = ½√(π/T) and the
 * recursion upwards, which is stable there.
 *
 * @param maxOrder - 0 … {@link BOYS_MAX_ORDER}
 * @param values - T ≥ 0, the first `count` of them are used
 * @param target - count × (maxOrder + 1), row-major
 *
 * Source: T. Helgaker, P. Jørgensen, J. Olsen, Molecular Electronic-Structure Theory (2000), section 9.8.
 * Accuracy: relative error below 2e-15 for all T and m, checked in tests/engine/special-functions/boys-function.test.ts.
 * Cost: about 25 multiplications and 2 an order; allocates nothing.
 */
export function boysFunctionsInto(
  maxOrder: number,
  values: Float64Array,
  count: number,
  target: Float64Array,
): void {
  for (let i = 0, end = maxOrder; i < count; i++, end += maxOrder + 1) {
    const argument = values[i];
    if (argument >= TABLE_END) {
      boysAsymptoticInto(maxOrder, values, i, target);
      continue;
    }
    const point = (argument * GRID_DENSITY + 0.5) | 0;
    const step = point / GRID_DENSITY - argument;
    const row = point * ROW_LENGTH;
    const first = row + 1 + maxOrder;
    const half = step * (1 / 2);
    const third = step * (1 / 3);
    const quarter = step * (1 / 4);
    const fifth = step * (1 / 5);
    const sixth = step * (1 / 6);
    let value =
      table[first] +
      step *
        (table[first + 1] +
          half *
            (table[first + 2] +
              third *
                (table[first + 3] +
                  quarter * (table[first + 4] + fifth * (table[first + 5] + sixth * table[first + 6])))));
    target[end] = value;
    if (maxOrder === 0) continue;
    const exponential =
      table[row] *
      (1 +
        step * (1 + half * (1 + third * (1 + quarter * (1 + fifth * (1 + sixth * (1 + step * (1 / 7))))))));
    const twiceArgument = 2 * argument;
    for (let order = maxOrder; order > 0; order--) {
      value = (twiceArgument * value + exponential) * INVERSE_ODD[order];
      target[end - maxOrder + order - 1] = value;
    }
  }
}

function boysAsymptoticInto(
  maxOrder: number,
  values: Float64Array,
  index: number,
  target: Float64Array,
): void {
  const argument = values[index];
  const start = index * (maxOrder + 1);
  let value = 0.5 * Math.sqrt(Math.PI / argument);
  target[start] = value;
  if (maxOrder === 0) return;
  const inverse = 1 / (2 * argument);
  const exponential = Math.exp(-argument);
  for (let order = 1; order <= maxOrder; order++) {
    value = ((2 * order - 1) * value - exponential) * inverse;
    target[start + order] = value;
  }
}

/** Highest order by the series e^−T Σ_i (2T)^i / ((2m+1)(2m+3)…(2m+2i+1)), all terms positive; the rest downwards. */
function buildTable(): Float64Array {
  const highest = BOYS_MAX_ORDER + TAYLOR_TERMS - 1;
  const points = TABLE_END * GRID_DENSITY + 1;
  const rows = new Float64Array(points * ROW_LENGTH);
  for (let point = 0; point < points; point++) {
    const argument = point / GRID_DENSITY;
    const exponential = Math.exp(-argument);
    let term = 1 / (2 * highest + 1);
    let sum = term;
    for (let i = 1; term > sum * 1e-18; i++) {
      term *= (2 * argument) / (2 * highest + 2 * i + 1);
      sum += term;
    }
    const row = point * ROW_LENGTH;
    rows[row] = exponential;
    let value = exponential * sum;
    rows[row + 1 + highest] = value;
    for (let order = highest; order > 0; order--) {
      value = (2 * argument * value + exponential) / (2 * order - 1);
      rows[row + order] = value;
    }
  }
  return rows;
}

/**
 * What the fast form needs for one order, a line of the cache (8 numbers) for each grid point T: e^−T, and the Taylor
 * coefficients of F_order in −(T' − T).
 *
 * @param order - 0 … {@link BOYS_MAX_ORDER}
 */
export function boysTaylorTable(order: number): Float64Array {
  const points = table.length / ROW_LENGTH;
  const lines = new Float64Array(points * (1 + TAYLOR_TERMS));
  let at = 0;
  for (let row = 0; row < table.length; row += ROW_LENGTH) {
    lines[at++] = table[row];
    let factorial = 1;
    for (let term = 0; term < TAYLOR_TERMS; term++) {
      lines[at++] = table[row + 1 + order + term] / factorial;
      factorial *= term + 1;
    }
  }
  return lines;
}
