import type { StudyResults } from '#engine';
import { HARTREE_IN_WAVENUMBERS } from '#engine';
import type { DrawnPoint } from './figure-plan';
import { placeAtHeight } from './monotone-curve';

/** A vibrational level as a line across the well. */
export interface LevelLine {
  readonly from: number;
  readonly to: number;
  readonly y: number;
}

export interface WellLevels {
  readonly lines: readonly LevelLine[];
  /** every so manyth level from the lowest is drawn */
  readonly every: number;
}

/** Lines nearer to one another, as a fraction of the panel's height, become a grey patch in print. */
const LEAST_SPACING = 0.016;
const STEPS = [1, 2, 5, 10, 20, 50];

/** The level of a study whose vibrational levels are drawn: the last that has any, as studies end with the best. */
export const levelWithLevels = ({ study, findings }: StudyResults): string | undefined =>
  study.levels.findLast((level) => findings[level]?.vibration?.kind === 'found');

/**
 * Vibrational levels between the turning points on the drawn curve.
 *
 * @param points - of the curve, rising, its minimum among them
 * @param range - of the panel's axis
 */
export function wellLevels(
  { findings }: StudyResults,
  level: string,
  points: readonly DrawnPoint[],
  range: readonly [number, number],
): WellLevels | undefined {
  const { minimum, vibration } = findings[level] ?? {};
  if (minimum?.kind !== 'found' || vibration?.kind !== 'found') return undefined;
  const energies = vibration.levels.map(
    ({ energyPerCm }) => minimum.energy + energyPerCm / HARTREE_IN_WAVENUMBERS,
  );
  const [lowest = 0, highest = 0] = [energies[0], energies.at(-1)];
  const spacing = (highest - lowest) / Math.max(1, energies.length - 1) / (range[1] - range[0]);
  const every =
    energies.length < 2 ? 1 : (STEPS.find((step) => step * spacing >= LEAST_SPACING) ?? STEPS.at(-1)!);
  const bottom = points.reduce((best, { y }, index) => (y < points[best]!.y ? index : best), 0);
  const lines = energies
    .filter((_, v) => v % every === 0)
    .map((y): LevelLine => {
      const inner = turningPoint(points, bottom, y, -1) ?? points[0]!.x;
      const outer = turningPoint(points, bottom, y, 1) ?? points.at(-1)!.x;
      return { from: inner, to: outer, y };
    });
  return lines.length > 0 ? { lines, every } : undefined;
}

/** From the bottom outwards the first place where the curve reaches the height. */
function turningPoint(
  points: readonly DrawnPoint[],
  bottom: number,
  height: number,
  direction: 1 | -1,
): number | undefined {
  for (let index = bottom; index + direction >= 0 && index + direction < points.length; index += direction) {
    const place = placeAtHeight(points, Math.min(index, index + direction), height);
    if (place !== undefined) return place;
  }
  return undefined;
}
