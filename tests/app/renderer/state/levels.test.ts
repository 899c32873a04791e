import { describe, expect, it } from 'vitest';
import { LEVEL_NAMES } from '#engine';
import { LEVELS, withLevel } from '../../../../app/renderer/state/levels';

describe('levels on offer', () => {
  it('are the levels that the engine computes, in its order', () => {
    expect(LEVELS.map(({ name }) => name)).toEqual(LEVEL_NAMES);
  });

  it('stay in that order however they are chosen, others behind them', () => {
    expect(withLevel(['FCI', 'of later'], 'RHF', true)).toEqual(['RHF', 'FCI', 'of later']);
    expect(withLevel(['RHF', 'FCI'], 'RHF', false)).toEqual(['FCI']);
  });
});
