import { describe, expect, it } from 'vitest';
import { levelWithLines } from '../../../../app/renderer/charts/level-lines';
import { sampleResults } from '../../../support/sample-results';

const results = sampleResults();
const vibration = { kind: 'none', reason: 'not asked for' } as const;
const vibrating = {
  kind: 'found',
  levels: [{ v: 0, energyPerCm: 2000, rotationalConstantPerCm: 60, uncertaintyPerCm: 0 }],
  zeroPointPerCm: 2000,
  boundLevels: 1,
  converged: true,
  beyondComputedRange: [],
  interpolationErrorPerCm: 0,
  pointsAdded: 0,
  reducedMassDalton: 0.5,
} as const;
const { FCI } = results.findings;
const levelsOf = {
  ...results,
  findings: { RHF: { ...FCI!, vibration: vibrating }, FCI: { ...FCI!, vibration: vibrating } },
};

describe('the level whose vibrational levels are drawn', () => {
  it('is the most complete one that is shown and has them', () => {
    expect(levelWithLines({ levelsOf, hiddenLevels: [] })).toBe('FCI');
    expect(levelWithLines({ levelsOf, hiddenLevels: ['FCI'] })).toBe('RHF');
  });

  it('is none without levels, or before the curve is finished', () => {
    const without = { ...results, findings: { FCI: { ...FCI!, vibration } } };
    expect(levelWithLines({ levelsOf: without, hiddenLevels: [] })).toBeUndefined();
    expect(levelWithLines({ levelsOf: undefined, hiddenLevels: [] })).toBeUndefined();
  });
});
