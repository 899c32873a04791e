import { describe, expect, it } from 'vitest';
import { evaluateOnGrid } from '#engine';
import { gaussLegendre } from '../../support/quadrature';
import { atom, prepare, study } from '../../support/studies';

/** Gauss–Legendre points over r = reach·x², 0 < x < 1, and over the cosine of the angle with the axis. */
function halfPlane(radii: number, angles: number, reach: number) {
  const points: number[] = [];
  const weights: number[] = [];
  const radial = gaussLegendre(radii);
  const angular = gaussLegendre(angles);
  radial.nodes.forEach((x, i) => {
    const r = reach * x * x;
    const dr = 2 * reach * x * radial.weights[i]!;
    angular.nodes.forEach((node, j) => {
      const cosine = 2 * node - 1;
      // the molecule lies on z, so that one half-plane tells everything
      points.push(r * Math.sqrt(1 - cosine * cosine), 0, r * cosine);
      weights.push(2 * Math.PI * r * r * dr * 2 * angular.weights[j]!);
    });
  });
  return { points: Float64Array.from(points), weights };
}

describe('evaluateOnGrid', () => {
  it.each([
    ['LiH', [atom('Li'), atom('H', 0, 0, 3)], 1, 4],
    ['NH, triplet', [atom('N'), atom('H', 0, 0, 1.96)], 3, 8],
  ] as const)(
    'independent: the density of %s integrates to its electrons',
    (_, atoms, multiplicity, electrons) => {
      const plain = study(atoms, { basis: 'STO-3G', levels: ['UHF'] });
      const prepared = prepare({ ...plain, molecule: { ...plain.molecule, multiplicity } });
      const { points, weights } = halfPlane(160, 120, 16);
      const { density, converged } = evaluateOnGrid(prepared, null, points);
      expect(converged).toBe(true);
      // NH's π electrons are spread over x and y alike in ROHF, so that the half-plane is fair for it too
      const sum = density.reduce((total, value, k) => total + value * weights[k]!, 0);
      expect(Math.abs(sum - electrons)).toBeLessThan(1e-5);
    },
  );
});
