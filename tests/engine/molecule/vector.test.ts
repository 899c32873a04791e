import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Vector3 } from '../../../engine/molecule/molecule';
import { angleBetween, cross, distance, dot, length, rotate, scale } from '../../../engine/molecule/vector';

const SEED = 20261201;
const number = fc.double({ min: -10, max: 10, noNaN: true });
const vector = fc.tuple(number, number, number);

describe('vector', () => {
  it('identity: the cross product is perpendicular, and |a×b|² + (a·b)² = |a|²|b|²', () => {
    fc.assert(
      fc.property(vector, vector, (a, b) => {
        const product = cross(a, b);
        const size = dot(a, a) * dot(b, b);
        expect(Math.abs(dot(product, a))).toBeLessThan(1e-11);
        expect(Math.abs(dot(product, product) + dot(a, b) ** 2 - size)).toBeLessThan(1e-9);
      }),
      { seed: SEED },
    );
  });

  it('identity: a quarter turn about z takes x to y', () => {
    const turned = rotate([1, 0, 0], [0, 0, 1], Math.PI / 2);
    expect(distance(turned, [0, 1, 0])).toBeLessThan(1e-15);
  });

  it('identity: turning keeps lengths and the axis, adds up and shows as the angle', () => {
    fc.assert(
      fc.property(vector, vector, number, number, (a, direction, first, second) => {
        fc.pre(length(direction) > 0.1);
        const axis: Vector3 = scale(direction, 1 / length(direction));
        const turned = rotate(a, axis, first);
        expect(Math.abs(length(turned) - length(a))).toBeLessThan(1e-12);
        expect(distance(rotate(axis, axis, first), axis)).toBeLessThan(1e-14);
        expect(distance(rotate(turned, axis, second), rotate(a, axis, first + second))).toBeLessThan(1e-12);
        const across = cross(axis, a);
        fc.pre(length(across) > 0.1 && Math.abs(first) < Math.PI);
        expect(Math.abs(angleBetween(across, rotate(across, axis, first)) - Math.abs(first))).toBeLessThan(
          1e-12,
        );
      }),
      { seed: SEED },
    );
  });
});
