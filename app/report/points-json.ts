import type { StudyResults } from '#engine';
import { type BasisColumn, basisColumns } from '../study/basis-columns';
import { energyColumns } from '../study/energy-columns';
import { studySentence } from '../study/sentence';
import { sharedCoordinate } from './scanned-coordinate';

/**
 * The points of a study as JSON for a plotting program: energies and correlation energies in hartree under the names
 * of the CSV's columns, null where a level has no number or did not converge.
 */
export function pointsJson(results: StudyResults): string {
  const { label, kind, lengthUnit } = sharedCoordinate([results], ['']);
  const columns = energyColumns(results);
  const further = basisColumns(results);
  const points = results.points.map((point, index) => {
    const entries = columns.map((column) => ({ label: column.label, entry: column.entryAt(point) }));
    const numbers = (pick: (entry: NonNullable<(typeof entries)[number]['entry']>) => number | undefined) =>
      Object.fromEntries(
        entries.flatMap(({ label: name, entry }) => {
          const value = entry && pick(entry);
          if (entry && value === undefined) return [];
          return [[name, entry?.converged && Number.isFinite(value) ? value : null]];
        }),
      );
    const inBases = (pick: (column: BasisColumn) => readonly (number | null)[] | undefined) =>
      Object.fromEntries(
        further.flatMap((column) => {
          const values = pick(column);
          return values ? [[column.label, values[index] ?? null]] : [];
        }),
      );
    return {
      coordinate: point.coordinate,
      energies: { ...numbers(({ energy }) => energy), ...inBases(({ energies }) => energies) },
      correlationEnergies: {
        ...numbers(({ correlation }) => correlation),
        ...inBases(({ correlation }) => correlation),
      },
      ...(further.some(({ uncertainties }) => uncertainties) && {
        uncertainties: inBases(({ uncertainties }) => uncertainties),
      }),
    };
  });
  const unit = kind === 'distance' ? lengthUnit : kind === 'none' ? null : 'degree';
  return `${JSON.stringify(
    {
      format: 'farwell/points',
      version: 1,
      study: studySentence(results.study),
      coordinate: { name: label, unit },
      energyUnit: 'hartree',
      points,
    },
    null,
    2,
  )}\n`;
}
