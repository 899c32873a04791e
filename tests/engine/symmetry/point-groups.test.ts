import { describe, expect, it } from 'vitest';
import {
  type AxisSigns,
  character,
  POINT_GROUPS,
  type PointGroupName,
} from '../../../engine/symmetry/point-groups';

const names = Object.keys(POINT_GROUPS) as PointGroupName[];

function operations(name: PointGroupName): AxisSigns[] {
  const found: AxisSigns[] = [[1, 1, 1]];
  for (const generator of POINT_GROUPS[name].generators) {
    found.push(
      ...found.map((signs) => signs.map((sign, axis) => sign * generator[axis]) as unknown as AxisSigns),
    );
  }
  return found;
}

describe('POINT_GROUPS', () => {
  it.each(names)('identity: the characters of %s are orthogonal, and as many as operations', (name) => {
    const all = operations(name);
    const { irreps } = POINT_GROUPS[name];
    expect(irreps).toHaveLength(all.length);
    expect(new Set(all.map(String)).size).toBe(all.length);
    irreps.forEach((_, a) => {
      irreps.forEach((__, b) => {
        const product = all.reduce((sum, r) => sum + character(name, a, r) * character(name, b, r), 0);
        expect(product).toBe(a === b ? all.length : 0);
      });
    });
  });

  it.each(names)('identity: representations of %s multiply by exclusive or of their numbers', (name) => {
    for (const r of operations(name)) {
      POINT_GROUPS[name].irreps.forEach((_, a, irreps) => {
        irreps.forEach((__, b) => {
          expect(character(name, a ^ b, r)).toBe(character(name, a, r) * character(name, b, r));
        });
      });
    }
  });

  it.each<[PointGroupName, string, string, string, string, string]>([
    ['C2v', 'B1', 'B2', 'A1', 'A2', 'B2'],
    ['C2h', 'Bu', 'Bu', 'Au', 'Ag', 'Bg'],
    ['D2', 'B3', 'B2', 'B1', 'B1', 'B3'],
    ['D2h', 'B3u', 'B2u', 'B1u', 'B1g', 'B3g'],
    ['Cs', 'A′', 'A′', 'A″', 'A′', 'A″'],
    ['C2', 'B', 'B', 'A', 'A', 'B'],
    ['Ci', 'Au', 'Au', 'Au', 'Ag', 'Ag'],
  ])(
    'published: in %s x, y, z, xy and yz belong to %s, %s, %s, %s, %s (character tables in every textbook of group theory, value from memory)',
    (name, ...expected) => {
      const basis: readonly ((signs: AxisSigns) => number)[] = [
        ([x]) => x,
        ([, y]) => y,
        ([, , z]) => z,
        ([x, y]) => x * y,
        ([, y, z]) => y * z,
      ];
      const found = basis.map((f) =>
        POINT_GROUPS[name].irreps.find((_, irrep) =>
          operations(name).every((r) => character(name, irrep, r) === f(r)),
        ),
      );
      expect(found).toEqual(expected);
    },
  );

  it('identity: an operation that a group does not have is refused', () => {
    expect(() => character('C2v', 0, [-1, -1, -1])).toThrow(RangeError);
  });
});
