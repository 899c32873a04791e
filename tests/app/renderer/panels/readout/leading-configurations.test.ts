import { describe, expect, it } from 'vitest';
import { configurationText } from '../../../../../app/renderer/panels/readout/leading-configurations';

describe('a configuration', () => {
  it('is written orbital by orbital with its electrons', () => {
    expect(configurationText({ weight: 1, doublyOccupied: [0, 3], singlyOccupied: [2, 5] })).toBe(
      '0² 2¹ 3² 5¹',
    );
  });
});
