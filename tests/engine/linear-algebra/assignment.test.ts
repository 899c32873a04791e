import { expect, it } from 'vitest';
import { cheapestAssignment } from '../../../engine/linear-algebra/assignment';
import { seededRandom } from '../../support/random';

const permutations = (n: number): number[][] =>
  n === 0
    ? [[]]
    : permutations(n - 1).flatMap((shorter) =>
        Array.from({ length: n }, (_, place) => shorter.toSpliced(place, 0, n - 1)),
      );

const total = (costs: Float64Array, columnOf: ArrayLike<number>): number =>
  Array.from(columnOf).reduce((sum, column, row) => sum + costs[row * columnOf.length + column]!, 0);

it.each([1, 2, 3, 5, 7])('independent: the cheapest of all permutations of %i', (n) => {
  const random = seededRandom(20 + n);
  const all = permutations(n);
  for (let trial = 0; trial < 20; trial++) {
    const costs = Float64Array.from({ length: n * n }, () => 3 * random() - 1);
    const columnOf = cheapestAssignment(costs, n);
    expect([...columnOf].sort((a, b) => a - b)).toEqual(Array.from({ length: n }, (_, i) => i));
    const cheapest = Math.min(...all.map((permutation) => total(costs, permutation)));
    expect(total(costs, columnOf)).toBeCloseTo(cheapest, 12);
  }
});

it('identity: costs hidden in sums of row and column numbers leave the planted assignment the cheapest, at size 100', () => {
  const n = 100;
  const random = seededRandom(7);
  const rows = Float64Array.from({ length: n }, () => 10 * random());
  const columns = Float64Array.from({ length: n }, () => 10 * random());
  const planted = Array.from({ length: n }, (_, row) => (37 * row + 11) % n);
  const costs = Float64Array.from({ length: n * n }, (_, k) => {
    const row = Math.floor(k / n);
    const column = k % n;
    return rows[row]! + columns[column]! + (planted[row] === column ? 0 : 0.01 + random());
  });
  expect([...cheapestAssignment(costs, n)]).toEqual(planted);
});

it('identity: nothing to place', () => {
  expect(cheapestAssignment(new Float64Array(0), 0)).toHaveLength(0);
});
