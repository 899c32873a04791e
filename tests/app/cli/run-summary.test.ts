import { describe, expect, it } from 'vitest';
import type { StudyResults } from '#engine';
import { cautionLines, findingsLines, unconvergedLines } from '../../../app/cli/run-summary';
import { hartreeFock, sampleResults } from '../../support/sample-results';

const results = sampleResults();

/** The sample with RHF stopped short at its first `count` points. */
function withUnconverged(count: number): StudyResults {
  const RHF = hartreeFock(-1, { converged: false, termination: { kind: 'iterationLimit', limit: 200 } });
  return {
    ...results,
    points: results.points.map((point, index) =>
      index < count ? { ...point, levels: { ...point.levels, RHF } } : point,
    ),
  };
}

describe('unconvergedLines', () => {
  it('is empty when everything converged', () => {
    expect(unconvergedLines(results)).toEqual([]);
  });

  it('says which level, where and why', () => {
    expect(unconvergedLines(withUnconverged(1))).toEqual([
      'RHF did not converge at 0.4 Å: not done after 200 iterations.',
    ]);
  });

  it('tells of a level that was left out because of another one', () => {
    const [point] = results.points;
    const failed = {
      kind: 'failed',
      converged: false,
      termination: { kind: 'orbitalsNotConverged' },
    } as const;
    const lines = unconvergedLines({
      ...results,
      points: [{ ...point!, coordinate: null, levels: { FCI: failed } }],
    });
    expect(lines).toEqual(['FCI did not converge: the orbitals that it builds on did not converge.']);
  });

  it('counts the rest of many', () => {
    const lines = unconvergedLines(withUnconverged(37));
    expect(lines).toHaveLength(13);
    expect(lines.at(-1)).toContain('25 more');
  });
});

describe('findingsLines', () => {
  it('gives the minimum of a level with its depth, or says that the lowest point is at the end', () => {
    const lines = findingsLines(results);
    expect(lines).toEqual([
      'RHF: lowest at the end of the range, 0.4 Å: no minimum inside',
      expect.stringMatching(
        /^FCI: minimum of -1\.170000 hartree at 0\.74 Å, 0\.16\d{4} hartree below the curve at 4 Å$/,
      ),
    ]);
  });

  it('has nothing to say about a single point', () => {
    const { scan: _, ...study } = results.study;
    expect(findingsLines({ ...results, study })).toEqual([]);
  });
});

describe('cautionLines', () => {
  it('writes out what concerns the whole curve and counts the points with cautions', () => {
    const lines = cautionLines({ ...results, cautions: [{ code: 'a', message: 'Too coarse.' }] });
    expect(lines).toEqual(['Caution: Too coarse.', 'Cautions at 20 of 37 points: see the results file.']);
    expect(cautionLines({ ...results, points: results.points.slice(0, 3) })).toEqual([]);
  });
});
