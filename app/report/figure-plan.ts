import type { StudyResults } from '#engine';
import { styleOfLevel } from '../study/level-style';
import { shareEnergyScale } from './comparability';
import { type CurvePoint, type CurveSeries, curveSeries } from './curve-series';
import { levelWithLevels, type WellLevels, wellLevels } from './figure-levels';
import { coordinateRange, correlationRange, energyRange } from './figure-ranges';
import { type CurveStyle, FAINT_INK, FILE_COLOURS, HIGHER_STATE_DASH, TRIPLET_DASH } from './figure-style';
import { coordinateHeading, sharedCoordinate } from './scanned-coordinate';

export interface DrawnPoint {
  readonly x: number;
  readonly y: number;
  readonly converged: boolean;
}

/** A curve of one panel, ready to draw: what to draw where is decided here, how in figure-specification.ts. */
export interface DrawnCurve {
  readonly style: CurveStyle;
  /** excited states are thin and have no markers */
  readonly isExcited: boolean;
  /** in order of x */
  readonly points: readonly DrawnPoint[];
  /** the converged points that carry a marker */
  readonly marked: readonly DrawnPoint[];
  readonly minimum?: { readonly x: number; readonly y: number };
}

export interface LegendEntry {
  readonly label: string;
  readonly style: CurveStyle;
  readonly kind: 'curve' | 'excited' | 'file';
}

export interface PlannedPanel {
  readonly title: string;
  readonly range: readonly [number, number];
  readonly curves: readonly DrawnCurve[];
}

export interface FigurePlan {
  readonly coordinateTitle: string;
  readonly coordinateRange: readonly [number, number];
  readonly energies: PlannedPanel;
  /** vibrational levels in the well of one curve */
  readonly levels?: WellLevels & { readonly colour: string };
  /** absent where no level gives a correlation energy */
  readonly correlation?: PlannedPanel;
  readonly legend: readonly LegendEntry[];
  /** what the marks mean, as far as they occur */
  readonly key: readonly string[];
}

/** Of two places on the axis, in its unit: a curve takes one of them only. */
const SAME_PLACE = 1e-6;
/** Curves with more points than this carry a marker on every second, third, … point. */
const MARKERS_PER_CURVE = 11;

/**
 * What the figure of some results shows: curves, ranges, legend.
 *
 * Energies are absolute where all files are about the same atoms and charge, else above each level's own lowest
 * point. The repulsive wall may leave the frame, so that the well keeps its room.
 *
 * @returns the plan, or why there is nothing to draw
 * @throws ReportError `report.coordinatesDiffer`
 */
export function planFigure(
  results: readonly StudyResults[],
  names: readonly string[],
): { readonly plan: FigurePlan } | { readonly reason: string } {
  const shared = sharedCoordinate(results, names);
  if (shared.kind === 'none') return { reason: 'A single geometry has no curve to draw.' };
  const isAbsolute = shareEnergyScale(
    results.map((file, index) => ({ name: names[index] ?? '', results: file })),
  );
  const all = curveSeries(results, names, shared);
  const series = (isAbsolute ? all : all.map((one) => aboveMinimum(one, all))).filter(
    ({ points }) => points.length > 0,
  );
  if (series.length === 0) return { reason: 'No level gave an energy at any point.' };

  const styleOf = ({ level, file, family, isExcited }: CurveSeries): CurveStyle => {
    const ofLevel = styleOfLevel(level);
    const dash = isExcited ? excitedDash(family) : ofLevel.dash;
    const style = { ...ofLevel, dash };
    return results.length === 1 ? style : { ...style, colour: FILE_COLOURS[file % FILE_COLOURS.length]! };
  };
  const energies = series.map((one, index) => ({
    ...drawnCurve(withMinimum(one), index, styleOf(one), ({ energy }) => energy),
    ...(one.minimum ? { minimum: { x: one.minimum.coordinate, y: one.minimum.energy } } : {}),
  }));
  const correlation = series.flatMap((one, index) =>
    one.points.some((point) => point.correlation !== undefined)
      ? [drawnCurve(one, index, styleOf(one), (point) => point.correlation)]
      : [],
  );
  const range = energyRange(energies, shared.kind);
  const levels = results.length === 1 ? levelsInWell(results[0]!, series, energies, range) : undefined;
  return {
    plan: {
      coordinateTitle: coordinateHeading(shared),
      coordinateRange: coordinateRange(energies),
      energies: {
        title: isAbsolute ? 'Energy (hartree)' : 'Energy above minimum (hartree)',
        range,
        curves: energies,
      },
      ...(levels && { levels }),
      ...(correlation.length > 0
        ? {
            correlation: {
              title: 'Correlation energy (hartree)',
              range: correlationRange(correlation),
              curves: correlation,
            },
          }
        : {}),
      legend: legendOf(series, names, styleOf),
      key: keyOf(energies, levels, results[0] && levelWithLevels(results[0])),
    },
  };
}

function levelsInWell(
  results: StudyResults,
  series: readonly CurveSeries[],
  energies: readonly DrawnCurve[],
  range: readonly [number, number],
): FigurePlan['levels'] {
  const level = levelWithLevels(results);
  const curve = energies[series.findIndex((one) => one.level === level && !one.isExcited)];
  const found = level !== undefined && curve && wellLevels(results, level, curve.points, range);
  return found ? { ...found, colour: curve.style.colour } : undefined;
}

function excitedDash(family: string): readonly number[] {
  if (family === 'CIS singlets') return [];
  return family === 'CIS triplets' ? TRIPLET_DASH : HIGHER_STATE_DASH;
}

/** CIS energies are counted from the RHF minimum, which they are excitations from. */
function aboveMinimum(one: CurveSeries, all: readonly CurveSeries[]): CurveSeries {
  const home = one.level === 'CIS' ? 'RHF' : one.level;
  const own =
    all.find(({ file, level, isExcited }) => file === one.file && level === home && !isExcited) ?? one;
  const converged = own.points.filter((point) => point.converged);
  const zero = Math.min(...(converged.length > 0 ? converged : own.points).map(({ energy }) => energy));
  const shift = own.minimum ? Math.min(zero, own.minimum.energy) : zero;
  return {
    ...one,
    points: one.points.map((point) => ({ ...point, energy: point.energy - shift })),
    ...(one.minimum ? { minimum: { ...one.minimum, energy: one.minimum.energy - shift } } : {}),
  };
}

/** The minimum was computed as the points were, and a coarse scan does not come near it. */
function withMinimum(one: CurveSeries): CurveSeries {
  if (!one.minimum) return one;
  const { coordinate, energy } = one.minimum;
  const others = one.points.filter((point) => Math.abs(point.coordinate - coordinate) > SAME_PLACE);
  return { ...one, points: [...others, { coordinate, energy, converged: true }] };
}

function drawnCurve(
  one: CurveSeries,
  index: number,
  style: CurveStyle,
  heightOf: (point: CurvePoint) => number | undefined,
): DrawnCurve {
  const points = one.points
    .flatMap((point): DrawnPoint[] => {
      const y = heightOf(point);
      return y === undefined ? [] : [{ x: point.coordinate, y, converged: point.converged }];
    })
    .sort((a, b) => a.x - b.x);
  const markable = points.filter(({ x }) => x !== one.minimum?.coordinate);
  const every = Math.ceil(markable.length / MARKERS_PER_CURVE);
  return {
    style,
    isExcited: one.isExcited,
    points,
    // staggered, so that the markers of curves that lie on one another are all seen
    marked: one.isExcited
      ? []
      : markable.filter(({ converged }, place) => converged && (place + index) % every === 0),
  };
}

/** One entry a family of curves; of several files, whose colour is the file, the entries of families are grey. */
function legendOf(
  series: readonly CurveSeries[],
  names: readonly string[],
  styleOf: (one: CurveSeries) => CurveStyle,
): readonly LegendEntry[] {
  const several = names.length > 1;
  const files = names.map((label, file): LegendEntry => {
    const colour = FILE_COLOURS[file % FILE_COLOURS.length]!;
    return { label, style: { colour, dash: [], shape: 'circle' }, kind: 'file' };
  });
  const firstOfFamily = series.filter(
    ({ family }, index) => series.findIndex((other) => other.family === family) === index,
  );
  const families = firstOfFamily.map((one): LegendEntry => {
    const style = several ? { ...styleOf(one), colour: FAINT_INK } : styleOf(one);
    return { label: one.family, style, kind: one.isExcited ? 'excited' : 'curve' };
  });
  const lowestFirst = families.toSorted(
    (a, b) => Number(a.kind === 'excited') - Number(b.kind === 'excited'),
  );
  return several ? [...files, ...lowestFirst] : lowestFirst;
}

function keyOf(
  curves: readonly DrawnCurve[],
  levels: WellLevels | undefined,
  levelOfLevels: string | undefined,
): readonly string[] {
  return [
    ...(curves.some(({ minimum }) => minimum) ? ['Bars mark the minima.'] : []),
    ...(levels
      ? [
          `Thin lines: ${levels.every === 1 ? 'the vibrational levels' : `every ${ordinal(levels.every)} vibrational level`} of ${levelOfLevels}.`,
        ]
      : []),
    ...(curves.some(({ points }) => points.some(({ converged }) => !converged))
      ? ['Crosses: not converged.']
      : []),
  ];
}

const ordinal = (count: number): string => ({ 2: 'second', 5: 'fifth' })[count] ?? `${count}th`;
