import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BOHR_IN_ANGSTROM } from '../../../engine/constants';
import {
  buildMolecule,
  electronCount,
  lowestMultiplicity,
  type MoleculeInput,
  nuclearDipole,
  nuclearRepulsion,
} from '../../../engine/molecule/build-molecule';
import type { Molecule, Vector3 } from '../../../engine/molecule/molecule';
import { add, rotate } from '../../../engine/molecule/vector';

const HEH: MoleculeInput = {
  unit: 'bohr',
  atoms: [
    { element: 'He', at: [0, 0, 0] },
    { element: 'H', at: [0, 0, 1.4632] },
  ],
  charge: 1,
};

function built(input: MoleculeInput): Molecule {
  const result = buildMolecule(input);
  if (!result.ok) throw new Error(result.errors.map(({ message }) => message).join());
  return result.molecule;
}

function problems(input: MoleculeInput): string[] {
  const result = buildMolecule(input);
  return result.ok ? [] : result.errors.map(({ code, place }) => `${code} at ${place}`);
}

describe('buildMolecule', () => {
  it('identity: gives nuclei in bohr, with the lowest multiplicity by default', () => {
    expect(built(HEH)).toEqual({
      atoms: [
        { symbol: 'He', atomicNumber: 2, nuclearCharge: 2, position: [0, 0, 0] },
        { symbol: 'H', atomicNumber: 1, nuclearCharge: 1, position: [0, 0, 1.4632] },
      ],
      charge: 1,
      multiplicity: 1,
    });
    expect(built({ ...HEH, charge: 0 }).multiplicity).toBe(2);
  });

  it('identity: one bohr given in ångström is one bohr', () => {
    const { atoms } = built({
      ...HEH,
      unit: 'angstrom',
      atoms: [HEH.atoms[0], { element: 'H', at: [0, 0, BOHR_IN_ANGSTROM] }],
    });
    expect(atoms[1].position[2]).toBeCloseTo(1, 15);
  });

  it('identity: a ghost keeps its element and loses its charge; an isotope is kept', () => {
    const { atoms } = built({
      unit: 'bohr',
      atoms: [
        { element: 'H', at: [0, 0, 0], isotope: 2 },
        { element: 'Li', at: [0, 0, 3], ghost: true },
      ],
    });
    expect(atoms[0].isotope).toBe(2);
    expect(atoms[1]).toMatchObject({ symbol: 'Li', atomicNumber: 3, nuclearCharge: 0 });
    expect(electronCount({ atoms, charge: 0 })).toBe(1);
  });

  it('identity: every problem is collected with its place', () => {
    expect(
      problems({
        unit: 'angstrom',
        atoms: [
          { element: 'Xy', at: [0, 0, 0] },
          { element: 'H', at: [0, Number.NaN, 0], isotope: 40 },
          { element: 'H', at: [0, 0, 1e-4] },
          { element: 'H', at: [0, 1e30, 0] },
        ],
        charge: 0.5,
      }),
    ).toEqual([
      'molecule.unknownElement at molecule.atoms[0].element',
      'molecule.unknownIsotope at molecule.atoms[1].isotope',
      'molecule.coordinate at molecule.atoms[1].at',
      'molecule.coordinate at molecule.atoms[3].at',
      'molecule.atomsCoincide at molecule.atoms[2].at',
      'molecule.charge at molecule.charge',
    ]);
  });

  it('identity: an empty molecule and one of ghosts alone are refused', () => {
    expect(problems({ unit: 'bohr', atoms: [] })).toEqual(['molecule.empty at molecule.atoms']);
    expect(problems({ unit: 'bohr', atoms: [{ element: 'H', at: [0, 0, 0], ghost: true }] })).toEqual([
      'molecule.empty at molecule.atoms',
    ]);
  });

  it('identity: atoms 0.05 bohr apart are accepted, 0.009 bohr apart refused, ghosts as well', () => {
    const pair = (separation: number, ghost: boolean): MoleculeInput => ({
      unit: 'bohr',
      atoms: [
        { element: 'H', at: [0, 0, 0] },
        { element: 'H', at: [0, separation, 0], ghost },
      ],
      charge: ghost ? 0 : 1,
    });
    for (const ghost of [false, true]) {
      expect(problems(pair(0.05, ghost))).toEqual([]);
      expect(problems(pair(0.009, ghost))).toEqual(['molecule.atomsCoincide at molecule.atoms[1].at']);
    }
  });

  it('identity: a molecule without electrons is refused and the highest charge named', () => {
    const bare = buildMolecule({ ...HEH, charge: 3 });
    expect(bare).toMatchObject({
      errors: [
        {
          code: 'molecule.noElectrons',
          message: 'With charge 3 no electron is left.',
          remedy: 'Lower the charge to 2 or less.',
          details: { electrons: 0 },
        },
      ],
    });
    expect(problems({ ...HEH, charge: 7 })).toEqual(['molecule.noElectrons at molecule.charge']);
    expect(problems({ ...HEH, charge: 2 })).toEqual([]);
  });

  it('identity: an impossible multiplicity is refused in plain words', () => {
    expect(buildMolecule({ ...HEH, charge: 0, multiplicity: 1 })).toMatchObject({
      errors: [
        {
          code: 'molecule.spinMismatch',
          place: 'molecule.multiplicity',
          message: '3 electrons cannot form a singlet.',
          remedy: 'Choose multiplicity 2 or 4, or change the charge by one.',
          details: { electrons: 3, multiplicity: 1 },
        },
      ],
    });
    expect(buildMolecule({ ...HEH, charge: 2, multiplicity: 1 })).toMatchObject({
      errors: [
        {
          message: '1 electron cannot form a singlet.',
          remedy: 'Choose multiplicity 2, or change the charge by one.',
        },
      ],
    });
  });

  it('identity: exactly the multiplicities that N spins of 1/2 can couple to are accepted', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 8 }),
        fc.integer({ min: -1, max: 12 }),
        (electrons, multiplicity) => {
          // couple one spin after the other: 2S changes by ±1 and stays ≥ 0
          let doubled = new Set([0]);
          for (let spin = 0; spin < electrons; spin++) {
            doubled = new Set([...doubled].flatMap((value) => [value + 1, Math.abs(value - 1)]));
          }
          const input: MoleculeInput = {
            unit: 'bohr',
            atoms: [{ element: 'O', at: [0, 0, 0] }],
            charge: 8 - electrons,
            multiplicity,
          };
          expect(buildMolecule(input).ok).toBe(doubled.has(multiplicity - 1));
          expect(lowestMultiplicity(electrons)).toBe(Math.min(...doubled) + 1);
        },
      ),
      { seed: 20261201 },
    );
  });
});

describe('nuclearRepulsion and nuclearDipole', () => {
  const WATER = built({
    unit: 'angstrom',
    atoms: [
      { element: 'O', at: [0, 0, 0.1] },
      { element: 'H', at: [0.757, 0, -0.47] },
      { element: 'H', at: [-0.757, 0, -0.47] },
    ],
  });
  const moved = (turn: number, shift: Vector3): Molecule => ({
    ...WATER,
    atoms: WATER.atoms.map((atom) => ({
      ...atom,
      position: add(rotate(atom.position, [0.6, 0, 0.8], turn), shift),
    })),
  });

  it('identity: two charges repel with their product over their distance', () => {
    expect(nuclearRepulsion(built(HEH))).toBeCloseTo(2 / 1.4632, 15);
  });

  it('identity: a ghost repels nothing, even on top of an atom', () => {
    const ghost = { symbol: 'H', atomicNumber: 1, nuclearCharge: 0, position: WATER.atoms[0].position };
    expect(nuclearRepulsion({ atoms: [...WATER.atoms, ghost, ghost] })).toBe(nuclearRepulsion(WATER));
  });

  it('identity: repulsion does not change under rotation and translation; the dipole follows the charge', () => {
    const coordinate = fc.double({ min: -5, max: 5, noNaN: true });
    fc.assert(
      fc.property(coordinate, fc.tuple(coordinate, coordinate, coordinate), (turn, shift) => {
        expect(Math.abs(nuclearRepulsion(moved(turn, shift)) - nuclearRepulsion(WATER))).toBeLessThan(1e-12);
        const dipole = nuclearDipole(moved(0, shift));
        const start = nuclearDipole(WATER);
        for (let axis = 0; axis < 3; axis++) {
          expect(Math.abs(dipole[axis] - start[axis] - 10 * shift[axis])).toBeLessThan(1e-12);
        }
      }),
      { seed: 20261201 },
    );
  });
});
