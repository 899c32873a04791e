import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { PlacedBasis } from '../../../engine/basis/contracted-gaussian';
import { findBasisSet, listBasisSets } from '../../../engine/basis/library-index';
import { placeBasis } from '../../../engine/basis/place-basis';
import { electronRepulsionTensor } from '../../../engine/integrals/electron-repulsion';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import type { Vector3 } from '../../../engine/molecule/molecule';
import {
  cartesianFunctions,
  contracted,
  onSeparateAtoms,
  placedBasis,
  repulsionByQuadrature,
  type ShellSketch,
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

  it('identity: contraction is linear — contracted shells equal the sum over their primitives as shells of their own', () => {
    const centres: Vector3[] = [
      [0, 0, 0],
      [0.7, -0.4, 1.1],
    ];
    const exponents = [30, 6, 1.7, 0.6, 0.15];
    const contractions = [
      { centre: centres[0], l: 0, terms: [0, 1, 2, 3, 4] },
      { centre: centres[0], l: 1, terms: [1, 2, 3] },
      { centre: centres[1], l: 1, terms: [0, 2, 4] },
      { centre: centres[1], l: 2, terms: [2, 3] },
    ];
    const whole = placedBasis(
      contractions.map(({ centre, l, terms }) => ({ centre, l, exponents: terms.map((t) => exponents[t]) })),
      'spherical',
    );
    const parts = placedBasis(
      contractions.flatMap(({ centre, l, terms }) =>
        terms.map((t) => ({ centre, l, exponents: [exponents[t]] })),
      ),
      'spherical',
    );
    // weight of each primitive function in its contracted function
    let shell = 0;
    const members = whole.shells.flatMap((contracted) => {
      const primitives = parts.shells.slice(shell, shell + contracted.exponents.length);
      shell += primitives.length;
      return Array.from({ length: contracted.functionCount }, (_, i) =>
        primitives.map((primitive, n) => ({
          function: primitive.firstFunction + i,
          weight: contracted.coefficients[n] / primitive.coefficients[0],
        })),
      );
    });
    const contractedTensor = electronRepulsionTensor(whole);
    const primitiveTensor = electronRepulsionTensor(parts);
    for (let sample = 0; sample < 150; sample++) {
      const [i, j, k, l] = [3, 5, 7, 11].map((step) => (sample * step + (sample >> 2)) % whole.functionCount);
      let expected = 0;
      for (const a of members[i])
        for (const b of members[j])
          for (const c of members[k])
            for (const d of members[l]) {
              const value = primitiveTensor[place(a.function, b.function, c.function, d.function)];
              expected += a.weight * b.weight * c.weight * d.weight * value;
            }
      expect(Math.abs(contractedTensor[place(i, j, k, l)] - expected)).toBeLessThan(1e-13);
    }
  });

  it('identity: shells that share exponents, computed together, are as each by itself', () => {
    const coefficient = fc.double({ min: -1, max: 1, noNaN: true });
    const block = fc.record({
      atom: fc.nat(1),
      exponents: fc.array(fc.double({ min: 0.1, max: 40, noNaN: true }), { minLength: 1, maxLength: 3 }),
      momenta: fc.array(fc.nat(2), { minLength: 1, maxLength: 4 }),
    });
    const problem = fc.record({
      blocks: fc.array(block, { minLength: 1, maxLength: 3 }),
      coefficients: fc.array(coefficient, { minLength: 36, maxLength: 36 }),
      distance: fc.double({ min: 0.1, max: 4, noNaN: true }),
      harmonics: fc.constantFrom('spherical' as const, 'cartesian' as const),
    });
    fc.assert(
      fc.property(problem, ({ blocks, coefficients, distance, harmonics }) => {
        let used = 0;
        const sketches = blocks.flatMap(({ atom, exponents, momenta }) =>
          momenta.map((l) => {
            used += exponents.length;
            return {
              centre: [0, 0.3 * atom * distance, atom * distance] as Vector3,
              l,
              exponents,
              coefficients: coefficients.slice(used - exponents.length, used),
              keepNorm: true,
            };
          }),
        );
        const separate = placedBasis(sketches, harmonics);
        const atoms = blocks.flatMap(({ atom, momenta }) => momenta.map(() => atom));
        const shells = separate.shells.map((shell, i) => ({ ...shell, atom: atoms[i] }));
        expectEqualRepulsion({ ...separate, shells }, separate);
      }),
      { seed: 5, numRuns: 60 },
    );
  });

  it.each(listBasisSets().map(({ name }) => name))(
    'identity: shells together as each by itself, HF and HCl in %s',
    (name) => {
      for (const [heavy, distance] of [
        ['F', 1.73],
        ['Cl', 2.41],
      ] as const) {
        const entry = listBasisSets().find((set) => set.name === name)!;
        if (!entry.elements.includes(heavy)) continue;
        const basis = placeBasis(findBasisSet(name, ['H', heavy]), {
          atoms: [
            { symbol: heavy, position: [0, 0, 0] },
            { symbol: 'H', position: [0, 0, distance] },
          ],
        });
        expectEqualRepulsion(basis, onSeparateAtoms(basis));
      }
    },
  );

  it('identity: the order of the shells does not matter (eightfold symmetry)', () => {
    const sketches = [
      { centre: [0.1, -0.2, 0.3] as Vector3, l: 1, exponents: [0.9, 0.2] },
      { centre: [0.5, 0.4, -0.6] as Vector3, l: 0, exponents: [0.8, 3] },
      { centre: [0.5, 0.4, -0.6] as Vector3, l: 1, exponents: [0.7] },
      { centre: [-0.4, 0.7, 0.2] as Vector3, l: 2, exponents: [0.6] },
    ];
    const forward = placedBasis(sketches);
    const backward = placedBasis([...sketches].reverse());
    const moved = forward.shells.flatMap((shell, s) =>
      Array.from(
        { length: shell.functionCount },
        (_, i) => backward.shells[sketches.length - 1 - s].firstFunction + i,
      ),
    );
    const one = electronRepulsionTensor(forward);
    const other = electronRepulsionTensor(backward);
    const n = forward.functionCount;
    for (let i = 0; i < n; i++)
      for (let j = 0; j <= i; j++)
        for (let k = 0; k < n; k++)
          for (let l = 0; l <= k; l++) {
            const difference = one[place(i, j, k, l)] - other[place(moved[i], moved[j], moved[k], moved[l])];
            expect(Math.abs(difference)).toBeLessThan(1e-14);
          }
  });

  it('identity: turning and shifting the molecule leaves Σ (ab|cd)² over each quartet of shells as it is', () => {
    const sketches = [
      { centre: [0, 0, 0] as Vector3, l: 1, exponents: [0.9, 0.2] },
      { centre: [0, 0, 1.3] as Vector3, l: 2, exponents: [0.8] },
      { centre: [1.1, 0, 0.4] as Vector3, l: 1, exponents: [0.7] },
    ];
    const reference = shellQuartetNorms(sketches);
    const unit = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.tuple(unit, unit, unit, unit), fc.tuple(unit, unit, unit), ([w, x, y, z], shift) => {
        fc.pre(w * w + x * x + y * y + z * z > 0.1);
        const turned = sketches.map((sketch) => ({
          ...sketch,
          centre: rotated(sketch.centre, w, x, y, z).map(
            (v, axis) => v + 5 * shift[axis],
          ) as unknown as Vector3,
        }));
        shellQuartetNorms(turned).forEach((norm, i) => {
          expect(Math.abs(norm - reference[i])).toBeLessThan(1e-12);
        });
      }),
      { seed: 3, numRuns: 20 },
    );
  });

  it('identity: (ab|cd)² ≤ (ab|ab)(cd|cd)', () => {
    const basis = placedBasis([
      { centre: [0, 0, 0], l: 0, exponents: [20, 3, 0.5] },
      { centre: [0, 0, 0], l: 1, exponents: [3, 0.5] },
      { centre: [0.2, 1.9, -0.4], l: 1, exponents: [1.2, 0.3] },
      { centre: [2.5, 0.1, 3.0], l: 2, exponents: [0.7] },
    ]);
    const tensor = electronRepulsionTensor(basis);
    const pairs = (basis.functionCount * (basis.functionCount + 1)) / 2;
    for (let p = 0; p < pairs; p++) {
      for (let q = 0; q <= p; q++) {
        const bound = tensor[packedPair(p, p)] * tensor[packedPair(q, q)];
        expect(tensor[packedPair(p, q)] ** 2).toBeLessThanOrEqual(bound * (1 + 1e-12) + 1e-26);
      }
    }
  });

  it.each([
    [1e5, 1e5],
    [1e5, 1e-3],
    [1e-3, 1e-3],
  ])('identity: concentric s functions, exponents %f and %f: (aa|bb) = 2 √(pq/π(p + q))', (a, b) => {
    const centre: Vector3 = [3, -2, 1];
    const basis = placedBasis([
      { centre, l: 0, exponents: [a] },
      { centre, l: 0, exponents: [b] },
    ]);
    const expected = 2 * Math.sqrt((2 * a * 2 * b) / (Math.PI * (2 * a + 2 * b)));
    expect(electronRepulsionTensor(basis)[place(0, 0, 1, 1)] / expected).toBeCloseTo(1, 13);
  });

  it('identity: 100 bohr apart, a p function acts as charge and quadrupole, (zz|ss) = 1/R + 1/(2aR³)', () => {
    const distance = 100;
    for (const a of [0.05, 1, 1e5]) {
      const basis = placedBasis([
        { centre: [0, 0, 0], l: 1, exponents: [a] },
        { centre: [0, 0, distance], l: 0, exponents: [1e5, 30, 0.1] },
      ]);
      const tensor = electronRepulsionTensor(basis);
      const along = 1 / distance + 1 / (2 * a * distance ** 3);
      const across = 1 / distance - 1 / (4 * a * distance ** 3);
      expect(Math.abs(tensor[place(2, 2, 3, 3)] - along)).toBeLessThan(1e-15);
      expect(Math.abs(tensor[place(0, 0, 3, 3)] - across)).toBeLessThan(1e-15);
      expect(Math.abs(tensor[place(2, 3, 2, 3)])).toBeLessThan(1e-15);
    }
  });

  it('independent: centres 0.05 bohr apart, very tight with very diffuse functions', () => {
    const basis = placedBasis([
      { centre: [0, 0, 0], l: 1, exponents: [900] },
      { centre: [0.03, 0, 0.04], l: 1, exponents: [400] },
      { centre: [0, 0, 0], l: 2, exponents: [1e-3] },
      { centre: [0.03, 0, 0.04], l: 1, exponents: [0.02] },
    ]);
    const functions = cartesianFunctions(basis);
    const tensor = electronRepulsionTensor(basis, { schwarzThreshold: 0 });
    for (let sample = 0; sample < 150; sample++) {
      const [i, j, k, l] = [7, 11, 13, 4].map(
        (step) => (sample * step + (sample >> 3)) % basis.functionCount,
      );
      const chosen = [functions[i], functions[j], functions[k], functions[l]];
      const expected = contracted(chosen, repulsionByQuadrature);
      expect(Math.abs(tensor[place(i, j, k, l)] - expected)).toBeLessThan(1e-12);
    }
  });

  it.each([
    ['shells by themselves', [2, 0.4]],
    ['s and p shells with shared exponents', [13, 2, 0.4]],
  ])('identity: what screening leaves out is below its threshold: %s', (_title, exponents) => {
    const separate = placedBasis(
      [0, 4, 8, 14].flatMap((z) => [
        { centre: [0, 0, z] as Vector3, l: 0, exponents: [13, 2, 0.4] },
        { centre: [0, 0, z] as Vector3, l: 1, exponents },
      ]),
    );
    const shells = separate.shells.map((shell, i) => ({ ...shell, atom: Math.floor(i / 2) }));
    const basis = { ...separate, shells };
    const all = electronRepulsionTensor(basis, { schwarzThreshold: 0 });
    const screened = electronRepulsionTensor(basis, { schwarzThreshold: 1e-8 });
    const standard = electronRepulsionTensor(basis);
    let skipped = 0;
    all.forEach((value, i) => {
      if (screened[i] === 0 && value !== 0) skipped++;
      expect(Math.abs(screened[i] - value)).toBeLessThan(1e-8);
      expect(Math.abs(standard[i] - value)).toBeLessThan(1e-13);
    });
    expect(skipped).toBeGreaterThan(100);
  });
});

/** To 1e-13 of the larger of the largest integral and 1 hartree, with nothing screened. */
function expectEqualRepulsion(one: PlacedBasis, other: PlacedBasis): void {
  const values = electronRepulsionTensor(one, { schwarzThreshold: 0 });
  const expected = electronRepulsionTensor(other, { schwarzThreshold: 0 });
  let largest = 1;
  let difference = 0;
  values.forEach((value, i) => {
    largest = Math.max(largest, Math.abs(expected[i]));
    difference = Math.max(difference, Math.abs(value - expected[i]));
  });
  expect(difference / largest).toBeLessThan(1e-13);
}

/** Σ (ab|cd)² over the functions of four shells, for all quartets: the same for any choice of axes. */
function shellQuartetNorms(sketches: readonly ShellSketch[]): number[] {
  const basis = placedBasis(sketches, 'spherical');
  const tensor = electronRepulsionTensor(basis);
  const functionsOf = basis.shells.map((shell) =>
    Array.from({ length: shell.functionCount }, (_, i) => shell.firstFunction + i),
  );
  const norms: number[] = [];
  for (const a of functionsOf)
    for (const b of functionsOf)
      for (const c of functionsOf)
        for (const d of functionsOf) {
          let sum = 0;
          for (const i of a)
            for (const j of b) for (const k of c) for (const l of d) sum += tensor[place(i, j, k, l)] ** 2;
          norms.push(sum);
        }
  return norms;
}

/** Rotation by the quaternion w + xi + yj + zk, not normalised. */
function rotated([a, b, c]: Vector3, w: number, x: number, y: number, z: number): number[] {
  const s = 2 / (w * w + x * x + y * y + z * z);
  return [
    (1 - s * (y * y + z * z)) * a + s * (x * y - z * w) * b + s * (x * z + y * w) * c,
    s * (x * y + z * w) * a + (1 - s * (x * x + z * z)) * b + s * (y * z - x * w) * c,
    s * (x * z - y * w) * a + s * (y * z + x * w) * b + (1 - s * (x * x + y * y)) * c,
  ];
}
