import { coulombExchangeInto } from '../integrals/coulomb-exchange';
import { addScaledInto, dot } from '../linear-algebra/dense';
import { type StartingPoint, startingDensities } from './mean-field';
import type { MeanFieldProblem } from './mean-field-problem';

/**
 * Energy of the determinant of given occupied orbitals, made orthonormal first:
 * E = V(nn) + Σ D h + ½ Σ D J(D) − ½ Σ Dα K(Dα) − ½ Σ Dβ K(Dβ), D = Dα + Dβ.
 *
 * @param orbitals - one set serves RHF, UHF and high-spin ROHF alike
 * @returns undefined where the orbitals are linearly dependent
 *
 * Source: A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, sec. 3.8.2.
 */
export function determinantEnergy(
  problem: MeanFieldProblem,
  orbitals: Extract<StartingPoint, { kind: 'occupiedOrbitals' }>,
): number | undefined {
  const densities = startingDensities(orbitals, problem);
  if (!densities) return undefined;
  const { functionCount: n, coreHamiltonian, repulsion, nuclearRepulsion } = problem;
  const coulomb = new Float64Array(n * n);
  const exchange = new Float64Array(n * n);
  const total = new Float64Array(n * n);
  const totalCoulomb = new Float64Array(n * n);
  let exchangeEnergy = 0;
  for (const density of [densities.alpha, densities.beta]) {
    coulombExchangeInto(density, repulsion, n, coulomb, exchange);
    addScaledInto(total, 1, density);
    addScaledInto(totalCoulomb, 1, coulomb);
    exchangeEnergy -= dot(density, exchange) / 2;
  }
  return nuclearRepulsion + dot(total, coreHamiltonian) + dot(total, totalCoulomb) / 2 + exchangeEnergy;
}
