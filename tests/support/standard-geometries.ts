import type { StudyMolecule } from '#engine';

/*
 * The geometries that the tables of A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, chapter 3, are for (from
 * memory; the energies of all seven come out as printed with them). Lengths in bohr.
 */

const CARBON_HYDROGEN = 2.05;
const NITROGEN_HYDROGEN = 1.913;
const HYDROGEN_NITROGEN_HYDROGEN_DEGREES = 106.7;
const OXYGEN_HYDROGEN = 1.809;
const HYDROGEN_OXYGEN_HYDROGEN_DEGREES = 104.52;

type Position = readonly [number, number, number];

function molecule(...atoms: readonly (readonly [element: string, at: Position])[]): StudyMolecule {
  return { unit: 'bohr', atoms: atoms.map(([element, at]) => ({ element, at })) };
}

const diatomic = (first: string, second: string, distance: number): StudyMolecule =>
  molecule([first, [0, 0, 0]], [second, [0, 0, distance]]);

function methane(): StudyMolecule {
  const c = CARBON_HYDROGEN / Math.sqrt(3);
  return molecule(
    ['C', [0, 0, 0]],
    ['H', [c, c, c]],
    ['H', [c, -c, -c]],
    ['H', [-c, c, -c]],
    ['H', [-c, -c, c]],
  );
}

function ammonia(): StudyMolecule {
  const hydrogenDistance =
    2 * NITROGEN_HYDROGEN * Math.sin((HYDROGEN_NITROGEN_HYDROGEN_DEGREES * Math.PI) / 360);
  const radius = hydrogenDistance / Math.sqrt(3);
  const height = Math.sqrt(NITROGEN_HYDROGEN ** 2 - radius ** 2);
  const hydrogen = (turn: number): Position => [
    radius * Math.cos((2 * Math.PI * turn) / 3),
    radius * Math.sin((2 * Math.PI * turn) / 3),
    -height,
  ];
  return molecule(['N', [0, 0, 0]], ['H', hydrogen(0)], ['H', hydrogen(1)], ['H', hydrogen(2)]);
}

function water(): StudyMolecule {
  const half = (HYDROGEN_OXYGEN_HYDROGEN_DEGREES * Math.PI) / 360;
  const x = OXYGEN_HYDROGEN * Math.sin(half);
  const z = OXYGEN_HYDROGEN * Math.cos(half);
  return molecule(['O', [0, 0, 0]], ['H', [x, 0, z]], ['H', [-x, 0, z]]);
}

/** By formula. */
export const STANDARD_GEOMETRIES: Readonly<Record<string, StudyMolecule>> = {
  H2: diatomic('H', 'H', 1.4),
  CO: diatomic('C', 'O', 2.132),
  N2: diatomic('N', 'N', 2.074),
  CH4: methane(),
  NH3: ammonia(),
  H2O: water(),
  HF: diatomic('H', 'F', 1.733),
};
