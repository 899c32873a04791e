import { expect, it } from 'vitest';
import { tableCsv } from '../../../app/report/table-csv';

it('writes plain minus signs before numbers only, and quotes what holds separators', () => {
  expect(
    tableCsv({
      id: 't',
      heading: '',
      columns: [{ label: 'a, b' }, { groups: ['c'], label: 'd' }],
      rows: [
        ['−1.5', '−'],
        ['say "x"', ''],
      ],
      notes: ['left out'],
    }),
  ).toBe('"a, b","c, d"\r\n-1.5,−\r\n"say ""x""",\r\n');
});
