import type { Mark } from 'vega';
import { FONT, LABEL_SIZE } from './figure-style';

/** A line of text at a place, in points, in the size of labels. */
export function textMark(
  text: string,
  x: number,
  y: number,
  { colour, baseline }: { readonly colour: string; readonly baseline: 'top' | 'middle' },
): Mark {
  return {
    type: 'text',
    encode: {
      enter: {
        text: { value: text },
        x: { value: x },
        y: { value: y },
        font: { value: FONT },
        fontSize: { value: LABEL_SIZE },
        fill: { value: colour },
        baseline: { value: baseline },
      },
    },
  };
}
