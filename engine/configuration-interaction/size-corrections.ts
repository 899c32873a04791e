/** Total energies, hartree: CI of singles and doubles with an estimate of what its lack of size consistency costs. */
export interface SizeCorrections {
  readonly davidson: number;
  readonly renormalised: number;
  /** this and the next two: absent where the reference weight is too small for the formula */
  readonly davidsonSilver?: number;
  readonly pople?: number;
  readonly duchDiercksen?: number;
  readonly meissner: number;
}

export interface TruncatedEnergy {
  /** of the CI, hartree */
  readonly energy: number;
  /** energy less that of the reference determinant */
  readonly correlation: number;
  /** c0² */
  readonly referenceWeight: number;
  /** electrons outside the frozen orbitals, at least 1 */
  readonly electrons: number;
}

/**
 * The usual estimates of the quadruple excitations that CISD lacks. The last three vanish for two electrons, where
 * CISD is exact; Pople's is exact for any number of equal electron pairs that know nothing of each other.
 *
 * Sources: S. R. Langhoff, E. R. Davidson, Int. J. Quantum Chem. 8, 61 (1974); E. R. Davidson, D. W. Silver,
 * Chem. Phys. Lett. 52, 403 (1977); J. A. Pople, R. Seeger, R. Krishnan, Int. J. Quantum Chem. Symp. 11, 149
 * (1977); L. Meissner, Chem. Phys. Lett. 146, 204 (1988); W. Duch, G. H. F. Diercksen, J. Chem. Phys. 101, 3018
 * (1994).
 */
export function sizeCorrections({
  energy,
  correlation,
  referenceWeight: weight,
  electrons: n,
}: TruncatedEnergy): SizeCorrections {
  const missing = 1 - weight;
  const corrected = (factor: number) => energy + factor * correlation;
  const silver = 2 * weight - 1;
  const duch = 2 * (n - 1) * weight - (n - 2);
  return {
    davidson: corrected(missing),
    renormalised: corrected(missing / weight),
    ...(silver > 0 && {
      davidsonSilver: corrected(missing / silver),
      pople: corrected(popleFactor(weight, n)),
    }),
    ...(duch > 0 && { duchDiercksen: corrected((missing * (n - 2)) / duch) }),
    meissner: corrected(((missing / weight) * (n - 2) * (n - 3)) / (n * (n - 1) || 1)),
  };
}

/**
 * (√(N² + 2N tan² 2θ) − N)/(2(sec 2θ − 1)) − 1 with cos θ = c0, freed of the differences that cancel for small θ:
 * tan² = (sec − 1)(sec + 1).
 */
function popleFactor(weight: number, n: number): number {
  const secant = 1 / (2 * weight - 1);
  const root = Math.sqrt(n ** 2 + 2 * n * (secant ** 2 - 1));
  return (n * (secant + 1)) / (root + n) - 1;
}
