import { type LevelStyle, type MarkerShape, styleOfLevel } from '../../study/level-style';

export type Ground = 'light' | 'dark';

/** A level's look on a screen. */
export interface CurveLook {
  readonly colour: string;
  /** strokes and gaps in pixels; empty: solid */
  readonly dash: readonly number[];
  readonly width: number;
  readonly shape: MarkerShape;
}

/** The dashes are made for lines a point wide; the lines on screens are wider. */
const PIXELS_PER_POINT = 1.7;

export function curveLook(level: string, ground: Ground): CurveLook {
  const style: LevelStyle = styleOfLevel(level);
  return {
    colour: ground === 'dark' ? style.colourOnDark : style.colour,
    dash: style.dash.map((length) => Math.round(length * PIXELS_PER_POINT * 10) / 10),
    width: style.dash.length === 0 ? 2.2 : 2,
    shape: style.shape,
  };
}
