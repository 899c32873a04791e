import { describe, expect, it } from 'vitest';
import {
  commonDecimals,
  formatBytes,
  formatDuration,
  formatFixed,
  formatPlain,
  formatScientific,
} from '../../../app/renderer/numbers';

describe('numbers as the window writes them', () => {
  it('keeps the decimals asked for, so that columns align at the point', () => {
    expect(formatFixed(-1.1, 8)).toBe('−1.10000000');
    expect(formatFixed(0.75, 4)).toBe('0.7500');
  });

  it('groups thousands by thin spaces from five digits on, and never the decimals', () => {
    expect(formatFixed(-249600.123456, 2)).toBe('−249\u2009600.12');
    expect(formatFixed(1234567, 0)).toBe('1\u2009234\u2009567');
    expect(formatFixed(4356, 0)).toBe('4356');
    expect(formatFixed(1.23456789, 8)).toBe('1.23456789');
  });

  it('writes no minus before a zero and no NaN at all', () => {
    expect(formatFixed(-1e-12, 5)).toBe('0.00000');
    expect(formatFixed(Number.NaN, 5)).toBe('–');
    expect(formatScientific(Number.POSITIVE_INFINITY)).toBe('–');
  });

  it('finds the decimals that a column of coordinates needs', () => {
    expect(commonDecimals([0.4, 0.1 + 0.2, 1], 6)).toBe(1);
    expect(commonDecimals([0.4, 1 / 3], 6)).toBe(6);
    expect(commonDecimals([60, 120], 6)).toBe(0);
    expect(commonDecimals([], 6)).toBe(0);
  });

  it('writes small numbers by their power of ten', () => {
    expect(formatScientific(3.21e-9)).toBe('3.2 × 10⁻⁹');
    expect(formatScientific(0)).toBe('0');
  });

  it('writes a coordinate as someone would type it', () => {
    expect(formatPlain(0.1 + 0.2)).toBe('0.3');
    expect(formatPlain(-90)).toBe('−90');
  });

  it('says durations and sizes in round words', () => {
    expect([0.2, 8.4, 180, 7800].map(formatDuration)).toEqual([
      'under a second',
      '8 s',
      '3 min',
      '2 h 10 min',
    ]);
    expect([0, 640, 1800, 486_123, 1.24e9].map(formatBytes)).toEqual([
      '0 B',
      '640 B',
      '1.8 kB',
      '486 kB',
      '1.2 GB',
    ]);
  });
});
