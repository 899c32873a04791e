import { followStates, type PointResult, type RaisedCaution, type StateCurve } from '#engine';
import { curveName } from '../study/state-name';

export type StateCurves = Readonly<Record<string, readonly StateCurve[]>>;

/** States closer than this, hartree, are degenerate, and their order is chance. */
const DEGENERATE = 1e-6;
/** More pairs than this would make the sentence unreadable. */
const MOST_PAIRS = 4;

/** The states of every level that lists any, each followed along the scan. */
export function stateCurves(levels: readonly string[], points: readonly PointResult[]): StateCurves {
  return Object.fromEntries(
    levels.flatMap((level) => {
      const curves = followStates(points, level).map(({ states, ...state }) => ({
        name: curveName(state),
        states,
      }));
      return curves.length > 0 ? [[level, curves]] : [];
    }),
  );
}

interface Crossing {
  /** the curve that is lower before, and the one that is lower after */
  readonly pair: readonly [string, string];
  /** coordinates of the points on both sides */
  readonly range: readonly [number, number];
  readonly isLowest: boolean;
  /** of the two, hartree, before and after; infinite where one is not among the states computed */
  readonly gaps: readonly [number, number];
}

/** Says where states change their order: each crossing of the lowest state of a level, those above it together. */
export function crossingCautions(
  points: readonly PointResult[],
  curves: StateCurves,
): readonly RaisedCaution[] {
  return Object.entries(curves).flatMap(([level, ofLevel]) => {
    const crossings = crossingsOf(points, level, ofLevel);
    const higher = crossings.filter(({ isLowest }) => !isLowest);
    return [
      ...crossings.filter(({ isLowest }) => isLowest).map((crossing) => lowestCaution(level, crossing)),
      ...(higher.length > 0 ? [higherCaution(level, higher)] : []),
    ];
  });
}

function lowestCaution(level: string, { pair: [before, after], range, gaps }: Crossing): RaisedCaution {
  return {
    code: 'state.crossing',
    level,
    range,
    message:
      `Between ${places(range)} the lowest state of ${level} changes from ${before} to ${after}, by rising ` +
      'coordinate.',
    meaning:
      `${level} is the energy of the lowest state at every point and has a kink there; the curve of each state goes on ` +
      'smoothly as far as it is among the states computed.',
    remedy: 'Follow one state by its curve, and compute as many states as it takes to keep it.',
    numbers: [
      { name: 'gap of the two states before', value: gaps[0], unit: 'hartree' },
      { name: 'gap after', value: gaps[1], unit: 'hartree' },
    ].filter(({ value }) => Number.isFinite(value)),
  };
}

function higherCaution(level: string, crossings: readonly Crossing[]): RaisedCaution {
  const range = [
    Math.min(...crossings.map((crossing) => crossing.range[0])),
    Math.max(...crossings.map((crossing) => crossing.range[1])),
  ] as const;
  const pairs = [...new Set(crossings.map(({ pair }) => pair.toSorted().join(' and ')))];
  const named = pairs.slice(0, MOST_PAIRS).join('; ');
  const rest = pairs.length - MOST_PAIRS;
  return {
    code: 'state.crossing',
    level,
    range,
    message:
      `Higher states of ${level} change their order between ${places(range)}: ${named}` +
      `${rest > 0 ? `; ${rest} more` : ''}.`,
    meaning: 'The number of a state in the list of a point does not identify it; its curve does.',
    remedy: 'Read states off by their curves.',
    numbers: [{ name: 'pairs of states that cross', value: pairs.length, unit: '' }],
  };
}

function crossingsOf(
  points: readonly PointResult[],
  level: string,
  curves: readonly StateCurve[],
): Crossing[] {
  const energies = points.map((point) => energiesOf(point, level));
  const energyAt = ({ states }: StateCurve, point: number): number | undefined => {
    const place = states[point];
    return place == null ? undefined : energies[point]?.[place];
  };
  const alongScan = points
    .flatMap(({ coordinate }, index) => (coordinate === null ? [] : [{ coordinate, index }]))
    .sort((a, b) => a.coordinate - b.coordinate);
  return alongScan.slice(1).flatMap((after, k): Crossing[] => {
    const before = alongScan[k]!;
    const range = [before.coordinate, after.coordinate] as const;
    const here = curves.map((curve) => ({
      curve,
      from: energyAt(curve, before.index),
      to: energyAt(curve, after.index),
    }));
    return here.flatMap((one) =>
      here.flatMap((other): Crossing[] => {
        // a state that is not among those computed lies above them
        const gapBefore = (other.from ?? Infinity) - (one.from ?? Infinity);
        const gapAfter = (one.to ?? Infinity) - (other.to ?? Infinity);
        if (!(gapBefore > DEGENERATE && gapAfter > DEGENERATE)) return [];
        const isLowest = one.curve.states[before.index] === 0 && other.curve.states[after.index] === 0;
        const isSeen = [one.from, one.to, other.from, other.to].every((energy) => energy !== undefined);
        // of one state a point, only another spin or label proves that it is another state, not a lost match
        const isProven =
          spinAt(points[before.index], level) !== spinAt(points[after.index], level) ||
          (isLabelled(one.curve) && isLabelled(other.curve));
        return isSeen || (isLowest && isProven)
          ? [{ pair: [one.curve.name, other.curve.name], range, isLowest, gaps: [gapBefore, gapAfter] }]
          : [];
      }),
    );
  });
}

/** Of the lowest state. */
function spinAt(point: PointResult | undefined, level: string): string | undefined {
  const result = point?.levels[level];
  return result?.kind === 'correlated' || result?.kind === 'singles' ? result.states[0]?.spin : undefined;
}

/** Without a label a curve is named by its spin in words: “singlet 2”. */
const isLabelled = ({ name }: StateCurve): boolean => !/^[a-z]+ \d+$/.test(name);

/** Of the states of a level that converged. */
function energiesOf({ levels }: PointResult, level: string): readonly number[] {
  const result = levels[level];
  const hasStates = result?.kind === 'correlated' || result?.kind === 'singles';
  return hasStates && result.converged ? result.states.map(({ energy }) => energy) : [];
}

const places = (range: readonly number[]): string =>
  range.map((value) => Number(value.toPrecision(6))).join(' and ');
