import type { PlacedBasis } from '../basis/contracted-gaussian';
import { electronRepulsionTensor } from '../integrals/electron-repulsion';
import { kineticMatrix } from '../integrals/kinetic';
import { dipoleMatrices } from '../integrals/multipole';
import { nuclearAttractionMatrix } from '../integrals/nuclear-attraction';
import { overlapMatrix } from '../integrals/overlap';
import { addScaledInto } from '../linear-algebra/dense';
import { nuclearRepulsion } from '../molecule/build-molecule';
import type { Molecule } from '../molecule/molecule';
import type { MeanFieldProblem } from '../self-consistent-field/mean-field-problem';

/** All integrals of a molecule at one geometry. */
export interface MolecularIntegrals {
  readonly problem: MeanFieldProblem;
  /** n×n, hartree; part of the core Hamiltonian */
  readonly kinetic: Float64Array;
  /** ⟨μ|r|ν⟩ about the origin of coordinates: x, y, z, each n×n, bohr */
  readonly dipole: readonly Float64Array[];
}

export function molecularIntegrals(molecule: Molecule, basis: PlacedBasis): MolecularIntegrals {
  const kinetic = kineticMatrix(basis);
  const coreHamiltonian = kinetic.slice();
  const nuclei = molecule.atoms
    .filter((atom) => atom.nuclearCharge !== 0)
    .map((atom) => ({ charge: atom.nuclearCharge, position: atom.position }));
  addScaledInto(coreHamiltonian, 1, nuclearAttractionMatrix(basis, nuclei));
  return {
    problem: {
      functionCount: basis.functionCount,
      overlap: overlapMatrix(basis),
      coreHamiltonian,
      repulsion: electronRepulsionTensor(basis),
      nuclearRepulsion: nuclearRepulsion(molecule),
    },
    kinetic,
    dipole: dipoleMatrices(basis, [0, 0, 0]),
  };
}
