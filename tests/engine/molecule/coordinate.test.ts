import { describe, expect, it } from 'vitest';
import type { MoleculeInput } from '../../../engine/molecule/build-molecule';
import { type Coordinate, listedPairs, measureCoordinate } from '../../../engine/molecule/coordinate';
import type { Vector3 } from '../../../engine/molecule/molecule';

function measure(coordinate: Coordinate, ...places: readonly Vector3[]): readonly number[] {
  const atoms: MoleculeInput['atoms'] = places.map((at) => ({ element: 'H', at }));
  return measureCoordinate({ atoms }, coordinate);
}

describe('measureCoordinate', () => {
  it('identity: sides and angles of the triangle 3, 4, 5', () => {
    const triangle: Vector3[] = [
      [1, 2, 3],
      [4, 2, 3],
      [1, 6, 3],
    ];
    const sides = {
      bonds: [
        [0, 1],
        [0, 2],
        [1, 2],
      ],
    } as const;
    expect(measure(sides, ...triangle)).toEqual([3, 4, 5]);
    expect(measure({ angle: [1, 0, 2] }, ...triangle)[0]).toBeCloseTo(90, 12);
    expect(measure({ angle: [0, 1, 2] }, ...triangle)[0]).toBeCloseTo((Math.atan(4 / 3) * 180) / Math.PI, 12);
  });

  it('identity: angles keep their digits where an arccosine loses them', () => {
    const tilt = 1e-7;
    const [angle] = measure({ angle: [0, 1, 2] }, [0, 0, 1], [0, 0, 0], [0, Math.sin(tilt), Math.cos(tilt)]);
    expect(Math.abs((angle * Math.PI) / 180 / tilt - 1)).toBeLessThan(1e-12);
  });

  // looking along +z with x to the right, y points down: from x to y is clockwise
  it.each([
    ['cis', [1, 0, 1.4], 0],
    ['clockwise', [0, 1, 1.4], 90],
    ['counter-clockwise', [0, -1, 1.4], -90],
    ['sixty', [0.5, Math.sqrt(3) / 2, 3], 60],
  ] as const)('identity: a dihedral seen along its middle bond, %s', (_, last, degrees) => {
    expect(measure({ dihedral: [0, 1, 2, 3] }, [1, 0, 0], [0, 0, 0], [0, 0, 1.4], last)[0]).toBeCloseTo(
      degrees,
      12,
    );
  });

  it('identity: a dihedral read backwards is the same', () => {
    const places: Vector3[] = [
      [1, 0.2, 0],
      [0, 0, 0],
      [0.1, 0, 1.4],
      [0.4, -1, 1.9],
    ];
    const [forwards] = measure({ dihedral: [0, 1, 2, 3] }, ...places);
    expect(measure({ dihedral: [3, 2, 1, 0] }, ...places)[0]).toBeCloseTo(forwards, 12);
  });
});

describe('listedPairs', () => {
  it('identity: neighbours along an angle or dihedral count as bonded', () => {
    expect(listedPairs({ angle: [1, 0, 2] })).toEqual([
      [1, 0],
      [0, 2],
    ]);
    expect(listedPairs({ dihedral: [3, 1, 0, 2] })).toHaveLength(3);
    expect(listedPairs({ bonds: [[4, 5]] })).toEqual([[4, 5]]);
  });
});
