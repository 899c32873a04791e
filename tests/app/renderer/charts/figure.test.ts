import { describe, expect, it } from 'vitest';
import { LIGHT_CHART } from '../../../../app/renderer/charts/chart-theme';
import { cursorShapes } from '../../../../app/renderer/charts/cursor-shapes';
import { buildFigure, type FigureRequest } from '../../../../app/renderer/charts/figure';
import { sampleResults } from '../../../support/sample-results';

const { study, points } = sampleResults(['RHF', 'CIS', 'CISD', 'FCI']);
const request = (overrides: Partial<FigureRequest> = {}): FigureRequest => ({
  study,
  points,
  energyUnit: 'hartree',
  energyReference: 'absolute',
  lengthUnit: 'angstrom',
  hiddenLevels: [],
  levelsOf: undefined,
  theme: LIGHT_CHART,
  zoomKey: '',
  size: { width: 800, height: 600 },
  ...overrides,
});
interface Trace {
  readonly name: string;
  readonly yaxis: string;
  readonly xaxis: string;
  readonly mode: string;
  readonly y: readonly (number | null)[];
  readonly connectgaps?: boolean;
  readonly line?: { readonly color: string; readonly dash: string };
  readonly marker: { readonly symbol: string };
}
const traces = (overrides: Partial<FigureRequest> = {}) =>
  buildFigure(request(overrides)).data as unknown as readonly Trace[];
const unconverged = points.map((point, index) =>
  index === 7
    ? { ...point, levels: { ...point.levels, CISD: { ...point.levels.CISD, converged: false } } }
    : point,
) as typeof points;

describe('the figure of a computation', () => {
  it('draws every level and state above, correlations below, all over one axis', () => {
    const drawn = traces();
    const labels = (axis: string) => drawn.filter(({ yaxis }) => yaxis === axis).map(({ name }) => name);
    expect(labels('y').sort()).toEqual(['CIS singlet 1', 'CIS triplet 1', 'CISD', 'FCI', 'RHF']);
    expect(labels('y2').sort()).toEqual(['CISD', 'FCI']);
    expect(new Set(drawn.map(({ xaxis }) => xaxis))).toEqual(new Set(['x']));
  });

  it('tells every level apart by colour, by dash and by marker', () => {
    const ground = traces().filter(
      ({ name, yaxis }) => yaxis === 'y' && ['RHF', 'CISD', 'FCI'].includes(name),
    );
    for (const look of [
      ({ line }: Trace) => line?.color,
      ({ line }: Trace) => line?.dash,
      ({ marker }: Trace) => marker.symbol,
    ])
      expect(new Set(ground.map(look)).size).toBe(3);
  });

  it('tells excited states by open marks, and triplets by a mark of their own', () => {
    const symbolOf = (label: string) => traces().find(({ name }) => name === label)?.marker.symbol;
    expect(['CIS singlet 1', 'CIS triplet 1', 'FCI'].map(symbolOf)).toEqual([
      'diamond-open',
      'triangle-up-open',
      'circle',
    ]);
  });

  it('draws a point that has not converged as a cross, outside of the line', () => {
    const drawn = traces({ points: unconverged }).filter(
      ({ name, yaxis }) => yaxis === 'y' && name.startsWith('CISD'),
    );
    const [line, crosses] = drawn;
    expect(line?.y[7]).toBeNull();
    expect(line?.connectgaps).toBe(false);
    expect(crosses).toMatchObject({
      name: 'CISD, not converged',
      mode: 'markers',
      marker: { symbol: 'x-thin-open' },
    });
    expect(crosses?.y.filter((value) => value !== null)).toEqual([
      (points[7]!.levels.CISD as { energy: number }).energy,
    ]);
  });

  it('leaves out what is hidden, and the strip of cautions when there are none', () => {
    const names = traces({ hiddenLevels: ['CIS', 'FCI'] }).map(({ name }) => name);
    expect(names).toEqual(['RHF', 'CISD', 'CISD', 'Cautions']);
    const calm = points.map((point) => ({ ...point, cautions: [] }));
    expect(traces({ points: calm }).map(({ name }) => name)).not.toContain('Cautions');
    expect(buildFigure(request({ points: calm })).layout).not.toHaveProperty('yaxis3');
  });

  it('marks the points that have cautions', () => {
    const strip = traces().find(({ name }) => name === 'Cautions');
    expect(strip?.y.map((value) => value !== null)).toEqual(
      points.map(({ cautions }) => cautions.length > 0),
    );
  });

  it('shows the whole range from the first point on, in the unit of the axis', () => {
    const only = buildFigure(request({ points: [points[0]], lengthUnit: 'bohr' })).layout;
    const [low, high] = only.xaxis!.range as [number, number];
    expect(low).toBeLessThan(0.4 / 0.5292);
    expect(high).toBeGreaterThan(4 / 0.5292);
    expect(only.xaxis?.title).toMatchObject({ text: 'Bond length, a₀' });
    expect(only.annotations?.map(({ text }) => text)).toEqual(['Energy, Eₕ', 'Correlation energy, Eₕ']);
  });

  it('keeps the charts apart however small the drawing is', () => {
    for (const height of [80, 300, 1400]) {
      const { yaxis, yaxis2, yaxis3 } = buildFigure(request({ size: { width: 300, height } }))
        .layout as Record<string, { domain: [number, number] }>;
      const bands = [yaxis3, yaxis2, yaxis].map((axis) => axis!.domain);
      for (const [low, high] of bands) expect(low).toBeLessThanOrEqual(high);
      expect(bands[0]![1]).toBeLessThanOrEqual(bands[1]![0]);
      expect(bands[1]![1]).toBeLessThanOrEqual(bands[2]![0]);
    }
  });
});

describe('the cursor on the figure', () => {
  it('is a line at the geometry and a ring at every number there', () => {
    const shapes = cursorShapes(request(), 4);
    expect(shapes[0]).toMatchObject({ type: 'line', x0: 0.8, x1: 0.8 });
    // RHF, two of CIS, CISD, FCI; correlation of CISD and FCI
    expect(shapes.filter(({ type }) => type === 'circle')).toHaveLength(7);
    expect(cursorShapes(request({ hiddenLevels: ['CIS', 'RHF', 'CISD'] }), 4)).toHaveLength(3);
  });

  it('is absent where there is no point', () => {
    expect(cursorShapes(request(), undefined)).toEqual([]);
    expect(cursorShapes(request({ points: [undefined] }), 0)).toEqual([]);
  });
});
