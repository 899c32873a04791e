import { DALTON_IN_ELECTRON_MASSES } from '../constants';
import { type MeasuredState, measuredStates } from '../curves/measured-constants';
import { type MassOfAtom, reducedMass } from '../curves/reduced-mass';
import type { CompleteStudy, Study } from './study';

/** Two nuclei whose distance is scanned. */
export interface Diatomic {
  readonly atoms: readonly [MassOfAtom, MassOfAtom];
  /** electron masses, atoms with their electrons */
  readonly reducedMass: number;
  readonly reducedMassDalton: number;
}

/** The two atoms of a study that has no others, not even ghosts; else undefined. */
export function diatomicOf({ molecule, scan }: Pick<Study, 'molecule' | 'scan'>): Diatomic | undefined {
  const atoms = atomPair(molecule);
  if (!atoms || !scan || !('bonds' in scan.coordinate)) return undefined;
  const mass = reducedMass(...atoms, 'atomic');
  return { atoms, reducedMass: mass, reducedMassDalton: mass / DALTON_IN_ELECTRON_MASSES };
}

/** The same two atoms with other mass numbers. */
export function isotopologueOf(study: CompleteStudy, massNumbers: readonly number[]): Diatomic | undefined {
  const atoms = study.molecule.atoms.map((atom, index) => ({ ...atom, isotope: massNumbers[index] }));
  return diatomicOf({ ...study, molecule: { ...study.molecule, atoms } });
}

/**
 * What was measured for the molecule of a study: its electronic states, the ground state first.
 *
 * @returns empty where nothing is known of this isotopologue; undefined for a molecule that is not diatomic
 */
export function measuredFor({ molecule }: CompleteStudy): readonly MeasuredState[] | undefined {
  const atoms = atomPair(molecule);
  return atoms && measuredStates(...atoms, molecule.charge);
}

function atomPair({ atoms }: Study['molecule']): readonly [MassOfAtom, MassOfAtom] | undefined {
  if (atoms.length !== 2 || atoms.some(({ ghost }) => ghost)) return undefined;
  const [first, second] = atoms.map(
    ({ element, isotope }): MassOfAtom => ({ element, ...(isotope !== undefined && { isotope }) }),
  );
  return [first, second];
}
