import { describe, expect, it } from 'vitest';
import { LEVEL_NAMES } from '#engine';
import { type LevelStyle, styleOfLevel } from '../../../app/study/level-style';

describe('looks of levels', () => {
  it.each([
    ['colour on white', ({ colour }: LevelStyle) => colour],
    ['colour on dark', ({ colourOnDark }: LevelStyle) => colourOnDark],
    ['dash and marker, for prints in grey', ({ dash, shape }: LevelStyle) => `${dash} ${shape}`],
  ])('differ between all levels that are computed, by %s', (_, look) => {
    expect(new Set(LEVEL_NAMES.map((level) => look(styleOfLevel(level)))).size).toBe(LEVEL_NAMES.length);
  });
});
