import type { PointResult, StudyResults } from '#engine';

/** Of the distance of the minimum: where correlation turns from dynamic to static. */
const STRETCHES = [1, 1.5, 2, 3];

/** The points next to some multiples of the lowest minimum's distance, and the last one. */
export function chosenPoints({ points, findings }: StudyResults): readonly PointResult[] {
  const sorted = points.toSorted((a, b) => (a.coordinate ?? 0) - (b.coordinate ?? 0));
  const minima = Object.values(findings).flatMap(({ minimum }) =>
    minimum.kind === 'found' ? [minimum] : [],
  );
  const lowest = minima.toSorted((a, b) => a.energy - b.energy)[0];
  const wanted = lowest
    ? STRETCHES.map((stretch) => stretch * lowest.equilibriumDistance)
    : [sorted[0]?.coordinate ?? 0];
  const last = sorted.at(-1);
  const nearest = wanted
    .filter((place) => place <= (last?.coordinate ?? 0))
    .map((place) =>
      sorted.reduce((best, point) =>
        Math.abs((point.coordinate ?? 0) - place) < Math.abs((best.coordinate ?? 0) - place) ? point : best,
      ),
    );
  return [...new Set([...nearest, ...(last ? [last] : [])])];
}
