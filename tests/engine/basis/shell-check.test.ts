import { describe, expect, it } from 'vitest';
import {
  angularMomentumProblem,
  EXPONENT_RANGE,
  exponentProblem,
  HIGHEST_ANGULAR_MOMENTUM,
  shellProblem,
} from '../../../engine/basis/shell-check';

describe('shell checks', () => {
  it('identity: the ends of what is allowed are allowed', () => {
    for (const l of [0, HIGHEST_ANGULAR_MOMENTUM]) expect(angularMomentumProblem(l)).toBeUndefined();
    for (const exponent of Object.values(EXPONENT_RANGE)) {
      expect(exponentProblem(exponent, 'smallest')).toBeUndefined();
      for (const angularMomentum of [0, 4]) {
        const shell = { angularMomentum, exponents: [exponent], coefficients: [1e-9] };
        expect(shellProblem(shell)).toBeUndefined();
      }
    }
  });

  it('identity: what lies just beyond is not, and the field is named', () => {
    expect(angularMomentumProblem(HIGHEST_ANGULAR_MOMENTUM + 1)?.field).toBe('angularMomentum');
    expect(exponentProblem(EXPONENT_RANGE.largest * 1.001, 'count')?.field).toBe('count');
    expect(exponentProblem(EXPONENT_RANGE.smallest / 1.001, 'smallest')?.field).toBe('smallest');
  });

  it('identity: nearly equal primitives of opposite sign cancel, well separated ones do not', () => {
    const shell = (second: number) => ({
      angularMomentum: 0,
      exponents: [0.5, second],
      coefficients: [1, -1],
    });
    expect(shellProblem(shell(0.5000001))?.message).toMatch(/cancel/);
    expect(shellProblem(shell(0.7))).toBeUndefined();
  });

  it('identity: the first exponent that cannot be used is the one named', () => {
    const shell = { angularMomentum: 0, exponents: [1, -2, -3], coefficients: [1, 1, 1] };
    expect(shellProblem(shell)).toMatchObject({
      field: 'exponents[1]',
      message: expect.stringContaining('-2'),
    });
  });
});
