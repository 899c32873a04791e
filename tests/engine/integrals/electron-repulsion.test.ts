import { describe, expect, it } from 'vitest';
import { electronRepulsionTensor } from '../../../engine/integrals/electron-repulsion';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import {
  cartesianFunctions,
  contracted,
  placedBasis,
  repulsionByQuadrature,
} from '../../support/gaussian-integrals';
import { heliumHydride, hydrogenMolecule, SZABO_OSTLUND } from '../../support/minimal-molecules';

const place = (i: number, j: number, k: number, l: number) => packedPair(packedPair(i, j), packedPair(k, l));

describe('electronRepulsionTensor', () => {
  it.each([
    [
      'H2',
      hydrogenMolecule,
      [
        ['0 0 0 0', '0.7746'],
        ['0 0 1 1', '0.5697'],
        ['1 0 0 0', '0.4441'],
        ['1 0 1 0', '0.2970'],
      ],
    ],
    [
      'HeH+',
      heliumHydride,
      [
        ['0 0 0 0', '1.3072'],
        ['1 1 1 1', '0.7746'],
        ['1 1 0 0', '0.6057'],
        ['1 0 0 0', '0.4373'],
        ['1 1 1 0', '0.3118'],
        ['1 0 1 0', '0.1773'],
      ],
    ],
  ] as const)('published: %s', (_name, molecule, values) => {
    const tensor = electronRepulsionTensor(molecule.basis);
    for (const [indices, printed] of values) {
      const [i, j, k, l] = indices.split(' ').map(Number);
      expect(tensor[place(i, j, k, l)]).toMatchPublished({ printed, unit: 'hartree', source: SZABO_OSTLUND });
    }
  });

  it('independent: s, p, d, f, g on different centres, through 1/r₁₂ = 2/√π ∫ exp(−u²r₁₂²) du', () => {
    const basis = placedBasis([
      { centre: [0.1, -0.2, 0.3], l: 0, exponents: [0.9, 0.2], coefficients: [0.4, 0.7] },
      { centre: [0.5, 0.4, -0.6], l: 1, exponents: [0.8] },
      { centre: [-0.4, 0.7, 0.2], l: 2, exponents: [0.6] },
      { centre: [0.3, 0.1, 0.9], l: 3, exponents: [0.5] },
      { centre: [0.0, -0.5, 0.4], l: 4, exponents: [0.7] },
    ]);
    const functions = cartesianFunctions(basis);
    const tensor = electronRepulsionTensor(basis);
    const count = basis.functionCount;
    for (let sample = 0; sample < 200; sample++) {
      // a fixed walk through the index quadruples that meets all shells
      const [i, j, k, l] = [7, 11, 13, 17].map((step) => (sample * step + (sample >> 3)) % count);
      const expected = contracted(
        [functions[i], functions[j], functions[k], functions[l]],
        repulsionByQuadrature,
      );
      expect(Math.abs(tensor[place(i, j, k, l)] - expected)).toBeLessThan(2e-13);
    }
  });
});
