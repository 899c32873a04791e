import { describe, expect, it } from 'vitest';
import { cursorText, nearestIndex } from '../../../../app/renderer/panels/cursor-text';
import type { Run } from '../../../../app/renderer/state/window-state';
import { sampleResults } from '../../../support/sample-results';

const { study, points } = sampleResults();
const run = { study, points, total: points.length } as unknown as Run;

describe('the cursor for the ear', () => {
  it('says where it is and every level’s energy there, and what has not converged', () => {
    const odd = points.map((point, index) =>
      index === 1
        ? { ...point, levels: { ...point.levels, CISD: { ...point.levels.CISD, converged: false } } }
        : point,
    );
    const text = cursorText({ ...run, points: odd as typeof points }, 1, 'hartree', 'angstrom');
    expect(text).toMatch(/^0\.5 Å; RHF −\d\.\d{8} hartree; CISD −\d\.\d{8} hartree, not converged; FCI −/);
  });

  it('goes to the computed point nearest to where the chart was pressed', () => {
    expect(nearestIndex([null, 0.5, 1, null], 0.8)).toBe(2);
    expect(nearestIndex([null], 0.8)).toBeUndefined();
  });
});
