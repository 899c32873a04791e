interface Point {
  readonly x: number;
  readonly y: number;
}

/**
 * Where the smooth line that is drawn through some points takes a height, between two neighbouring points.
 *
 * The line is the one of vega's `monotone` interpolation: cubic pieces without extremes of their own, so that there is
 * at most one such place, and only if the height lies between those of the two points.
 *
 * @param points - rising x, at least two
 * @param index - of the first of the two points
 * @returns undefined if the line does not take the height there
 *
 * Source: M. Steffen, Astron. Astrophys. 239, 443 (1990).
 */
export function placeAtHeight(points: readonly Point[], index: number, height: number): number | undefined {
  const [first, second] = [points[index], points[index + 1]];
  if (!first || !second || (height - first.y) * (height - second.y) > 0) return undefined;
  const width = second.x - first.x;
  const [startSlope, endSlope] = [slopeAt(points, index), slopeAt(points, index + 1)];
  const heightAt = (t: number) =>
    first.y * (1 + 2 * t) * (1 - t) ** 2 +
    second.y * t ** 2 * (3 - 2 * t) +
    width * t * (1 - t) * (startSlope * (1 - t) - endSlope * t);
  let [low, high] = first.y <= second.y ? [0, 1] : [1, 0];
  for (let halving = 0; halving < HALVINGS; halving += 1) {
    const middle = (low + high) / 2;
    if (heightAt(middle) < height) low = middle;
    else high = middle;
  }
  return first.x + width * ((low + high) / 2);
}

/** Far finer than a printed line. */
const HALVINGS = 30;

/** The slope of the line at a point, from its neighbours; at an end from the only piece there is. */
function slopeAt(points: readonly Point[], index: number): number {
  const secant = (from: number): number => {
    const [a, b] = [points[from], points[from + 1]];
    return a && b ? (b.y - a.y) / (b.x - a.x) : Number.NaN;
  };
  const last = points.length - 1;
  if (last === 1) return secant(0);
  if (index === 0) return (3 * secant(0) - slopeAt(points, 1)) / 2;
  if (index === last) return (3 * secant(last - 1) - slopeAt(points, last - 1)) / 2;
  const [before, after] = [secant(index - 1), secant(index)];
  if (before * after <= 0) return 0;
  const [left, right] = [points[index]!.x - points[index - 1]!.x, points[index + 1]!.x - points[index]!.x];
  const parabola = (before * right + after * left) / (left + right);
  return Math.sign(before) * Math.min(2 * Math.abs(before), 2 * Math.abs(after), Math.abs(parabola));
}
