import type { Layout } from 'plotly.js-dist';
import { PRINT_CHART } from './chart-theme';
import { buildFigure, type Figure, type FigureRequest } from './figure';
import { loadPlotly } from './load-plotly';

/** In CSS pixels; a PNG has three times as many dots, some 300 an inch on a printed page. */
const WIDTH = 900;
const PLOT_HEIGHT = 860;
const PNG_SCALE = 3;
/** of the legend, over the name of the upper chart */
const LEGEND_LIFT = 26;
const CAPTION_LINE_LENGTH = 118;
const CAPTION_LINE_HEIGHT = 19;

export interface PrintFigure extends Figure {
  readonly width: number;
  readonly height: number;
}

/** Both charts for paper: white ground, legend on top, the study sentence as caption below. */
export function printFigure(
  request: Omit<FigureRequest, 'theme' | 'zoomKey' | 'size'>,
  caption: string,
): PrintFigure {
  const lines = wrap(caption, CAPTION_LINE_LENGTH);
  const captionHeight = lines.length * CAPTION_LINE_HEIGHT;
  const size = { width: WIDTH, height: PLOT_HEIGHT + captionHeight };
  const { data, layout } = buildFigure({ ...request, theme: PRINT_CHART, zoomKey: '', size });
  const print: Partial<Layout> = {
    ...layout,
    showlegend: true,
    legend: {
      orientation: 'h',
      x: 0,
      xanchor: 'left',
      y: 1 + LEGEND_LIFT / PLOT_HEIGHT,
      yanchor: 'bottom',
      itemwidth: 46,
    },
    hovermode: false,
    margin: { l: 72, r: 24, t: 72, b: 64 + captionHeight },
    annotations: [
      ...(layout.annotations ?? []),
      {
        text: lines.map(escapeMarkup).join('<br>'),
        showarrow: false,
        xref: 'paper',
        yref: 'paper',
        x: 0,
        xanchor: 'left',
        align: 'left',
        y: 0,
        yanchor: 'top',
        yshift: -56,
      },
    ],
  };
  return { data, layout: print, ...size };
}

export async function figureAsSvg({ data, layout, width, height }: PrintFigure): Promise<string> {
  const plotly = await loadPlotly();
  const address = await plotly.toImage({ data: [...data], layout }, { format: 'svg', width, height });
  return decodeURIComponent(address.slice(address.indexOf(',') + 1));
}

export async function figureAsPng({ data, layout, width, height }: PrintFigure): Promise<Blob> {
  const plotly = await loadPlotly();
  const address = await plotly.toImage(
    { data: [...data], layout },
    { format: 'png', width, height, scale: PNG_SCALE },
  );
  const bytes = Uint8Array.from(atob(address.slice(address.indexOf(',') + 1)), (character) =>
    character.charCodeAt(0),
  );
  return new Blob([bytes], { type: 'image/png' });
}

/** Lines of at most `length` characters, broken at spaces. */
export function wrap(text: string, length: number): readonly string[] {
  const lines: string[] = [];
  for (const word of text.split(' ')) {
    const last = lines.at(-1);
    if (last !== undefined && last.length + 1 + word.length <= length)
      lines[lines.length - 1] = `${last} ${word}`;
    else lines.push(word);
  }
  return lines;
}

/** Plotly reads a small markup in its texts, which a user's words must not become. */
const escapeMarkup = (text: string): string =>
  text.replaceAll('&', '&amp;').replaceAll('<', '&lt;').replaceAll('>', '&gt;');
