import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { headSpans, splitTable, type TextTable, tableWidth } from '../../../app/report/text-table';

const table: TextTable = {
  id: 't',
  heading: 'A table',
  columns: [
    { label: 'r' },
    { groups: ['a', 'energy'], label: '1' },
    { groups: ['a', 'energy'], label: '2' },
    { groups: ['b', 'energy'], label: '1' },
  ],
  rows: [['0.7', '−1.0', '−2.0', '−3.0']],
  notes: ['A note.'],
};

describe('headSpans', () => {
  it('covers all columns in every row, and joins no columns of different outer heads', () => {
    expect(headSpans(table.columns)).toEqual([
      [
        { text: '', width: 1 },
        { text: 'a', width: 2 },
        { text: 'b', width: 1 },
      ],
      [
        { text: '', width: 1 },
        { text: 'energy', width: 2 },
        { text: 'energy', width: 1 },
      ],
    ]);
  });
});

describe('tableWidth', () => {
  it('counts a head that is wider than the columns below it', () => {
    const head = 'Correlation energy (hartree)';
    const narrow = {
      ...table,
      columns: [{ label: 'r' }, { groups: [head], label: 'x' }],
      rows: [['1', '2']],
    };
    expect(tableWidth(narrow, 'onOneLine')).toBe('r'.length + 3 + head.length + 3);
    expect(tableWidth(narrow, 'wrapped')).toBe('r'.length + 3 + 'Correlation'.length + 3);
  });
});

describe('splitTable', () => {
  it('leaves a table that fits as it is', () => {
    expect(splitTable(table, 100, 'wrapped')).toEqual([table]);
  });

  it('keeps every column once and in order, and the first in every part', () => {
    fc.assert(
      fc.property(
        fc.array(fc.integer({ min: 1, max: 30 }), { minLength: 1, maxLength: 12 }),
        fc.integer({ min: 10, max: 80 }),
        (widths, most) => {
          const columns = widths.map((width, index) => ({ label: `${index}`.padEnd(width, 'x') }));
          const rows = [['r', ...widths.map((_, index) => `cell ${index}`)]];
          const parts = splitTable(
            { ...table, columns: [{ label: 'r' }, ...columns], rows },
            most,
            'onOneLine',
          );
          expect(parts.flatMap((part) => part.columns.slice(1))).toEqual(columns);
          expect(parts.flatMap((part) => part.rows[0]!.slice(1))).toEqual(rows[0]!.slice(1));
          for (const part of parts) expect(part.columns[0]).toEqual({ label: 'r' });
        },
      ),
      { seed: 20261201 },
    );
  });

  it('says the notes once, below the last part', () => {
    const parts = splitTable(table, 12, 'wrapped');
    expect(parts.length).toBeGreaterThan(1);
    expect(parts.map(({ notes }) => notes.length)).toEqual([...parts.slice(1).map(() => 0), 1]);
  });
});
