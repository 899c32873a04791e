import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { electronRepulsionTensor } from '../../../engine/integrals/electron-repulsion';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import type { Vector3 } from '../../../engine/molecule/molecule';
import {
  cartesianFunctions,
  contracted,
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

  it('identity: what screening leaves out is below its threshold', () => {
    const basis = placedBasis(
      [0, 4, 8, 14].flatMap((z) => [
        { centre: [0, 0, z] as Vector3, l: 0, exponents: [13, 2, 0.4] },
        { centre: [0, 0, z] as Vector3, l: 1, exponents: [2, 0.4] },
      ]),
    );
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
