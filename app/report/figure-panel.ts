import type { Axis, GroupMark, Mark } from 'vega';
import { axisTicks, type Ticks } from './axis-ticks';
import type { DrawnCurve, FigurePlan, PlannedPanel } from './figure-plan';
import { FAINT_INK, FONT, GRID, INK, LABEL_SIZE, MARKER_AREA, TICK_LENGTH, TITLE_SIZE } from './figure-style';

/** A path in the square from −1 to 1. */
const CROSS = 'M-1,-1L1,1M-1,1L1,-1';
/** Length of the bar at a minimum, in points. */
const BAR = 9;
/** Points between ticks of the distance axis, about. */
const TICK_DISTANCE = 30;

/** Lengths in points. */
export interface PanelPlacement {
  readonly plan: FigurePlan;
  readonly panel: PlannedPanel;
  /** of the panel, one line each */
  readonly title: readonly string[];
  readonly ticks: Ticks;
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
  /** the lowest panel carries the labels of the shared axis */
  readonly isLast: boolean;
}

/** One panel with its frame, axes and curves. */
export function panelGroup({
  plan,
  panel,
  title,
  ticks,
  left,
  top,
  width,
  height,
  isLast,
}: PanelPlacement): GroupMark {
  const xTicks = axisTicks(...plan.coordinateRange, Math.round(width / TICK_DISTANCE));
  const axisLook = {
    labelFont: FONT,
    labelFontSize: LABEL_SIZE,
    labelColor: INK,
    titleFont: FONT,
    titleFontSize: TITLE_SIZE,
    titleFontWeight: 'normal',
    titleColor: INK,
    domainColor: FAINT_INK,
    domainWidth: 0.6,
    tickColor: FAINT_INK,
    tickWidth: 0.6,
    tickSize: TICK_LENGTH,
    labelPadding: 2,
    gridColor: GRID,
    gridWidth: 0.5,
  } as const;
  const axes: Axis[] = [
    {
      ...axisLook,
      orient: 'left',
      scale: 'y',
      values: [...ticks.values],
      format: `.${ticks.decimals}f`,
      grid: true,
      gridScale: 'x',
      title: [...title],
      titleX: -left + TITLE_SIZE,
      titleAlign: 'center',
      titleAnchor: 'middle',
      titleBaseline: 'middle',
    },
    {
      ...axisLook,
      orient: 'bottom',
      scale: 'x',
      values: [...xTicks.values],
      format: `.${xTicks.decimals}f`,
      labels: isLast,
      ...(isLast ? { title: plan.coordinateTitle, titlePadding: 3 } : {}),
    },
  ];
  return {
    type: 'group',
    encode: {
      enter: { x: { value: left }, y: { value: top }, width: { value: width }, height: { value: height } },
    },
    scales: [
      { name: 'x', type: 'linear', domain: [...plan.coordinateRange], range: [0, width], zero: false },
      { name: 'y', type: 'linear', domain: [...panel.range], range: [height, 0], zero: false },
    ],
    axes,
    marks: [
      {
        type: 'group',
        clip: true,
        encode: { enter: { width: { value: width }, height: { value: height } } },
        marks: [
          ...(panel === plan.energies && plan.levels ? levelMarks(plan.levels) : []),
          // later levels first, so that the dashes of earlier ones show on top of solid lines
          ...panel.curves.toReversed().flatMap(curveMarks),
        ],
      },
    ],
  };
}

function levelMarks({ lines, colour }: NonNullable<FigurePlan['levels']>): Mark[] {
  return lines.map(
    ({ from, to, y }): Mark => ({
      type: 'rule',
      encode: {
        enter: {
          x: { scale: 'x', value: from },
          x2: { scale: 'x', value: to },
          y: { scale: 'y', value: y },
          stroke: { value: colour },
          strokeWidth: { value: 0.35 },
        },
      },
    }),
  );
}

function curveMarks(curve: DrawnCurve): Mark[] {
  const { colour, dash, shape } = curve.style;
  const place = { x: { scale: 'x', field: 'x' }, y: { scale: 'y', field: 'y' } };
  const marksOn = (
    points: readonly object[],
    encode: Record<string, object>,
    type: 'line' | 'symbol' | 'rule',
  ) => {
    const name = `points-${type}`;
    // a group of its own, so that the data need no names that are unique in the whole figure
    return {
      type: 'group',
      data: [{ name, values: points.map((point) => ({ ...point })) }],
      marks: [{ type, from: { data: name }, encode: { enter: encode } }],
    } as GroupMark;
  };
  const stroke = { value: colour };
  const line = {
    ...place,
    stroke,
    strokeWidth: { value: curve.isExcited ? 0.7 : 1.2 },
    strokeDash: { value: [...dash] },
    // smooth, yet without extremes of its own between the points
    interpolate: { value: 'monotone' },
    strokeJoin: { value: 'round' },
    defined: { field: 'converged' },
  };
  const marker = { ...place, shape: { value: shape }, size: { value: MARKER_AREA }, fill: { value: colour } };
  const cross = {
    ...place,
    shape: { value: CROSS },
    size: { value: 22 },
    stroke,
    strokeWidth: { value: 0.8 },
  };
  const unconverged = curve.points.filter(({ converged }) => !converged);
  return [
    marksOn(curve.points, line, 'line'),
    marksOn(curve.marked, marker, 'symbol'),
    marksOn(unconverged, cross, 'symbol'),
    ...(curve.minimum
      ? [
          marksOn(
            [curve.minimum],
            {
              x: place.x,
              y: { ...place.y, offset: -BAR / 2 },
              y2: { ...place.y, offset: BAR / 2 },
              stroke,
              strokeWidth: { value: 0.8 },
            },
            'rule',
          ),
        ]
      : []),
  ];
}
