import type { Dissociation, Estimate, LevelFindings, Vibration, WellConstants, WellDepth } from './result';

/*
 * Findings that a curve gives beyond its minimum, depth and constants; parts of the results file. Energies in hartree,
 * dipole moments in e·bohr, coordinates in the study's unit.
 */

/** Levels of a rotating molecule on the same curve. */
export interface RotatingLevels {
  /** J; of states that are no singlets N, the angular momentum without spin */
  readonly rotation: number;
  /** below the limit of the curve */
  readonly levels: readonly RotatingLevel[];
  /** above the limit, held back by the centrifugal barrier alone: they decay */
  readonly quasiBound: readonly QuasiBoundLevel[];
  /** top of that barrier above the minimum of the curve; absent where there is none */
  readonly barrierPerCm?: number;
  /** as for the levels without rotation */
  readonly converged: boolean;
}

export interface RotatingLevel {
  /** quantum number of vibration */
  readonly v: number;
  /** above the minimum of the curve, rotation included */
  readonly energyPerCm: number;
  readonly uncertaintyPerCm: number;
}

export interface QuasiBoundLevel extends RotatingLevel {
  /** semiclassical; the level is not sharper than this */
  readonly widthPerCm: number;
}

/** The same curve with other masses: no energy is computed anew. */
export interface Isotopologue {
  /** mass number of every atom of the study */
  readonly massNumbers: readonly number[];
  readonly reducedMassDalton: number;
  /** Dunham's constants; absent where the study's own isotopes have none */
  readonly constants?: WellConstants['diatomic'];
  readonly vibration: Vibration;
}

/** The converged points of the scan up to the limit as closed forms, each by least squares with equal weights. */
export interface CurveFits {
  readonly morse?: MorseFit;
  readonly extendedRydberg?: ExtendedRydbergFit;
  /** from derivatives at the minimum */
  readonly dunham?: DunhamExpansion;
}

/** How well a form describes the points that it was fitted to. */
export interface FitQuality {
  readonly rootMeanSquarePerCm: number;
  /** largest distance of the form from a point */
  readonly largestPerCm: number;
  readonly points: number;
  /** first and last coordinate of these points, study unit */
  readonly range: readonly [number, number];
}

/** E(r) = limit + depth·[(1 − e^(−a(r − re)))² − 1]. */
export interface MorseFit extends FitQuality {
  /** hartree */
  readonly depth: number;
  readonly equilibriumDistanceBohr: number;
  /** a, bohr⁻¹ */
  readonly steepnessPerBohr: number;
  /** hartree */
  readonly limit: number;
  /** the limit is that of the separate fragments, not a fitted number */
  readonly limitIsFixed: boolean;
}

/** E(r) = limit − depth·(1 + a₁ρ + a₂ρ² + a₃ρ³)·e^(−a₁ρ), ρ = r − re. */
export interface ExtendedRydbergFit extends FitQuality {
  /** hartree */
  readonly depth: number;
  readonly equilibriumDistanceBohr: number;
  /** a₁, a₂, a₃ in bohr⁻¹, bohr⁻², bohr⁻³ */
  readonly coefficientsInBohr: readonly [number, number, number];
  /** hartree */
  readonly limit: number;
  /** the limit is that of the separate fragments, not a fitted number */
  readonly limitIsFixed: boolean;
}

/**
 * E(r) = energy + a₀ξ²(1 + a₁ξ + a₂ξ² + a₃ξ³ + a₄ξ⁴), ξ = (r − re)/re: a Taylor series, good near re only. The quality
 * is that of the series against the points around the minimum which its derivatives come from.
 */
export interface DunhamExpansion extends FitQuality {
  /** at re, hartree */
  readonly energy: number;
  readonly equilibriumDistanceBohr: number;
  /** a₀, hartree */
  readonly leading: number;
  /** a₁ … a₄ */
  readonly coefficients: readonly [number, number, number, number];
}

/** What is read off the curve of a state above the lowest. */
export interface ExcitedState {
  /** index of its curve among `curves` of this level */
  readonly curve: number;
  /** of the state's own curve */
  readonly minimum: LevelFindings['minimum'];
  /**
   * whether the minimum comes from points computed around it, or from the curve interpolated between those of the
   * scan, because further points are too dear; the uncertainty says how well
   */
  readonly minimumFrom?: 'computed' | 'interpolated';
  readonly constants?: WellConstants;
  /** at the minimum of the lowest state (of CIS: of RHF); absent where that has none or the curve does not reach it */
  readonly vertical?: VerticalExcitation;
  /** Te: from minimum to minimum, hartree */
  readonly adiabatic?: Estimate;
  /** T0: from lowest level to lowest level, hartree */
  readonly zeroPointToZeroPoint?: Estimate;
  /**
   * the states of separate fragments that this state goes to at large distance, or why they cannot be told; absent where
   * the scan does not part the molecule in two, and in files of earlier versions
   */
  readonly dissociation?: Dissociation;
  /** De against that limit, or else against the end of the state's own curve; absent without a minimum */
  readonly wellDepth?: WellDepth;
  /** at the points of the scan where both states are known; empty where nothing is computed of them */
  readonly transitionMoments: readonly TransitionMoment[];
  /** towards ions, whose attraction holds infinitely many, the levels below the end of the curve; D0 is against the ions */
  readonly vibration?: Vibration;
  readonly franckCondon?: FranckCondon;
}

export interface VerticalExcitation {
  /** where, study unit */
  readonly coordinate: number;
  /** hartree */
  readonly energy: Estimate;
  /** length form; 0 for another spin */
  readonly oscillatorStrength?: number;
  /** length of ⟨lowest|−r|state⟩, e·bohr */
  readonly transitionDipole?: number;
}

export interface TransitionMoment {
  readonly coordinate: number;
  /** length of ⟨lowest|−r|state⟩, e·bohr: its sign is arbitrary at every point */
  readonly dipole: number;
  /** length form */
  readonly oscillatorStrength: number;
}

/** Overlaps |⟨v′|v″⟩|² of levels without rotation; v″ of the lowest state, v′ of the excited one. */
export interface FranckCondon {
  /** a row for each v″ from 0, in it a column for each v′ from 0 */
  readonly factors: readonly (readonly number[])[];
  /** of each row over all bound v′, also those not listed: 1 less what goes to the continuum */
  readonly sums: readonly number[];
  /** number of v′ that the sums run over */
  readonly boundLevels: number;
  /** of a factor, from the grid */
  readonly uncertainty: number;
  readonly converged: boolean;
}
