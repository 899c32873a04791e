import type { Shape } from 'plotly.js-dist';
import { correlationCurves, energyCurves, positions } from './curves';
import type { FigureRequest } from './figure';

const RING_PIXELS = { ground: 7, excited: 4.5 } as const;

/** The cursor: a line through both charts and a ring around every level's number at that geometry. */
export function cursorShapes(request: FigureRequest, index: number | undefined): Partial<Shape>[] {
  const x =
    index === undefined
      ? null
      : (positions(request.study, request.points, request.lengthUnit)[index] ?? null);
  if (index === undefined || x === null) return [];
  const ring = (y: number, axis: 'y' | 'y2', radius: number): Partial<Shape> => ({
    type: 'circle',
    xref: 'x',
    yref: axis,
    xsizemode: 'pixel',
    ysizemode: 'pixel',
    xanchor: x,
    yanchor: y,
    x0: -radius,
    x1: radius,
    y0: -radius,
    y1: radius,
    line: { color: request.theme.cursor, width: 1.5 },
  });
  const rings = (curves: ReturnType<typeof correlationCurves>, axis: 'y' | 'y2') =>
    curves
      .filter(({ level }) => !request.hiddenLevels.includes(level))
      .flatMap(({ values, isExcited }) => {
        const y = values[index];
        return typeof y === 'number'
          ? [ring(y, axis, isExcited ? RING_PIXELS.excited : RING_PIXELS.ground)]
          : [];
      });
  const line: Partial<Shape> = {
    type: 'line',
    xref: 'x',
    yref: 'paper',
    x0: x,
    x1: x,
    y0: 0,
    y1: 1,
    layer: 'between',
    line: { color: request.theme.cursor, width: 1.5 },
  };
  return [
    line,
    ...rings(energyCurves(request.study, request.points, request).curves, 'y'),
    ...rings(correlationCurves(request.study, request.points, request.energyUnit), 'y2'),
  ];
}
