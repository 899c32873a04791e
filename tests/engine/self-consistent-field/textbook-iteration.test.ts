import { describe, expect, it } from 'vitest';
import { coulombExchangeInto } from '../../../engine/integrals/coulomb-exchange';
import { electronRepulsionTensor } from '../../../engine/integrals/electron-repulsion';
import { kineticMatrix } from '../../../engine/integrals/kinetic';
import { nuclearAttractionMatrix } from '../../../engine/integrals/nuclear-attraction';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { transformToOrbitals } from '../../../engine/integrals/orbital-transformation';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import { dot } from '../../../engine/linear-algebra/dense';
import { buildDensity, diagonaliseFock } from '../../../engine/self-consistent-field/orbitals';
import { orthogonalise } from '../../../engine/self-consistent-field/orthogonalisation';
import { HELIUM_HYDRIDE, HYDROGEN_MOLECULE } from '../../reference-data/szabo-ostlund';
import { heliumHydride, hydrogenMolecule } from '../../support/minimal-molecules';

/*
 * The plain iteration of two two-function molecules, put together from the parts that the solver is made of and
 * followed step by step beside the book's numbers.
 */

const FUNCTIONS = 2;
const ITERATIONS = 20;

interface Step {
  /** ½ Σ P(h + F) of the density that the step starts with, hartree */
  readonly electronicEnergy: number;
  /** spin-summed, of the step's start */
  readonly density: Float64Array;
  readonly orbitalEnergies: Float64Array;
  readonly coefficients: Float64Array;
}

function followed({ basis, nuclei }: typeof hydrogenMolecule) {
  const kinetic = kineticMatrix(basis);
  const attraction = nuclearAttractionMatrix(basis, nuclei);
  const coreHamiltonian = kinetic.map((element, place) => element + attraction[place]);
  const repulsion = electronRepulsionTensor(basis);
  const { transformation } = orthogonalise(overlapMatrix(basis), FUNCTIONS);
  const steps: Step[] = [];
  let density = new Float64Array(FUNCTIONS * FUNCTIONS);
  for (let iteration = 0; iteration < ITERATIONS; iteration++) {
    const coulomb = new Float64Array(density.length);
    const exchange = new Float64Array(density.length);
    coulombExchangeInto(density, repulsion, FUNCTIONS, coulomb, exchange);
    const fock = coreHamiltonian.map((element, place) => element + coulomb[place] - exchange[place] / 2);
    const orbitals = diagonaliseFock(fock, transformation, FUNCTIONS, FUNCTIONS);
    const electronicEnergy = (dot(density, coreHamiltonian) + dot(density, fock)) / 2;
    const { coefficients, energies: orbitalEnergies } = orbitals;
    steps.push({ electronicEnergy, density, orbitalEnergies, coefficients });
    density = buildDensity(coefficients, FUNCTIONS, FUNCTIONS, 1).map((element) => 2 * element);
  }
  return { coreHamiltonian, repulsion, steps, last: steps.at(-1)! };
}

describe('H2 at 1.4 bohr', () => {
  const { coreHamiltonian, repulsion, last } = followed(hydrogenMolecule);

  it('published: core Hamiltonian', () => {
    expect(coreHamiltonian[0]).toMatchPublished(HYDROGEN_MOLECULE.coreHamiltonian11);
    expect(coreHamiltonian[1]).toMatchPublished(HYDROGEN_MOLECULE.coreHamiltonian12);
  });

  it('published: integrals over the orbitals', () => {
    const { oneElectron, twoElectron } = transformToOrbitals({
      oneElectron: coreHamiltonian,
      repulsion,
      coefficients: last.coefficients,
      orbitalCount: FUNCTIONS,
      frozen: 0,
      active: FUNCTIONS,
      nuclearRepulsion: 0,
    });
    const [first, mixed, second] = [packedPair(0, 0), packedPair(1, 0), packedPair(1, 1)];
    expect(oneElectron[0]).toMatchPublished(HYDROGEN_MOLECULE.orbitalCore11);
    expect(oneElectron[3]).toMatchPublished(HYDROGEN_MOLECULE.orbitalCore22);
    expect(twoElectron[packedPair(first, first)]).toMatchPublished(HYDROGEN_MOLECULE.coulomb11);
    expect(twoElectron[packedPair(second, first)]).toMatchPublished(HYDROGEN_MOLECULE.coulomb12);
    expect(twoElectron[packedPair(second, second)]).toMatchPublished(HYDROGEN_MOLECULE.coulomb22);
    expect(twoElectron[packedPair(mixed, mixed)]).toMatchPublished(HYDROGEN_MOLECULE.exchange12);
  });
});

describe('HeH+ at 1.4632 bohr', () => {
  const { coreHamiltonian, steps, last } = followed(heliumHydride);

  it('published: core Hamiltonian', () => {
    expect(coreHamiltonian[0]).toMatchPublished(HELIUM_HYDRIDE.coreHamiltonian11);
    expect(coreHamiltonian[1]).toMatchPublished(HELIUM_HYDRIDE.coreHamiltonian12);
    expect(coreHamiltonian[3]).toMatchPublished(HELIUM_HYDRIDE.coreHamiltonian22);
  });

  it('published: energies of the first iterations after a zero density', () => {
    expect(steps[1].electronicEnergy).toMatchPublished(HELIUM_HYDRIDE.electronicEnergyIteration1);
    expect(steps[2].electronicEnergy).toMatchPublished(HELIUM_HYDRIDE.electronicEnergyIteration2);
    expect(steps[3].electronicEnergy).toMatchPublished(HELIUM_HYDRIDE.electronicEnergyIteration3);
  });

  it('published: density and orbital energy where the book’s iteration stops', () => {
    expect(steps[4].density[0]).toMatchPublished(HELIUM_HYDRIDE.densityIteration4);
    expect(steps[5].orbitalEnergies[0].toFixed(6)).toBe(HELIUM_HYDRIDE.orbitalEnergy1.printed);
  });

  it('published: converged density and orbitals, each up to its sign', () => {
    expect(last.density[1]).toMatchPublished(HELIUM_HYDRIDE.density12);
    expect(last.density[3]).toMatchPublished(HELIUM_HYDRIDE.density22);
    const [c11, c12, c21, c22] = last.coefficients;
    expect(c11 * Math.sign(c11)).toMatchPublished(HELIUM_HYDRIDE.coefficient11);
    expect(c21 * Math.sign(c11)).toMatchPublished(HELIUM_HYDRIDE.coefficient21);
    expect(c12 * Math.sign(c22)).toMatchPublished(HELIUM_HYDRIDE.coefficient12);
    expect(c22 * Math.sign(c22)).toMatchPublished(HELIUM_HYDRIDE.coefficient22);
  });
});
