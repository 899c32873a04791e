import { EngineError } from '../errors';
import {
  type AtomInput,
  bohrPerUnit,
  coincidingAtoms,
  LARGEST_COORDINATE,
  type MoleculeInput,
} from './build-molecule';
import {
  type Coordinate,
  chainOf,
  DEGREE,
  listedPairs,
  measureCoordinate,
  type TurnCoordinate,
} from './coordinate';
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
      const place =
        'values' in scan
          ? `scan.values[${index}]`
          : index === 0
            ? 'scan.from'
            : index === values.length - 1
              ? 'scan.to'
              : 'scan';
      checkValue(molecule, scan.coordinate, value, place);
      checkApart(geometryAt(molecule, scan.coordinate, value), value, place);
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

function checkIndices(atoms: readonly AtomInput[], coordinate: Coordinate): EngineError[] {
  const groups: readonly { readonly place: string; readonly indices: readonly number[] }[] =
    'bonds' in coordinate
      ? coordinate.bonds.map((indices, bond) => ({ place: `scan.coordinate.bonds[${bond}]`, indices }))
      : [{ place: `scan.coordinate.${Object.keys(coordinate)[0]}`, indices: chainOf(coordinate) }];
  if (groups.length === 0) {
    return [
      undefinedCoordinate(
        'No bond is listed.',
        'List at least one bond, such as [0, 1].',
        'scan.coordinate.bonds',
      ),
    ];
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

/** An angle, or either angle inside a dihedral, must not be a straight line. */
function checkBent(molecule: MoleculeInput, coordinate: Coordinate): EngineError[] {
  const pairs = listedPairs(coordinate);
  if ('bonds' in coordinate) return [];
  return pairs.slice(1).flatMap(([apex, end], index) => {
    const start = pairs[index][0];
    const [degrees] = measureCoordinate(molecule, { angle: [start, apex, end] });
    if (Math.min(degrees, 180 - degrees) > LINEAR_WITHIN_DEGREES) return [];
    return [
      undefinedCoordinate(
        `Atoms ${start}, ${apex} and ${end} are in a line, so the plane in which to turn is undefined.`,
        'Start from a geometry in which they are bent a little.',
        `scan.coordinate.${Object.keys(coordinate)[0]}`,
      ),
    ];
  });
}

function undefinedCoordinate(reason: string, remedy: string, place: string): EngineError {
  return new EngineError('scan.undefinedCoordinate', reason, remedy, { reason }, place);
}

function checkValue({ unit }: MoleculeInput, coordinate: Coordinate, value: number, place: string): void {
  const largestLength = LARGEST_COORDINATE / bohrPerUnit(unit);
  const [isPossible, message, remedy] =
    'bonds' in coordinate
      ? [
          value > 0 && value <= largestLength,
          `A bond cannot be ${value} long.`,
          `Choose lengths above 0 and up to ${Math.floor(largestLength)}.`,
        ]
      : 'angle' in coordinate
        ? [
            value > 0 && value <= 180,
            `An angle cannot be ${value}°.`,
            'Choose angles above 0 and up to 180 degrees.',
          ]
        : [
            Math.abs(value) <= 360,
            `A dihedral of ${value}° is out of range.`,
            'Choose dihedrals from −360 to 360 degrees.',
          ];
  if (!isPossible) throw new EngineError('scan.value', message, remedy, { value }, place);
}

function checkApart(molecule: MoleculeInput, value: number, place: string): void {
  const [pair] = coincidingAtoms(molecule);
  if (!pair) return;
  throw new EngineError(
    'scan.value',
    `At ${value} atoms ${pair.first} and ${pair.second} are ${Number(pair.distanceBohr.toPrecision(3))} bohr apart.`,
    'Choose a range that keeps the atoms apart.',
    { value },
    place,
  );
}
