import type { Harmonics, ShellDefinition } from '../basis/contracted-gaussian';
import type { ScaleFactors } from '../basis/scalable-basis';
import type { SizeCorrections } from '../configuration-interaction/size-corrections';
import type { SizeCorrections } from '../configuration-interaction/size-corrections';
import type { SpinName } from '../configuration-interaction/spin';
import type { Vector3 } from '../molecule/molecule';
import type { PointGroupName } from '../symmetry/point-groups';
import type { StateSymmetry } from '../symmetry/state-symmetry';
import type { Termination } from '../termination';
import type { EnergyParts } from './energy-parts';
import type { EnergyParts } from './energy-parts';
import type { CompleteStudy, StudyAtom } from './study';

/*
 * The results file (`NAME.results.json`). Energies in hartree, dipole moments in e·bohr, coordinates in the
 * study's unit. Optional fields are absent where a number does not exist; a level that failed is present with
 * `converged: false`, its last numbers and the reason.
 */

export interface StudyResults {
  readonly format: 'farwell/results';
  readonly version: 1;
  readonly study: CompleteStudy;
  readonly program: { readonly name: 'farwell'; readonly version: string };
  readonly basis: BasisDescription;
  readonly points: readonly PointResult[];
  readonly findings: Readonly<Record<string, LevelFindings>>;
  /** what concerns the whole curve rather than one point */
  readonly cautions: readonly Caution[];
}

/** The numbers of the basis set used, per element of the molecule. */
export interface BasisDescription {
  readonly name: string;
  readonly harmonics: Harmonics;
  readonly functions: number;
  readonly shells: Readonly<Record<string, readonly ShellDefinition[]>>;
  /** the papers that the numbers come from */
  readonly citations: readonly string[];
  readonly notes: readonly string[];
}

export interface PointResult {
  /** in the study's unit or in degrees; null for a single point */
  readonly coordinate: number | null;
  /** in the study's unit */
  readonly atoms: readonly StudyAtom[];
  readonly nuclearRepulsion: number;
  /** Slater exponents by element and shell, where the study has them optimised */
  readonly scaleFactors?: ScaleFactors;
  readonly scaleOptimisation?: ScaleOptimisation;
  /** largest Abelian point group, which labels are named in; of a linear molecule also its whole group */
  readonly symmetry?: { readonly pointGroup: PointGroupName; readonly linear?: 'C∞v' | 'D∞h' };
  readonly levels: Readonly<Record<string, LevelResult>>;
  readonly cautions: readonly Caution[];
}

/** How the scale factors of a point were found. */
export interface ScaleOptimisation {
  /** whose energy they make lowest */
  readonly level: 'RHF' | 'ROHF' | 'UHF';
  /** false too where a factor ran to its limit */
  readonly converged: boolean;
  readonly termination: Termination;
  readonly iterations: number;
  /** largest derivative of the energy with respect to ln ζ, hartree */
  readonly residual: number;
  /** shells such as `H 1s` whose factor ran to its limit */
  readonly atLimit?: readonly string[];
}

/** Where a number should not be trusted, and why. */
export interface Caution {
  readonly code: string;
  /** one plain sentence of what it means for this result */
  readonly message: string;
  /** the level concerned; absent: all */
  readonly level?: string;
  /** coordinates between which it holds, where it is not said at a point */
  readonly range?: readonly [number, number];
}

export type LevelResult =
  | HartreeFockResult
  | PerturbationResult
  | SinglesResult
  | CorrelatedResult
  | FailedLevel;

/** Why a level's numbers are not final; a CI built on orbitals that did not converge is not final either. */
export type LevelTermination = Termination | { readonly kind: 'orbitalsNotConverged' };

/** A level that could not be computed at all at this point, because something before it failed. */
export interface FailedLevel {
  readonly kind: 'failed';
  readonly converged: false;
  readonly termination: LevelTermination | { readonly kind: 'refused'; readonly message: string };
}

export interface HartreeFockResult {
  readonly kind: 'hartreeFock';
  readonly energy: number;
  readonly converged: boolean;
  readonly termination: Termination;
  readonly iterations: number;
  readonly orbitalEnergies: readonly number[] | SpinOrbitalEnergies;
  /** in the same order, as `1σg` or `2a1`; null for an orbital that breaks the symmetry */
  readonly orbitalSymmetries?:
    | OrbitalLabels
    | { readonly alpha: OrbitalLabels; readonly beta: OrbitalLabels };
  /** of the determinant; absent where it breaks the symmetry */
  readonly symmetry?: StateSymmetry;
  /** e·bohr, about the origin of the study's coordinates, for ions too */
  readonly dipole: Vector3;
  readonly energyParts?: EnergyParts;
  readonly energyParts?: EnergyParts;
  /** ⟨S²⟩; UHF and ROHF */
  readonly sSquared?: number;
  /**
   * Lowest eigenvalues of the orbital Hessians, hartree; negative: not a minimum. RHF: of the real singlet and the
   * triplet one; UHF and ROHF: of the one within their own kind.
   */
  readonly stability?: { readonly singlet: number; readonly triplet: number } | { readonly own: number };
  readonly charges?: AtomicCharges;
}

/** Charges by atom, in e, after two ways of sharing the electrons out; ghosts have theirs too. */
export interface AtomicCharges {
  readonly mulliken: readonly number[];
  readonly loewdin: readonly number[];
  /** alpha minus beta electrons; UHF and ROHF */
  readonly spin?: { readonly mulliken: readonly number[]; readonly loewdin: readonly number[] };
}

export type OrbitalLabels = readonly (string | null)[];

export interface SpinOrbitalEnergies {
  readonly alpha: readonly number[];
  readonly beta: readonly number[];
}

export interface PerturbationResult {
  readonly kind: 'perturbation';
  readonly energy: number;
  /** energy minus the RHF (open shells: ROHF) energy */
  readonly correlation: number;
  /** the Hartree–Fock that it corrects: RHF, for open shells UHF */
  readonly reference: 'RHF' | 'UHF';
  /** parts of the second-order energy, hartree */
  readonly sameSpin: number;
  readonly oppositeSpin: number;
  readonly converged: boolean;
  readonly termination: LevelTermination;
}

export interface SinglesState {
  readonly energy: number;
  /** above the RHF energy */
  readonly excitation: number;
  readonly spin: 'singlet' | 'triplet';
  /** absent where it is not determined, as over orbitals that break the symmetry */
  readonly symmetry?: StateSymmetry;
  /** length form; 0 for triplets */
  readonly oscillatorStrength: number;
  /** ⟨0|−r|state⟩, e·bohr */
  readonly transitionDipole: Vector3;
  readonly leading: readonly { readonly from: number; readonly to: number; readonly weight: number }[];
}

export interface SinglesResult {
  readonly kind: 'singles';
  readonly converged: boolean;
  readonly termination: LevelTermination;
  /** in order of energy, `study.states` of each spin as far as they exist */
  readonly states: readonly SinglesState[];
}

/** A determinant in a CI vector; spatial orbitals counted from 0 over all orbitals, frozen ones included. */
export interface LeadingDeterminant {
  readonly coefficient: number;
  readonly weight: number;
  readonly alpha: readonly number[];
  readonly beta: readonly number[];
}

export interface CorrelatedState {
  readonly energy: number;
  /** above this level's lowest state */
  readonly excitation: number;
  readonly spin: SpinName;
  /** absent where it is not determined, as over orbitals that break the symmetry */
  readonly symmetry?: StateSymmetry;
  readonly sSquared: number;
  readonly referenceWeight: number;
  /** from the lowest state, length form; of every state but the lowest */
  readonly oscillatorStrength?: number;
  /** ⟨lowest|−r|state⟩, e·bohr; of every state but the lowest */
  readonly transitionDipole?: Vector3;
  /** from the lowest state, length form; of every state but the lowest */
  readonly oscillatorStrength?: number;
  /** ⟨lowest|−r|state⟩, e·bohr; of every state but the lowest */
  readonly transitionDipole?: Vector3;
  readonly residual: number;
  readonly dipole: Vector3;
  readonly charges?: AtomicCharges;
  readonly naturalOccupations: readonly number[];
  readonly leading: readonly LeadingDeterminant[];
}

export interface CorrelatedResult {
  readonly kind: 'correlated';
  /** of the lowest state, as all the fields that follow */
  readonly energy: number;
  /** energy minus the RHF (open shells: ROHF) energy */
  readonly correlation: number;
  readonly converged: boolean;
  readonly termination: LevelTermination;
  readonly iterations: number;
  readonly determinants: number;
  readonly referenceWeight: number;
  readonly sSquared: number;
  readonly spin: SpinName;
  readonly symmetry?: StateSymmetry;
  /** falling, frozen orbitals included with 2 */
  readonly naturalOccupations: readonly number[];
  readonly dipole: Vector3;
  readonly energyParts?: EnergyParts;
  readonly energyParts?: EnergyParts;
  /** energy + (1 − c0²)·correlation (Langhoff, Davidson 1974); truncated CI only, not variational */
  readonly davidsonCorrected?: number;
  /** CISD: total energies with the usual estimates of the missing quadruples */
  readonly sizeCorrections?: SizeCorrections;
  /** CISD: total energies with the usual estimates of the missing quadruples */
  readonly sizeCorrections?: SizeCorrections;
  readonly states: readonly CorrelatedState[];
}

/** What can be read off one level's curve. Distances and energies of freshly computed points, not of a fit. */
export interface LevelFindings {
  readonly minimum:
    | {
        readonly kind: 'found';
        /** study unit; every scanned bond at this length */
        readonly equilibriumDistance: number;
        readonly energy: number;
        /** how far the distance may be off, study unit */
        readonly uncertainty: number;
      }
    /** the lowest computed point is the first or last of the range */
    | { readonly kind: 'atEdge'; readonly coordinate: number }
    /** several minima: the coordinates of the computed points nearest to them */
    | { readonly kind: 'several'; readonly near: readonly number[] }
    /** too few converged points, or no scan of a distance */
    | { readonly kind: 'none'; readonly reason: string };
  /** E(last computed distance) − E(minimum): depth against the far end of this curve, not against fragments */
  readonly wellDepth?: { readonly value: number; readonly against: 'farEnd'; readonly farEnd: number };
  /** RHF of a scan: where a spin-polarised solution begins to lie lower */
  readonly instabilityOnset?: InstabilityOnset;
}

export type InstabilityOnset =
  /** study unit or degrees */
  | { readonly kind: 'found'; readonly coordinate: number; readonly uncertainty: number }
  | { readonly kind: 'none'; readonly reason: string };
