import { describe, expect, it } from 'vitest';
import { kineticMatrix } from '../../../engine/integrals/kinetic';
import {
  cartesianFunctions,
  contracted,
  kineticByQuadrature,
  placedBasis,
} from '../../support/gaussian-integrals';
import { heliumHydride, hydrogenMolecule, SZABO_OSTLUND } from '../../support/minimal-molecules';

describe('kineticMatrix', () => {
  it.each([
    ['H2', hydrogenMolecule, ['0.7600', '0.2365', '0.7600']],
    ['HeH+', heliumHydride, ['2.1643', '0.1670', '0.7600']],
  ] as const)('published: %s, T11, T12, T22', (_name, molecule, values) => {
    const matrix = kineticMatrix(molecule.basis);
    [matrix[0], matrix[1], matrix[3]].forEach((value, i) => {
      expect(value).toMatchPublished({ printed: values[i], unit: 'hartree', source: SZABO_OSTLUND });
    });
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
    const matrix = kineticMatrix(basis);
    for (let i = 0; i < functions.length; i++) {
      for (let j = 0; j < functions.length; j++) {
        const expected = contracted([functions[i], functions[j]], ([a, b]) => kineticByQuadrature(a, b));
        expect(Math.abs(matrix[i * functions.length + j] - expected)).toBeLessThan(5e-13);
      }
    }
  });

  it('identity: oscillator ground states of each degree l have ⟨T⟩ = (l + 3/2) a, from 1e-3 to 1e5', () => {
    for (let l = 0; l <= 4; l++) {
      for (const a of [1e-3, 0.7, 1e5]) {
        const basis = placedBasis([{ centre: [0.4, -2, 1], l, exponents: [a] }], 'spherical');
        const matrix = kineticMatrix(basis);
        for (let i = 0; i < basis.functionCount; i++) {
          expect(matrix[i * (basis.functionCount + 1)] / ((l + 1.5) * a)).toBeCloseTo(1, 13);
        }
      }
    }
  });
});
