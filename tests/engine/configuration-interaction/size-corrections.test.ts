import { describe, expect, it } from 'vitest';
import { sizeCorrections } from '../../../engine/configuration-interaction/size-corrections';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import { minimalHydrogens, TEXTBOOK_HYDROGEN } from '../../support/model-hamiltonians';

function separateHydrogens(molecules: number) {
  const { h11, J11 } = TEXTBOOK_HYDROGEN;
  const [state] = solveConfigurationInteraction(minimalHydrogens(molecules), {
    alphaElectrons: molecules,
    betaElectrons: molecules,
    maximumRank: 2,
    states: 1,
    residualTolerance: 1e-9,
  }).states;
  const reference = molecules * (2 * h11 + J11);
  const corrections = sizeCorrections({
    energy: state.energy,
    correlation: state.energy - reference,
    referenceWeight: state.referenceWeight,
    electrons: 2 * molecules,
  });
  return { energy: state.energy, reference, weight: state.referenceWeight, corrections };
}

describe('sizeCorrections: hydrogen molecules that know nothing of each other', () => {
  const one = separateHydrogens(1);

  it('identity: Pople’s, Meissner’s and Duch’s vanish for two electrons', () => {
    for (const kind of ['pople', 'meissner', 'duchDiercksen'] as const) {
      expect(Math.abs(one.corrections[kind]! - one.energy)).toBeLessThan(1e-13);
    }
  });

  it.each([2, 3, 5])('identity: Pople’s makes CISD of %i of them exactly additive', (molecules) => {
    const { corrections } = separateHydrogens(molecules);
    expect(Math.abs(corrections.pople! - molecules * one.energy)).toBeLessThan(1e-10);
  });

  it.each([2, 3, 5])(
    'identity: every variant brings CISD of %i of them nearer to additivity',
    (molecules) => {
      const { energy, corrections } = separateHydrogens(molecules);
      const exact = molecules * one.energy;
      for (const [kind, corrected] of Object.entries(corrections)) {
        if (molecules === 2 && kind !== 'pople') continue; // one pair of pairs: the simplest forms overshoot
        expect(Math.abs(corrected - exact), kind).toBeLessThan(Math.abs(energy - exact));
      }
    },
  );

  it.each([
    [1, '-0.020823'],
    [3, '-0.062326'],
    [5, '-0.103474'],
  ])('published: Davidson-corrected correlation energy of %i of them', (molecules, printed) => {
    const { reference, corrections } = separateHydrogens(molecules);
    expect(corrections.davidson - reference).toMatchPublished({
      printed,
      unit: 'hartree',
      source:
        'closed form of A. Szabo, N. S. Ostlund, Modern Quantum Chemistry, sec. 4.6, with the integrals of sec. 3.5.2; ' +
        'value from memory',
      tolerance: molecules * 2e-4,
      because: 'the book prints the integrals to four decimals',
    });
  });

  it('identity: forms that a small reference weight makes senseless are left out', () => {
    const weak = sizeCorrections({ energy: -1, correlation: -0.2, referenceWeight: 0.4, electrons: 8 });
    expect(weak).not.toHaveProperty('davidsonSilver');
    expect(weak).not.toHaveProperty('pople');
    expect(weak).not.toHaveProperty('duchDiercksen');
    expect(weak.davidson).toBeCloseTo(-1.12, 12);
  });
});
