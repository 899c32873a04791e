import type { PointResult, StudyResults } from '#engine';
import { geometryText } from '../study/geometry-text';
import { ReportError } from './report-error';
import { coordinateText, sharedCoordinate } from './scanned-coordinate';

/** Of the coordinate, in its unit: what a user types and what an evenly spaced scan holds differ by less. */
const SAME_PLACE = 1e-6;

/**
 * Geometries of a study as plain lines (`geometryText`); several are set apart by an empty line.
 *
 * @param place - the coordinate of one computed point, in the study's unit, or all of them
 * @throws ReportError `report.noSuchPoint`
 */
export function geometryLines(results: StudyResults, place: number | 'all'): string {
  const points = place === 'all' ? results.points : [pointAt(results, place)];
  return points.map((point) => geometryText(results.study, point, whereText(results, point))).join('\n');
}

function whereText({ study }: StudyResults, { coordinate }: PointResult): string {
  if (coordinate === null) return '';
  const { label, unit } = sharedCoordinate([{ study }], ['']);
  return `${label} ${coordinateText(coordinate, unit)}`;
}

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
