import { describe, expect, it } from 'vitest';
import type { LevelFindings, StudyResults, VibrationalState } from '#engine';
import { spectroscopyTables } from '../../../app/report/spectroscopy-tables';
import { comparedConstants } from '../../../app/study/compared-constants';
import { fragmentsText } from '../../../app/study/fragments-text';
import { sampleResults } from '../../support/sample-results';

const estimate = (value: number) => ({ value, uncertainty: 1e-3 });
const levels = (count: number): VibrationalState[] =>
  Array.from({ length: count }, (_, v) => ({
    v,
    energyPerCm: 2000 * (v + 0.5),
    rotationalConstantPerCm: 60 - v,
    uncertaintyPerCm: 1e-4,
  }));

function withConstants(count: number, changes: Partial<StudyResults> = {}): StudyResults {
  const results = sampleResults(['FCI']);
  const FCI: LevelFindings = {
    ...results.findings.FCI!,
    constants: {
      equilibriumDistanceAngstrom: estimate(0.75),
      forceConstantNewtonPerMetre: estimate(555),
      diatomic: {
        masses: 'atomic',
        reducedMassDalton: 0.5,
        harmonicWavenumberPerCm: estimate(4300.5),
        anharmonicityPerCm: estimate(111),
        rotationalConstantPerCm: estimate(59),
        vibrationRotationCouplingPerCm: estimate(2.7),
        centrifugalDistortionPerCm: estimate(0.0446),
      },
    },
    vibration: {
      kind: 'found',
      levels: levels(count),
      zeroPointPerCm: 1000,
      boundLevels: count,
      converged: true,
      beyondComputedRange: [count - 1],
      interpolationErrorPerCm: 0.004,
      pointsAdded: 0,
      reducedMassDalton: 0.5,
    },
  };
  return { ...results, findings: { FCI }, ...changes };
}

const measured = [
  {
    state: 'X ¹Σg⁺',
    isGroundState: true,
    constants: [
      {
        quantity: 'harmonicWavenumber',
        printed: '4401.21',
        value: 4401.21,
        unit: 'cm⁻¹',
        source: 'A book',
        status: 'seen',
      },
      {
        quantity: 'lowestRotationalConstant',
        printed: '29979.2458',
        value: 29979.2458,
        unit: 'MHz',
        source: 'A book',
        status: 'seen',
      },
    ],
  },
] as const;

describe('spectroscopyTables', () => {
  it('sets measured values beside computed ones, with the difference and the source', () => {
    const [constants] = spectroscopyTables(withConstants(3, { measured }), '');
    const row = constants?.rows.find(([head]) => head?.startsWith('ωₑ,'));
    expect(row?.slice(1)).toEqual(['4300.50 (−100.71)', '4401.21']);
    expect(constants?.rows.find(([head]) => head?.startsWith('Bₑ'))?.at(-1)).toBe('not known');
    expect(constants?.notes.join()).toContain('A book');
  });

  it('says that nothing measured is on file, and nothing of the kind for molecules of more atoms', () => {
    const notes = (changes: Partial<StudyResults>) =>
      spectroscopyTables(withConstants(3, changes), '')[0]?.notes;
    expect(notes({ measured: [] })).toEqual(['No measured constants of this molecule are on file.']);
    expect(notes({})).toEqual([]);
  });

  it('lists ten levels and the last', () => {
    const table = (count: number) => spectroscopyTables(withConstants(count), '')[1];
    expect(table(10)?.rows).toHaveLength(10);
    expect(table(15)?.rows).toHaveLength(11);
    expect(table(15)?.rows.at(-1)).toEqual(['last', 'v = 14: 29000.00', '46.0000']);
    expect(table(15)?.notes.join()).toContain('15 bound levels');
    expect(table(15)?.notes.join()).toContain('from v = 14 on partly beyond the computed points');
  });

  it('is empty where no minimum was found', () => {
    expect(spectroscopyTables(sampleResults(['RHF']), '')).toEqual([]);
  });
});

describe('comparedConstants', () => {
  it('converts a measured value to the unit of the computed one', () => {
    const constant = comparedConstants(withConstants(3, { measured })).find(({ symbol }) => symbol === 'B₀');
    expect(constant?.measured?.value).toBeCloseTo(1, 12);
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
