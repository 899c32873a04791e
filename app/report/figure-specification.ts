import type { GroupMark, Spec } from 'vega';
import { axisTicks } from './axis-ticks';
import { legendMarks } from './figure-legend';
import { panelGroup } from './figure-panel';
import type { FigurePlan, PlannedPanel } from './figure-plan';
import { FAINT_INK, LABEL_SIZE, TICK_LENGTH, TITLE_SIZE } from './figure-style';
import { textMark } from './figure-text';
import { ReportError } from './report-error';
import { textWidth, wrapText } from './text-layout';

export interface FigureOptions {
  /** of the finished figure: 85 for one column of a journal, 170 for the whole page */
  readonly widthMillimetres: number;
  /** default: what suits the width */
  readonly heightMillimetres?: number;
  /** set beneath the panels; absent where the page around the figure has it */
  readonly caption?: string;
}

const POINTS_PER_MILLIMETRE = 72 / 25.4;

/** All lengths in points, the unit of the drawing. */
const TITLE_LINE = 1.15 * TITLE_SIZE;
const PANEL_GAP = 9;
const AXIS_ROOM = 27;
/** between legend and first panel */
const LEGEND_GAP = 3;
const CAPTION_LINE = 9;
const CAPTION_GAP = 5;
const RIGHT_MARGIN = 5;
/** Heights of the panels as fractions of the figure's width, capped so that a wide figure stays flat. */
const PANEL_SHAPES = { energies: { share: 0.7, most: 250 }, correlation: { share: 0.28, most: 90 } } as const;
/** Lower ones show nothing. */
const LOWEST_PANELS = { energies: 60, correlation: 30 } as const;

/**
 * The drawing of a planned figure: legend, energy curves, beneath them the correlation energy on the same
 * distance axis, caption.
 *
 * @throws ReportError `report.figureTooSmall`
 */
export function figureSpecification(plan: FigurePlan, options: FigureOptions): Spec {
  const width = options.widthMillimetres * POINTS_PER_MILLIMETRE;
  const planned = [
    { panel: plan.energies, name: 'energies', wantedTicks: 5 } as const,
    ...(plan.correlation ? [{ panel: plan.correlation, name: 'correlation', wantedTicks: 3 } as const] : []),
  ].map((one) => ({ ...one, ticks: axisTicks(...one.panel.range, one.wantedTicks) }));

  const tickRoom = Math.max(
    ...planned.flatMap(({ ticks }) => ticks.labels.map((label) => textWidth(label, LABEL_SIZE))),
  );
  /** Titles that are broken into lines for panels of one height may need more of them once the heights are known. */
  const layOut = (heightsBefore: Readonly<Record<PanelName, number>>): FigureLayout => {
    const titles = {
      energies: titleLines(plan.energies, heightsBefore.energies),
      correlation: plan.correlation ? titleLines(plan.correlation, heightsBefore.correlation) : [],
    };
    const lines = Math.max(...planned.map(({ name }) => titles[name].length));
    const left = lines * TITLE_LINE + tickRoom + TICK_LENGTH + 6;
    const legend = legendMarks(plan.legend, left, width - left - RIGHT_MARGIN);
    const around =
      legend.height + LEGEND_GAP + (planned.length - 1) * PANEL_GAP + AXIS_ROOM + captionHeight + 2;
    const names = planned.map(({ name }) => name);
    return { titles, left, legend, heights: panelHeights(names, width, around, options.heightMillimetres) };
  };
  const captionLines =
    options.caption === undefined
      ? []
      : wrapText([options.caption, ...plan.key].join(' '), LABEL_SIZE, width - 4);
  const captionHeight = captionLines.length > 0 ? CAPTION_GAP + captionLines.length * CAPTION_LINE : 0;
  const { titles, left, legend, heights } = layOut(
    layOut({ energies: usualHeight('energies', width), correlation: usualHeight('correlation', width) })
      .heights,
  );

  let top = legend.height + LEGEND_GAP;
  const groups = planned.map(({ panel, name, ticks }, index): GroupMark => {
    const isLast = index === planned.length - 1;
    const height = heights[name];
    const group = panelGroup({
      plan,
      panel,
      title: titles[name],
      ticks,
      left,
      top,
      width: width - left - RIGHT_MARGIN,
      height,
      isLast,
    });
    top += height + (isLast ? AXIS_ROOM : PANEL_GAP);
    return group;
  });
  const captionMarks = captionLines.map((line, index) =>
    textMark(line, 2, top + CAPTION_GAP + index * CAPTION_LINE, { colour: FAINT_INK, baseline: 'top' }),
  );
  return {
    width,
    height: top + captionHeight + 2,
    padding: 0,
    autosize: 'none',
    background: 'white',
    marks: [...legend.marks, ...groups, ...captionMarks],
  };
}

type PanelName = keyof typeof PANEL_SHAPES;

interface FigureLayout {
  readonly titles: Readonly<Record<PanelName, readonly string[]>>;
  readonly left: number;
  readonly legend: ReturnType<typeof legendMarks>;
  readonly heights: Readonly<Record<PanelName, number>>;
}

/** Set along the axis, no longer than the panel is high. */
const titleLines = ({ title }: PlannedPanel, height: number): readonly string[] =>
  wrapText(title, TITLE_SIZE, height);

const usualHeight = (name: PanelName, width: number): number =>
  Math.min(PANEL_SHAPES[name].share * width, PANEL_SHAPES[name].most);

/** Of the panels in points; with a height asked for, what is left of it once everything around them has its room. */
function panelHeights(
  names: readonly PanelName[],
  width: number,
  around: number,
  heightMillimetres: number | undefined,
): Readonly<Record<PanelName, number>> {
  const usual = (name: PanelName) => usualHeight(name, width);
  if (heightMillimetres === undefined)
    return { energies: usual('energies'), correlation: usual('correlation') };
  const room = heightMillimetres * POINTS_PER_MILLIMETRE - around;
  const together = names.reduce((sum, name) => sum + usual(name), 0);
  const heights = {
    energies: (room * usual('energies')) / together,
    correlation: (room * usual('correlation')) / together,
  };
  if (names.some((name) => heights[name] < LOWEST_PANELS[name])) {
    const least = Math.max(...names.map((name) => (LOWEST_PANELS[name] * together) / usual(name)));
    throw new ReportError(
      'report.figureTooSmall',
      'height',
      `A figure ${heightMillimetres} mm high has no room for its curves beside legend and labels.`,
      `Make it at least ${Math.ceil((around + least) / POINTS_PER_MILLIMETRE)} mm high, or wider.`,
    );
  }
  return heights;
}
