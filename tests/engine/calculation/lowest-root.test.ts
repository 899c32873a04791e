import { describe, expect, it } from 'vitest';
import type { Study } from '#engine';
import { computePoint } from '#engine';
import { atom, correlated, prepare, study } from '../../support/studies';

/** N2 far beyond its equilibrium, where states of every spin lie within millihartrees and RHF has broken symmetry. */
function stretchedNitrogen(states: number) {
  const request: Study = {
    ...study([atom('N'), atom('N', 0, 0, 2.6)], {
      unit: 'angstrom',
      levels: ['CISDTQ'],
      states,
      frozenCore: true,
    }),
  };
  return correlated(computePoint(prepare(request), null).result, 'CISDTQ');
}

describe('lowest roots of a strongly mixed state', () => {
  it('identity: the lowest state is the same whether one or two are asked for', () => {
    const one = stretchedNitrogen(1);
    const two = stretchedNitrogen(2);
    expect(one.spin).toBe('singlet');
    expect(Math.abs(one.energy - two.energy)).toBeLessThan(1e-9);
  });
});
