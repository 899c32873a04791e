import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { spinAveragedDiagonal } from '../../../engine/configuration-interaction/diagonal';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { findLowestStates } from '../../../engine/configuration-interaction/lowest-states';
import {
  hamiltonianElement,
  spinSquaredElement,
} from '../../../engine/configuration-interaction/matrix-elements';
import { configurationInteractionBytes } from '../../../engine/configuration-interaction/size';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import { scratchMemory } from '../../../engine/kernels/kernel-memory';
import { davidsonVectorCount } from '../../../engine/linear-algebra/davidson';
import { plainVectors, type VectorAlgebra } from '../../../engine/linear-algebra/vector-algebra';
import { UNATTENDED } from '../../../engine/termination';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

const FULL = Number.POSITIVE_INFINITY;
const SPACE = [7, 3, 3, FULL] as const;

/** The vectors of plain TypeScript, counted. */
function counting() {
  const held = new Set<Float64Array>();
  let most = 0;
  const algebra: VectorAlgebra = {
    ...plainVectors,
    take(dimension) {
      const vector = new Float64Array(dimension).fill(Number.NaN);
      held.add(vector);
      most = Math.max(most, held.size);
      return vector;
    },
    giveBack(vector) {
      // what is given back must not be read again
      if (held.delete(vector)) vector.fill(Number.NaN);
    },
  };
  return { algebra, most: () => most };
}

/** Over 1225 determinants, with at most so many basis vectors. */
function lowestWith(states: number, basisVectors: number | undefined, coupling: number) {
  const integrals = randomOrbitalIntegrals(7, 17, { coupling });
  const space = buildDeterminantSpace(...SPACE);
  const { algebra, most } = counting();
  const found = scratchMemory().scope(() => {
    const [sector] = prepareHamiltonianProduct(space, integrals).sectors;
    return findLowestStates(
      {
        sectors: [
          {
            dimension: space.dimension,
            diagonal: spinAveragedDiagonal(space, integrals),
            apply: sector.apply,
            restoreSymmetry: sector.restoreSpinFlip,
            partsOf: sector.spinFlipParts,
            elementsAmong: (places) => {
              const determinants = Array.from(places, (place) => determinantAt(space, place));
              return {
                hamiltonian: (i, j) => hamiltonianElement(determinants[i], determinants[j], integrals),
                spinSquared: (i, j) => spinSquaredElement(determinants[i], determinants[j]),
              };
            },
          },
        ],
        distinguishing: [],
      },
      {
        states,
        residualTolerance: 1e-6,
        maximumIterations: 300,
        control: UNATTENDED,
        stage: 'test',
        algebra,
        basisVectors,
      },
    );
  });
  return { ...found, most: most() };
}

describe('findWithFewVectors', () => {
  it.each([
    [1, 2, 0.1],
    [1, 2, 0.3],
    [1, 3, 0.3],
    [3, 4, 0.1],
    [3, 6, 0.3],
  ])(
    'identity: %i states with %i basis vectors, coupling %f: the energies of a large basis, no more vectors than counted',
    (states, basisVectors, coupling) => {
      const free = lowestWith(states, undefined, coupling);
      const few = lowestWith(states, basisVectors, coupling);
      expect(few.termination).toEqual({ kind: 'converged' });
      expect(few.values).toHaveLength(states);
      few.values.forEach((value, k) => {
        expect(Math.abs(value - free.values[k])).toBeLessThan(1e-10);
      });
      const allowed = Math.max(davidsonVectorCount(basisVectors), states + davidsonVectorCount(2));
      expect(few.most).toBeLessThanOrEqual(allowed);
      expect(free.most).toBeGreaterThan(allowed);
    },
  );

  it('identity: a memory limit gives the same energies down to the least that is counted, and is refused below', () => {
    const integrals = randomOrbitalIntegrals(7, 18, { coupling: 0.15 });
    const options = { alphaElectrons: 3, betaElectrons: 3, maximumRank: FULL, states: 2 };
    const free = solveConfigurationInteraction(integrals, options);
    const useful = configurationInteractionBytes(...SPACE, 2);
    const least = configurationInteractionBytes(...SPACE, 2, false, 0);
    expect(least).toBeLessThan(useful / 1.5);
    for (const memoryLimit of [least, (least + useful) / 2]) {
      expect(configurationInteractionBytes(...SPACE, 2, false, memoryLimit)).toBeLessThanOrEqual(memoryLimit);
      const limited = solveConfigurationInteraction(integrals, { ...options, memoryLimit });
      expect(limited.termination).toEqual({ kind: 'converged' });
      limited.states.forEach(({ energy }, k) => {
        expect(Math.abs(energy - free.states[k].energy)).toBeLessThan(1e-10);
      });
    }
    expect(() => solveConfigurationInteraction(integrals, { ...options, memoryLimit: least - 1 })).toThrow(
      'determinants need about',
    );
  });
});
