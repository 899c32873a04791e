import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { MoleculeInput } from '../../../engine/molecule/build-molecule';
import { type Coordinate, measureCoordinate } from '../../../engine/molecule/coordinate';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { checkScan, geometryAt, scanGeometries } from '../../../engine/molecule/scan-coordinate';
import { add, distance, rotate } from '../../../engine/molecule/vector';

const SEED = 20261201;

function molecule(...atoms: readonly [string, ...Vector3][]): MoleculeInput {
  return { unit: 'angstrom', atoms: atoms.map(([element, ...at]) => ({ element, at })) };
}

const WATER = molecule(['O', 0, 0, 0], ['H', 0.757, 0.586, 0], ['H', -0.757, 0.586, 0]);
const PEROXIDE = molecule(
  ['O', 0, 0.7, 0.1],
  ['O', 0, -0.7, 0.1],
  ['H', 0.8, 0.9, -0.4],
  ['H', -0.7, -1, -0.5],
);
const METHANOL = molecule(
  ['C', 0, 0, 0],
  ['O', 1.42, 0, 0],
  ['H', -0.36, 1.03, 0],
  ['H', -0.36, -0.51, 0.89],
  ['H', -0.36, -0.51, -0.89],
  ['H', 1.74, 0.45, 0.78],
);

/** All distances among some atoms, as the shape that must not change. */
function shape({ atoms }: MoleculeInput, indices: readonly number[]): number[] {
  return indices.flatMap((a) => indices.map((b) => distance(atoms[a].at, atoms[b].at)));
}

function expectSame(actual: readonly number[], expected: readonly number[], tolerance: number): void {
  expect(actual.length).toBe(expected.length);
  for (const [index, value] of actual.entries())
    expect(Math.abs(value - expected[index])).toBeLessThan(tolerance);
}

describe('geometryAt, bonds', () => {
  it('identity: both bonds of water get the asked length and keep their directions', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.05, max: 50, noNaN: true }), (value) => {
        const coordinate = {
          bonds: [
            [0, 1],
            [0, 2],
          ],
        } as const;
        const pulled = geometryAt(WATER, coordinate, value);
        expectSame(measureCoordinate(pulled, coordinate), [value, value], 1e-12);
        expect(pulled.atoms[0].at).toEqual(WATER.atoms[0].at);
        expect(measureCoordinate(pulled, { angle: [1, 0, 2] })[0]).toBeCloseTo(
          measureCoordinate(WATER, { angle: [1, 0, 2] })[0],
          9,
        );
      }),
      { seed: SEED },
    );
  });

  it('identity: the smaller part moves as one, whichever way round the bond is named', () => {
    for (const bond of [
      [0, 1],
      [1, 0],
    ] as const) {
      const pulled = geometryAt(METHANOL, { bonds: [bond] }, 3);
      expect(pulled.atoms.map((atom) => atom.element)).toEqual(METHANOL.atoms.map((atom) => atom.element));
      for (const still of [0, 2, 3, 4]) expect(pulled.atoms[still].at).toEqual(METHANOL.atoms[still].at);
      expectSame(shape(pulled, [1, 5]), shape(METHANOL, [1, 5]), 1e-12);
      expectSame(measureCoordinate(pulled, { bonds: [bond] }), [3], 1e-12);
    }
  });

  it('identity: of two equal parts the one of the atom named last moves', () => {
    const first = geometryAt(PEROXIDE, { bonds: [[1, 0]] }, 2);
    expect(first.atoms[1].at).toEqual(PEROXIDE.atoms[1].at);
    expect(first.atoms[3].at).toEqual(PEROXIDE.atoms[3].at);
    expect(first.atoms[0].at).not.toEqual(PEROXIDE.atoms[0].at);
    const second = geometryAt(PEROXIDE, { bonds: [[0, 1]] }, 2);
    expect(second.atoms[0].at).toEqual(PEROXIDE.atoms[0].at);
  });

  it('identity: three bonds of a chain all get the length, the outermost atom moved by all of them', () => {
    const coordinate = {
      bonds: [
        [2, 0],
        [0, 1],
        [1, 3],
      ],
    } as const;
    expectSame(measureCoordinate(geometryAt(PEROXIDE, coordinate, 2.5), coordinate), [2.5, 2.5, 2.5], 1e-12);
  });

  it('identity: pulling commutes with rotation and translation', () => {
    const number = fc.double({ min: -3, max: 3, noNaN: true });
    fc.assert(
      fc.property(
        number,
        fc.tuple(number, number, number),
        fc.constantFrom(0, 1, 2),
        (angle, shift, which) => {
          const axis: Vector3 = [2 / 3, -1 / 3, 2 / 3];
          const place = (input: MoleculeInput): MoleculeInput => ({
            ...input,
            atoms: input.atoms.map((atom) => ({ ...atom, at: add(rotate(atom.at, axis, angle), shift) })),
          });
          const [input, coordinate, value] = (
            [
              [
                METHANOL,
                {
                  bonds: [
                    [0, 1],
                    [1, 5],
                  ],
                },
                2,
              ],
              [WATER, { angle: [1, 0, 2] }, 130],
              [METHANOL, { dihedral: [2, 0, 1, 5] }, -75],
            ] satisfies [MoleculeInput, Coordinate, number][]
          )[which];
          const movedFirst = geometryAt(place(input), coordinate, value);
          const movedLast = place(geometryAt(input, coordinate, value));
          expectSame(
            movedFirst.atoms.flatMap((atom) => atom.at),
            movedLast.atoms.flatMap((atom) => atom.at),
            1e-12,
          );
        },
      ),
      { seed: SEED },
    );
  });

  it('identity: a bond listed by the study joins, however long it is at the start', () => {
    const far = molecule(['He', 0, 0, 0], ['H', 0, 0, 9]);
    const near = geometryAt(far, { bonds: [[0, 1]] }, 0.7743);
    expectSame(near.atoms[1].at, [0, 0, 0.7743], 1e-12);
    expect(near.atoms[0].at).toEqual([0, 0, 0]);
  });

  it('identity: a ghost copy of a fragment moves as the fragment does', () => {
    const ghosted = {
      ...METHANOL,
      atoms: METHANOL.atoms.map((atom, i) => (i === 1 || i === 5 ? { ...atom, ghost: true } : atom)),
    };
    const places = (input: MoleculeInput) =>
      geometryAt(input, { bonds: [[0, 1]] }, 2.2).atoms.map((atom) => atom.at);
    expect(places(ghosted)).toEqual(places(METHANOL));
  });

  it('identity: atoms that hang together with neither end stay', () => {
    const withSpectator = { ...WATER, atoms: [...WATER.atoms, { element: 'He', at: [0, 0, 4] as const }] };
    expect(geometryAt(withSpectator, { bonds: [[0, 1]] }, 3).atoms[3].at).toEqual([0, 0, 4]);
  });
});

describe('geometryAt, angles and dihedrals', () => {
  it('identity: an angle is met and the bonds at its apex keep their lengths', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 180, noNaN: true }), (degrees) => {
        const bent = geometryAt(METHANOL, { angle: [0, 1, 5] }, degrees);
        expectSame(measureCoordinate(bent, { angle: [0, 1, 5] }), [degrees], 1e-9);
        expectSame(
          measureCoordinate(bent, {
            bonds: [
              [0, 1],
              [1, 5],
            ],
          }),
          measureCoordinate(METHANOL, {
            bonds: [
              [0, 1],
              [1, 5],
            ],
          }),
          1e-12,
        );
        expectSame(shape(bent, [0, 1, 2, 3, 4]), shape(METHANOL, [0, 1, 2, 3, 4]), 1e-12);
      }),
      { seed: SEED },
    );
  });

  it('identity: the smaller end turns even where it is named first', () => {
    const bent = geometryAt(METHANOL, { angle: [5, 1, 0] }, 90);
    expect(bent.atoms[0].at).toEqual(METHANOL.atoms[0].at);
    expectSame(measureCoordinate(bent, { angle: [5, 1, 0] }), [90], 1e-9);
  });

  it('identity: a dihedral is met from either end, with its sign, and the parts keep their shapes', () => {
    fc.assert(
      fc.property(fc.double({ min: -180, max: 180, noNaN: true }), fc.boolean(), (degrees, isReversed) => {
        const dihedral = isReversed ? ([5, 1, 0, 2] as const) : ([2, 0, 1, 5] as const);
        const turned = geometryAt(METHANOL, { dihedral }, degrees);
        const [measured] = measureCoordinate(turned, { dihedral });
        expect(Math.abs(((measured - degrees + 540) % 360) - 180)).toBeLessThan(1e-9);
        expectSame(shape(turned, [0, 1, 2, 3, 4]), shape(METHANOL, [0, 1, 2, 3, 4]), 1e-12);
        expectSame(shape(turned, [0, 1, 5]), shape(METHANOL, [0, 1, 5]), 1e-12);
      }),
      { seed: SEED },
    );
  });
});

describe('checkScan', () => {
  const bonds = { bonds: [[0, 1]] } as const;
  const problems = (scan: Parameters<typeof checkScan>[1]) =>
    checkScan(WATER, scan).map(({ code, place }) => `${code} at ${place}`);

  it('identity: a sound scan has no problem, and its geometries carry its values', () => {
    const scan = { coordinate: bonds, from: 0.5, to: 2.5, count: 21 };
    expect(problems(scan)).toEqual([]);
    const geometries = scanGeometries(WATER, scan);
    expect(geometries).toHaveLength(21);
    for (const { value, molecule: geometry } of geometries) {
      expectSame(measureCoordinate(geometry, bonds), [value], 1e-12);
    }
  });

  it.each([0, -1, Number.NaN, 1e7])('identity: a bond of length %s is refused', (value) => {
    expect(problems({ coordinate: bonds, values: [1, value] })).toEqual(['scan.value at scan.values[1]']);
    expect(() => geometryAt(WATER, bonds, value)).toThrow(expect.objectContaining({ code: 'scan.value' }));
  });

  it.each([0, 180.001, -10, Number.POSITIVE_INFINITY])('identity: an angle of %s is refused', (value) => {
    expect(() => geometryAt(WATER, { angle: [1, 0, 2] }, value)).toThrow(
      expect.objectContaining({ code: 'scan.value' }),
    );
  });

  it('identity: a value that puts two atoms at one place is refused where it stands', () => {
    expect(problems({ coordinate: bonds, from: 0.001, to: 2, count: 5 })).toEqual([
      'scan.value at scan.from',
    ]);
    expect(problems({ coordinate: { angle: [1, 0, 2] }, from: 100, to: 0.1, count: 5 })).toEqual([
      'scan.value at scan.to',
    ]);
  });

  it('identity: problems of the coordinate and of the values are reported together', () => {
    expect(problems({ coordinate: { bonds: [[0, 7]] }, from: 1, to: 2, count: 1e6 })).toEqual([
      'scan.atomIndex at scan.coordinate.bonds[0][1]',
      'scan.count at scan.count',
    ]);
  });
});
