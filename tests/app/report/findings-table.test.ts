import { describe, expect, it } from 'vitest';
import type { LevelFindings } from '#engine';
import { findingsRows } from '../../../app/report/findings-table';
import { sampleResults } from '../../support/sample-results';

const minimaOf = (findings: ReturnType<typeof sampleResults>['findings'], levels = ['FCI']) => {
  const results = sampleResults();
  return findingsRows({ ...results, study: { ...results.study, levels }, findings }, '', 'Å').map(
    ({ minimum }) => minimum,
  );
};
const found = (uncertainty: number) =>
  ({
    FCI: { minimum: { kind: 'found', equilibriumDistance: 0.741234567, energy: -1.17, uncertainty } },
  }) as const;

describe('findingsRows', () => {
  it('prints as many digits of a distance as its uncertainty covers', () => {
    expect(minimaOf(found(1e-4))).toEqual(['0.7412 Å']);
    expect(minimaOf(found(2e-6))).toEqual(['0.741235 Å']);
    expect(minimaOf(found(0))).toEqual(['0.741235 Å']);
    expect(minimaOf(found(0.3))).toEqual(['0.74 Å']);
  });

  it('says in words where there is no single minimum', () => {
    expect(minimaOf({ FCI: { minimum: { kind: 'several', near: [0.7, 2.1] } } })).toEqual([
      'several, near 0.7 Å, 2.1 Å',
    ]);
    expect(minimaOf({ FCI: { minimum: { kind: 'none', reason: 'too few points' } } })).toEqual([
      'none: too few points',
    ]);
    expect(minimaOf({ FCI: { minimum: { kind: 'atEdge', coordinate: 4 } } })).toEqual([
      'lowest at the edge of the range, 4 Å',
    ]);
  });

  it('gives the onset of an instability with the digits that it is sure of', () => {
    const onsets = (instabilityOnset?: LevelFindings['instabilityOnset']) => {
      const results = sampleResults();
      const RHF = { ...results.findings.RHF!, ...(instabilityOnset && { instabilityOnset }) };
      return findingsRows({ ...results, findings: { RHF } }, '', 'Å').map(({ onset }) => onset);
    };
    expect(onsets({ kind: 'found', coordinate: 1.20348, uncertainty: 3e-4 })).toEqual(['1.2035 Å']);
    expect(onsets({ kind: 'none', reason: 'RHF is stable at every point.' })).toEqual(['']);
    expect(onsets()).toEqual(['']);
  });

  it('names the far end that a depth is against', () => {
    const row = findingsRows(sampleResults(), '', 'Å').find(({ level }) => level === 'FCI');
    expect(row?.depth).toMatch(/^0\.16\d{4} \(at 4 Å\)$/);
  });
});
