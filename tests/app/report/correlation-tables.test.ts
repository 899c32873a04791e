import { describe, expect, it } from 'vitest';
import type { CorrelatedResult, StudyResults } from '#engine';
import { correlationTables } from '../../../app/report/correlation-tables';
import { Citations } from '../../../app/report/references';
import { sharedCoordinate } from '../../../app/report/scanned-coordinate';
import { sampleResults } from '../../support/sample-results';

const tablesOf = (results: StudyResults) =>
  correlationTables({ name: '', results }, sharedCoordinate([results], ['']), new Citations());

/** Full CI with more about its lowest state at every point. */
function withMore(more: Partial<CorrelatedResult>): StudyResults {
  const results = sampleResults(['RHF', 'FCI']);
  const points = results.points.map((point) => {
    const FCI = point.levels.FCI;
    if (FCI?.kind !== 'correlated') throw new Error('sample changed');
    return { ...point, levels: { ...point.levels, FCI: { ...FCI, ...more } } };
  });
  return { ...results, points };
}

describe('correlationTables', () => {
  it('shows the points next to the minimum, to 1.5, 2 and 3 times its distance, and the last', () => {
    const [table] = tablesOf(sampleResults());
    expect(table?.rows.map(([place]) => place)).toEqual(['0.7', '1.1', '1.5', '2.2', '4']);
  });

  it('has no table without correlated levels', () => {
    expect(tablesOf(sampleResults(['RHF', 'CIS']))).toEqual([]);
  });

  it('leaves the Davidson correction out where the reference is the smaller part', () => {
    const correction = (referenceWeight: number) =>
      tablesOf(withMore({ energy: -1, davidsonCorrected: -1.01, referenceWeight }))[0]?.columns.map(
        ({ label }) => label,
      );
    expect(correction(0.9)).toContain('Davidson correction (hartree)');
    expect(correction(0.4)).not.toContain('Davidson correction (hartree)');
  });

  it('lists leading configurations at the minimum and at the far end, orbitals by label or number', () => {
    const results = withMore({});
    const points = results.points.map((point) => {
      const { RHF, FCI } = point.levels;
      if (FCI?.kind !== 'correlated' || RHF?.kind !== 'hartreeFock') throw new Error('sample changed');
      const configurations = [
        { weight: 0.9, doublyOccupied: [0], singlyOccupied: [] },
        { weight: 0.09, doublyOccupied: [], singlyOccupied: [0, 1] },
        { weight: 0.001, doublyOccupied: [1], singlyOccupied: [] },
      ];
      return {
        ...point,
        levels: {
          RHF: { ...RHF, orbitalSymmetries: ['1σg', null] },
          FCI: { ...FCI, states: [{ ...FCI.states[0]!, configurations }] },
        },
      };
    });
    expect(tablesOf({ ...results, points }).at(-1)?.rows).toEqual([
      ['0.7', '1σg²', '0.9000'],
      ['0.7', '1σg¹ #2¹', '0.0900'],
      ['4', '1σg²', '0.9000'],
      ['4', '1σg¹ #2¹', '0.0900'],
    ]);
  });

  it('shows the parts by rank and by pair, which add up to the whole as printed', () => {
    const pair = (a: number, b: number, energy: number) => ({
      orbitals: [a, b] as const,
      energy,
      sameSpin: energy / 4,
    });
    const results = withMore({
      correlationParts: {
        total: -0.06,
        byRank: [
          { weight: 0.95, energy: 0 },
          { weight: 0.01, energy: -0.01 },
          { weight: 0.04, energy: -0.05 },
        ],
        projected: {
          kind: 'found',
          singles: [{ orbital: 0, energy: -0.002 }],
          pairs: [pair(0, 0, -0.04), pair(0, 1, -0.01775), pair(1, 1, -0.00025)],
        },
      },
    });
    const [, ranks, pairs] = tablesOf(results);
    expect(ranks?.rows[0]).toEqual([
      '0.7',
      '−0.010000',
      '−0.050000',
      '−0.060000',
      '0.9500',
      '0.0100',
      '0.0400',
    ]);
    expect(pairs?.rows.map(([from, energy]) => [from, energy])).toEqual([
      ['#1²', '−0.040000'],
      ['#1 and #2', '−0.017750'],
      ['1 further pair', '−0.000250'],
      ['single excitations', '−0.002000'],
      ['together', '−0.060000'],
    ]);
  });
});
