import type { PointResult, StudyResults } from '#engine';
import { formula } from '../study/formula';
import { ReportError } from './report-error';
import { coordinateText, sharedCoordinate } from './scanned-coordinate';

/** Of the coordinate, in its unit: what a user types and what an evenly spaced scan holds differ by less. */
const SAME_PLACE = 1e-6;

/**
 * Geometries of a study as plain lines `element x y z`, after a line that begins with `#` and names molecule, place and
 * unit; several are set apart by an empty line. Ghost atoms have no line, since they have no nucleus.
 *
 * @param place - the coordinate of one computed point, in the study's unit, or all of them
 * @throws ReportError `report.noSuchPoint`
 */
export function geometryLines(results: StudyResults, place: number | 'all'): string {
  const points = place === 'all' ? results.points : [pointAt(results, place)];
  return points.map((point) => `${linesOf(results, point).join('\n')}\n`).join('\n');
}

function linesOf({ study }: StudyResults, { coordinate, atoms }: PointResult): readonly string[] {
  const { label, unit } = sharedCoordinate([{ study }], ['']);
  const where = coordinate === null ? '' : `, ${label} ${coordinateText(coordinate, unit)}`;
  const real = atoms.filter(({ ghost }) => !ghost);
  return [
    `# ${formula(study.molecule)}${where}; x y z in ${study.molecule.unit}`,
    ...real.map(({ element, at }) => [element.padEnd(2), ...at.map(lengthText)].join(' ')),
  ];
}

/** Far more digits than a geometry means, in columns. */
const lengthText = (length: number): string => length.toFixed(10).padStart(16);

function pointAt({ points, study }: StudyResults, place: number): PointResult {
  const found = points.find(
    ({ coordinate }) => coordinate !== null && Math.abs(coordinate - place) < SAME_PLACE,
  );
  if (found) return found;
  const { unit } = sharedCoordinate([{ study }], ['']);
  const distance = ({ coordinate }: PointResult) =>
    Math.abs((coordinate ?? Number.POSITIVE_INFINITY) - place);
  const nearest = points
    .filter(({ coordinate }) => coordinate !== null)
    .sort((a, b) => distance(a) - distance(b))
    .slice(0, 2)
    .map(({ coordinate }) => coordinateText(coordinate!, unit));
  throw new ReportError(
    'report.noSuchPoint',
    'geometry',
    nearest.length === 0
      ? 'These results have a single geometry and no coordinate.'
      : `No point was computed at ${coordinateText(place, unit)}.`,
    nearest.length === 0
      ? 'Ask for all: `--geometry all`.'
      : `The nearest are ${nearest.join(' and ')}; \`--geometry all\` gives every one.`,
  );
}
