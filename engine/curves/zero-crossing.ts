/** One side of a change of sign. */
export interface CrossingSide {
  readonly x: number;
  readonly value: number;
}

export type ZeroCrossing =
  | { readonly kind: 'found'; readonly x: number; readonly uncertainty: number }
  /** the function could not be had at x */
  | { readonly kind: 'undefined'; readonly x: number };

/** Bisection alone would need about 30 for the finest use. */
const EVALUATIONS = 60;

/**
 * Where a function changes its sign, between two places at which its signs differ: inverse quadratic interpolation
 * where it is trustworthy, else bisection. A jump across zero is found as well as a root.
 *
 * @param tolerance - largest distance of the answer from the crossing
 *
 * Source: T. R. Chandrupatla, Adv. Eng. Softw. 28, 145 (1997).
 */
export function findZeroCrossing(
  valueAt: (x: number) => number | undefined,
  first: CrossingSide,
  second: CrossingSide,
  tolerance: number,
): ZeroCrossing {
  if (first.value * second.value > 0) throw new RangeError('findZeroCrossing: no change of sign');
  // `newest` and `opposite` enclose the crossing; `last` is the place that the newest one replaced
  let newest = second;
  let opposite = first;
  let last = first;
  let fraction = 0.5;
  for (let evaluation = 0; evaluation < EVALUATIONS; evaluation++) {
    const width = Math.abs(opposite.x - newest.x);
    if (newest.value === 0) return { kind: 'found', x: newest.x, uncertainty: 0 };
    if (width <= 2 * tolerance) break;
    const margin = tolerance / width;
    const x = newest.x + Math.min(Math.max(fraction, margin), 1 - margin) * (opposite.x - newest.x);
    const value = valueAt(x);
    if (value === undefined || !Number.isFinite(value)) return { kind: 'undefined', x };
    if (value > 0 === newest.value > 0) last = newest;
    else {
      last = opposite;
      opposite = newest;
    }
    newest = { x, value };
    fraction = interpolatedFraction(newest, opposite, last);
  }
  return {
    kind: 'found',
    x: (newest.x + opposite.x) / 2,
    uncertainty: Math.abs(opposite.x - newest.x) / 2,
  };
}

/** How far from the newest place to the opposite one the root is expected; ½ where interpolation could mislead. */
function interpolatedFraction(newest: CrossingSide, opposite: CrossingSide, last: CrossingSide): number {
  const xi = (newest.x - opposite.x) / (last.x - opposite.x);
  const phi = (newest.value - opposite.value) / (last.value - opposite.value);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  const direct =
    (newest.value / (opposite.value - newest.value)) * (last.value / (opposite.value - last.value));
  const through =
    ((last.x - newest.x) / (opposite.x - newest.x)) *
    (newest.value / (last.value - newest.value)) *
    (opposite.value / (last.value - opposite.value));
  return direct + through;
}
