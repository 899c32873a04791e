import type { StudyResults } from '#engine';
import { energyColumns } from '../study/energy-columns';
import { coordinateScale, type ScannedCoordinate } from './scanned-coordinate';

export interface CurvePoint {
  /** in the unit of the shared axis */
  readonly coordinate: number;
  /** hartree */
  readonly energy: number;
  /** hartree; lowest states of correlated levels only */
  readonly correlation?: number;
  readonly converged: boolean;
}

/** One curve of a figure: one state of one level of one results file. */
export interface CurveSeries {
  /** which of the results files */
  readonly file: number;
  readonly name: string;
  readonly level: string;
  readonly label: string;
  /** curves that share one entry of the legend */
  readonly family: string;
  readonly isExcited: boolean;
  readonly points: readonly CurvePoint[];
  readonly minimum?: { readonly coordinate: number; readonly energy: number };
}

/** All curves of the results, with the points that have a number at all, unconverged ones included. */
export function curveSeries(
  results: readonly StudyResults[],
  names: readonly string[],
  shared: ScannedCoordinate,
): readonly CurveSeries[] {
  return results.flatMap((file, index) => {
    const scale = coordinateScale(file, shared);
    return energyColumns(file).map(({ label, family, level, isExcited, entryAt }): CurveSeries => {
      const points = file.points.flatMap((point): CurvePoint[] => {
        const entry = entryAt(point);
        if (!entry || point.coordinate === null || !Number.isFinite(entry.energy)) return [];
        const { energy, converged, correlation } = entry;
        const coordinate = point.coordinate * scale;
        return [{ coordinate, energy, converged, ...(correlation === undefined ? {} : { correlation }) }];
      });
      const found = isExcited ? undefined : file.findings[level]?.minimum;
      return {
        file: index,
        name: names[index] ?? '',
        level,
        label,
        family,
        isExcited,
        points,
        ...(found?.kind === 'found'
          ? { minimum: { coordinate: found.equilibriumDistance * scale, energy: found.energy } }
          : {}),
      };
    });
  });
}
