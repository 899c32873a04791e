import type { LimitVariant } from '../curves/basis-extrapolation';
import type { BasisDescription, Caution, Estimate, LevelFindings, WellConstants } from './result';

/*
 * What the results file holds of a study that was computed in several bases (`findings.bases`). Energies in hartree.
 */

/** A study in one of its bases, as far as bases are compared. */
export interface StudyInBasis {
  readonly basis: BasisDescription;
  /** by level, in the study's order */
  readonly levels: Readonly<Record<string, EnergiesInBasis>>;
  readonly findings: Readonly<Record<string, LevelFindings>>;
  /** what concerns the whole curve in this basis */
  readonly cautions: readonly Caution[];
}

/** Of a level's lowest state; of CIS, its lowest excited state. */
export interface EnergiesInBasis {
  /** total energy at each of the study's points; null where the level did not converge */
  readonly energies: readonly (number | null)[];
  /** the part of it that is not RHF (open shells: ROHF), extrapolated by itself; levels beyond Hartree–Fock, not CIS */
  readonly correlation?: readonly (number | null)[];
}

/** What bases of one systematic family tend to. */
export type BasisSetLimit =
  | {
      readonly kind: 'found';
      /** as `cc-pVXZ` */
      readonly family: string;
      /** the sets extrapolated from, by rising X */
      readonly members: readonly BasisFamilyMember[];
      /** without CIS, and without levels that failed everywhere in some member */
      readonly levels: Readonly<Record<string, LevelLimit>>;
    }
  /** said where several bases were asked for */
  | { readonly kind: 'none'; readonly reason: string };

export interface BasisFamilyMember {
  readonly name: string;
  /** X: 2 for double zeta, 3 for triple, … */
  readonly cardinal: number;
}

/**
 * Hartree–Fock and correlation energy extrapolated each by its own formula. An uncertainty is half the spread over
 * all formulas that could be used, and never less than all (of correlated levels, a third) of what extrapolation
 * added to the largest basis.
 */
export interface LevelLimit {
  readonly hartreeFock: LimitFormula;
  /** absent for Hartree–Fock levels */
  readonly correlation?: LimitFormula;
  /** total energy at each of the study's points; null where a member did not converge */
  readonly energies: readonly (Estimate | null)[];
  /**
   * read off the extrapolated curve from points computed around its minimum in every member; absent where the
   * energies of finished results only were extrapolated
   */
  readonly curve?: LimitCurve;
}

/** The formula whose energies are given, and the sets that it uses. */
export type LimitFormula = Pick<LimitVariant, 'formula' | 'cardinals'>;

export type LimitCurve =
  | {
      readonly kind: 'found';
      /** study unit */
      readonly equilibriumDistance: Estimate;
      readonly energy: Estimate;
      readonly constants: WellConstants;
      /** against separate fragments, extrapolated too; absent where the bases do not agree on which they are */
      readonly wellDepth?: Estimate;
    }
  | { readonly kind: 'none'; readonly reason: string };
