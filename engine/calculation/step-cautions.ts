import type { SolutionCrossing } from './cautions';
import { groundEnergy } from './level-curve';
import type { PreparedStudy } from './prepare-study';
import { number, type RaisedCaution } from './raised-caution';
import type { PointResult } from './result';

/** A point off the curve through its neighbours by less than this, hartree, is not said. */
const SMALLEST_STEP = 1e-3;
/** It must be off by more than so many times what points on both sides of it are off by. */
const TIMES_ELSEWHERE = 8;
/** Points whose neighbours do not include the one in question. */
const ELSEWHERE = 3;

interface Place {
  readonly x: number;
  readonly energy: number;
}

/**
 * Where a level's lowest energies do not lie on one smooth curve, as when an eigenvalue solver lands in another state
 * or a curve jumps to another solution: points far off the cubic through their four neighbours, compared with how far
 * off such cubics are on either side of them.
 *
 * @param crossings - known ones, which explain a kink by themselves
 */
export function stepCautions(
  { levels, study }: PreparedStudy,
  points: readonly PointResult[],
  crossings: readonly SolutionCrossing[],
): RaisedCaution[] {
  if (!study.scan) return [];
  return levels
    .filter(({ kind }) => kind !== 'singles')
    .flatMap(({ name }) => {
      const curve = points
        .flatMap(({ coordinate, levels: ofPoint }): Place[] => {
          const energy = groundEnergy(ofPoint[name]);
          return coordinate === null || energy === undefined ? [] : [{ x: coordinate, energy }];
        })
        .sort((a, b) => a.x - b.x);
      const steps = stepsOf(curve).filter(({ from, to }) =>
        crossings.every(({ range }) => range[1] < from || range[0] > to),
      );
      return steps.length === 0 ? [] : [stepCaution(name, steps)];
    });
}

interface Step {
  readonly x: number;
  /** neighbours of the point */
  readonly from: number;
  readonly to: number;
  readonly size: number;
}

function stepsOf(curve: readonly Place[]): Step[] {
  const off = curve.map((_, k) => distanceFromNeighbours(curve, k));
  return curve.flatMap(({ x }, k): Step[] => {
    const [size, before, after] = [off[k], off[k - ELSEWHERE], off[k + ELSEWHERE]];
    if (size === undefined || before === undefined || after === undefined) return [];
    const isStep = size > SMALLEST_STEP && size > TIMES_ELSEWHERE * Math.max(before, after);
    return isStep ? [{ x, from: curve[k - 1].x, to: curve[k + 1].x, size }] : [];
  });
}

/** Of point k from the cubic through two points on either side; undefined where there are none. */
function distanceFromNeighbours(curve: readonly Place[], k: number): number | undefined {
  const others = [k - 2, k - 1, k + 1, k + 2].map((index) => curve[index]);
  if (others.some((place) => place === undefined)) return undefined;
  const { x, energy } = curve[k];
  const onCubic = others.reduce((sum, { x: own, energy: value }) => {
    const weight = others.reduce(
      (product, { x: other }) => (other === own ? product : (product * (x - other)) / (own - other)),
      1,
    );
    return sum + weight * value;
  }, 0);
  return Math.abs(energy - onCubic);
}

function stepCaution(level: string, steps: readonly Step[]): RaisedCaution {
  const largest = steps.reduce((a, b) => (b.size > a.size ? b : a));
  const range = [Math.min(...steps.map(({ from }) => from)), Math.max(...steps.map(({ to }) => to))] as const;
  return {
    code: 'curve.step',
    level,
    range,
    message:
      `The ${level} curve is not smooth between ${Number(range[0].toPrecision(6))} and ${Number(range[1].toPrecision(6))}: at ` +
      `${Number(largest.x.toPrecision(6))} it lies ${largest.size.toPrecision(2)} hartree off a curve through the neighbouring points.`,
    meaning: 'The level may have landed in another state or solution there, or a crossing lies between.',
    remedy: 'Compute finer steps there and more states, to see which one the curve follows.',
    numbers: [number('distance from the neighbours’ curve', largest.size, 'hartree')],
  };
}
