/*
 * How levels look in every figure, in the window and on paper. Colours are from P. Tol, Colour Schemes, SRON
 * technical note SRON/EPS/TN/09-002, issue 3.2 (2021), made to be told apart by colour-blind readers: the
 * "muted" scheme on white, the "light" scheme on dark grounds. Dashes and markers say the same once more for
 * prints in grey.
 */

/** "muted" */
const INDIGO = '#332288';
const CYAN = '#88CCEE';
const TEAL = '#44AA99';
const GREEN = '#117733';
const OLIVE = '#999933';
const SAND = '#DDCC77';
const ROSE = '#CC6677';
const WINE = '#882255';
const PURPLE = '#AA4499';
/** "bright", and black, for ranks that are seldom drawn: the other scheme has no more */
const BLUE = '#4477AA';
const BLACK = '#000000';

/** "light" */
const LIGHT_BLUE = '#77AADD';
const LIGHT_CYAN = '#99DDFF';
const MINT = '#44BB99';
const PEAR = '#BBCC33';
const DEEP_OLIVE = '#AAAA00';
const LIGHT_YELLOW = '#EEDD88';
const ORANGE = '#EE8866';
const PINK = '#FFAABB';
const PALE_GREY = '#DDDDDD';
/** "pale", and white */
const PALE_GREEN = '#CCDDAA';
const WHITE = '#FFFFFF';

export type MarkerShape = 'circle' | 'square' | 'triangle-up' | 'triangle-down' | 'diamond';

export interface LevelStyle {
  /** on white */
  readonly colour: string;
  readonly colourOnDark: string;
  /** lengths of strokes and gaps in points; empty: a solid line */
  readonly dash: readonly number[];
  readonly shape: MarkerShape;
}

/** Full CI is solid, as the curve that the others are measured by. */
const LEVEL_STYLES: Readonly<Record<string, LevelStyle>> = {
  RHF: { colour: INDIGO, colourOnDark: LIGHT_BLUE, dash: [6, 1.6, 1.2, 1.6], shape: 'triangle-up' },
  ROHF: { colour: TEAL, colourOnDark: DEEP_OLIVE, dash: [6, 1.6, 1.2, 1.6], shape: 'diamond' },
  UHF: { colour: CYAN, colourOnDark: LIGHT_CYAN, dash: [7, 2], shape: 'triangle-down' },
  MP2: { colour: SAND, colourOnDark: LIGHT_YELLOW, dash: [1.2, 1.2], shape: 'square' },
  CIS: { colour: PURPLE, colourOnDark: PINK, dash: [1.2, 1.6], shape: 'diamond' },
  CISD: { colour: ROSE, colourOnDark: ORANGE, dash: [4, 2], shape: 'square' },
  CISDT: { colour: OLIVE, colourOnDark: PEAR, dash: [2.4, 1.6], shape: 'triangle-down' },
  CISDTQ: {
    colour: WINE,
    colourOnDark: PALE_GREY,
    dash: [5, 1.6, 1.2, 1.6, 1.2, 1.6],
    shape: 'diamond',
  },
  CISDTQ5: { colour: BLUE, colourOnDark: WHITE, dash: [3, 1.2], shape: 'square' },
  CISDTQ56: { colour: BLACK, colourOnDark: PALE_GREEN, dash: [1.6, 3], shape: 'circle' },
  FCI: { colour: GREEN, colourOnDark: MINT, dash: [], shape: 'circle' },
};

/** For a level that this version does not know, from a file of a newer one. */
const UNKNOWN: LevelStyle = { colour: '#666666', colourOnDark: PALE_GREY, dash: [1, 1], shape: 'circle' };

/** A level looks the same in every figure. */
export const styleOfLevel = (level: string): LevelStyle => LEVEL_STYLES[level] ?? UNKNOWN;
