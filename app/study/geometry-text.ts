import type { PointResult, Study } from '#engine';
import { formula } from './formula';

/**
 * One geometry of a study as plain lines `element x y z`, after a line that begins with `#` and names molecule, place
 * and unit. Ghost atoms have no line, since they have no nucleus.
 *
 * @param where - the place along the scan with its unit; empty for a single geometry
 */
export function geometryText({ molecule }: Study, { atoms }: PointResult, where: string): string {
  const real = atoms.filter(({ ghost }) => !ghost);
  const lines = [
    `# ${[formula(molecule), where].filter((part) => part !== '').join(', ')}; x y z in ${molecule.unit}`,
    ...real.map(({ element, at }) => [element.padEnd(2), ...at.map(lengthText)].join(' ')),
  ];
  return `${lines.join('\n')}\n`;
}

/** Far more digits than a geometry means, in columns. */
const lengthText = (length: number): string => length.toFixed(10).padStart(16);
