import { describe, expect, it } from 'vitest';
import { correlationParts } from '../../../engine/configuration-interaction/correlation-parts';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

describe('correlationParts', () => {
  it('identity: the reference alone has no correlation', () => {
    const integrals = randomOrbitalIntegrals(4, 1);
    const space = buildDeterminantSpace(4, 2, 1, 2);
    const reference = determinantAt(space, 0);
    const vector = new Float64Array(space.dimension);
    vector[0] = 1;
    const energy = hamiltonianElement(reference, reference, integrals);
    const parts = correlationParts(prepareHamiltonianProduct(space, integrals), vector, energy, integrals);
    expect(parts.total).toBe(0);
    expect(parts.byRank.map(({ weight }) => weight)).toEqual([1, 0, 0]);
    for (const { energy: part } of parts.byRank) expect(Math.abs(part)).toBeLessThan(1e-14);
    if (parts.projected.kind === 'none') throw new Error(parts.projected.reason);
    for (const { energy: part } of [...parts.projected.singles, ...parts.projected.pairs]) {
      expect(Math.abs(part)).toBe(0);
    }
  });
});
