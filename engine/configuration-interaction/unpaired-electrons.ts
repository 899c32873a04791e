/** Numbers of effectively unpaired electrons from natural occupations n, in the three forms in use. */
export interface UnpairedElectrons {
  /** Σ min(n, 2 − n): 1 for each singly occupied orbital, at most the number of electrons */
  readonly linear: number;
  /** Σ n(2 − n): the oldest form; counts the many small occupations of dynamic correlation twice */
  readonly quadratic: number;
  /** Σ n²(2 − n)²: all but blind to small occupations, so that it tells open shells from dynamic correlation */
  readonly quartic: number;
}

/**
 * Number of effectively unpaired electrons.
 *
 * @param occupations - of the natural orbitals, 0 … 2; those of exactly 0 or 2 count nothing
 *
 * Sources: quadratic: K. Takatsuka, T. Fueno, K. Yamaguchi, Theor. Chim. Acta 48, 175 (1978); linear and quartic:
 * M. Head-Gordon, Chem. Phys. Lett. 372, 508 (2003).
 */
export function unpairedElectrons(occupations: readonly number[]): UnpairedElectrons {
  let [linear, quadratic, quartic] = [0, 0, 0];
  for (const n of occupations) {
    // rounding may lead out of the range
    const hole = Math.max(0, 2 - n);
    const electron = Math.max(0, n);
    linear += Math.min(electron, hole);
    quadratic += electron * hole;
    quartic += (electron * hole) ** 2;
  }
  return { linear, quadratic, quartic };
}
