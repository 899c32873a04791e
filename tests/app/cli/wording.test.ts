import { describe, expect, it } from 'vitest';
import {
  alignedTable,
  bytesText,
  counted,
  durationText,
  grouped,
  refusalText,
} from '../../../app/cli/wording';

describe('wording', () => {
  it('writes every issue of a refusal with its place, once, and its remedy', () => {
    const text = refusalText('a.study.json', [
      { code: 'x', place: 'scan.count', message: 'It is 0.', remedy: 'Give more.' },
      { code: 'x', place: 'scan.from', message: 'scan.from is 0.', remedy: 'Give more.' },
      { code: 'y', place: '', message: 'It is no study.', remedy: 'Give a study.' },
    ]);
    expect(text).toBe(
      'farwell: a.study.json was refused.\n  scan.count: It is 0.\n    Give more.\n  scan.from is 0.\n    Give more.\n  It is no study.\n    Give a study.',
    );
  });

  it('sets thousands apart', () => {
    const numbers = [0, 999, 1000, 1234567, -12345, 1234.56789];
    expect(numbers.map(grouped)).toEqual(['0', '999', '1,000', '1,234,567', '-12,345', '1,234.56789']);
  });

  it('counts', () => {
    expect(counted(1, 'point')).toBe('1 point');
    expect(counted(0, 'point')).toBe('0 points');
  });

  it.each([
    [0, 'under 1 s'],
    [0.99, 'under 1 s'],
    [1, '1 s'],
    [89.4, '89 s'],
    [90, '2 min'],
    [3600, '60 min'],
    [7 * 3600 + 600, '7 h 10 min'],
    [7 * 3600 - 1, '7 h'],
    [86_400 * 400, '400 days'],
  ])('writes %d seconds as %s', (seconds, text) => {
    expect(durationText(seconds)).toBe(text);
  });

  it.each([
    [0, 'under 0.1 kB'],
    [8, 'under 0.1 kB'],
    [999, '1 kB'],
    [64_000, '64 kB'],
    [1_500_000, '1.5 MB'],
    [2e9, '2 GB'],
    [3e18, '3,000 PB'],
  ])('writes %d bytes as %s', (bytes, text) => {
    expect(bytesText(bytes)).toBe(text);
  });

  it('aligns the first column to the left and the others to the right', () => {
    expect(
      alignedTable([
        ['level', 'size'],
        ['RHF', '–'],
        ['FCI', '441'],
      ]),
    ).toBe('level   size\nRHF        –\nFCI      441');
  });
});
