import type { Harmonics, ShellDefinition } from '../basis/contracted-gaussian';

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
  readonly convergence?: { readonly energy?: number | undefined } | undefined;
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
  | { readonly coordinate: ScanCoordinate; readonly from: number; readonly to: number; readonly count: number }
  | { readonly coordinate: ScanCoordinate; readonly values: readonly number[] };

/** Uncontracted exponents smallest·ratio^k, k = 0 … count − 1. */
export interface EvenTemperedShells {
  readonly angularMomentum: number;
  readonly smallest: number;
  readonly ratio: number;
  readonly count: number;
}

export type BasisRequest =
  | string
  | {
      readonly name: string;
      /** Slater exponents by element and shell (`1s`, `2sp`, `3sp`), for STO-nG */
      readonly scaleFactors: Readonly<Record<string, Readonly<Record<string, number>>>>;
    }
  | {
      readonly name: string;
      readonly shells: Readonly<Record<string, readonly ShellDefinition[]>>;
      readonly harmonics?: Harmonics | undefined;
    }
  | {
      readonly name: string;
      readonly evenTempered: Readonly<Record<string, readonly EvenTemperedShells[]>>;
      readonly harmonics?: Harmonics | undefined;
    }
  | {
      /** path of a basis set in the open MolSSI JSON schema, relative to the study file */
      readonly file: string;
    };

/** A study with every default filled in, so that the results file says what was really run. */
export interface CompleteStudy extends Study {
  readonly molecule: StudyMolecule & { readonly charge: number; readonly multiplicity: number };
  readonly states: number;
  readonly frozenCore: boolean;
  readonly convergence: { readonly energy: number };
}
