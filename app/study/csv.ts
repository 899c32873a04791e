import type { StudyResults } from '#engine';
import { basisColumns } from './basis-columns';
import { csvText } from './csv-text';
import { energyColumns } from './energy-columns';

/**
 * The energies of a study as CSV (RFC 4180, CRLF): one row a point, header `coordinate,RHF,CISD,…`.
 *
 * Energies in hartree with all the digits that a double holds; the coordinate in the study's unit (degrees for
 * angles), empty for a single point. Empty where an energy is missing or did not converge, so that it cannot be
 * taken for a good one. After the study's own columns follow, as `FCI/cc-pVTZ`, those in its further bases and, as
 * `FCI/limit` and `FCI/limit ±`, in their limit.
 */
export function studyCsv(results: StudyResults): string {
  const columns = energyColumns(results);
  const further = basisColumns(results).flatMap(({ label, energies, uncertainties }) => [
    { label, numbers: energies },
    ...(uncertainties ? [{ label: `${label} ±`, numbers: uncertainties }] : []),
  ]);
  const header = ['coordinate', ...[...columns, ...further].map(({ label }) => label)];
  const rows = results.points.map((point, index) => [
    point.coordinate === null ? '' : String(point.coordinate),
    ...columns.map(({ entryAt }) => {
      const entry = entryAt(point);
      return entry?.converged && Number.isFinite(entry.energy) ? String(entry.energy) : '';
    }),
    ...further.map(({ numbers }) => numbers[index]?.toString() ?? ''),
  ]);
  return csvText([header, ...rows]);
}
