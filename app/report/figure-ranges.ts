import type { DrawnCurve, DrawnPoint } from './figure-plan';
import type { ScannedCoordinate } from './scanned-coordinate';

/** Room around the curves, as a fraction of their range. */
const MARGIN = 0.06;
/** Room above the far end of the curves for the repulsive wall, as a fraction of the well's depth. */
const WALL_SHARE = 0.3;

/**
 * Of a scan of a distance, what lies beyond the lowest point of each curve decides: the repulsive wall at short
 * distances would leave the well no room.
 */
export function energyRange(
  curves: readonly DrawnCurve[],
  kind: ScannedCoordinate['kind'],
): readonly [number, number] {
  const shown = curves.flatMap((curve) => {
    const points = trusted(curve.points);
    if (kind !== 'distance') return points.map(({ y }) => y);
    const lowest = points.reduce((a, b) => (b.y < a.y ? b : a));
    return points.filter(({ x }) => x >= lowest.x).map(({ y }) => y);
  });
  const everything = rangeOf(curves.flatMap((curve) => trusted(curve.points).map(({ y }) => y)));
  const [low, high] = rangeOf(shown);
  const top = Math.min(everything[1], high + WALL_SHARE * (high - low));
  return padded([low, top > low ? top : everything[1]], MARGIN);
}

/** From the lowest value to zero. */
export function correlationRange(curves: readonly DrawnCurve[]): readonly [number, number] {
  const [low, high] = rangeOf([0, ...curves.flatMap((curve) => trusted(curve.points).map(({ y }) => y))]);
  const [bottom, top] = padded([low, high], MARGIN);
  return [bottom, high > 0 ? top : 0];
}

export function coordinateRange(curves: readonly DrawnCurve[]): readonly [number, number] {
  return padded(rangeOf(curves.flatMap(({ points }) => points.map(({ x }) => x))), MARGIN / 2);
}

/** Converged points decide; unconverged ones only where there is nothing else. */
function trusted(points: readonly DrawnPoint[]): readonly DrawnPoint[] {
  const converged = points.filter((point) => point.converged);
  return converged.length > 0 ? converged : points;
}

const rangeOf = (values: readonly number[]): [number, number] =>
  values.reduce<[number, number]>(
    ([low, high], value) => [Math.min(low, value), Math.max(high, value)],
    [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY],
  );

/** A range of no width (one point, or a flat curve) is given some. */
function padded([low, high]: readonly [number, number], share: number): [number, number] {
  const room = share * (high - low || Math.abs(high) * 0.01 || 1);
  return [low - room, high + room];
}
