import { describe, expect, it } from 'vitest';
import { stepNumber } from '../../../../app/renderer/sentence/text-part';

describe('arrow keys in a number of the sentence', () => {
  it('step without the noise of binary fractions', () => {
    expect(stepNumber('0.2', 0.1)).toBe('0.3');
    expect(stepNumber('−1', -0.1)).toBe('-1.1');
  });

  it('leave alone what is not a number', () => {
    expect(stepNumber('six', 1)).toBeUndefined();
    expect(stepNumber(' ', 1)).toBeUndefined();
  });
});
