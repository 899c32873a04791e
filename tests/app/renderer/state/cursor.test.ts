import { describe, expect, it } from 'vitest';
import { cursorIndex, moveCursor } from '../../../../app/renderer/state/cursor';
import type { Run } from '../../../../app/renderer/state/window-state';
import { sampleResults, sampleStudy } from '../../../support/sample-results';

const { points } = sampleResults();
const run = (overrides: Partial<Run> = {}): Run => ({
  status: 'done',
  study: sampleStudy,
  sentence: '',
  text: '',
  points,
  total: points.length,
  progress: undefined,
  results: undefined,
  error: undefined,
  ...overrides,
});
const withHoles = run({ points: points.map((point, index) => (index % 2 === 0 ? point : undefined)) });

describe('the cursor', () => {
  it('rests at the lowest point of the best level until it is moved', () => {
    // the sample curve's minimum is at 0.74 Å, its points stand at 0.4, 0.5, …
    expect(points[cursorIndex(run(), undefined)!]?.coordinate).toBe(0.7);
  });

  it('ignores points that have not converged when it looks for the lowest', () => {
    const unconverged = points.map((point, index) =>
      index === 3
        ? { ...point, levels: { FCI: { ...point.levels.FCI!, converged: false } as never } }
        : point,
    );
    expect(cursorIndex(run({ points: unconverged }), undefined)).toBe(4);
  });

  it('stays where it was put, unless that point is gone', () => {
    expect(cursorIndex(run(), 20)).toBe(20);
    expect(cursorIndex(withHoles, 21)).not.toBe(21);
    expect(cursorIndex(run({ points: [undefined, points[1]] }), undefined)).toBe(1);
    expect(cursorIndex(run({ points: [] }), undefined)).toBeUndefined();
  });

  it('steps over what has not arrived and is held at the ends', () => {
    expect(moveCursor(withHoles, 4, 'next')).toBe(6);
    expect(moveCursor(withHoles, 4, 'previous')).toBe(2);
    expect(moveCursor(withHoles, 0, 'previous')).toBe(0);
    expect(moveCursor(withHoles, 36, 'ahead')).toBe(36);
    expect(moveCursor(withHoles, 10, 'first')).toBe(0);
    expect(moveCursor(withHoles, 10, 'last')).toBe(36);
    expect(moveCursor(run(), 10, 'ahead')).toBe(15);
  });
});
