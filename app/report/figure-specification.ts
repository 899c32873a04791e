import type { GroupMark, Spec } from 'vega';
import { axisTicks } from './axis-ticks';
import { legendMarks } from './figure-legend';
import { panelGroup } from './figure-panel';
import type { FigurePlan } from './figure-plan';
import { FAINT_INK, LABEL_SIZE, TICK_LENGTH, TITLE_SIZE } from './figure-style';
import { textMark } from './figure-text';
import { textWidth, wrapText } from './text-layout';

export interface FigureOptions {
  /** of the finished figure: 85 for one column of a journal, 170 for the whole page */
  readonly widthMillimetres: number;
  /** set beneath the panels */
  readonly caption: string;
}

const POINTS_PER_MILLIMETRE = 72 / 25.4;

/** All lengths in points, the unit of the drawing. */
const PANEL_GAP = 9;
const AXIS_ROOM = 27;
const CAPTION_LINE = 9;
const CAPTION_GAP = 5;
const RIGHT_MARGIN = 5;
/** Heights of the panels as fractions of the figure's width, capped so that a wide figure stays flat. */
const PANEL_SHAPES = { energies: { share: 0.6, most: 210 }, correlation: { share: 0.3, most: 100 } } as const;

/**
 * The drawing of a planned figure: legend, energy curves, beneath them the correlation energy on the same
 * distance axis, caption.
 */
export function figureSpecification(plan: FigurePlan, { widthMillimetres, caption }: FigureOptions): Spec {
  const width = widthMillimetres * POINTS_PER_MILLIMETRE;
  const heightOf = ({ share, most }: { readonly share: number; readonly most: number }) =>
    Math.min(share * width, most);
  const panels = [
    { panel: plan.energies, height: heightOf(PANEL_SHAPES.energies), wantedTicks: 5 },
    ...(plan.correlation
      ? [{ panel: plan.correlation, height: heightOf(PANEL_SHAPES.correlation), wantedTicks: 3 }]
      : []),
  ].map((one) => ({ ...one, ticks: axisTicks(...one.panel.range, one.wantedTicks) }));

  const tickRoom = Math.max(
    ...panels.flatMap(({ ticks }) => ticks.labels.map((label) => textWidth(label, LABEL_SIZE))),
  );
  const titleLines = Math.max(...panels.map(({ panel }) => panel.title.length));
  const left = titleLines * TITLE_SIZE * 1.15 + tickRoom + TICK_LENGTH + 6;
  const innerWidth = width - left - RIGHT_MARGIN;

  const legend = legendMarks(plan.legend, left, innerWidth);
  let top = legend.height + 3;
  const groups = panels.map(({ panel, height, ticks }, index): GroupMark => {
    const isLast = index === panels.length - 1;
    const group = panelGroup({ plan, panel, ticks, left, top, width: innerWidth, height, isLast });
    top += height + (isLast ? AXIS_ROOM : PANEL_GAP);
    return group;
  });
  const captionLines = wrapText([caption, ...plan.key].join(' '), LABEL_SIZE, width - 4);
  top += CAPTION_GAP;
  const captionMarks = captionLines.map((line, index) =>
    textMark(line, 2, top + index * CAPTION_LINE, { colour: FAINT_INK, baseline: 'top' }),
  );
  return {
    width,
    height: top + captionLines.length * CAPTION_LINE + 2,
    padding: 0,
    autosize: 'none',
    background: 'white',
    marks: [...legend.marks, ...groups, ...captionMarks],
  };
}
