import { describe, expect, it } from 'vitest';
import { NOT_COMPUTED, NOT_CONVERGED, resultTable } from '../../../app/report/result-table';
import { hartreeFock, sampleResults } from '../../support/sample-results';

describe('resultTable', () => {
  it('has a row a point with all energies, then the correlation energies', () => {
    const results = sampleResults();
    const table = resultTable([results], ['h2']);
    expect(table.blocks).toEqual([
      { file: '', quantity: 'Energy (hartree)', columns: ['RHF', 'CISD', 'FCI'] },
      { file: '', quantity: 'Correlation energy (hartree)', columns: ['CISD', 'FCI'] },
    ]);
    expect(table.rows).toHaveLength(37);
    const full = results.points[3]!.levels.FCI;
    if (full?.kind !== 'correlated') throw new Error('sample changed');
    expect(table.rows[3]).toMatchObject({ coordinate: '0.7' });
    expect(table.rows[3]!.cells[2]).toBe(full.energy.toFixed(6));
    expect(table.rows[3]!.cells[4]).toBe(full.correlation.toFixed(6));
  });

  it('prints no digit that the threshold does not cover', () => {
    const results = sampleResults();
    const study = { ...results.study, convergence: { energy: 1e-6 } };
    expect(resultTable([{ ...results, study }], ['h2']).rows[0]!.cells[0]).toMatch(/^-\d\.\d{5}$/);
  });

  it('shows what did not converge and what was not computed as such, and explains', () => {
    const results = sampleResults();
    const failed = { kind: 'failed', converged: false, termination: { kind: 'cancelled' } } as const;
    const points = [
      { ...results.points[0]!, levels: { RHF: hartreeFock(-1, { converged: false }), CISD: failed } },
      ...results.points.slice(1),
    ];
    const table = resultTable([{ ...results, points }], ['h2']);
    expect(table.rows[0]!.cells).toEqual([
      NOT_CONVERGED,
      NOT_COMPUTED,
      NOT_COMPUTED,
      NOT_COMPUTED,
      NOT_COMPUTED,
    ]);
    expect(table.notes.join(' ')).toContain('did not converge');
  });

  it('gives CIS energies, no correlation energy, and says why', () => {
    const table = resultTable([sampleResults(['RHF', 'CIS'])], ['h2']);
    expect(table.blocks).toEqual([
      { file: '', quantity: 'Energy (hartree)', columns: ['RHF', 'CIS singlet 1', 'CIS triplet 1'] },
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
    const table = resultTable([{ ...results, points: points.toReversed() }], ['h2']);
    expect(table.notes).toContain('States, by rising coordinate: FCI ¹Σg⁺, then ¹Σu⁺.');
    expect(resultTable([results], ['h2']).notes.join(' ')).not.toContain('States');
  });

  it('puts equal distances of several files in one row, in spite of different units', () => {
    const first = sampleResults(['RHF']);
    const study = { ...first.study, molecule: { ...first.study.molecule, unit: 'bohr' as const } };
    const inBohr = first.points.map((point) => ({
      ...point,
      coordinate: point.coordinate! / 0.529177210544,
    }));
    const extra = { ...first.points[0]!, coordinate: 10 };
    const table = resultTable([first, { ...first, study, points: [...inBohr, extra] }], ['a', 'b']);
    expect(table.rows).toHaveLength(38);
    expect(table.blocks.map(({ file }) => file)).toEqual(['a', 'b']);
    expect(table.rows[0]!.cells[0]).toBe(table.rows[0]!.cells[1]);
    expect(table.rows.at(-1)!.cells[0]).toBe(NOT_COMPUTED);
  });

  it('keeps to one set of columns a file when one file is named twice', () => {
    const results = sampleResults(['RHF']);
    expect(resultTable([results, results], ['a', 'b']).rows[0]!.cells).toHaveLength(2);
  });

  it('prints evenly spaced distances without the noise of their last bits', () => {
    const rows = resultTable([sampleResults(['RHF'])], ['h2']).rows;
    expect(rows.map(({ coordinate }) => coordinate).slice(0, 4)).toEqual(['0.4', '0.5', '0.6', '0.7']);
  });
});
