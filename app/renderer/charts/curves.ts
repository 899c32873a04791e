import type { LengthUnit, PointResult, Study, StudyResults } from '#engine';
import { type EnergyColumn, type EnergyEntry, energyColumns } from '../../study/energy-columns';
import type { EnergyReference } from '../state/window-state';
import { convertLength, type EnergyUnit, toEnergyUnit } from '../units';

/** The points of a computation; undefined where one has not arrived. */
export type Points = readonly (PointResult | undefined)[];

export interface CurveOptions {
  readonly energyUnit: EnergyUnit;
  readonly energyReference: EnergyReference;
  /** of the axis; ignored for angles */
  readonly lengthUnit: LengthUnit;
  /** of the whole scan; undefined as long as it is not complete */
  readonly curves?: StudyResults['curves'];
}

/** One line of a chart: one entry a point, in the order of the points. */
export interface Curve {
  readonly label: string;
  readonly level: string;
  readonly isExcited: boolean;
  /** a triplet at every point */
  readonly isTriplet: boolean;
  /** in the axis's unit; null where there is nothing to draw */
  readonly values: readonly (number | null)[];
  readonly isConverged: readonly boolean[];
}

/** A level without the number that its curve would be measured from. */
export interface MissingReference {
  readonly level: string;
  readonly reason: string;
}

export const scansLength = ({ scan }: Study): boolean => scan !== undefined && 'bonds' in scan.coordinate;

/** The positions of the points along the axis, in its unit; null where a point has not arrived or has none. */
export function positions(study: Study, points: Points, lengthUnit: LengthUnit): readonly (number | null)[] {
  return points.map((point) => {
    const coordinate = point?.coordinate ?? null;
    return coordinate === null || !scansLength(study)
      ? coordinate
      : convertLength(coordinate, study.molecule.unit, lengthUnit);
  });
}

/** The energies of every level and state, in the unit and from the reference asked for. */
export function energyCurves(
  study: Study,
  points: Points,
  options: CurveOptions,
): { readonly curves: readonly Curve[]; readonly missing: readonly MissingReference[] } {
  const columns = columnsOf(study, points, options.curves);
  const references = new Map(
    study.levels.map((level) => [level, referenceEnergy(level, columns, points, options.energyReference)]),
  );
  const curves = columns
    .filter(({ level }) => typeof references.get(level) === 'number')
    .map((column) =>
      curve(column, points, ({ energy }) =>
        toEnergyUnit(energy - (references.get(column.level) as number), options.energyUnit),
      ),
    );
  const missing = [...references].flatMap(([level, reference]) =>
    typeof reference === 'string' ? [{ level, reason: reference }] : [],
  );
  return { curves, missing };
}

/** What each correlated level adds to RHF. */
export function correlationCurves(study: Study, points: Points, energyUnit: EnergyUnit): readonly Curve[] {
  return columnsOf(study, points)
    .map((column) =>
      curve(column, points, ({ correlation }) =>
        correlation === undefined ? null : toEnergyUnit(correlation, energyUnit),
      ),
    )
    .filter(({ values }) => values.some((value) => value !== null));
}

const columnsOf = (study: Study, points: Points, curves?: StudyResults['curves']): readonly EnergyColumn[] =>
  energyColumns({ study, points: points.filter((point) => point !== undefined), curves });

function curve(
  { label, level, isExcited, entryAt }: EnergyColumn,
  points: Points,
  value: (entry: EnergyEntry) => number | null,
): Curve {
  const entries = points.map((point) => (point === undefined ? undefined : entryAt(point)));
  return {
    label,
    level,
    isExcited,
    isTriplet: entries.every((entry) => entry === undefined || entry.spin === 'triplet'),
    values: entries.map((entry) => {
      const drawn = entry === undefined ? null : value(entry);
      return drawn === null || Number.isFinite(drawn) ? drawn : null;
    }),
    isConverged: entries.map((entry) => entry?.converged ?? false),
  };
}

/** What a level's energies are measured from, hartree, or why there is nothing to measure from. */
export function energyZero(
  study: Study,
  points: Points,
  level: string,
  { energyReference, curves }: CurveOptions,
): number | string {
  return referenceEnergy(level, columnsOf(study, points, curves), points, energyReference);
}

/** The energy that a level is measured from, in hartree, or why there is none. CIS is measured from its own ground state, RHF's. */
function referenceEnergy(
  level: string,
  columns: readonly EnergyColumn[],
  points: Points,
  reference: EnergyReference,
): number | string {
  if (reference === 'absolute') return 0;
  const groundLevel = level === 'CIS' ? 'RHF' : level;
  const ground = columns.find((column) => column.level === groundLevel && !column.isExcited);
  if (ground === undefined) return `needs ${groundLevel} among the levels`;
  const computed = points
    .filter((point) => point !== undefined && point.coordinate !== null)
    .map((point) => ({ coordinate: point!.coordinate!, entry: ground.entryAt(point!) }));
  if (reference === 'ownMinimum') {
    const energies = computed.flatMap(({ entry }) => (entry?.converged ? [entry.energy] : []));
    return energies.length === 0 ? 'no converged point yet' : Math.min(...energies);
  }
  const farthest = computed.reduce<(typeof computed)[number] | undefined>(
    (far, candidate) => (far === undefined || candidate.coordinate > far.coordinate ? candidate : far),
    undefined,
  );
  return farthest?.entry?.converged ? farthest.entry.energy : 'its far end has not converged';
}
