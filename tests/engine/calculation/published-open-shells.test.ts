import { describe, expect, it } from 'vitest';
import type { EvenTemperedShells, HartreeFockResult } from '#engine';
import {
  ATOMIC_LIMITS,
  ATOMIC_ORBITAL_ENERGIES,
  HYDROGEN_MOLECULE_LIMIT,
} from '../../reference-data/hartree-fock-limits';
import { atom, compute, hartreeFock, pairedOrbitalEnergies, study } from '../../support/studies';

const shells = (
  angularMomentum: number,
  smallest: number,
  ratio: number,
  count: number,
): EvenTemperedShells => ({
  angularMomentum,
  smallest,
  ratio,
  count,
});

/** Even-tempered sets wide enough for each atom, and how far above the limit they may stay, hartree. */
const ATOMS = {
  He: { multiplicity: 1, within: 5e-5, set: [shells(0, 0.08, 2.2, 13)] },
  Li: { multiplicity: 2, within: 5e-5, set: [shells(0, 0.02, 2.2, 17)] },
  Be: { multiplicity: 1, within: 5e-5, set: [shells(0, 0.03, 2.2, 17)] },
  N: { multiplicity: 4, within: 2e-4, set: [shells(0, 0.07, 2.3, 17), shells(1, 0.06, 2.3, 11)] },
  Ne: { multiplicity: 1, within: 3e-4, set: [shells(0, 0.12, 2.3, 17), shells(1, 0.1, 2.3, 12)] },
  Mg: { multiplicity: 1, within: 3e-4, set: [shells(0, 0.02, 2.3, 20), shells(1, 0.2, 2.3, 12)] },
} as const satisfies Record<keyof typeof ATOMIC_LIMITS, unknown>;

function solve(element: keyof typeof ATOMS): HartreeFockResult {
  const { multiplicity, set } = ATOMS[element];
  const level = multiplicity === 1 ? 'RHF' : 'ROHF';
  const basis = { name: 'even-tempered', evenTempered: { [element]: set } };
  const plain = study([atom(element)], { levels: [level], basis });
  const result = compute({ ...plain, molecule: { ...plain.molecule, multiplicity } }).levels[level];
  if (result?.kind !== 'hartreeFock' || !result.converged) throw new Error(`no ${level}`);
  return result;
}

describe('atoms near the Hartree–Fock limit', () => {
  it.each(Object.keys(ATOMS) as (keyof typeof ATOMS)[])(
    'published: %s – at most as far above the numerical energy as its set allows, and not below it',
    (element) => {
      const row = ATOMIC_LIMITS[element];
      const result = solve(element);
      expect(result.energy).toMatchPublished({
        ...row,
        tolerance: ATOMS[element].within,
        because: 'an even-tempered set of finite size lies above the limit',
      });
      // variational, up to half the print's last digit
      expect(result.energy).toBeGreaterThan(Number(row.printed) - 1e-7);
    },
  );

  it.each(Object.entries(ATOMIC_ORBITAL_ENERGIES))('published: %s – orbital energies', (element, printed) => {
    const energies = pairedOrbitalEnergies(solve(element as keyof typeof ATOMS));
    // 1s, 2s and the first of the three 2p
    for (const [i, value] of printed.entries()) {
      expect(energies[i]).toMatchPublished({
        printed: value,
        unit: 'hartree',
        source: ATOMIC_LIMITS.Ne.source,
        tolerance: 2e-4,
        because: 'an even-tempered set of finite size',
      });
    }
  });
});

describe('H2 near the Hartree–Fock limit', () => {
  it('published: 1.4 bohr, even-tempered s, p and d', () => {
    const set = [shells(0, 0.04, 2.6, 11), shells(1, 0.2, 2.6, 4), shells(2, 0.8, 2.6, 1)];
    const basis = { name: 'even-tempered', evenTempered: { H: set } };
    const { energy } = hartreeFock(compute(study([atom('H'), atom('H', 0, 0, 1.4)], { basis })));
    expect(energy).toMatchPublished({
      ...HYDROGEN_MOLECULE_LIMIT,
      tolerance: 1e-4,
      because: 'an even-tempered set of finite size lies above the limit',
    });
    expect(energy).toBeGreaterThan(Number(HYDROGEN_MOLECULE_LIMIT.printed));
  });
});
