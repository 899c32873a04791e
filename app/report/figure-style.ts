import type { LevelStyle } from '../study/level-style';

/*
 * What is the report's own in the look of its figures; how levels look is the same in every figure. Colours of
 * files are the "bright" scheme of P. Tol, Colour Schemes, SRON technical note SRON/EPS/TN/09-002, issue 3.2
 * (2021), made to be told apart by colour-blind readers.
 */

/** For several files, one colour a file: neighbours in this order differ most. */
export const FILE_COLOURS = ['#4477AA', '#EE6677', '#228833', '#AA3377', '#66CCEE', '#CCBB44'] as const;

/** On paper. */
export type CurveStyle = Pick<LevelStyle, 'colour' | 'dash' | 'shape'>;

/** Of excited states, the singlets of CIS are solid. */
export const TRIPLET_DASH: readonly number[] = [2, 1.4];
export const HIGHER_STATE_DASH: readonly number[] = [5, 1.2, 0.8, 1.2];

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
