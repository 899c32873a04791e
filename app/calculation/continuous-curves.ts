import type { FollowedNeighbours, PreparedStudy, SolutionCrossing } from '#engine';
import { coordinateText } from './coordinate-text';
import type { FinishedPoint } from './messages';
import type { Task, WorkerPool } from './worker-pool';

/** Every round carries a lower solution one point further. */
const mostRounds = (points: number) => points;

interface Following {
  readonly prepared: PreparedStudy;
  /** which of the study's bases it is prepared in */
  readonly basis: number;
  readonly points: readonly FinishedPoint[];
  readonly pool: WorkerPool;
  /** a point computed anew, in a lower solution than before */
  readonly onImproved: (index: number, point: FinishedPoint) => void;
  /** how many points a round looks at, and each as it is done, with the seconds it took */
  readonly onRound: (total: number) => { finished(seconds: number): void; stop(): void };
}

/**
 * Makes each level one curve of the lowest Hartree–Fock solution: the solution of every point is followed to its
 * neighbours on both sides, a point that it leads lower is computed anew, and so on until nothing changes.
 *
 * Each round starts from the orbitals as the round before left them, so that the outcome does not depend on which
 * worker was faster.
 *
 * @returns the points, and where two solutions cross
 */
export async function makeCurvesContinuous({
  prepared,
  basis,
  points,
  pool,
  onImproved,
  onRound,
}: Following): Promise<{
  readonly points: readonly FinishedPoint[];
  readonly crossings: readonly SolutionCrossing[];
}> {
  const current = [...points];
  const order = orderAlongCurve(prepared);
  const outcomes = new Map<number, { neighbours: readonly number[]; followed: FollowedNeighbours }>();
  const neighboursOf = (place: number) =>
    [order[place - 1], order[place + 1]].filter((index) => index !== undefined);

  let places = order.map((_, place) => place);
  for (let round = 0; round < mostRounds(order.length) && places.length > 0 && order.length > 1; round++) {
    const improved: number[] = [];
    const before = [...current];
    const progress = onRound(places.length);
    const tasks = places.map((place): Task => {
      const index = order[place] as number;
      const neighbours = neighboursOf(place).filter((other) => before[other]?.carry !== undefined);
      return {
        request: () => ({
          kind: 'follow',
          basis,
          index,
          own: before[index]?.carry,
          neighbours: neighbours.flatMap((other) => before[other]?.carry ?? []),
        }),
        accept: (finding) => {
          if (finding.kind !== 'followed') return;
          const { followed, seconds } = finding;
          outcomes.set(index, { neighbours, followed });
          if (followed.improved) {
            current[index] = followed.improved;
            improved.push(place);
            onImproved(index, followed.improved);
          }
          progress.finished(seconds);
        },
        current: () =>
          `the neighbourhood of ${coordinateText(prepared.study, prepared.coordinates[index] ?? 0)}`,
      };
    });
    try {
      await pool.perform(tasks);
    } finally {
      progress.stop();
    }
    places = [...new Set(improved.flatMap((place) => [place - 1, place, place + 1]))]
      .filter((place) => order[place] !== undefined)
      .sort((a, b) => a - b);
  }
  return { points: current, crossings: crossingsAmong(prepared, outcomes) };
}

/** Indices of the points by rising coordinate; a list of values may jump about. */
function orderAlongCurve({ coordinates }: PreparedStudy): readonly number[] {
  return coordinates.map((_, index) => index).sort((a, b) => (coordinates[a] ?? 0) - (coordinates[b] ?? 0));
}

/** One crossing for each pair of neighbours, whichever of the two sides saw it. */
function crossingsAmong(
  { coordinates }: PreparedStudy,
  outcomes: ReadonlyMap<number, { neighbours: readonly number[]; followed: FollowedNeighbours }>,
): readonly SolutionCrossing[] {
  const found = new Map<string, SolutionCrossing>();
  for (const [index, { neighbours, followed }] of outcomes) {
    followed.higherBy.forEach((gaps, k) => {
      const other = neighbours[k] ?? index;
      const range = [coordinates[index] ?? 0, coordinates[other] ?? 0].sort((a, b) => a - b) as [
        number,
        number,
      ];
      for (const kind of ['restricted', 'unrestricted'] as const) {
        const gap = gaps[kind];
        const key = `${kind} ${range.join()}`;
        if (gap !== undefined && gap > (found.get(key)?.gap ?? 0)) found.set(key, { kind, range, gap });
      }
    });
  }
  return [...found.values()].sort((a, b) => a.range[0] - b.range[0]);
}
