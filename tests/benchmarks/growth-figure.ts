import type { GroupMark, Mark, Spec } from 'vega';
import {
  FAINT_INK,
  FILE_COLOURS,
  FONT,
  GRID,
  INK,
  LABEL_SIZE,
  TITLE_SIZE,
} from '../../app/report/figure-style';
import type { Growth } from './growth';

export const GROWTH_FIGURE_MILLIMETRES = 170;

const POINTS_PER_MILLIMETRE = 72 / 25.4;
const WIDTH = GROWTH_FIGURE_MILLIMETRES * POINTS_PER_MILLIMETRE;
const PANELS_A_ROW = 3;
const PANEL = { width: WIDTH / PANELS_A_ROW - 42, height: 95, left: 34, top: 34, bottom: 30 } as const;

/** A panel for each kind of work: what was measured, the fitted line, and, faint, the slope of theory. */
export function growthFigure(growth: readonly Growth[]): Spec {
  const rows = Math.ceil(growth.length / PANELS_A_ROW);
  const rowHeight = PANEL.top + PANEL.height + PANEL.bottom;
  return {
    width: WIDTH,
    height: rows * rowHeight,
    padding: 0,
    autosize: 'none',
    background: 'white',
    config: { axis: { labelFont: FONT, titleFont: FONT } },
    marks: growth.map((one, i) => panel(one, i % PANELS_A_ROW, Math.floor(i / PANELS_A_ROW) * rowHeight)),
  };
}

function panel(growth: Growth, column: number, top: number): GroupMark {
  const { samples, size, exponent, theoretical } = growth;
  const line = (slope: number) => {
    // through the middle of the measured points
    const meanOf = (value: (sample: Growth['samples'][number]) => number) =>
      Math.exp(samples.reduce((sum, sample) => sum + Math.log(value(sample)), 0) / samples.length);
    const [x, y] = [meanOf((sample) => sample.size), meanOf(({ seconds }) => seconds)];
    return [samples[0], samples.at(-1)].flatMap((sample) =>
      sample ? [{ size: sample.size, seconds: y * (sample.size / x) ** slope }] : [],
    );
  };
  const colour = FILE_COLOURS[0];
  return {
    type: 'group',
    encode: {
      enter: {
        x: { value: column * (WIDTH / PANELS_A_ROW) + PANEL.left },
        y: { value: top + PANEL.top },
        width: { value: PANEL.width },
        height: { value: PANEL.height },
      },
    },
    // what the axes take as the length of their grid
    signals: [
      { name: 'width', value: PANEL.width },
      { name: 'height', value: PANEL.height },
    ],
    data: [
      { name: 'measured', values: [...samples] },
      { name: 'fitted', values: line(exponent) },
      { name: 'theory', values: line(theoretical) },
    ],
    scales: [
      {
        name: 'x',
        type: 'log',
        range: [0, PANEL.width],
        domain: { fields: [{ data: 'measured', field: 'size' }] },
        padding: 6,
      },
      {
        name: 'y',
        type: 'log',
        range: [PANEL.height, 0],
        domain: { fields: ['measured', 'fitted', 'theory'].map((data) => ({ data, field: 'seconds' })) },
        padding: 6,
      },
    ],
    axes: [
      axis('x', 'bottom', size, { values: samples.map((sample) => sample.size), format: '.2~s' }),
      axis('y', 'left', 'seconds', {
        values: powersOfTen(samples.map(({ seconds }) => seconds)),
        format: '~g',
      }),
    ],
    marks: [
      title(growth),
      straight('theory', FAINT_INK, [3, 2]),
      straight('fitted', colour, []),
      {
        type: 'symbol',
        from: { data: 'measured' },
        encode: {
          enter: {
            x: { scale: 'x', field: 'size' },
            y: { scale: 'y', field: 'seconds' },
            size: { value: 18 },
            fill: { value: colour },
          },
        },
      },
    ],
  };
}

/** Those around and between the values; too few to read by: also twice and five times each. */
function powersOfTen(values: readonly number[]): number[] {
  const lowest = Math.floor(Math.log10(Math.min(...values)));
  const highest = Math.ceil(Math.log10(Math.max(...values)));
  const powers = Array.from({ length: highest - lowest + 1 }, (_, i) => 10 ** (lowest + i));
  return powers.length > 3 ? powers : powers.flatMap((power) => [power, 2 * power, 5 * power]);
}

function axis(scale: string, orient: 'bottom' | 'left', text: string, ticks: object) {
  return {
    scale,
    orient,
    title: text,
    ...ticks,
    grid: true,
    gridColor: GRID,
    gridWidth: 0.5,
    domainWidth: 0.5,
    tickWidth: 0.5,
    domainColor: FAINT_INK,
    tickColor: FAINT_INK,
    labelColor: INK,
    titleColor: INK,
    labelFontSize: LABEL_SIZE,
    titleFontSize: LABEL_SIZE,
    titleFontWeight: 'normal' as const,
    labelOverlap: true,
  };
}

function title({ work, exponent, theoretical }: Growth): Mark {
  const lines = work.length > 38 ? splitInTwo(work) : [work];
  return {
    type: 'text',
    encode: {
      enter: {
        x: { value: 0 },
        y: { value: -4 - 8 * lines.length },
        text: { value: [...lines, `exponent ${exponent.toFixed(2)}, in theory ${theoretical}`] },
        font: { value: FONT },
        fontSize: { value: TITLE_SIZE - 1.5 },
        lineHeight: { value: 8 },
        fill: { value: INK },
      },
    },
  };
}

function splitInTwo(text: string): string[] {
  const middle = text.indexOf(' ', text.length / 2);
  return middle < 0 ? [text] : [text.slice(0, middle), text.slice(middle + 1)];
}

function straight(data: string, colour: string, dash: number[]): Mark {
  return {
    type: 'line',
    from: { data },
    encode: {
      enter: {
        x: { scale: 'x', field: 'size' },
        y: { scale: 'y', field: 'seconds' },
        stroke: { value: colour },
        strokeWidth: { value: 1 },
        strokeDash: { value: dash },
      },
    },
  };
}
