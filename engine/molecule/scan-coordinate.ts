import { EngineError } from '../errors';
import {
  type AtomInput,
  bohrPerUnit,
  buildMolecule,
  LARGEST_COORDINATE,
  type MoleculeInput,
} from './build-molecule';
import { checkCoordinate } from './check-coordinate';
import { type Coordinate, chainOf, DEGREE, measureCoordinate, type TurnCoordinate } from './coordinate';
import type { Vector3 } from './molecule';
import { type Motion, planMotions } from './scan-motion';
import { type ScanRange, scanValues } from './scan-values';
import { add, cross, length, rotate, scale, subtract } from './vector';

/*
 * How the atoms follow a scanned coordinate. Stretching shifts the moved part along its bond, so nothing inside a
 * part changes and every listed bond keeps its direction; angles and dihedrals turn the moved part rigidly. Which
 * part moves: `planMotions`. All functions expect a molecule that `buildMolecule` accepts.
 */

export type ScanInput = { readonly coordinate: Coordinate } & ScanRange;

/**
 * Everything that keeps a scan from being run: `checkCoordinate`, then the first problem with its values (codes of
 * `scanValues`; `scan.value` for one that no geometry can have or that puts two atoms at one place).
 */
export function checkScan(molecule: MoleculeInput, scan: ScanInput): readonly EngineError[] {
  const errors = [...checkCoordinate(molecule, scan.coordinate)];
  try {
    const values = scanValues(scan);
    if (errors.length > 0) return errors;
    values.forEach((value, index) => {
      checkPoint(molecule, scan.coordinate, value, valuePlace(scan, index, values.length));
    });
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    errors.push(error);
  }
  return errors;
}

/**
 * The scanned geometries in the order of `scanValues`.
 *
 * @throws EngineError the codes of `scanValues` and `geometryAt`
 */
export function scanGeometries<M extends MoleculeInput>(
  molecule: M,
  scan: ScanInput,
): readonly { readonly value: number; readonly molecule: M }[] {
  return scanValues(scan).map((value) => ({ value, molecule: geometryAt(molecule, scan.coordinate, value) }));
}

/**
 * The molecule with the coordinate at one value; all but the places of the moved atoms is kept as it is.
 *
 * @param value - length in the molecule's unit, or degrees
 * @throws EngineError the codes of `checkCoordinate`; `scan.value` for a length outside (0, 10⁶ bohr], an angle
 * outside (0, 180] or a dihedral outside [−360, 360] degrees
 */
export function geometryAt<M extends MoleculeInput>(molecule: M, coordinate: Coordinate, value: number): M {
  const [error] = checkCoordinate(molecule, coordinate);
  if (error) throw error;
  checkValue(molecule, coordinate, value, 'scan');
  const { motions } = planMotions(molecule, coordinate);
  const places =
    'bonds' in coordinate
      ? stretch(molecule.atoms, motions, value)
      : turn(molecule, coordinate, motions[0], value);
  return { ...molecule, atoms: molecule.atoms.map((atom, index) => ({ ...atom, at: places[index] })) };
}

function stretch(atoms: readonly AtomInput[], motions: readonly Motion[], value: number): readonly Vector3[] {
  const places = atoms.map((atom) => atom.at);
  for (const { bond, moved } of motions) {
    // every other bond shifts both ends of this one alike, so the vector at the start serves throughout
    const along = subtract(atoms[bond[1]].at, atoms[bond[0]].at);
    const shift = scale(along, value / length(along) - 1);
    for (const index of moved) places[index] = add(places[index], shift);
  }
  return places;
}

function turn(
  molecule: MoleculeInput,
  coordinate: TurnCoordinate,
  { bond, moved }: Motion,
  value: number,
): readonly Vector3[] {
  const chain = chainOf(coordinate);
  const [a, b, c] = chain.map((index) => molecule.atoms[index].at);
  const axis = 'angle' in coordinate ? cross(subtract(a, b), subtract(c, b)) : subtract(c, b);
  const unitAxis = scale(axis, 1 / length(axis));
  // turning the last-named end forwards changes the coordinate as much as turning the first-named one backwards
  const sense = bond[1] === chain[2] ? 1 : -1;
  const angle = sense * (value - measureCoordinate(molecule, coordinate)[0]) * DEGREE;
  return molecule.atoms.map(({ at }, index) =>
    moved.has(index) ? add(b, rotate(subtract(at, b), unitAxis, angle)) : at,
  );
}

function valuePlace(scan: ScanInput, index: number, count: number): string {
  if ('values' in scan) return `scan.values[${index}]`;
  if (index === 0) return 'scan.from';
  return index === count - 1 ? 'scan.to' : 'scan';
}

function checkPoint(molecule: MoleculeInput, coordinate: Coordinate, value: number, place: string): void {
  checkValue(molecule, coordinate, value, place);
  const built = buildMolecule(geometryAt(molecule, coordinate, value));
  if (built.ok) return;
  const message = `At ${value}: ${built.errors[0].message}`;
  throw new EngineError(
    'scan.value',
    message,
    'Choose a range that keeps the atoms apart.',
    { value },
    place,
  );
}

function checkValue({ unit }: MoleculeInput, coordinate: Coordinate, value: number, place: string): void {
  const refuse = (message: string, remedy: string): never => {
    throw new EngineError('scan.value', message, remedy, { value }, place);
  };
  if ('bonds' in coordinate) {
    const longest = LARGEST_COORDINATE / bohrPerUnit(unit);
    if (value > 0 && value <= longest) return;
    refuse(`A bond cannot be ${value} long.`, `Choose lengths above 0 and up to ${Math.floor(longest)}.`);
  }
  if ('angle' in coordinate) {
    if (value > 0 && value <= 180) return;
    refuse(`An angle cannot be ${value}°.`, 'Choose angles above 0 and up to 180 degrees.');
  }
  if (Math.abs(value) <= 360) return;
  refuse(`A dihedral of ${value}° is out of range.`, 'Choose dihedrals from −360 to 360 degrees.');
}
