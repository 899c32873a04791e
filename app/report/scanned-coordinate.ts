import type { LengthUnit, StudyResults } from '#engine';
import { BOHR_IN_ANGSTROM } from '#engine';
import { ReportError } from './report-error';

/** What lies along the horizontal axis of a figure and in the first column of a table. */
export interface ScannedCoordinate {
  readonly kind: 'distance' | 'angle' | 'dihedral' | 'none';
  /** `H–H distance`, `H–O–H angle` */
  readonly label: string;
  /** as printed: `Å`, `bohr`, `°`; empty without a scan */
  readonly unit: string;
  /** names of the files by unit of length, to convert by */
  readonly lengthUnit: LengthUnit;
}

/**
 * The coordinate that all these results share.
 *
 * @param names - one a results file, for the messages
 * @throws ReportError `report.coordinatesDiffer` if one scans a distance and another an angle, or nothing
 */
export function sharedCoordinate(
  results: readonly Pick<StudyResults, 'study'>[],
  names: readonly string[],
): ScannedCoordinate {
  const coordinates = results.map(coordinateOf);
  const [first, ...others] = coordinates;
  if (!first)
    throw new ReportError('report.noResults', '', 'There are no results to report.', 'Name a results file.');
  const odd = others.findIndex(({ kind }) => kind !== first.kind) + 1;
  if (odd > 0) {
    throw new ReportError(
      'report.coordinatesDiffer',
      names[odd] ?? '',
      `${names[0]} has ${DESCRIPTIONS[first.kind]}, ${names[odd]} has ${DESCRIPTIONS[coordinates[odd]!.kind]}: they share no axis.`,
      'Report them one by one, or together with results of the same kind.',
    );
  }
  const label = others.every((other) => other.label === first.label)
    ? first.label
    : GENERAL_LABELS[first.kind];
  return { ...first, label };
}

/** A file's own lengths → the unit of the shared axis; angles stay as they are. */
export function coordinateScale(results: StudyResults, shared: ScannedCoordinate): number {
  const own = results.study.molecule.unit;
  if (shared.kind !== 'distance' || own === shared.lengthUnit) return 1;
  return own === 'bohr' ? BOHR_IN_ANGSTROM : 1 / BOHR_IN_ANGSTROM;
}

/** `H–H distance (Å)` */
export const coordinateHeading = ({ label, unit }: ScannedCoordinate): string =>
  unit ? `${label} (${unit})` : label;

/** `0.7414 Å`, `104.5°`: without the noise of evenly spaced doubles */
export const coordinateText = (value: number, unit: string): string =>
  `${Number(value.toFixed(6))}${unit === '°' ? '' : ' '}${unit}`;

const DESCRIPTIONS = {
  distance: 'a scan of a distance',
  angle: 'a scan of an angle',
  dihedral: 'a scan of a dihedral angle',
  none: 'a single point',
} as const;

const GENERAL_LABELS = {
  distance: 'Bond distance',
  angle: 'Angle',
  dihedral: 'Dihedral angle',
  none: 'Geometry',
} as const;

function coordinateOf({ study }: Pick<StudyResults, 'study'>): ScannedCoordinate {
  const { atoms, unit: lengthUnit } = study.molecule;
  const chain = (indices: readonly number[]) =>
    indices.map((index) => atoms[index]?.element ?? '?').join('–');
  const coordinate = study.scan?.coordinate;
  if (!coordinate) return { kind: 'none', label: GENERAL_LABELS.none, unit: '', lengthUnit };
  if ('angle' in coordinate)
    return { kind: 'angle', label: `${chain(coordinate.angle)} angle`, unit: '°', lengthUnit };
  if ('dihedral' in coordinate)
    return { kind: 'dihedral', label: `${chain(coordinate.dihedral)} dihedral angle`, unit: '°', lengthUnit };
  const pairs = new Set(coordinate.bonds.map((bond) => chain(bond)));
  return {
    kind: 'distance',
    label: pairs.size === 1 ? `${[...pairs][0]} distance` : GENERAL_LABELS.distance,
    unit: lengthUnit === 'angstrom' ? 'Å' : 'bohr',
    lengthUnit,
  };
}
