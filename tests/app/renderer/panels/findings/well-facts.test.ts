import { describe, expect, it } from 'vitest';
import { whyNoMinimum } from '../../../../../app/renderer/panels/findings/well-facts';

const where = (value: number) => `${value} Å`;

describe('findings that are absent', () => {
  it('say why, and what to do', () => {
    expect(whyNoMinimum({ kind: 'atEdge', coordinate: 4 }, where)).toBe(
      'No minimum inside the range: the lowest point is its edge, 4 Å. Widen the range there.',
    );
    expect(whyNoMinimum({ kind: 'several', near: [1, 2.5] }, where)).toContain('near 1 Å, 2.5 Å');
    expect(whyNoMinimum({ kind: 'none', reason: 'fewer than five converged points' }, where)).toBe(
      'No minimum: fewer than five converged points.',
    );
  });
});
