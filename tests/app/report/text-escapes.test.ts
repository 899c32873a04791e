import { describe, expect, it } from 'vitest';
import { withMinus } from '../../../app/report/text-escapes';

describe('withMinus', () => {
  it.each([
    ['-1.5', '−1.5'],
    ['2', '2'],
    ['-0.000000', '0.000000'],
    ['-0', '0'],
    ['-0.0001', '−0.0001'],
  ])('prints %s as %s: a number that rounds to zero has no sign', (number, printed) => {
    expect(withMinus(number)).toBe(printed);
  });
});
