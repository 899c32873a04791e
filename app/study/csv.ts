import type { StudyResults } from '#engine';
import { energyColumns } from './energy-columns';

/**
 * The energies of a study as CSV (RFC 4180, CRLF): one row a point, header `coordinate,RHF,CISD,…`.
 *
 * Energies in hartree with all the digits that a double holds; the coordinate in the study's unit (degrees for
 * angles), empty for a single point. Empty where an energy is missing or did not converge, so that it cannot be
 * taken for a good one.
 */
export function studyCsv(results: StudyResults): string {
  const columns = energyColumns(results);
  const header = ['coordinate', ...columns.map(({ label }) => label)];
  const rows = results.points.map((point) => [
    point.coordinate === null ? '' : String(point.coordinate),
    ...columns.map(({ entryAt }) => {
      const entry = entryAt(point);
      return entry?.converged && Number.isFinite(entry.energy) ? String(entry.energy) : '';
    }),
  ]);
  return [header, ...rows].map((row) => `${row.join(',')}\r\n`).join('');
}
