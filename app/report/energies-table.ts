import type { PointResult, StudyResults } from '#engine';
import { type EnergyColumn, type EnergyEntry, energyColumns } from '../study/energy-columns';
import { stateName } from '../study/state-name';
import { fileGroup, type NamedResults } from './named-results';
import { coordinateHeading, coordinateScale, type ScannedCoordinate } from './scanned-coordinate';
import { withMinus } from './text-escapes';
import type { TableColumn, TextTable } from './text-table';

const NOT_CONVERGED = 'n.c.';

/** A microhartree; more makes columns too wide for a page, and is in the CSV. */
const MOST_DECIMALS = 6;
const LEAST_DECIMALS = 3;
/** Of coordinates; evenly spaced scans have endless decimals. */
const MOST_COORDINATE_DECIMALS = 6;

/** Of the rows of a common table, at least this share must have numbers of more than one file. */
const LEAST_COMMON_SHARE = 0.5;

/** One table of all files where they have many distances in common, else one a file. */
export function energiesTables(
  files: readonly NamedResults[],
  shared: ScannedCoordinate,
): readonly TextTable[] {
  const counts = new Map<number, number>();
  for (const { results } of files) {
    const scale = coordinateScale(results, shared);
    for (const key of new Set(results.points.map((point) => scaledKey(point, scale))))
      counts.set(key, (counts.get(key) ?? 0) + 1);
  }
  const common = [...counts.values()].filter((count) => count > 1).length;
  if (files.length === 1 || common >= LEAST_COMMON_SHARE * counts.size) return [energiesTable(files, shared)];
  return files.map((file) => energiesTable([file], shared));
}

/** Energies and correlation energies: one row for every coordinate that any of the files has, in rising order. */
export function energiesTable(files: readonly NamedResults[], shared: ScannedCoordinate): TextTable {
  const decimals = Math.min(...files.map(({ results }) => energyDecimals(results)));
  const columnsByFile = files.map(fileColumns);
  const pointsByCoordinate = files.map(({ results }) => {
    const scale = coordinateScale(results, shared);
    return new Map(results.points.map((point) => [scaledKey(point, scale), point]));
  });
  const keys = [...new Set(pointsByCoordinate.flatMap((points) => [...points.keys()]))].sort((a, b) => a - b);
  const coordinateDecimals = decimalsOf(keys);
  const rows = keys.map((key) => [
    shared.kind === 'none' ? 'as given' : withMinus(key.toFixed(coordinateDecimals)),
    ...columnsByFile.flatMap((columns, index) => {
      const point = pointsByCoordinate[index]?.get(key);
      return columns.map(({ valueAt }) => cellText(point && valueAt(point), decimals));
    }),
  ]);
  return {
    id: 'energies',
    heading: 'Energies at all points',
    columns: [{ label: coordinateHeading(shared) }, ...columnsByFile.flat().map(({ column }) => column)],
    rows,
    notes: [...notesOf(files, rows), ...files.flatMap(statesNotes)],
  };
}

/** Two digits short of the convergence threshold, so that every printed digit is converged. */
function energyDecimals({ study }: StudyResults): number {
  const digits = Math.floor(-Math.log10(study.convergence.energy)) - 1;
  return Math.min(MOST_DECIMALS, Math.max(LEAST_DECIMALS, digits));
}

interface EnergiesColumn {
  readonly column: TableColumn;
  readonly valueAt: (
    point: PointResult,
  ) => { readonly value: number; readonly converged: boolean } | undefined;
}

function fileColumns(file: NamedResults): readonly EnergiesColumn[] {
  const columns = energyColumns(file.results);
  const energiesColumn = (
    { label, entryAt }: EnergyColumn,
    quantity: string,
    pick: (entry: EnergyEntry) => number | undefined,
  ): EnergiesColumn => ({
    column: { groups: [...fileGroup(file), quantity], label },
    valueAt: (point) => {
      const entry = entryAt(point);
      const value = entry && pick(entry);
      return value === undefined ? undefined : { value, converged: entry?.converged ?? false };
    },
  });
  const hasCorrelation = ({ entryAt }: EnergyColumn) =>
    file.results.points.some((point) => entryAt(point)?.correlation !== undefined);
  return [
    ...columns.map((column) => energiesColumn(column, 'Energy (hartree)', ({ energy }) => energy)),
    ...columns
      .filter(hasCorrelation)
      .map((column) =>
        energiesColumn(column, 'Correlation energy (hartree)', ({ correlation }) => correlation),
      ),
  ];
}

function cellText(
  entry: { readonly value: number; readonly converged: boolean } | undefined,
  decimals: number,
): string {
  if (!entry) return '';
  return entry.converged && Number.isFinite(entry.value)
    ? withMinus(entry.value.toFixed(decimals))
    : NOT_CONVERGED;
}

/** Rounded, so that equal distances of several files meet in one row in spite of the last bits of a conversion. */
const scaledKey = ({ coordinate }: PointResult, scale: number): number =>
  coordinate === null ? 0 : Number((coordinate * scale).toFixed(9));

function decimalsOf(values: readonly number[]): number {
  const isExact = (decimals: number) =>
    values.every((value) => Math.abs(Number(value.toFixed(decimals)) - value) < 1e-10);
  return (
    Array.from({ length: MOST_COORDINATE_DECIMALS }, (_, decimals) => decimals).find(isExact) ??
    MOST_COORDINATE_DECIMALS
  );
}

function notesOf(files: readonly NamedResults[], rows: readonly (readonly string[])[]): readonly string[] {
  return [
    ...(rows.flat().includes(NOT_CONVERGED)
      ? [
          `${NOT_CONVERGED}: the iteration did not converge; the number it ended with is in the results file only.`,
        ]
      : []),
    ...(files.some(({ results }) => results.study.levels.includes('CIS'))
      ? ['CIS has no correlation energy: its energies are those of excited states (Brillouin’s theorem).']
      : []),
    'Every digit is in the CSV file.',
  ];
}

/** Where states have labels, which state each column holds, in the order of the coordinate. */
function statesNotes({ name, results }: NamedResults): readonly string[] {
  const points = [...results.points].sort((a, b) => (a.coordinate ?? 0) - (b.coordinate ?? 0));
  const states = energyColumns(results).flatMap(({ label, entryAt }) => {
    const along = points.map(entryAt).flatMap((entry) => {
      return entry?.converged && entry.spin && entry.symmetry ? [stateName(entry.spin, entry.symmetry)] : [];
    });
    const changes = along.filter((state, k) => state !== along[k - 1]);
    // a column named after its state says it already
    const isSaid = changes.length === 1 && label.includes(changes[0]!);
    return changes.length > 0 && !isSaid ? [`${label} ${changes.join(', then ')}`] : [];
  });
  return states.length > 0
    ? [`States${name && ` of ${name}`}, by rising coordinate: ${states.join('; ')}.`]
    : [];
}
