/*
 * Colours, dashes and markers of curves. Colours are the "bright" scheme of P. Tol, Colour Schemes, SRON
 * technical note SRON/EPS/TN/09-002, issue 3.2 (2021), made to be told apart by colour-blind readers. Dashes
 * and markers say the same once more for prints in grey.
 */

const BLUE = '#4477AA';
const RED = '#EE6677';
const GREEN = '#228833';
const YELLOW = '#CCBB44';
const CYAN = '#66CCEE';
const PURPLE = '#AA3377';

/** For several files, one colour a file: neighbours in this order differ most. */
export const FILE_COLOURS = [BLUE, RED, GREEN, PURPLE, CYAN, YELLOW] as const;

export type MarkerShape = 'circle' | 'square' | 'triangle-up' | 'triangle-down' | 'diamond';

export interface CurveStyle {
  readonly colour: string;
  /** lengths of strokes and gaps in points; empty: a solid line */
  readonly dash: readonly number[];
  readonly shape: MarkerShape;
}

/** Of excited states, the singlets of CIS are solid. */
export const TRIPLET_DASH: readonly number[] = [2, 1.4];
export const HIGHER_STATE_DASH: readonly number[] = [5, 1.2, 0.8, 1.2];

/** Full CI is solid, as the curve that the others are measured by. */
const LEVEL_STYLES: Readonly<Record<string, CurveStyle>> = {
  RHF: { colour: BLUE, dash: [6, 1.6, 1.2, 1.6], shape: 'triangle-up' },
  UHF: { colour: CYAN, dash: [2.4, 1.6], shape: 'triangle-down' },
  ROHF: { colour: BLUE, dash: [6, 1.6, 1.2, 1.6], shape: 'triangle-up' },
  CIS: { colour: PURPLE, dash: [], shape: 'diamond' },
  MP2: { colour: YELLOW, dash: [1.2, 1.2], shape: 'diamond' },
  CISD: { colour: RED, dash: [4, 2], shape: 'square' },
  FCI: { colour: GREEN, dash: [], shape: 'circle' },
};

const OTHER_LEVELS: readonly CurveStyle[] = [
  { colour: PURPLE, dash: [1.6, 1.6], shape: 'diamond' },
  { colour: YELLOW, dash: [7, 2], shape: 'triangle-down' },
  { colour: CYAN, dash: [5, 1.6, 1.2, 1.6, 1.2, 1.6], shape: 'square' },
];

/** A level looks the same in every figure; `levels` only orders those that have no look of their own. */
export function styleOfLevel(level: string, levels: readonly string[]): CurveStyle {
  const own = LEVEL_STYLES[level];
  if (own) return own;
  const place = levels.filter((other) => !(other in LEVEL_STYLES)).indexOf(level);
  return OTHER_LEVELS[Math.max(0, place) % OTHER_LEVELS.length]!;
}

export const INK = '#222222';
export const FAINT_INK = '#555555';
export const GRID = '#E4E4E4';
/** The name of the bundled face comes first, then what common systems have. */
export const FONT = "'Source Sans 3', 'Helvetica Neue', Arial, 'Liberation Sans', 'Noto Sans', sans-serif";
/** Type sizes in points. */
export const LABEL_SIZE = 7;
export const TITLE_SIZE = 8;
export const TICK_LENGTH = 3;
/** In square points. */
export const MARKER_AREA = 12;
