import { describe, expect, it } from 'vitest';
import { computePoint, type Study } from '#engine';
import { inForm } from '../../support/kernel-forms';
import { atom, prepare, study } from '../../support/studies';

/** Energies of all levels and states, with their names. */
function energiesOf(request: Study): [string, number][] {
  const { result } = computePoint(prepare(request), null);
  return Object.entries(result.levels).flatMap(([name, level]): [string, number][] => [
    ...('energy' in level ? [[name, level.energy] as [string, number]] : []),
    ...('states' in level
      ? level.states.map(({ energy }, k): [string, number] => [`${name} ${k}`, energy])
      : []),
  ]);
}

const oh = 1.81;

describe('the engine in its two forms', () => {
  it.each<[string, Study]>([
    [
      'open shell, frozen core, states: BeH in 6-31G',
      study([atom('Be'), atom('H', 0, 0, 2.54)], {
        basis: '6-31G',
        levels: ['UHF', 'ROHF', 'CISD'],
        states: 2,
        frozenCore: true,
      }),
    ],
    [
      'closed shell: H2O in 6-31G*',
      study([atom('O'), atom('H', oh, 0, 0), atom('H', -0.25 * oh, 0, 0.97 * oh)], {
        basis: '6-31G*',
        levels: ['RHF', 'MP2', 'CIS'],
      }),
    ],
  ])('independent: compiled kernels and TypeScript give the same energies, %s', (_, request) => {
    const [fast, plain] = (['fast', 'plain'] as const).map((form) => inForm(form, () => energiesOf(request)));
    expect(fast.length).toBeGreaterThan(2);
    expect(fast.map(([name]) => name)).toEqual(plain.map(([name]) => name));
    fast.forEach(([name, energy], k) => {
      expect(Math.abs(energy - plain[k][1]), name).toBeLessThan(1e-9);
    });
  });
});
