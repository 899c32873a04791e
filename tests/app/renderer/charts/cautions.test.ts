import { describe, expect, it } from 'vitest';
import { groupCautions, neighbourRuns } from '../../../../app/renderer/charts/cautions';
import { samplePoint } from '../../../support/sample-results';

const caution = (code: string, level?: string) => ({
  code,
  message: code,
  ...(level !== undefined && { level }),
});

describe('cautions of a curve', () => {
  it('are each said once, with the points they hold at', () => {
    const points = [
      { ...samplePoint(1), cautions: [caution('a', 'RHF')] },
      undefined,
      { ...samplePoint(2), cautions: [caution('a', 'FCI'), caution('a', 'RHF')] },
    ];
    expect(groupCautions(points)).toEqual([
      { caution: caution('a', 'RHF'), at: [0, 2] },
      { caution: caution('a', 'FCI'), at: [2] },
    ]);
  });

  it('hold over runs of neighbouring points', () => {
    expect(neighbourRuns([3, 4, 5, 9])).toEqual([
      [3, 5],
      [9, 9],
    ]);
    expect(neighbourRuns([])).toEqual([]);
  });
});
