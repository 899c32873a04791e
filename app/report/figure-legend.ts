import type { Mark } from 'vega';
import type { LegendEntry } from './figure-plan';
import { INK, LABEL_SIZE, MARKER_AREA } from './figure-style';
import { textMark } from './figure-text';
import { flowRows, textWidth } from './text-layout';

/** All lengths in points. */
const ROW = 10.5;
const SAMPLE = 22;
const SAMPLE_GAP = 3;
const ENTRY_GAP = 9;

/** Files first, the kinds of curves in rows of their own beneath. */
export function legendMarks(
  entries: readonly LegendEntry[],
  left: number,
  width: number,
): { readonly marks: Mark[]; readonly height: number } {
  let rows = 0;
  const marks = [
    entries.filter(({ kind }) => kind === 'file'),
    entries.filter(({ kind }) => kind !== 'file'),
  ].flatMap((block) => {
    const widths = block.map(({ label }) => SAMPLE + SAMPLE_GAP + textWidth(label, LABEL_SIZE));
    const flow = flowRows(widths, width, ENTRY_GAP);
    const first = rows;
    rows += flow.rows;
    return block.flatMap((entry, index) => {
      const { x, row } = flow.places[index]!;
      return legendEntryMarks(entry, left + x, 2 + (first + row + 0.5) * ROW);
    });
  });
  return { marks, height: rows * ROW + 2 };
}

function legendEntryMarks({ label, style, kind }: LegendEntry, x: number, y: number): Mark[] {
  const rule: Mark = {
    type: 'rule',
    encode: {
      enter: {
        x: { value: x },
        x2: { value: x + SAMPLE },
        y: { value: y },
        stroke: { value: style.colour },
        strokeWidth: { value: { curve: 1.2, excited: 0.7, file: 3 }[kind] },
        strokeDash: { value: [...style.dash] },
      },
    },
  };
  const marker: Mark = {
    type: 'symbol',
    encode: {
      enter: {
        x: { value: x + SAMPLE / 2 },
        y: { value: y },
        shape: { value: style.shape },
        size: { value: MARKER_AREA },
        fill: { value: style.colour },
      },
    },
  };
  const text = textMark(label, x + SAMPLE + SAMPLE_GAP, y, { colour: INK, baseline: 'middle' });
  return kind === 'curve' ? [rule, marker, text] : [rule, text];
}
