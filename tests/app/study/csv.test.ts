import { describe, expect, it } from 'vitest';
import { studyCsv } from '../../../app/study/csv';
import { correlated, hartreeFock, samplePoint, sampleResults, singles } from '../../support/sample-results';

const rowsOf = (csv: string): string[][] =>
  csv
    .split('\r\n')
    .slice(0, -1)
    .map((row) => row.split(','));

describe('studyCsv', () => {
  it('has one row a point and one column a level in study order, every row ended by CRLF', () => {
    const csv = studyCsv(sampleResults());
    const rows = rowsOf(csv);
    expect(rows[0]).toEqual(['coordinate', 'RHF', 'CISD', 'FCI']);
    expect(rows).toHaveLength(38);
    expect(csv.endsWith('\r\n')).toBe(true);
    expect(csv.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
  });

  it('loses no digit of any energy', () => {
    const results = sampleResults();
    const rows = rowsOf(studyCsv(results)).slice(1);
    for (const [index, point] of results.points.entries()) {
      const full = point.levels.FCI;
      expect(Number(rows[index]![0])).toBe(point.coordinate);
      expect(Number(rows[index]![3])).toBe(full?.kind === 'correlated' ? full.energy : undefined);
    }
  });

  it('leaves the field empty where a level failed or did not converge', () => {
    const good = samplePoint(0.8);
    const results = {
      ...sampleResults(),
      points: [
        {
          ...good,
          levels: {
            RHF: hartreeFock(-1, {
              converged: false,
              termination: { kind: 'iterationLimit' as const, limit: 100 },
            }),
            CISD: {
              kind: 'failed' as const,
              converged: false as const,
              termination: { kind: 'cancelled' as const },
            },
            FCI: correlated(-1.1, -0.1),
          },
        },
      ],
    };
    expect(rowsOf(studyCsv(results))[1]).toEqual(['0.8', '', '', '-1.1']);
  });

  it('gives CIS as its singlets and triplets, and further states after the levels', () => {
    const lowest = correlated(-1.1, -0.1);
    const twoStates = {
      ...lowest,
      states: [lowest.states[0]!, { ...lowest.states[0]!, energy: -0.7, spin: 'triplet' as const }],
    };
    const sample = sampleResults(['RHF', 'CIS', 'FCI']);
    const cis = singles([
      { spin: 'triplet', energy: -0.6 },
      { spin: 'singlet', energy: -0.4 },
      { spin: 'triplet', energy: -0.3 },
    ]);
    const results = {
      ...sample,
      points: [{ ...samplePoint(1), levels: { RHF: hartreeFock(-1), CIS: cis, FCI: twoStates } }],
    };
    expect(rowsOf(studyCsv(results))).toEqual([
      ['coordinate', 'RHF', 'CIS singlet 1', 'CIS triplet 1', 'CIS triplet 2', 'FCI', 'FCI state 2'],
      ['1', '-1', '-0.4', '-0.6', '-0.3', '-1.1', '-0.7'],
    ]);
  });

  it('follows states where their curves are known; the column of a level stays its lowest state', () => {
    const sample = sampleResults(['CIS', 'FCI']);
    const [plain] = correlated(-1, 0).states;
    const pointAt = (coordinate: number, energies: readonly number[]) => ({
      ...samplePoint(coordinate),
      levels: {
        CIS: singles([
          { spin: 'triplet', energy: -0.9 },
          { spin: 'singlet', energy: -0.5 },
        ]),
        FCI: correlated(energies[0]!, 0, { states: energies.map((energy) => ({ ...plain!, energy })) }),
      },
    });
    const results = {
      ...sample,
      points: [pointAt(1, [-1.2, -1.1, -0.8]), pointAt(2, [-1.3, -1.0])],
      curves: {
        CIS: [
          { name: '1 ³B₁', states: [0, 0] },
          { name: '1 ¹B₁', states: [1, 1] },
        ],
        FCI: [
          { name: '1 ¹A₁', states: [0, 1] },
          { name: '2 ¹A₁', states: [2, null] },
          { name: '1 ³B₁', states: [1, 0] },
        ],
      },
    };
    expect(rowsOf(studyCsv(results))).toEqual([
      ['coordinate', 'CIS 1 ¹B₁', 'CIS 1 ³B₁', 'FCI', 'FCI 1 ¹A₁', 'FCI 2 ¹A₁', 'FCI 1 ³B₁'],
      ['1', '-0.5', '-0.9', '-1.2', '-1.2', '-0.8', '-1.1'],
      ['2', '-0.5', '-0.9', '-1.3', '-1', '', '-1.3'],
    ]);
  });

  it('has no column for a curve that is nothing but the lowest state', () => {
    const results = {
      ...sampleResults(['FCI']),
      curves: { FCI: [{ name: '1 ¹Σg⁺', states: Array(37).fill(0) }] },
    };
    expect(rowsOf(studyCsv(results))[0]).toEqual(['coordinate', 'FCI']);
  });

  it('leaves the coordinate of a single point empty', () => {
    const results = { ...sampleResults(), points: [{ ...samplePoint(0.8), coordinate: null }] };
    expect(rowsOf(studyCsv(results))[1]![0]).toBe('');
  });
});
