import type { Run } from './window-state';

/**
 * The point under the cursor: the one chosen, or, while none is, the lowest of the last level that has
 * energies (levels are listed from the roughest to the best), where a reader looks first.
 */
export function cursorIndex(run: Run, chosen: number | undefined): number | undefined {
  if (chosen !== undefined && run.points[chosen] !== undefined) return chosen;
  for (const level of [...run.study.levels].reverse()) {
    const lowest = lowestIndex(run, level);
    if (lowest !== undefined) return lowest;
  }
  const first = run.points.findIndex((point) => point !== undefined);
  return first === -1 ? undefined : first;
}

function lowestIndex({ points }: Run, level: string): number | undefined {
  let lowest: { readonly index: number; readonly energy: number } | undefined;
  for (const [index, point] of points.entries()) {
    const result = point?.levels[level];
    if (result === undefined || !('energy' in result) || !result.converged) continue;
    if (lowest === undefined || result.energy < lowest.energy) lowest = { index, energy: result.energy };
  }
  return lowest?.index;
}

export type CursorMove = 'previous' | 'next' | 'back' | 'ahead' | 'first' | 'last';

/** How many points the long steps (page keys) go. */
const LONG_STEP = 5;

/** Where a move takes the cursor: points that have not arrived are stepped over, the ends hold it. */
export function moveCursor(run: Run, from: number | undefined, move: CursorMove): number | undefined {
  const present = run.points.flatMap((point, index) => (point === undefined ? [] : [index]));
  const here = from === undefined ? -1 : present.indexOf(from);
  const steps = {
    previous: -1,
    next: 1,
    back: -LONG_STEP,
    ahead: LONG_STEP,
    first: -Infinity,
    last: Infinity,
  };
  return present[Math.min(present.length - 1, Math.max(0, here + steps[move]))];
}
