import type { Annotation, Dash, Data, Layout } from 'plotly.js-dist';
import type { Study, StudyResults } from '#engine';
import { ENERGY_UNITS, LENGTH_UNITS } from '../units';
import type { ChartTheme } from './chart-theme';
import {
  type Curve,
  type CurveOptions,
  correlationCurves,
  energyCurves,
  type Points,
  positions,
  scansLength,
} from './curves';
import { levelLines } from './level-lines';
import { type CurveLook, curveLook } from './palette';

export interface FigureRequest extends CurveOptions {
  readonly study: Study;
  readonly points: Points;
  readonly hiddenLevels: readonly string[];
  /** the finished results, if vibrational levels are to be drawn in the well */
  readonly levelsOf: StudyResults | undefined;
  readonly theme: ChartTheme;
  /** changes when a zoom made by the user no longer makes sense */
  readonly zoomKey: string;
  /** of the whole drawing, in pixels */
  readonly size: { readonly width: number; readonly height: number };
}

export interface Figure {
  readonly data: readonly Data[];
  readonly layout: Partial<Layout>;
}

/** What the charts leave free, in pixels. */
const MARGIN = { l: 40, r: 14, t: 28, b: 46 } as const;
const GAP = 34;
const CAUTION_STRIP = 18;
/** of the height that the two charts share */
const CORRELATION_SHARE = 0.35;

/**
 * Energies above, correlation energies below, cautions at the foot, over one axis of distance, so that a zoom
 * of one is a zoom of all.
 */
export function buildFigure(request: FigureRequest): Figure {
  const { study, points, theme } = request;
  const x = positions(study, points, request.lengthUnit);
  const isShown = ({ level }: Curve) => !request.hiddenLevels.includes(level);
  const energies = energyCurves(study, points, request).curves.filter(isShown);
  const correlations = correlationCurves(study, points, request.energyUnit).filter(isShown);
  const hasCautions = points.some((point) => (point?.cautions.length ?? 0) > 0);
  const bands = bandsOf(request.size.height, hasCautions);
  const draw = (curve: Curve, axis: 'y' | 'y2') => tracesOf(curve, x, axis, request);

  return {
    data: [
      ...levelLines(request),
      ...drawingOrder(energies).flatMap((curve) => draw(curve, 'y')),
      ...drawingOrder(correlations).flatMap((curve) => draw(curve, 'y2')),
      ...(hasCautions ? [cautionTrace(x, points, theme)] : []),
    ],
    layout: {
      font: { family: theme.fontFamily, size: theme.fontSize, color: theme.text },
      paper_bgcolor: theme.paper,
      plot_bgcolor: theme.plot,
      margin: MARGIN,
      width: request.size.width,
      height: request.size.height,
      showlegend: false,
      dragmode: 'zoom',
      // the nearest point shows by a line under the pointer; a click puts the cursor there
      hovermode: 'x',
      hoverdistance: -1,
      spikedistance: -1,
      annotations: [
        chartTitle(energyTitle(request), bands.energy[1], theme),
        chartTitle(
          `Correlation energy, ${ENERGY_UNITS[request.energyUnit].symbol}`,
          bands.correlation[1],
          theme,
        ),
      ],
      uirevision: request.zoomKey,
      xaxis: {
        ...axisLook(theme),
        anchor: hasCautions ? 'y3' : 'y2',
        title: { text: axisTitle(study, request), standoff: 10, font: quietFont(theme) },
        ...fullRange(study, x, request),
        showspikes: true,
        spikemode: 'across',
        spikesnap: 'hovered data',
        spikecolor: theme.axis,
        spikedash: 'solid',
        spikethickness: 1,
      },
      yaxis: {
        ...axisLook(theme),
        domain: bands.energy,
        automargin: true,
      },
      yaxis2: {
        ...axisLook(theme),
        domain: bands.correlation,
        automargin: true,
      },
      ...(hasCautions && {
        yaxis3: {
          domain: bands.cautions,
          range: [-1, 1],
          fixedrange: true,
          showgrid: false,
          zeroline: false,
          tickvals: [0],
          ticktext: ['Cautions'],
          tickfont: { color: theme.caution },
          automargin: true,
          ticks: '',
        },
      }),
    },
  };
}

interface Bands {
  readonly energy: [number, number];
  readonly correlation: [number, number];
  readonly cautions: [number, number];
}

/** The vertical shares of the charts and of the strip, from the bottom. */
function bandsOf(height: number, hasCautions: boolean): Bands {
  const inner = Math.max(1, height - MARGIN.t - MARGIN.b);
  const wanted = GAP + (hasCautions ? CAUTION_STRIP + GAP / 2 : 0);
  // in a drawing too small for charts, what stands between them shrinks first
  const perPixel = Math.min(1 / inner, 0.5 / wanted);
  const strip = hasCautions ? (CAUTION_STRIP + GAP / 2) * perPixel : 0;
  const middle = strip + CORRELATION_SHARE * (1 - wanted * perPixel);
  return {
    cautions: [0, CAUTION_STRIP * perPixel],
    correlation: [strip, middle],
    energy: [middle + GAP * perPixel, 1],
  };
}

const quietFont = (theme: ChartTheme) => ({ size: theme.fontSize, color: theme.quietText });

/** The name of a chart, level above its upper left corner: read without turning the head. */
const chartTitle = (text: string, top: number, theme: ChartTheme): Partial<Annotation> => ({
  text,
  showarrow: false,
  xref: 'paper',
  yref: 'paper',
  x: 0,
  xanchor: 'left',
  y: top,
  yanchor: 'bottom',
  font: quietFont(theme),
});

const axisLook = (theme: ChartTheme) => ({
  gridcolor: theme.grid,
  linecolor: theme.axis,
  tickcolor: theme.axis,
  tickfont: { color: theme.text },
  showline: true,
  ticks: 'outside' as const,
  ticklen: 4,
  zeroline: false,
  exponentformat: 'power' as const,
});

function axisTitle(study: Study, { lengthUnit }: CurveOptions): string {
  if (study.scan === undefined) return 'Geometry as given';
  const { coordinate } = study.scan;
  if ('angle' in coordinate) return 'Angle, °';
  if ('dihedral' in coordinate) return 'Dihedral angle, °';
  const bonds = coordinate.bonds.length > 1 ? 'Bond lengths' : 'Bond length';
  return `${bonds}, ${LENGTH_UNITS[lengthUnit].symbol}`;
}

function energyTitle({ energyReference, energyUnit }: CurveOptions): string {
  const { symbol } = ENERGY_UNITS[energyUnit];
  switch (energyReference) {
    case 'absolute':
      return `Energy, ${symbol}`;
    case 'ownMinimum':
      return `Energy above own minimum, ${symbol}`;
    case 'farEnd':
      return `Energy against far end, ${symbol}`;
  }
}

/** The whole scan from the start, so that the axis does not creep while points arrive; 3 % of air at each end. */
function fullRange(
  study: Study,
  x: readonly (number | null)[],
  request: FigureRequest,
): { range?: [number, number] } {
  const ends =
    study.scan === undefined || 'values' in study.scan
      ? x.filter((value) => value !== null)
      : positionsOfEnds(study, study.scan, request);
  if (ends.length === 0) return {};
  const low = Math.min(...ends);
  const high = Math.max(...ends);
  const air = low === high ? 0.5 : 0.03 * (high - low);
  return { range: [low - air, high + air] };
}

function positionsOfEnds(
  study: Study,
  { from, to }: { readonly from: number; readonly to: number },
  { lengthUnit }: CurveOptions,
): readonly number[] {
  const scale = scansLength(study)
    ? LENGTH_UNITS[lengthUnit].perBohr / LENGTH_UNITS[study.molecule.unit].perBohr
    : 1;
  return [from * scale, to * scale];
}

/** The complete CI, the one solid line, first: what is drawn later, dashed, stays visible on top of it. */
const drawingOrder = (curves: readonly Curve[]): readonly Curve[] =>
  [...curves].sort((a, b) => Number(b.level === 'FCI') - Number(a.level === 'FCI'));

/** The line of the converged points, and open crosses, not joined, for the others. */
function tracesOf(
  curve: Curve,
  x: readonly (number | null)[],
  axis: 'y' | 'y2',
  request: FigureRequest,
): Data[] {
  const look = curveLook(curve.level, request.theme.ground);
  const shared = {
    type: 'scatter' as const,
    x: [...x],
    xaxis: 'x',
    yaxis: axis,
    legendgroup: curve.label,
    showlegend: axis === 'y',
    hoverinfo: 'none' as const,
  };
  const converged = curve.values.map((value, index) => (curve.isConverged[index] ? value : null));
  const unconverged = curve.values.map((value, index) => (curve.isConverged[index] ? null : value));
  const line: Data = {
    ...shared,
    name: curve.label,
    mode: 'lines+markers',
    y: converged,
    connectgaps: false,
    line: { color: look.colour, dash: dashText(look.dash), width: curve.isExcited ? 1.2 : look.width },
    marker: convergedMarker(look, curve),
    opacity: curve.isExcited ? 0.85 : 1,
  };
  if (unconverged.every((value) => value === null)) return [line];
  const crosses: Data = {
    ...shared,
    name: `${curve.label}, not converged`,
    mode: 'markers',
    y: unconverged,
    marker: { symbol: 'x-thin-open', size: 10, color: look.colour, line: { color: look.colour, width: 2 } },
  };
  return [line, crosses];
}

/** Plotly takes any pattern of pixels here, which its types do not say. */
const dashText = (dash: readonly number[]): Dash =>
  (dash.length === 0 ? 'solid' : dash.map((length) => `${length}px`).join(',')) as Dash;

/** Of whatever level; the legend says so. */
const TRIPLET_MARKER = 'triangle-up-open';

function convergedMarker(look: CurveLook, curve: Curve) {
  const count = curve.values.length;
  const size = count <= 60 ? 6 : count <= 150 ? 4.5 : 3;
  return {
    symbol: curve.isTriplet ? TRIPLET_MARKER : curve.isExcited ? (`${look.shape}-open` as const) : look.shape,
    size: curve.isExcited ? size - 1 : size,
    color: look.colour,
  };
}

function cautionTrace(x: readonly (number | null)[], points: Points, theme: ChartTheme): Data {
  return {
    type: 'scatter',
    mode: 'markers',
    name: 'Cautions',
    x: [...x],
    y: points.map((point) => ((point?.cautions.length ?? 0) > 0 ? 0 : null)),
    hoverinfo: 'none',
    xaxis: 'x',
    yaxis: 'y3',
    showlegend: false,
    marker: { symbol: 'triangle-up', size: 8, color: theme.caution },
  };
}
