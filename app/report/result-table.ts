import type { PointResult, StudyResults } from '#engine';
import { type EnergyColumn, type EnergyEntry, energyColumns } from '../study/energy-columns';
import { stateName } from '../study/state-name';
import { coordinateHeading, coordinateScale, sharedCoordinate } from './scanned-coordinate';

/** Energies and correlation energies as a table to be printed; minus signs and dashes are left to the format. */
export interface ResultTable {
  readonly coordinateHeading: string;
  /** columns that share a quantity (and, of several files, the file) */
  readonly blocks: readonly TableBlock[];
  readonly rows: readonly TableRow[];
  /** sentences that explain what stands in the cells */
  readonly notes: readonly string[];
}

export interface TableBlock {
  /** name of the file, empty for a single one */
  readonly file: string;
  readonly quantity: string;
  readonly columns: readonly string[];
}

export interface TableRow {
  readonly coordinate: string;
  /** a number, or one of the two marks below */
  readonly cells: readonly string[];
}

export const NOT_CONVERGED = 'n.c.';
export const NOT_COMPUTED = '';

/** A microhartree; more makes columns too wide for a page, and is in the CSV. */
const MOST_DECIMALS = 6;
const LEAST_DECIMALS = 3;
/** Of coordinates; evenly spaced scans have endless decimals. */
const MOST_COORDINATE_DECIMALS = 6;

/**
 * One row for every coordinate that any of the files has, in rising order; one column for every energy and for
 * every correlation energy.
 *
 * @throws ReportError `report.coordinatesDiffer`
 */
export function resultTable(results: readonly StudyResults[], names: readonly string[]): ResultTable {
  const shared = sharedCoordinate(results, names);
  const decimals = Math.min(...results.map(energyDecimals));
  const columnsByFile = results.map((file, index) =>
    fileColumns(file, results.length > 1 ? (names[index] ?? '') : ''),
  );
  const pointsByCoordinate = results.map((file) => {
    const scale = coordinateScale(file, shared);
    return new Map(file.points.map((point) => [scaledKey(point, scale), point]));
  });
  const keys = [...new Set(pointsByCoordinate.flatMap((points) => [...points.keys()]))].sort((a, b) => a - b);
  const coordinateDecimals = decimalsOf(keys);
  const rows = keys.map(
    (key): TableRow => ({
      coordinate: shared.kind === 'none' ? 'as given' : key.toFixed(coordinateDecimals),
      cells: columnsByFile.flatMap((columns, index) => {
        const point = pointsByCoordinate[index]?.get(key);
        return columns.map(({ valueAt }) => cellText(point && valueAt(point), decimals));
      }),
    }),
  );
  return {
    coordinateHeading: coordinateHeading(shared),
    blocks: blocksOf(columnsByFile.flat()),
    rows,
    notes: [...notesOf(results, rows), ...statesNotes(results, names)],
  };
}

/** Two digits short of the convergence threshold, so that every printed digit is converged. */
function energyDecimals({ study }: StudyResults): number {
  const digits = Math.floor(-Math.log10(study.convergence.energy)) - 1;
  return Math.min(MOST_DECIMALS, Math.max(LEAST_DECIMALS, digits));
}

interface TableColumn {
  readonly file: string;
  readonly quantity: string;
  readonly label: string;
  readonly valueAt: (
    point: PointResult,
  ) => { readonly value: number; readonly converged: boolean } | undefined;
}

function fileColumns(results: StudyResults, file: string): readonly TableColumn[] {
  const columns = energyColumns(results);
  const tableColumn = (
    { label, entryAt }: EnergyColumn,
    quantity: string,
    pick: (entry: EnergyEntry) => number | undefined,
  ): TableColumn => ({
    file,
    quantity,
    label,
    valueAt: (point) => {
      const entry = entryAt(point);
      const value = entry && pick(entry);
      return value === undefined ? undefined : { value, converged: entry?.converged ?? false };
    },
  });
  const hasCorrelation = ({ entryAt }: EnergyColumn) =>
    results.points.some((point) => entryAt(point)?.correlation !== undefined);
  return [
    ...columns.map((column) => tableColumn(column, 'Energy (hartree)', ({ energy }) => energy)),
    ...columns
      .filter(hasCorrelation)
      .map((column) => tableColumn(column, 'Correlation energy (hartree)', ({ correlation }) => correlation)),
  ];
}

function blocksOf(columns: readonly TableColumn[]): readonly TableBlock[] {
  const blocks: { file: string; quantity: string; columns: string[] }[] = [];
  for (const { file, quantity, label } of columns) {
    const last = blocks.at(-1);
    if (last?.file === file && last.quantity === quantity) last.columns.push(label);
    else blocks.push({ file, quantity, columns: [label] });
  }
  return blocks;
}

function cellText(
  entry: { readonly value: number; readonly converged: boolean } | undefined,
  decimals: number,
): string {
  if (!entry) return NOT_COMPUTED;
  return entry.converged && Number.isFinite(entry.value) ? entry.value.toFixed(decimals) : NOT_CONVERGED;
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

function notesOf(results: readonly StudyResults[], rows: readonly TableRow[]): readonly string[] {
  const cells = rows.flatMap((row) => row.cells);
  return [
    ...(cells.includes(NOT_CONVERGED)
      ? [
          `${NOT_CONVERGED}: the iteration did not converge; the number it ended with is in the results file only.`,
        ]
      : []),
    ...(results.some(({ study }) => study.levels.includes('CIS'))
      ? ['CIS has no correlation energy: its energies are those of excited states (Brillouin’s theorem).']
      : []),
  ];
}

/** For every file whose states have labels, which state each column holds, in the order of the coordinate. */
function statesNotes(results: readonly StudyResults[], names: readonly string[]): readonly string[] {
  return results.flatMap((file, index) => {
    const points = [...file.points].sort((a, b) => (a.coordinate ?? 0) - (b.coordinate ?? 0));
    const states = energyColumns(file).flatMap(({ label, entryAt }) => {
      const along = points.map(entryAt).flatMap((entry) => {
        return entry?.converged && entry.spin && entry.symmetry
          ? [stateName(entry.spin, entry.symmetry)]
          : [];
      });
      const changes = along.filter((name, k) => name !== along[k - 1]);
      return changes.length > 0 ? [`${label} ${changes.join(', then ')}`] : [];
    });
    const of = results.length > 1 ? ` of ${names[index] ?? ''}` : '';
    return states.length > 0 ? [`States${of}, by rising coordinate: ${states.join('; ')}.`] : [];
  });
}
