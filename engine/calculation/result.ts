import type { Harmonics, ShellDefinition } from '../basis/contracted-gaussian';
import type { ScaleFactors } from '../basis/scalable-basis';
import type { CorrelationParts } from '../configuration-interaction/correlation-parts';
import type { SizeCorrections } from '../configuration-interaction/size-corrections';
import type { SpinName } from '../configuration-interaction/spin';
import type { UnpairedElectrons } from '../configuration-interaction/unpaired-electrons';
import type { MeasuredState } from '../curves/measured-constants';
import type { Vector3 } from '../molecule/molecule';
import type { PointGroupName } from '../symmetry/point-groups';
import type { StateSymmetry } from '../symmetry/state-symmetry';
import type { Termination } from '../termination';
import type { BasisSetLimit, StudyInBasis } from './basis-comparison';
import type { EnergyParts } from './energy-parts';
import type { CurveFits, ExcitedState, Isotopologue, RotatingLevels } from './further-findings';
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
  /** `date`: of the day when the last number was computed, as 2026-12-01 (UTC); absent in files of earlier versions */
  readonly program: { readonly name: 'farwell'; readonly version: string; readonly date?: string };
  readonly basis: BasisDescription;
  readonly points: readonly PointResult[];
  readonly findings: Readonly<Record<string, LevelFindings>>;
  /** states of CI levels and CIS joined along the scan, by level; absent in files of earlier versions */
  readonly curves?: Readonly<Record<string, readonly StateCurve[]>>;
  /** the same study in the further bases that it asks for */
  readonly furtherBases?: readonly StudyInBasis[];
  /** what the study's basis and the further ones tend to; present with `furtherBases` */
  readonly basisSetLimit?: BasisSetLimit;
  /** measured constants of this isotopologue, empty where none are known; diatomic molecules only */
  readonly measured?: readonly MeasuredState[];
  /** what concerns the whole curve rather than one point */
  readonly cautions: readonly Caution[];
}

/** One state of a level along the scan. */
export interface StateCurve {
  /** within its level, as `1 ³Σu⁺`; without symmetry `triplet 1` */
  readonly name: string;
  /** place of the state in the level's list at every point; null where it is not among those computed */
  readonly states: readonly (number | null)[];
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
  /** what is the case, in plain words */
  readonly message: string;
  /** what that means for this result, as one sentence; absent where the message says it, and in earlier files */
  readonly meaning?: string;
  /** what to do about it; absent in files of earlier versions */
  readonly remedy?: string;
  /** the values that raised it, and the bounds that they passed; absent where there are none, and in earlier files */
  readonly numbers?: readonly CautionNumber[];
  /** the level concerned; absent: all */
  readonly level?: string;
  /** coordinates between which it holds, where it is not said at a point */
  readonly range?: readonly [number, number];
}

/** A number behind a caution. */
export interface CautionNumber {
  /** what it is, as `⟨S²⟩` or `share of the well depth` */
  readonly name: string;
  readonly value: number;
  /** as `hartree`, `cm⁻¹`, `Å`; empty for a pure number */
  readonly unit: string;
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
  /** second-order energies are no expectation values, so that there are none; absent in files of earlier versions */
  readonly energyParts?: NotAvailable;
  readonly converged: boolean;
  readonly termination: LevelTermination;
}

/** A number that does not exist, and why. */
export interface NotAvailable {
  readonly kind: 'none';
  readonly reason: string;
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
  /** this and the next: of the state's own density (not relaxed); absent in files of earlier versions */
  readonly naturalOccupations?: readonly number[];
  readonly unpairedElectrons?: UnpairedElectrons;
  readonly dipole?: Vector3;
  readonly energyParts?: EnergyParts;
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

/** All determinants of one occupation of the spatial orbitals; orbitals as in `LeadingDeterminant`. */
export interface LeadingConfiguration {
  /** sum over the determinants */
  readonly weight: number;
  readonly doublyOccupied: readonly number[];
  readonly singlyOccupied: readonly number[];
}

/** Natural orbitals, in the order of `naturalOccupations`. */
export interface NaturalOrbitals {
  /** for each orbital a number for each basis function; those of UHF-based CI are of the spin-summed density too */
  readonly coefficients: readonly (readonly number[])[];
  /** as of `orbitalSymmetries`, counted by falling occupation; absent where the orbitals of the CI have no symmetry */
  readonly symmetries?: OrbitalLabels;
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
  readonly residual: number;
  readonly dipole: Vector3;
  readonly charges?: AtomicCharges;
  readonly naturalOccupations: readonly number[];
  /** absent in files of earlier versions */
  readonly unpairedElectrons?: UnpairedElectrons;
  readonly leading: readonly LeadingDeterminant[];
  /** falling weight; absent over UHF orbitals, and in files of earlier versions */
  readonly configurations?: readonly LeadingConfiguration[];
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
  /** whose determinant and orbitals these are, where not those of RHF or ROHF; states have no symmetry then */
  readonly reference?: 'UHF';
  readonly sSquared: number;
  readonly spin: SpinName;
  readonly symmetry?: StateSymmetry;
  /** falling, frozen orbitals included with 2 */
  readonly naturalOccupations: readonly number[];
  /** absent where the study is too large for them (`findings.naturalOrbitals`), and in files of earlier versions */
  readonly naturalOrbitals?: NaturalOrbitals;
  /** this and the next: absent in files of earlier versions */
  readonly unpairedElectrons?: UnpairedElectrons;
  /** of the energy less that of the reference determinant: RHF, ROHF or, where `reference` says so, UHF */
  readonly correlationParts?: CorrelationParts;
  readonly dipole: Vector3;
  readonly energyParts?: EnergyParts;
  /**
   * energy + (1 − c0²)·(energy − that of the reference determinant) (Langhoff, Davidson 1974); truncated CI only, not
   * variational
   */
  readonly davidsonCorrected?: number;
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
        /**
         * true where the energies around it lie on no smooth curve: a kink, as where two solutions cross, or noise. The
         * distance is good to `uncertainty` only, and there are no Dunham constants
         */
        readonly onKink?: true;
        /** higher minima of the same curve, from the lowest; absent where there are none */
        readonly others?: readonly HigherMinimum[];
      }
    /** the lowest computed point is the first or last of the range */
    | { readonly kind: 'atEdge'; readonly coordinate: number }
    /** several minima: the coordinates of the computed points nearest to them; files of earlier versions only */
    | { readonly kind: 'several'; readonly near: readonly number[] }
    /** too few converged points, or no scan of a distance */
    | { readonly kind: 'none'; readonly reason: string };
  /** absent without a minimum */
  readonly constants?: WellConstants;
  /** the lowest energy of separate fragments at this level; absent where the scan does not part the molecule in two */
  readonly dissociation?: Dissociation;
  /** absent without a minimum */
  readonly wellDepth?: WellDepth;
  /** where the study asks for it; absent without a minimum */
  readonly counterpoise?: Counterpoise;
  /** diatomic molecules; absent without a minimum */
  readonly vibration?: Vibration;
  /** those that the study asks for; diatomic molecules */
  readonly isotopologues?: readonly Isotopologue[];
  /** absent without a minimum */
  readonly fits?: CurveFits;
  /**
   * of levels of which more than the lowest state is computed: the other curves whose states are known along the scan,
   * of degenerate partners only the first
   */
  readonly excitedStates?: readonly ExcitedState[];
  /** RHF of a scan: where a spin-polarised solution begins to lie lower */
  readonly instabilityOnset?: InstabilityOnset;
  /** CI levels of a scan: where a single determinant ceases to describe most of the lowest state */
  readonly referenceWeight?: ReferenceWeightFinding;
}

/** A minimum above the lowest one. */
export interface HigherMinimum {
  /** study unit */
  readonly equilibriumDistance: number;
  readonly energy: number;
  /** how far the distance may be off, study unit */
  readonly uncertainty: number;
}

/** A number and how far it may be off for numerical reasons: of this level's own curve, not of nature. */
export interface Estimate {
  readonly value: number;
  readonly uncertainty: number;
}

/** What the shape of the curve at its minimum gives. */
export interface WellConstants {
  readonly equilibriumDistanceAngstrom: Estimate;
  /** second derivative of the energy along the scanned distance */
  readonly forceConstantNewtonPerMetre: Estimate;
  /** diatomic molecules only */
  readonly diatomic?: DiatomicConstants;
  /** why a diatomic molecule has none: a kink, or energies too noisy for derivatives */
  readonly withoutDiatomic?: string;
}

/** Leading terms after J. L. Dunham, Phys. Rev. 41, 721 (1932), for the isotopes of the study. */
export interface DiatomicConstants {
  /** masses of neutral atoms, electrons included */
  readonly masses: 'atomic';
  readonly reducedMassDalton: number;
  /** ωe */
  readonly harmonicWavenumberPerCm: Estimate;
  /** ωexe */
  readonly anharmonicityPerCm: Estimate;
  /** Be */
  readonly rotationalConstantPerCm: Estimate;
  /** αe */
  readonly vibrationRotationCouplingPerCm: Estimate;
  /** D̄e */
  readonly centrifugalDistortionPerCm: Estimate;
}

export type WellDepth =
  /** E(last computed distance) − E(minimum) */
  | { readonly value: number; readonly against: 'farEnd'; readonly farEnd: number }
  /** E(separate fragments) − E(minimum) */
  | {
      readonly value: number;
      readonly against: 'fragments';
      /** last computed distance where the level converged */
      readonly farEnd: number;
      /** E(that distance) − E(minimum) */
      readonly valueAgainstFarEnd: number;
    };

export type Dissociation =
  | {
      readonly kind: 'found';
      /** sum of the fragments, hartree */
      readonly energy: number;
      readonly fragments: readonly [Fragment, Fragment];
      /**
       * E(last computed distance) − `energy`: what still binds there, the size-consistency error of the level, or
       * both; absent where the level did not converge at any distance
       */
      readonly farEndAbove?: number;
    }
  | { readonly kind: 'none'; readonly reason: string };

/**
 * Superposition error of the fragments' bases: what each gains from the other's functions, at the geometry of the
 * molecule. Hartree.
 *
 * Source: S. F. Boys, F. Bernardi, Mol. Phys. 19, 553 (1970).
 */
export type Counterpoise =
  | {
      readonly kind: 'found';
      /** at the minimum; in the order of `dissociation.fragments` */
      readonly fragments: readonly [FragmentSuperposition, FragmentSuperposition];
      /** of both fragments, at the minimum */
      readonly error: number;
      /** well depth less the error, both at the uncorrected minimum */
      readonly wellDepth: number;
      /** error of both fragments at each of the study's points, null where one did not converge; only where it is cheap */
      readonly alongCurve?: readonly (number | null)[];
    }
  | { readonly kind: 'none'; readonly reason: string };

export interface FragmentSuperposition {
  /** at the level, charge and spin that `dissociation.fragments` says, in the basis of the whole molecule */
  readonly energyInWholeBasis: number;
  /** energy in its own basis less this */
  readonly error: number;
}

/** A part of the molecule on its own, in its own basis functions, at the geometry that it has in the scan. */
export interface Fragment {
  /** indices of the study's atoms */
  readonly atoms: readonly number[];
  readonly charge: number;
  /** 2S + 1 */
  readonly multiplicity: number;
  readonly energy: number;
  /** the level that it was computed at: ROHF for open shells where the molecule has RHF, and for one electron */
  readonly level: string;
  /** 2S + 1 of the determinant that a CI started from, where its state has turned out to be one of another spin */
  readonly startedFrom?: number;
  /** of the energy, what is not RHF (open shells: ROHF); levels beyond Hartree–Fock */
  readonly correlation?: number;
  /** above the lowest state of this fragment with this charge, hartree; present for fragments of excited states */
  readonly excitation?: number;
}

export type Vibration =
  | {
      readonly kind: 'found';
      /** bound levels without rotation (J = 0), from the lowest */
      readonly levels: readonly VibrationalState[];
      /** levels of the other J that the study asks for */
      readonly rotating?: readonly RotatingLevels[];
      /** of the lowest level above the minimum */
      readonly zeroPointPerCm: number;
      /** well depth less zero-point energy, hartree; against the same limit as the well depth */
      readonly d0?: number;
      readonly boundLevels: number;
      /** levels are those of the interpolated curve to 0.001 cm⁻¹ in grid and range */
      readonly converged: boolean;
      /** quantum numbers of levels that rest on the curve beyond its computed points by more than 0.001 cm⁻¹ */
      readonly beyondComputedRange: readonly number[];
      /** largest estimated error of the curve between its points, below the limit */
      readonly interpolationErrorPerCm: number;
      /** points computed for these levels only */
      readonly pointsAdded: number;
      readonly reducedMassDalton: number;
    }
  | {
      readonly kind: 'none';
      readonly reason: string;
      /** the curve is too poorly known for levels, as at a kink or between too few points */
      readonly isDoubtful?: true;
    };

export interface VibrationalState {
  /** quantum number */
  readonly v: number;
  /** above the minimum of the curve */
  readonly energyPerCm: number;
  /** Bv */
  readonly rotationalConstantPerCm: number;
  /** Dv; absent for levels so close to the limit that rotation is no small change */
  readonly centrifugalDistortionPerCm?: number;
  /** from the grid alone; see `interpolationErrorPerCm` for the curve */
  readonly uncertaintyPerCm: number;
}

export type InstabilityOnset =
  /** study unit or degrees */
  | { readonly kind: 'found'; readonly coordinate: number; readonly uncertainty: number }
  | { readonly kind: 'none'; readonly reason: string };

/** Where the weight of the reference determinant falls below a threshold (`findings.referenceWeight` of the study). */
export type ReferenceWeightFinding = {
  readonly threshold: number;
  /** every place found where the weight passes the threshold, by rising coordinate; study unit or degrees */
  readonly crossings: readonly ReferenceWeightCrossing[];
} & (
  | {
      readonly kind: 'found';
      /** from here to the end of the scan the weight stays below the threshold */
      readonly coordinate: number;
      readonly uncertainty: number;
    }
  | { readonly kind: 'none'; readonly reason: string }
);

export interface ReferenceWeightCrossing {
  readonly coordinate: number;
  readonly uncertainty: number;
  /** what the weight does there as the coordinate rises */
  readonly direction: 'falling' | 'rising';
}
