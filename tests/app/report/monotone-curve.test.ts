import { parse, View } from 'vega';
import { describe, expect, it } from 'vitest';
import { placeAtHeight } from '../../../app/report/monotone-curve';

const points = [
  { x: 0, y: 5 },
  { x: 1, y: 1 },
  { x: 1.5, y: 0 },
  { x: 3, y: 0.5 },
  { x: 4, y: 4 },
  { x: 6, y: 4.5 },
];

/** The line through the points as vega draws it: a start and cubic Bézier curves. */
async function drawnPath(): Promise<number[]> {
  const view = new View(
    parse({
      width: 10,
      height: 10,
      padding: 0,
      autosize: 'none',
      data: [{ name: 'points', values: points }],
      marks: [
        {
          type: 'line',
          from: { data: 'points' },
          encode: { enter: { x: { field: 'x' }, y: { field: 'y' }, interpolate: { value: 'monotone' } } },
        },
      ],
    }),
    { renderer: 'none' },
  );
  const svg = await view.toSVG();
  view.finalize();
  return [...(/<path[^>]* d="(M[^"]*C[^"]*)"/.exec(svg)?.[1] ?? '').matchAll(/-?\d+(\.\d+)?(e-?\d+)?/g)].map(
    ([number]) => Number(number),
  );
}

describe('placeAtHeight', () => {
  it('independent: finds the points that vega draws, in the middle of every piece', async () => {
    const numbers = await drawnPath();
    expect(numbers).toHaveLength(2 + 6 * (points.length - 1));
    for (let piece = 0; piece < points.length - 1; piece += 1) {
      const [x0, y0, x1, y1, x2, y2, x3, y3] = numbers.slice(6 * piece, 6 * piece + 8) as [
        number,
        number,
        number,
        number,
        number,
        number,
        number,
        number,
      ];
      // a Bézier curve at t = ½
      const x = (x0 + 3 * x1 + 3 * x2 + x3) / 8;
      const y = (y0 + 3 * y1 + 3 * y2 + y3) / 8;
      expect(placeAtHeight(points, piece, y)).toBeCloseTo(x, 2);
    }
  });

  it('finds nothing beyond the heights of the two points', () => {
    expect(placeAtHeight(points, 1, 1.1)).toBeUndefined();
    expect(placeAtHeight(points, 1, -0.1)).toBeUndefined();
    expect(placeAtHeight(points, 1, 1)).toBeCloseTo(1, 6);
  });
});
