import { describe, expect, it } from 'vitest';
import type { MeasuredConstant } from '#engine';
import { comparedConstants } from '../../../app/study/compared-constants';
import { fragmentsText } from '../../../app/study/fragments-text';
import { measuredStates } from '../../../engine/curves/measured-constants';
import { withSpectroscopy } from '../../support/reports';

const constant = (
  quantity: MeasuredConstant['quantity'],
  value: number,
  unit: MeasuredConstant['unit'] = 'cm⁻¹',
): MeasuredConstant => ({ quantity, printed: String(value), value, unit, source: quantity, status: 'seen' });

function measuredOf(symbol: string, constants: readonly MeasuredConstant[]) {
  const measured = [{ state: 'X', isGroundState: true, constants }];
  return comparedConstants(withSpectroscopy(3, { measured })).find((one) => one.symbol === symbol);
}

describe('comparedConstants', () => {
  it('identity: a rotational constant of c hertz is one of 1 m⁻¹', () => {
    const compared = measuredOf('B₀', [constant('lowestRotationalConstant', 29979.2458, 'MHz')]);
    expect(compared?.measured?.value).toBeCloseTo(1, 12);
  });

  it('identity: the harmonic zero-point energy of one eV is added to D₀ in eV', () => {
    const compared = measuredOf('Dₑ', [
      constant('dissociationEnergy', 4, 'eV'),
      constant('harmonicWavenumber', 2 * 8065.543937),
      constant('anharmonicity', 0),
    ]);
    expect(compared?.measured?.value).toBeCloseTo(5, 8);
    expect(compared?.measured).toMatchObject({
      workedOutFrom: 'D₀ + ωₑ/2 − ωₑxₑ/4',
      sources: ['dissociationEnergy', 'harmonicWavenumber', 'anharmonicity'],
    });
  });

  it('published: the force constant of H2 that follows from its measured ωₑ', () => {
    const hydrogen = measuredStates({ element: 'H' }, { element: 'H' }, 0);
    const results = withSpectroscopy(3, { measured: hydrogen });
    const FCI = results.findings.FCI!;
    const diatomic = { ...FCI.constants!.diatomic!, reducedMassDalton: 1.00782503223 / 2 };
    const compared = comparedConstants({
      ...results,
      findings: { FCI: { ...FCI, constants: { ...FCI.constants!, diatomic } } },
    });
    const force = compared.find(({ symbol }) => symbol === 'k')?.measured;
    expect(force?.value).toMatchPublished({
      printed: '575',
      unit: 'N/m',
      source:
        'P. W. Atkins, J. de Paula, Physical Chemistry, table of properties of diatomic molecules, value from memory',
    });
  });

  it('says why a value that is not measured by itself cannot be worked out either', () => {
    expect(measuredOf('k', [constant('anharmonicity', 1)])?.whyNotMeasured).toContain('no ωₑ on file');
    expect(measuredOf('Dₑ', [constant('dissociationEnergy', 4, 'eV')])?.whyNotMeasured).toContain(
      'no zero-point energy on file',
    );
    expect(measuredOf('Bₑ', [constant('anharmonicity', 1)])?.whyNotMeasured).toBe('no value on file');
    expect(measuredOf('Bₑ', [])?.whyNotMeasured).toBeUndefined();
  });
});

describe('fragmentsText', () => {
  it('names the fragments with their charges', () => {
    const fragment = { multiplicity: 1, energy: 0, level: 'RHF' };
    const atoms = [
      { element: 'He', at: [0, 0, 0] },
      { element: 'H', at: [0, 0, 1] },
    ] as const;
    const fragments = [
      { ...fragment, atoms: [0], charge: 0 },
      { ...fragment, atoms: [1], charge: 1 },
    ] as const;
    expect(fragmentsText({ unit: 'bohr', atoms }, { kind: 'found', energy: 0, fragments })).toBe('He + H⁺');
  });
});
