/** A study explained without computing it: sizes, memory and time per level. */
export interface StudyExplanation {
  readonly electrons: number;
  readonly points: number;
  readonly functions: number;
  /** doubly occupied orbitals kept out of the CI by `frozenCore` or `active` */
  readonly frozenOrbitals: number;
  /** orbitals of the CI, where `active` chooses them */
  readonly activeOrbitals?: number;
  /** repulsion integrals stored, 8-fold packed */
  readonly repulsionIntegrals: number;
  readonly levels: readonly LevelExplanation[];
  /** estimated for one point with all levels, on one core */
  readonly pointSeconds: number;
  /** estimated for what follows the points – neighbours, minima –, on one core */
  readonly afterwardsSeconds: number;
  /** the same study in its further bases, whose times come on top; absent where it asks for none */
  readonly furtherBases?: readonly BasisExplanation[];
}

export type BasisExplanation = StudyExplanation & { readonly name: string };

export interface LevelExplanation {
  readonly level: string;
  /** CI levels only */
  readonly determinants?: number;
  /** an upper bound, for one point */
  readonly bytes: number;
  /** estimated, for one point of this level alone on one core */
  readonly seconds: number;
}
