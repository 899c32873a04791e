import { describe, expect, it } from 'vitest';
import { correlationLimit, hartreeFockLimit } from '../../../engine/curves/basis-extrapolation';

const family = (f: (cardinal: number) => number, ...cardinals: number[]) =>
  cardinals.map((cardinal) => ({ cardinal, energy: f(cardinal) }));

describe('hartreeFockLimit', () => {
  it('identity: three exponential energies give their limit for any decay to the fitted variant', () => {
    for (const decay of [0.8, 1.4, 2.3]) {
      const found = hartreeFockLimit(family((x) => -1.1336 + 0.3 * Math.exp(-decay * x), 2, 3, 4));
      const fitted = found?.variants.find(({ formula }) => formula === 'exponentialThreePoint');
      expect(fitted?.energy).toBeCloseTo(-1.1336, 12);
    }
  });

  it('identity: two energies give the limit of each form with its fixed decay', () => {
    const plain = hartreeFockLimit(family((x) => -76.0675 + 2 * Math.exp(-1.63 * x), 3, 4));
    expect(plain?.variants[0]).toMatchObject({ formula: 'exponential', cardinals: [3, 4] });
    expect(plain?.energy).toBeCloseTo(-76.0675, 11);
    const root = hartreeFockLimit(
      family((x) => -76.0675 + 500 * (x + 1) * Math.exp(-9 * Math.sqrt(x)), 3, 4),
    );
    expect(root?.variants[1].formula).toBe('exponentialRoot');
    expect(root?.variants[1].energy).toBeCloseTo(-76.0675, 11);
  });

  it('identity: the uncertainty covers every variant and is never nothing', () => {
    const found = hartreeFockLimit(family((x) => -1 + 0.3 * Math.exp(-1.2 * x), 4, 2, 3));
    if (!found) throw new Error('no limit');
    const energies = found.variants.map(({ energy }) => energy);
    expect(2 * found.uncertainty).toBeGreaterThanOrEqual(Math.max(...energies) - Math.min(...energies));
    expect(found.uncertainty).toBeGreaterThan(0);
  });

  it('identity: energies whose steps do not shrink, or with a gap, fall back on two points', () => {
    for (const members of [family((x) => -x, 2, 3, 4), family((x) => -1 + Math.exp(-x), 2, 3, 5)])
      expect(hartreeFockLimit(members)?.variants.map(({ formula }) => formula)).toEqual([
        'exponential',
        'exponentialRoot',
      ]);
  });

  it('identity: one basis, or the same one twice, has no limit', () => {
    expect(hartreeFockLimit(family(() => -1, 3))).toBeUndefined();
    expect(hartreeFockLimit(family(() => -1, 3, 3))).toBeUndefined();
  });
});

describe('correlationLimit', () => {
  it('identity: inverse cubes give their limit, from two and from three sets', () => {
    const f = (x: number) => -0.3 + 0.9 * x ** -3;
    for (const cardinals of [
      [2, 3],
      [3, 5],
      [4, 3, 2],
    ])
      expect(correlationLimit(family(f, ...cardinals))?.energy).toBeCloseTo(-0.3, 12);
  });

  it('identity: (X + ½)⁻⁴ energies are met by that variant, and lie within the uncertainty', () => {
    const found = correlationLimit(family((x) => -0.3 + 0.9 * (x + 0.5) ** -4, 3, 4));
    if (!found) throw new Error('no limit');
    expect(found.variants[1].energy).toBeCloseTo(-0.3, 12);
    expect(Math.abs(found.energy - -0.3)).toBeLessThanOrEqual(2 * found.uncertainty);
  });

  it('identity: one basis has no limit', () => {
    expect(correlationLimit(family(() => -1, 3))).toBeUndefined();
  });
});
