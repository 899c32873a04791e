import { placeBasis } from '../basis/place-basis';
import { densityValues, functionValues, orbitalValues } from '../integrals/function-values';
import { addScaledInto } from '../linear-algebra/dense';
import { type RunControl, UNATTENDED } from '../termination';
import { type PointCarry, solveMeanFields } from './mean-fields';
import { molecularIntegrals } from './molecular-integrals';
import type { PreparedStudy } from './prepare-study';

/** Orbitals and density of a study's Hartree–Fock at chosen points in space, for plots. */
export interface FieldOnGrid {
  /** RHF, or ROHF for open shells */
  readonly level: 'RHF' | 'ROHF';
  readonly converged: boolean;
  /** points × orbitals, row-major, bohr^(−3/2) */
  readonly orbitals: Float64Array;
  readonly orbitalCount: number;
  readonly orbitalEnergies: Float64Array;
  /** spin-summed, one value a point, bohr⁻³ */
  readonly density: Float64Array;
}

/**
 * @param coordinate - as for `computePoint`
 * @param points - x, y, z of each, bohr, in the frame of the study's coordinates
 * @param options - `guess`: what a neighbouring point left
 */
export function evaluateOnGrid(
  prepared: PreparedStudy,
  coordinate: number | null,
  points: Float64Array,
  options: { readonly guess?: PointCarry | undefined; readonly control?: RunControl | undefined } = {},
): FieldOnGrid {
  const molecule = prepared.moleculeAt(coordinate);
  const basis = placeBasis(prepared.basisSet, molecule);
  const { problem } = molecularIntegrals(molecule, basis);
  const control = options.control ?? UNATTENDED;
  const { reference } = solveMeanFields(prepared, molecule, basis, problem, [], options.guess, control);
  const n = problem.functionCount;
  const values = functionValues(basis, points);
  const density = 'density' in reference ? reference.density : reference.densities[0].slice();
  if (!('density' in reference)) addScaledInto(density, 1, reference.densities[1]);
  return {
    level: molecule.multiplicity === 1 ? 'RHF' : 'ROHF',
    converged: reference.termination.kind === 'converged',
    orbitals: orbitalValues(values, reference.coefficients, n, reference.orbitalCount),
    orbitalCount: reference.orbitalCount,
    orbitalEnergies: reference.orbitalEnergies,
    density: densityValues(values, density, n),
  };
}
