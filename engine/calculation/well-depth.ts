import { HARTREE_IN_WAVENUMBERS } from '../constants';
import type { LevelCurve } from './level-curve';
import type { Dissociation, Vibration, WellDepth } from './result';

/**
 * De of a curve: against its separate fragments where they are known, else against its end if the curve is known to
 * the end of the scan.
 *
 * @param minimum - energy of the minimum, hartree
 */
export function wellDepthOf(
  minimum: number,
  { scan }: LevelCurve,
  dissociation: Dissociation | undefined,
): WellDepth | undefined {
  const known = scan.flatMap(({ x, energy }) => (energy === undefined ? [] : [{ x, energy }]));
  if (known.length === 0) return undefined;
  const farEnd = known.reduce((a, b) => (b.x > a.x ? b : a));
  if (dissociation?.kind === 'found') {
    return {
      value: dissociation.energy - minimum,
      against: 'fragments',
      farEnd: farEnd.x,
      valueAgainstFarEnd: farEnd.energy - minimum,
    };
  }
  const isLast = scan.every(({ x }) => x <= farEnd.x);
  return isLast ? { value: farEnd.energy - minimum, against: 'farEnd', farEnd: farEnd.x } : undefined;
}

/** Levels with D0, counted from the lowest of them to the limit that De stands against. */
export function fromLowestLevel(vibration: Vibration, depth: WellDepth | undefined): Vibration {
  if (vibration.kind !== 'found' || !depth) return vibration;
  return { ...vibration, d0: depth.value - vibration.zeroPointPerCm / HARTREE_IN_WAVENUMBERS };
}
