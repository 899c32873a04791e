import type { LengthUnit, Study } from '#engine';

/**
 * The study as it stands in the window: every field holds exactly what was typed, valid or not, so that
 * nothing typed is lost; the study's checker judges it.
 */
export interface StudyDraft {
  readonly title: string;
  readonly notes: string;
  readonly unit: LengthUnit;
  readonly atoms: readonly AtomDraft[];
  readonly charge: string;
  /** empty: the lowest that the electron count allows */
  readonly multiplicity: string;
  readonly scan: ScanDraft;
  readonly basis: BasisDraft;
  readonly levels: readonly string[];
  readonly states: string;
  readonly frozenCore: boolean;
  /** electrons and orbitals of an active space; absent: none */
  readonly active?: ActiveDraft;
  readonly orbitals: NonNullable<Study['orbitals']>;
  /** empty: the default */
  readonly energyConvergence: string;
  readonly findings: FindingsDraft;
}

export interface ActiveDraft {
  readonly electrons: string;
  readonly orbitals: string;
}

/** What is wanted of the curves beyond what is always read off; empty: the default. */
export interface FindingsDraft {
  readonly referenceWeight: string;
  /** J, separated by blanks or commas */
  readonly rotation: string;
  /** mass numbers of the atoms separated by blanks, molecules by commas */
  readonly isotopologues: string;
  readonly counterpoise: boolean;
  /** names, separated by commas */
  readonly bases: string;
  /** what has no field in the window, as the study gave it */
  readonly kept: Pick<NonNullable<Study['findings']>, 'naturalOrbitals' | 'bases'>;
}

export interface AtomDraft {
  readonly element: string;
  readonly at: readonly [string, string, string];
  readonly isotope: string;
  readonly ghost: boolean;
}

/** What is scanned, how, and over which values; the fields of the kinds not chosen are kept for the way back. */
export interface ScanDraft {
  readonly coordinate: 'none' | 'bonds' | 'angle' | 'dihedral';
  readonly bonds: readonly (readonly [number, number])[];
  readonly angle: readonly [number, number, number];
  readonly dihedral: readonly [number, number, number, number];
  readonly spacing: 'even' | 'listed';
  readonly from: string;
  readonly to: string;
  readonly count: string;
  readonly values: string;
}

export interface BasisDraft {
  readonly kind: 'named' | 'custom';
  readonly name: string;
  /** JSON, when `kind` is custom */
  readonly custom: string;
}

export const EMPTY_ATOM: AtomDraft = { element: '', at: ['0', '0', '0'], isotope: '', ghost: false };

export const EMPTY_DRAFT: StudyDraft = {
  title: '',
  notes: '',
  unit: 'angstrom',
  atoms: [],
  charge: '0',
  multiplicity: '',
  scan: {
    coordinate: 'none',
    bonds: [],
    angle: [0, 1, 2],
    dihedral: [0, 1, 2, 3],
    spacing: 'even',
    from: '',
    to: '',
    count: '',
    values: '',
  },
  basis: { kind: 'named', name: 'STO-3G', custom: '' },
  levels: ['RHF'],
  states: '1',
  frozenCore: false,
  orbitals: 'restricted',
  energyConvergence: '',
  findings: {
    referenceWeight: '',
    rotation: '',
    isotopologues: '',
    counterpoise: false,
    bases: '',
    kept: {},
  },
};
