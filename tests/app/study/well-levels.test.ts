import { describe, expect, it } from 'vitest';
import type { StudyResults, Vibration } from '#engine';
import { wellLevels } from '../../../app/study/well-levels';
import { HARTREE_IN_WAVENUMBERS } from '../../../engine/constants';
import { samplePoint, sampleResults } from '../../support/sample-results';

/** of the Morse curve that the sample results are drawn from */
const DEPTH = 0.17;
const STEEPNESS = 1.95;
const EQUILIBRIUM = 0.74;

const shares = [0.05, 0.5, 0.9];

function withLevels(results: StudyResults, first: number, last: number, step: number): StudyResults {
  const count = Math.round((last - first) / step) + 1;
  const vibration: Vibration = {
    kind: 'found',
    levels: shares.map((share, v) => ({
      v,
      energyPerCm: share * DEPTH * HARTREE_IN_WAVENUMBERS,
      rotationalConstantPerCm: 60,
      uncertaintyPerCm: 0,
    })),
    zeroPointPerCm: 0,
    boundLevels: shares.length,
    converged: true,
    beyondComputedRange: [],
    interpolationErrorPerCm: 0,
    pointsAdded: 0,
    reducedMassDalton: 0.5,
  };
  return {
    ...results,
    points: Array.from({ length: count }, (_, index) => samplePoint(first + index * step)),
    findings: { ...results.findings, FCI: { ...results.findings.FCI!, vibration } },
  };
}

describe('levels drawn in a well', () => {
  it('end at the turning points of a Morse curve', () => {
    const levels = wellLevels(withLevels(sampleResults(), 0.3, 4, 0.002), 'FCI');
    expect(levels.map(({ v }) => v)).toEqual([0, 1, 2]);
    for (const [index, share] of shares.entries()) {
      const { from, to } = levels[index]!;
      expect(from).toBeCloseTo(EQUILIBRIUM - Math.log(1 + Math.sqrt(share)) / STEEPNESS, 4);
      expect(to).toBeCloseTo(EQUILIBRIUM - Math.log(1 - Math.sqrt(share)) / STEEPNESS, 4);
    }
  });

  it('end where the scan ends before the curve reaches them', () => {
    const [, , highest] = wellLevels(withLevels(sampleResults(), 0.6, 1.2, 0.1), 'FCI');
    expect([highest!.from, highest!.to].map((end) => Number(end.toFixed(6)))).toEqual([0.6, 1.2]);
  });

  it('are none where a level has no vibration', () => {
    expect(wellLevels(sampleResults(), 'RHF')).toEqual([]);
    expect(wellLevels(sampleResults(), 'FCI')).toEqual([]);
  });
});
