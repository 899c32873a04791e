import { EngineError } from '../errors';
import type { AtomInput, MoleculeInput } from './build-molecule';
import { type Coordinate, chainOf, listedPairs, measureCoordinate, turnPlace } from './coordinate';
import { planMotions } from './scan-motion';

/** Within this of 0 or 180 degrees three atoms leave their plane, and so the axis to turn about, undefined. */
const LINEAR_WITHIN_DEGREES = 1e-4;

/**
 * Everything that keeps a coordinate from being scanned, each with its place in the study.
 *
 * Codes: `scan.atomIndex` (no such atom, an atom or bond named twice), `scan.undefinedCoordinate` (nothing listed,
 * three atoms in a line at the start), `scan.ring` and `scan.tornTwoWays` (see `planMotions`).
 */
export function checkCoordinate(molecule: MoleculeInput, coordinate: Coordinate): readonly EngineError[] {
  const errors = checkIndices(molecule.atoms, coordinate);
  if (errors.length > 0) return errors;
  return [...checkBent(molecule, coordinate), ...planMotions(molecule, coordinate).errors];
}

function checkIndices(atoms: readonly AtomInput[], coordinate: Coordinate): EngineError[] {
  const groups = placedIndices(coordinate);
  if (groups.length === 0) {
    const remedy = 'List at least one bond, such as [0, 1].';
    return [undefinedCoordinate('No bond is listed.', remedy, 'scan.coordinate.bonds')];
  }
  const fault = (index: number, place: string, message: string, remedy: string) =>
    new EngineError('scan.atomIndex', message, remedy, { index, atoms: atoms.length }, place);
  const seen = new Set<string>();
  return groups.flatMap(({ place, indices }) => {
    const errors = indices.flatMap((index, position) => {
      const there = `${place}[${position}]`;
      if (!atoms[index]) {
        const remedy = `Atoms are counted from 0; this molecule's last one is ${atoms.length - 1}.`;
        return [fault(index, there, `There is no atom ${index}.`, remedy)];
      }
      return indices.indexOf(index) < position
        ? [fault(index, there, `Atom ${index} is named twice.`, 'Name different atoms.')]
        : [];
    });
    const key = [...indices].sort((a, b) => a - b).join();
    if (seen.has(key))
      errors.push(fault(indices[0], place, 'This bond is listed twice.', 'Remove one of the two.'));
    seen.add(key);
    return errors;
  });
}

function placedIndices(
  coordinate: Coordinate,
): readonly { readonly place: string; readonly indices: readonly number[] }[] {
  if (!('bonds' in coordinate)) return [{ place: turnPlace(coordinate), indices: chainOf(coordinate) }];
  return coordinate.bonds.map((indices, bond) => ({ place: `scan.coordinate.bonds[${bond}]`, indices }));
}

/** An angle, or either angle inside a dihedral, must not be a straight line. */
function checkBent(molecule: MoleculeInput, coordinate: Coordinate): EngineError[] {
  if ('bonds' in coordinate) return [];
  const pairs = listedPairs(coordinate);
  return pairs.slice(1).flatMap(([apex, end], index) => {
    const start = pairs[index][0];
    const [degrees] = measureCoordinate(molecule, { angle: [start, apex, end] });
    if (Math.min(degrees, 180 - degrees) > LINEAR_WITHIN_DEGREES) return [];
    return [
      undefinedCoordinate(
        `Atoms ${start}, ${apex} and ${end} are in a line, so the plane in which to turn is undefined.`,
        'Start from a geometry in which they are bent a little.',
        turnPlace(coordinate),
      ),
    ];
  });
}

function undefinedCoordinate(reason: string, remedy: string, place: string): EngineError {
  return new EngineError('scan.undefinedCoordinate', reason, remedy, { reason }, place);
}
