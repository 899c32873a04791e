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
}

export interface LevelExplanation {
  readonly level: string;
  /** CI levels only */
  readonly determinants?: number;
  /** rough, for one point */
  readonly bytes: number;
  /** rough, for one point on one core */
  readonly seconds: number;
}
