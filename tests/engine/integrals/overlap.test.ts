import { describe, expect, it } from 'vitest';
import { overlapMatrix } from '../../../engine/integrals/overlap';
import {
  cartesianFunctions,
  contracted,
  overlapByQuadrature,
  placedBasis,
} from '../../support/gaussian-integrals';
import { heliumHydride, hydrogenMolecule, SZABO_OSTLUND } from '../../support/minimal-molecules';

describe('overlapMatrix', () => {
  it.each([
    ['H2', hydrogenMolecule, '0.6593'],
    ['HeH+', heliumHydride, '0.4508'],
  ] as const)('published: %s, S12', (_name, molecule, printed) => {
    expect(overlapMatrix(molecule.basis)[1]).toMatchPublished({ printed, source: SZABO_OSTLUND });
  });

  it('independent: s to g on different centres by Gauss–Hermite quadrature', () => {
    const basis = placedBasis([
      { centre: [0.1, -0.2, 0.3], l: 0, exponents: [0.9, 0.2], coefficients: [0.4, 0.7] },
      { centre: [0.5, 0.4, -0.6], l: 1, exponents: [0.8, 2.1], coefficients: [0.6, 0.5] },
      { centre: [-0.4, 0.7, 0.2], l: 2, exponents: [0.6] },
      { centre: [0.3, 0.1, 0.9], l: 3, exponents: [0.5] },
      { centre: [0.0, -0.5, 0.4], l: 4, exponents: [0.7] },
    ]);
    const functions = cartesianFunctions(basis);
    const matrix = overlapMatrix(basis);
    for (let i = 0; i < functions.length; i++) {
      for (let j = 0; j < functions.length; j++) {
        const expected = contracted([functions[i], functions[j]], ([a, b]) => overlapByQuadrature(a, b));
        expect(Math.abs(matrix[i * functions.length + j] - expected)).toBeLessThan(1e-13);
      }
    }
  });
});
