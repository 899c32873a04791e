import type { Caution, PointResult } from '#engine';

/** One caution and every point that it concerns. */
export interface CautionGroup {
  readonly caution: Caution;
  /** indices of the points, rising */
  readonly at: readonly number[];
}

/** The cautions of all points, each named once, in the order in which they first come. */
export function groupCautions(points: readonly (PointResult | undefined)[]): readonly CautionGroup[] {
  const groups = new Map<string, { readonly caution: Caution; readonly at: number[] }>();
  for (const [index, point] of points.entries())
    for (const caution of point?.cautions ?? []) {
      const key = JSON.stringify([caution.code, caution.level]);
      const group = groups.get(key);
      if (group === undefined) groups.set(key, { caution, at: [index] });
      else if (group.at.at(-1) !== index) group.at.push(index);
    }
  return [...groups.values()];
}

/** Indices of points as runs of neighbours: [3, 4, 5, 9] → [[3, 5], [9, 9]]. */
export function neighbourRuns(indices: readonly number[]): readonly (readonly [number, number])[] {
  const runs: [number, number][] = [];
  for (const index of indices) {
    const last = runs.at(-1);
    if (last !== undefined && last[1] === index - 1) last[1] = index;
    else runs.push([index, index]);
  }
  return runs;
}
