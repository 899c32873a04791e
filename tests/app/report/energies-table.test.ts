import { describe, expect, it } from 'vitest';
import type { StudyResults } from '#engine';
import { energiesTable, energiesTables } from '../../../app/report/energies-table';
import { sharedCoordinate } from '../../../app/report/scanned-coordinate';
import { hartreeFock, sampleResults } from '../../support/sample-results';

const tableOf = (...results: readonly StudyResults[]) => {
  const names = results.map((_, index) => 'ab'.charAt(index));
  return energiesTable(
    results.map((file, index) => ({ name: results.length > 1 ? names[index]! : '', results: file })),
    sharedCoordinate(results, names),
  );
};

describe('energiesTables', () => {
  it('makes one table of files with many distances in common, else one a file', () => {
    const results = sampleResults(['RHF']);
    const shiftedBy = (shift: number) => ({
      ...results,
      points: results.points.map((point) => ({ ...point, coordinate: point.coordinate! + shift })),
    });
    const rowsWith = (shift: number) =>
      energiesTables(
        [
          { name: 'a', results },
          { name: 'b', results: shiftedBy(shift) },
        ],
        sharedCoordinate([results], ['']),
      ).map(({ rows }) => rows.length);
    expect(rowsWith(0)).toEqual([37]);
    expect(rowsWith(0.5)).toEqual([42]);
    expect(rowsWith(0.05)).toEqual([37, 37]);
  });
});

describe('energiesTable', () => {
  it('has a row a point with all energies, then the correlation energies', () => {
    const results = sampleResults();
    const { columns, rows } = tableOf(results);
    expect(columns.slice(1).map(({ groups, label }) => [...(groups ?? []), label])).toEqual([
      ['Energy (hartree)', 'RHF'],
      ['Energy (hartree)', 'CISD'],
      ['Energy (hartree)', 'FCI'],
      ['Correlation energy (hartree)', 'CISD'],
      ['Correlation energy (hartree)', 'FCI'],
    ]);
    expect(rows).toHaveLength(37);
    const full = results.points[3]!.levels.FCI;
    if (full?.kind !== 'correlated') throw new Error('sample changed');
    expect(rows[3]![0]).toBe('0.7');
    expect(rows[3]![3]).toBe(`−${Math.abs(full.energy).toFixed(6)}`);
    expect(rows[3]![5]).toBe(`−${Math.abs(full.correlation).toFixed(6)}`);
  });

  it('prints no digit that the threshold does not cover', () => {
    const results = sampleResults();
    const study = { ...results.study, convergence: { energy: 1e-6 } };
    expect(tableOf({ ...results, study }).rows[0]![1]).toMatch(/^−\d\.\d{5}$/);
  });

  it('shows what did not converge and what was not computed as such, and explains', () => {
    const results = sampleResults();
    const failed = { kind: 'failed', converged: false, termination: { kind: 'cancelled' } } as const;
    const points = [
      { ...results.points[0]!, levels: { RHF: hartreeFock(-1, { converged: false }), CISD: failed } },
      ...results.points.slice(1),
    ];
    const table = tableOf({ ...results, points });
    expect(table.rows[0]).toEqual(['0.4', 'n.c.', '', '', '', '']);
    expect(table.notes.join(' ')).toContain('did not converge');
  });

  it('gives CIS energies, no correlation energy, and says why', () => {
    const table = tableOf(sampleResults(['RHF', 'CIS']));
    expect(table.columns.map(({ label }) => label)).toEqual([
      'H–H distance (Å)',
      'RHF',
      'CIS singlet 1',
      'CIS triplet 1',
    ]);
    expect(table.notes.join(' ')).toContain('Brillouin');
  });

  it('names the states that have labels, and where a column changes its state', () => {
    const results = sampleResults(['RHF', 'FCI']);
    const points = results.points.map((point, index) => {
      const full = point.levels.FCI;
      if (full?.kind !== 'correlated') throw new Error('sample changed');
      const symmetry = {
        irrep: index < 20 ? 'Ag' : 'B1u',
        term: { lambda: 0, inversion: index < 20 ? 'g' : 'u', reflection: '+' },
      } as const;
      return { ...point, levels: { ...point.levels, FCI: { ...full, symmetry } } };
    });
    // the order of the points must not matter
    const { notes } = tableOf({ ...results, points: points.toReversed() });
    expect(notes).toContain('States, by rising coordinate: FCI ¹Σg⁺, then ¹Σu⁺.');
    expect(tableOf(results).notes.join(' ')).not.toContain('States');
  });

  it('puts equal distances of several files in one row, in spite of different units', () => {
    const first = sampleResults(['RHF']);
    const study = { ...first.study, molecule: { ...first.study.molecule, unit: 'bohr' as const } };
    const inBohr = first.points.map((point) => ({
      ...point,
      coordinate: point.coordinate! / 0.529177210544,
    }));
    const extra = { ...first.points[0]!, coordinate: 10 };
    const { columns, rows } = tableOf(first, { ...first, study, points: [...inBohr, extra] });
    expect(rows).toHaveLength(38);
    expect(columns.map(({ groups }) => groups?.[0])).toEqual([undefined, 'a', 'b']);
    expect(rows[0]![1]).toBe(rows[0]![2]);
    expect(rows.at(-1)![1]).toBe('');
  });

  it('prints evenly spaced distances without the noise of their last bits', () => {
    const { rows } = tableOf(sampleResults(['RHF']));
    expect(rows.map(([coordinate]) => coordinate).slice(0, 4)).toEqual(['0.4', '0.5', '0.6', '0.7']);
  });
});
