import { describe, expect, it } from 'vitest';
import { cutTasks } from '../../../engine/configuration-interaction/row-tasks';
import { classifyStrings } from '../../../engine/configuration-interaction/string-classes';
import { buildStringSpace } from '../../../engine/configuration-interaction/string-space';

describe('cutTasks', () => {
  it('identity: every string is in one task, with none of another rank or representation', () => {
    const strings = buildStringSpace(8, 3, 2);
    const classes = classifyStrings(strings, [0, 1, 0, 2, 3, 0, 1, 0]);
    const seen: number[] = [];
    for (const [irrep, rank, first, count] of cutTasks(classes, false, 5)) {
      expect(count).toBeLessThanOrEqual(5);
      const members = classes.members[irrep].subarray(first, first + count);
      for (const string of members) expect(strings.ranks[string]).toBe(rank);
      seen.push(...members);
    }
    expect(seen.sort((a, b) => a - b)).toEqual(Array.from({ length: strings.count }, (_, k) => k));
  });
});
