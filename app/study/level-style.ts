/*
 * How levels look in every figure, in the window and on paper. Colours are from P. Tol, Colour Schemes, SRON
 * technical note SRON/EPS/TN/09-002, issue 3.2 (2021), made to be told apart by colour-blind readers: the
 * "bright" scheme on white, the "light" scheme on dark grounds. Dashes and markers say the same once more for
 * prints in grey.
 */

/** "bright" */
const BLUE = '#4477AA';
const RED = '#EE6677';
const GREEN = '#228833';
const YELLOW = '#CCBB44';
const CYAN = '#66CCEE';
const PURPLE = '#AA3377';

/** "light" */
const LIGHT_BLUE = '#77AADD';
const LIGHT_CYAN = '#99DDFF';
const MINT = '#44BB99';
const LIGHT_YELLOW = '#EEDD88';
const ORANGE = '#EE8866';
const PINK = '#FFAABB';

export type MarkerShape = 'circle' | 'square' | 'triangle-up' | 'triangle-down' | 'diamond';

export interface LevelStyle {
  readonly colour: string;
  readonly colourOnDark: string;
  /** lengths of strokes and gaps in points; empty: a solid line */
  readonly dash: readonly number[];
  readonly shape: MarkerShape;
}

const RESTRICTED: LevelStyle = {
  colour: BLUE,
  colourOnDark: LIGHT_BLUE,
  dash: [6, 1.6, 1.2, 1.6],
  shape: 'triangle-up',
};

/** Full CI is solid, as the curve that the others are measured by. */
const LEVEL_STYLES: Readonly<Record<string, LevelStyle>> = {
  RHF: RESTRICTED,
  ROHF: RESTRICTED,
  UHF: { colour: CYAN, colourOnDark: LIGHT_CYAN, dash: [2.4, 1.6], shape: 'triangle-down' },
  CIS: { colour: PURPLE, colourOnDark: PINK, dash: [1.2, 1.6], shape: 'diamond' },
  MP2: { colour: YELLOW, colourOnDark: LIGHT_YELLOW, dash: [1.2, 1.2], shape: 'diamond' },
  CISD: { colour: RED, colourOnDark: ORANGE, dash: [4, 2], shape: 'square' },
  FCI: { colour: GREEN, colourOnDark: MINT, dash: [], shape: 'circle' },
};

const OTHER_LEVELS: readonly LevelStyle[] = [
  { colour: PURPLE, colourOnDark: PINK, dash: [1.6, 1.6], shape: 'diamond' },
  { colour: YELLOW, colourOnDark: LIGHT_YELLOW, dash: [7, 2], shape: 'triangle-down' },
  { colour: CYAN, colourOnDark: LIGHT_CYAN, dash: [5, 1.6, 1.2, 1.6, 1.2, 1.6], shape: 'square' },
];

/** A level looks the same in every figure; `levels` only orders those that have no look of their own. */
export function styleOfLevel(level: string, levels: readonly string[]): LevelStyle {
  const own = LEVEL_STYLES[level];
  if (own) return own;
  const place = levels.filter((other) => !(other in LEVEL_STYLES)).indexOf(level);
  return OTHER_LEVELS[Math.max(0, place) % OTHER_LEVELS.length]!;
}
