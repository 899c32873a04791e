import { type BasisSetLimit, basisSetLimit, type LevelLimit, type StudyInBasis } from '#engine';
import type { Track } from './progress';
import type { CurvesInBasis } from './run-in-basis';
import type { Task, WorkerPool } from './worker-pool';

/**
 * What the bases of a study tend to: at its points by their energies, and off each level's extrapolated curve, for
 * which workers compute further points.
 *
 * @param studies - in the study's own basis and the further ones
 * @param curves - the same, as they were computed
 */
export async function findBasisSetLimit(
  studies: readonly StudyInBasis[],
  curves: readonly CurvesInBasis[],
  pool: WorkerPool,
  track: Track,
): Promise<BasisSetLimit> {
  const atPoints = basisSetLimit(studies);
  if (atPoints.kind === 'none') return atPoints;
  const levels = Object.keys(atPoints.levels);
  const limits = new Map<string, LevelLimit>(Object.entries(atPoints.levels));
  const progress = track('limit', levels.length);
  const tasks = levels.map(
    (level): Task => ({
      request: () => ({
        kind: 'limit',
        level,
        curves: curves.map(({ points, findings }) => ({
          points: points.map(({ result }) => result),
          left: points.map(({ carry }) => carry),
          findings: findings[level] ?? { minimum: { kind: 'none', reason: '' } },
        })),
      }),
      accept: (finding) => {
        if (finding.kind !== 'limit') return;
        if (finding.limit) limits.set(level, finding.limit);
        progress.finished(finding.seconds);
      },
      current: () => `the basis-set limit of the ${level} curve`,
    }),
  );
  try {
    await pool.perform(tasks);
  } finally {
    progress.stop();
  }
  return { ...atPoints, levels: Object.fromEntries(limits) };
}
