import type { BasisRequest } from '../basis/basis-request';

/**
 * A study as its file spells it out (`NAME.study.json`): what is to be computed. Lengths are in
 * `molecule.unit`, angles in degrees, energies in hartree; atoms are counted from 0.
 */
export interface Study {
  readonly format: 'farwell/study';
  readonly version: 1;
  readonly title?: string | undefined;
  readonly notes?: string | undefined;
  readonly molecule: StudyMolecule;
  readonly scan?: StudyScan | undefined;
  readonly basis: BasisRequest;
  readonly levels: readonly string[];
  readonly states?: number | undefined;
  readonly frozenCore?: boolean | undefined;
  /** CI within these orbitals around the Fermi level; not together with `frozenCore` */
  readonly active?: ActiveSpace | undefined;
  /** of the CI: RHF or ROHF ones (default), or those of UHF, different for the two spins */
  readonly orbitals?: OrbitalKind | undefined;
  readonly convergence?: { readonly energy?: number | undefined } | undefined;
  /** what is read off the curves beyond the usual */
  readonly findings?: FindingsOptions | undefined;
}

export interface FindingsOptions {
  /** below this weight of the reference a single determinant is said not to describe the state; default 0.9 */
  readonly referenceWeight?: number | undefined;
  /** natural orbitals in the results; default: where they are few numbers */
  readonly naturalOrbitals?: boolean | undefined;
  /** J of the vibrational levels, of states that are no singlets N; default 0 alone. Diatomic molecules */
  readonly rotation?: readonly number[] | undefined;
  /** further isotopologues: a mass number for every atom. Diatomic molecules */
  readonly isotopologues?: readonly (readonly number[])[] | undefined;
  /** at every minimum, how much the fragments gain from each other's basis functions; default false */
  readonly counterpoise?: boolean | undefined;
  /** the whole study is computed in each of these bases too; not from files */
  readonly bases?: readonly BasisRequest[] | undefined;
}

export type OrbitalKind = 'restricted' | 'unrestricted';

export interface ActiveSpace {
  readonly electrons: number;
  readonly orbitals: number;
}

export type LengthUnit = 'angstrom' | 'bohr';

export interface StudyMolecule {
  readonly unit: LengthUnit;
  readonly atoms: readonly StudyAtom[];
  readonly charge?: number | undefined;
  /** 2S + 1; default: the lowest that the electron count allows */
  readonly multiplicity?: number | undefined;
}

export interface StudyAtom {
  readonly element: string;
  readonly at: readonly [number, number, number];
  /** mass number */
  readonly isotope?: number | undefined;
  /** keeps the atom's functions without nucleus and electrons */
  readonly ghost?: boolean | undefined;
}

export type ScanCoordinate =
  | { readonly bonds: readonly (readonly [number, number])[] }
  | { readonly angle: readonly [number, number, number] }
  | { readonly dihedral: readonly [number, number, number, number] };

export type StudyScan =
  | {
      readonly coordinate: ScanCoordinate;
      readonly from: number;
      readonly to: number;
      readonly count: number;
    }
  | { readonly coordinate: ScanCoordinate; readonly values: readonly number[] };

/**
 * A study with every default filled in, so that the results file says what was really run (`orbitals` too, but for
 * files of earlier versions).
 */
export interface CompleteStudy extends Study {
  readonly molecule: StudyMolecule & { readonly charge: number; readonly multiplicity: number };
  readonly states: number;
  readonly frozenCore: boolean;
  readonly convergence: { readonly energy: number };
}
