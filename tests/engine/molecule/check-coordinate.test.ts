import { describe, expect, it } from 'vitest';
import type { MoleculeInput } from '../../../engine/molecule/build-molecule';
import { checkCoordinate } from '../../../engine/molecule/check-coordinate';
import { type Coordinate, measureCoordinate } from '../../../engine/molecule/coordinate';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { geometryAt } from '../../../engine/molecule/scan-coordinate';

function molecule(...atoms: readonly [string, ...Vector3][]): MoleculeInput {
  return { unit: 'angstrom', atoms: atoms.map(([element, ...at]) => ({ element, at })) };
}

const WATER = molecule(['O', 0, 0, 0], ['H', 0.757, 0.586, 0], ['H', -0.757, 0.586, 0]);
const codes = (input: MoleculeInput, coordinate: Coordinate) =>
  checkCoordinate(input, coordinate).map(({ code, place }) => ({ code, place }));

describe('checkCoordinate', () => {
  const H3 = molecule(['H', 0, 0, 0], ['H', 0.873, 0, 0], ['H', 0.4365, 0.756, 0]);

  it('identity: a bond in a ring is refused and the ring is named', () => {
    const [error] = checkCoordinate(H3, { bonds: [[0, 1]] });
    expect(error).toMatchObject({
      code: 'scan.ring',
      place: 'scan.coordinate.bonds[0]',
      details: { bond: [0, 1] },
    });
    expect(error.message).toBe(
      'The bond between H (atom 0) and H (atom 1) is part of a ring: H (atom 0) – H (atom 2) – H (atom 1).',
    );
  });

  it('identity: listed bonds that close a ring among themselves would tear an atom two ways', () => {
    const open = molecule(['H', 0, 0, 0], ['H', 0.8, 0, 0], ['O', 0.4, 4, 0]);
    const errors = checkCoordinate(open, {
      bonds: [
        [0, 2],
        [1, 2],
      ],
    });
    expect(errors.map(({ code, details }) => ({ code, details }))).toEqual([
      { code: 'scan.tornTwoWays', details: { atom: 2 } },
      { code: 'scan.tornTwoWays', details: { atom: 2 } },
    ]);
  });

  it('identity: an angle inside a ring cannot be turned, one at its edge can', () => {
    expect(codes(H3, { angle: [0, 1, 2] })).toEqual([{ code: 'scan.ring', place: 'scan.coordinate.angle' }]);
    const tailed = molecule(
      ...(H3.atoms.map(({ element, at }) => [element, ...at]) as [string, ...Vector3][]),
      ['O', -0.6, -0.7, 0],
    );
    expect(codes(tailed, { angle: [1, 0, 3] })).toEqual([]);
    const turned = geometryAt(tailed, { angle: [1, 0, 3] }, 120);
    expect(measureCoordinate(turned, { angle: [1, 0, 3] })[0]).toBeCloseTo(120, 9);
  });

  it('identity: straight angles are refused, alone and inside a dihedral', () => {
    const line = molecule(['H', 0, 0, -1], ['C', 0, 0, 0], ['C', 0, 0, 1.2], ['H', 0, 0.5, 2.1]);
    expect(codes(line, { angle: [0, 1, 2] })).toEqual([
      { code: 'scan.undefinedCoordinate', place: 'scan.coordinate.angle' },
    ]);
    expect(codes(line, { dihedral: [0, 1, 2, 3] })).toEqual([
      { code: 'scan.undefinedCoordinate', place: 'scan.coordinate.dihedral' },
    ]);
  });

  it('identity: atoms that do not exist, and atoms or bonds named twice, are refused with their place', () => {
    expect(
      codes(WATER, {
        bonds: [
          [0, 3],
          [1, 1],
          [0, 1],
          [1, 0],
        ],
      }),
    ).toEqual([
      { code: 'scan.atomIndex', place: 'scan.coordinate.bonds[0][1]' },
      { code: 'scan.atomIndex', place: 'scan.coordinate.bonds[1][1]' },
      { code: 'scan.atomIndex', place: 'scan.coordinate.bonds[3]' },
    ]);
    expect(codes(WATER, { bonds: [] })).toEqual([
      { code: 'scan.undefinedCoordinate', place: 'scan.coordinate.bonds' },
    ]);
    expect(codes(WATER, { angle: [1, 0, -1] })).toEqual([
      { code: 'scan.atomIndex', place: 'scan.coordinate.angle[2]' },
    ]);
  });
});
