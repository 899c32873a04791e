import { BOHR_IN_ANGSTROM } from '../constants';
import { EngineError } from '../errors';
import { findElement, isotopeMassDalton, requireElement } from './elements';
import type { Atom, Molecule, Vector3 } from './molecule';
import { distance } from './vector';

export interface AtomInput {
  readonly element: string;
  /** in the molecule's unit */
  readonly at: Vector3;
  /** mass number */
  readonly isotope?: number | undefined;
  /** keeps the atom's functions without nucleus and electrons */
  readonly ghost?: boolean | undefined;
}

/** A molecule as a study spells it out. */
export interface MoleculeInput {
  readonly unit: 'angstrom' | 'bohr';
  readonly atoms: readonly AtomInput[];
  readonly charge?: number | undefined;
  /** 2S + 1; default: the lowest that the electron count allows */
  readonly multiplicity?: number | undefined;
}

export type BuiltMolecule =
  | { readonly ok: true; readonly molecule: Molecule }
  | { readonly ok: false; readonly errors: readonly EngineError[] };

/**
 * Atoms nearer than this are taken for a mistake, in bohr. It leaves room for united-atom studies (0.05 bohr and
 * less) and ends where near-identical functions on the two centres would drown the energy in rounding errors.
 */
export const SMALLEST_DISTANCE = 0.01;

/** Coordinates and scanned lengths beyond this are taken for a mistake, in bohr; they also keep only 10 decimals. */
export const LARGEST_COORDINATE = 1e6;

/** How many bohr one unit of a study's lengths is. */
export function bohrPerUnit(unit: MoleculeInput['unit']): number {
  return unit === 'bohr' ? 1 : 1 / BOHR_IN_ANGSTROM;
}

/**
 * Checks a study's molecule and puts it in atomic units.
 *
 * @returns the molecule, or every problem found with its place (`molecule.atoms[1].element`): codes
 * `molecule.empty`, `.unknownElement`, `.unknownIsotope`, `.coordinate`, `.atomsCoincide`, `.charge`,
 * `.noElectrons`, `.spinMismatch`
 */
export function buildMolecule(input: MoleculeInput): BuiltMolecule {
  const errors: EngineError[] = [];
  const scale = bohrPerUnit(input.unit);
  const atoms = input.atoms.flatMap((atom, index) => buildAtom(atom, index, scale, errors));
  if (!input.atoms.some((atom) => !atom.ghost)) {
    errors.push(
      new EngineError(
        'molecule.empty',
        input.atoms.length > 0 ? 'Every atom of the molecule is a ghost.' : 'The molecule has no atoms.',
        'Give at least one atom that is not a ghost.',
        {},
        'molecule.atoms',
      ),
    );
  }
  errors.push(...checkDistances(input));

  const charge = input.charge ?? 0;
  if (!Number.isInteger(charge)) {
    errors.push(
      new EngineError(
        'molecule.charge',
        `The charge must be a whole number; it is ${charge}.`,
        'Give the total charge in elementary charges, such as 1 for a cation.',
        { charge },
        'molecule.charge',
      ),
    );
  }
  // electrons can be counted only when all nuclei and the charge are known
  if (errors.length > 0) return { ok: false, errors };

  const electrons = electronCount({ atoms, charge });
  const multiplicity = input.multiplicity ?? lowestMultiplicity(electrons);
  const error = checkElectrons(electrons, multiplicity, charge);
  return error ? { ok: false, errors: [error] } : { ok: true, molecule: { atoms, charge, multiplicity } };
}

function buildAtom(input: AtomInput, index: number, scale: number, errors: EngineError[]): Atom[] {
  const place = `molecule.atoms[${index}]`;
  const collect = (check: () => void) => {
    try {
      check();
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      errors.push(error);
    }
  };
  collect(() => requireElement(input.element, `${place}.element`));
  const element = findElement(input.element);
  if (element && input.isotope !== undefined) {
    collect(() => isotopeMassDalton(input.element, input.isotope, `${place}.isotope`));
  }
  const axis = input.at.findIndex((value) => !(Math.abs(value * scale) <= LARGEST_COORDINATE));
  if (axis >= 0) {
    const value = input.at[axis];
    errors.push(
      new EngineError(
        'molecule.coordinate',
        `Coordinate ${'xyz'[axis]} of atom ${index} (${input.element}) is ${value}.`,
        `Give three finite numbers within ${LARGEST_COORDINATE} bohr of the origin.`,
        { atom: index, value },
        `${place}.at`,
      ),
    );
  }
  if (!element) return [];
  const [x, y, z] = input.at;
  return [
    {
      symbol: element.symbol,
      atomicNumber: element.atomicNumber,
      nuclearCharge: input.ghost ? 0 : element.atomicNumber,
      position: [x * scale, y * scale, z * scale],
      ...(input.isotope === undefined ? {} : { isotope: input.isotope }),
    },
  ];
}

/** Ghosts count too: functions on top of an atom's are linearly dependent. */
function checkDistances({ unit, atoms }: MoleculeInput): EngineError[] {
  const errors: EngineError[] = [];
  for (let second = 1; second < atoms.length; second++) {
    for (let first = 0; first < second; first++) {
      const distanceBohr = distance(atoms[first].at, atoms[second].at) * bohrPerUnit(unit);
      if (!(distanceBohr < SMALLEST_DISTANCE)) continue;
      errors.push(
        new EngineError(
          'molecule.atomsCoincide',
          `Atoms ${first} (${atoms[first].element}) and ${second} (${atoms[second].element}) are ` +
            `${Number(distanceBohr.toPrecision(3))} bohr apart.`,
          `Move them at least ${SMALLEST_DISTANCE} bohr apart, or remove one.`,
          { first, second, distanceBohr },
          `molecule.atoms[${second}].at`,
        ),
      );
    }
  }
  return errors;
}

const SPIN_WORDS = ['singlet', 'doublet', 'triplet', 'quartet', 'quintet', 'sextet', 'septet'];

function checkElectrons(electrons: number, multiplicity: number, charge: number): EngineError | undefined {
  if (electrons < 1) {
    return new EngineError(
      'molecule.noElectrons',
      electrons === 0
        ? `With charge ${charge} no electron is left.`
        : `With charge ${charge} the electron count is ${electrons}.`,
      `Lower the charge to ${charge + electrons - 1} or less.`,
      { electrons },
      'molecule.charge',
    );
  }
  const isPossible =
    Number.isInteger(multiplicity) &&
    multiplicity >= 1 &&
    multiplicity <= electrons + 1 &&
    (multiplicity + electrons) % 2 === 1;
  if (isPossible) return undefined;
  const lowest = lowestMultiplicity(electrons);
  const choices = lowest + 2 <= electrons + 1 ? `${lowest} or ${lowest + 2}` : `${lowest}`;
  const state = SPIN_WORDS[multiplicity - 1] ?? `state of multiplicity ${multiplicity}`;
  return new EngineError(
    'molecule.spinMismatch',
    `${electrons} ${electrons === 1 ? 'electron' : 'electrons'} cannot form a ${state}.`,
    `Choose multiplicity ${choices}, or change the charge by one.`,
    { electrons, multiplicity },
    'molecule.multiplicity',
  );
}

/** Singlet for an even number of electrons, doublet for an odd one. */
export function lowestMultiplicity(electrons: number): 1 | 2 {
  return electrons % 2 === 0 ? 1 : 2;
}

/** Electrons of a molecule: nuclear charges minus total charge. */
export function electronCount({ atoms, charge }: Pick<Molecule, 'atoms' | 'charge'>): number {
  return atoms.reduce((sum, atom) => sum + atom.nuclearCharge, -charge);
}

/** Coulomb energy of the nuclei, Σ_{A<B} Z_A·Z_B / R_AB, in hartree. */
export function nuclearRepulsion({ atoms }: Pick<Molecule, 'atoms'>): number {
  let energy = 0;
  for (let a = 1; a < atoms.length; a++) {
    for (let b = 0; b < a; b++) {
      const charges = atoms[a].nuclearCharge * atoms[b].nuclearCharge;
      // a ghost may share an atom's place where no study was checked: 0/0
      if (charges !== 0) energy += charges / distance(atoms[a].position, atoms[b].position);
    }
  }
  return energy;
}

/** Dipole moment of the nuclei about the origin, Σ_A Z_A·R_A, in e·bohr. */
export function nuclearDipole({ atoms }: Pick<Molecule, 'atoms'>): Vector3 {
  const dipole: [number, number, number] = [0, 0, 0];
  for (const { nuclearCharge, position } of atoms) {
    for (let axis = 0; axis < 3; axis++) dipole[axis] += nuclearCharge * position[axis];
  }
  return dipole;
}
