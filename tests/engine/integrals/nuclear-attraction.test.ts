import { describe, expect, it } from 'vitest';
import { nuclearAttractionMatrix } from '../../../engine/integrals/nuclear-attraction';
import {
  attractionByQuadrature,
  cartesianFunctions,
  contracted,
  placedBasis,
} from '../../support/gaussian-integrals';
import { heliumHydride, hydrogenMolecule, SZABO_OSTLUND } from '../../support/minimal-molecules';

describe('nuclearAttractionMatrix', () => {
  it('independent: s to g on different centres, two nuclei, through 1/r = 2/√π ∫ exp(−u²r²) du', () => {
    const basis = placedBasis([
      { centre: [0.1, -0.2, 0.3], l: 0, exponents: [0.9, 0.2], coefficients: [0.4, 0.7] },
      { centre: [0.5, 0.4, -0.6], l: 1, exponents: [0.8, 2.1], coefficients: [0.6, 0.5] },
      { centre: [-0.4, 0.7, 0.2], l: 2, exponents: [0.6] },
      { centre: [0.3, 0.1, 0.9], l: 3, exponents: [0.5] },
      { centre: [0.0, -0.5, 0.4], l: 4, exponents: [0.7] },
    ]);
    const nuclei = [
      { charge: 3, position: [0.1, -0.2, 0.3] as const },
      { charge: 1.5, position: [0.9, 0.2, -0.4] as const },
    ];
    const functions = cartesianFunctions(basis);
    const matrix = nuclearAttractionMatrix(basis, nuclei);
    for (let i = 0; i < functions.length; i++) {
      for (let j = 0; j <= i; j++) {
        const expected = contracted([functions[i], functions[j]], ([a, b]) =>
          nuclei.reduce((sum, n) => sum - n.charge * attractionByQuadrature(a, b, n.position), 0),
        );
        expect(Math.abs(matrix[i * functions.length + j] - expected)).toBeLessThan(2e-12);
      }
    }
  });

  it('identity: shells that share exponents, computed together, are as each by itself', () => {
    const rows = [0, 0, 1, 2].map((l, i) => ({
      l,
      exponents: [9, 1.3, 0.4],
      coefficients: [0.2, i - 2, 0.7],
    }));
    const separate = placedBasis([
      ...rows.map((row) => ({ ...row, centre: [0, 0, 0] as const })),
      ...rows.map((row) => ({ ...row, centre: [0.4, -0.5, 1.1] as const })),
      ...[0, 1, 2].map((l) => ({ l, exponents: [0.6], centre: [0.4, -0.5, 1.1] as const })),
    ]);
    const [here, there] = [separate.shells.slice(0, 4), separate.shells.slice(4)];
    const shells = [here, there].flatMap((ofAtom, atom) => ofAtom.map((shell) => ({ ...shell, atom })));
    const nuclei = [
      { charge: 3, position: [0, 0, 0] as const },
      { charge: 1, position: [0.4, -0.5, 1.1] as const },
    ];
    const expected = nuclearAttractionMatrix(separate, nuclei);
    nuclearAttractionMatrix({ ...separate, shells }, nuclei).forEach((value, i) => {
      expect(Math.abs(value - expected[i])).toBeLessThan(1e-13);
    });
  });

  it.each([
    [
      'H2',
      hydrogenMolecule,
      0,
      [
        ['0 0', '-1.2266'],
        ['0 1', '-0.5974'],
        ['1 1', '-0.6538'],
      ],
    ],
    [
      'HeH+, attraction to He',
      heliumHydride,
      0,
      [
        ['0 0', '-4.1398'],
        ['0 1', '-1.1029'],
        ['1 1', '-1.2652'],
      ],
    ],
    [
      'HeH+, attraction to H',
      heliumHydride,
      1,
      [
        ['0 0', '-0.6772'],
        ['0 1', '-0.4113'],
        ['1 1', '-1.2266'],
      ],
    ],
  ] as const)('published: %s', (_name, molecule, nucleus, values) => {
    const matrix = nuclearAttractionMatrix(molecule.basis, [molecule.nuclei[nucleus]]);
    for (const [place, printed] of values) {
      const [i, j] = place.split(' ').map(Number);
      expect(matrix[i * 2 + j]).toMatchPublished({ printed, unit: 'hartree', source: SZABO_OSTLUND });
    }
  });

  it('identity: an s function on the nucleus has V = −2Z √(2a/π), from 1e-3 to 1e5', () => {
    const centre = [0.4, -2, 1] as const;
    for (const a of [1e-3, 0.7, 1e5]) {
      const basis = placedBasis([{ centre, l: 0, exponents: [a] }]);
      const [value] = nuclearAttractionMatrix(basis, [{ charge: 3, position: centre }]);
      expect(value / (-6 * Math.sqrt((2 * a) / Math.PI))).toBeCloseTo(1, 13);
    }
  });

  it('identity: from 100 bohr away a p function is a charge and a quadrupole, −V = 1/R + 1/(2aR³) along its axis', () => {
    const a = 0.8;
    const basis = placedBasis([{ centre: [0, 0, 0], l: 1, exponents: [a] }]);
    const matrix = nuclearAttractionMatrix(basis, [{ charge: 1, position: [0, 0, 100] }]);
    expect(Math.abs(matrix[8] + 1 / 100 + 1 / (2 * a * 1e6))).toBeLessThan(1e-15);
    expect(Math.abs(matrix[0] + 1 / 100 - 1 / (4 * a * 1e6))).toBeLessThan(1e-15);
  });

  it('identity: a ghost attracts nothing', () => {
    const ghost = { charge: 0, position: [0, 0, 0] as const };
    expect([...nuclearAttractionMatrix(hydrogenMolecule.basis, [ghost])]).toEqual([0, 0, 0, 0]);
  });
});
