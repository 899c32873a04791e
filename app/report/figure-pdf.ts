import { makePdf, pdfFigure } from './pdf-maker';
import type { DrawnFigure, FigureText } from './render-figure';

const POINTS_PER_MILLIMETRE = 72 / 25.4;

/** A figure as a PDF page of its own size: lines stay lines, letters stay text in embedded fonts. */
export function figurePdf(figure: DrawnFigure, { title, description }: FigureText): Promise<Uint8Array> {
  const width = figure.widthMillimetres * POINTS_PER_MILLIMETRE;
  return makePdf({
    pageSize: { width, height: figure.heightMillimetres * POINTS_PER_MILLIMETRE },
    pageMargins: 0,
    info: { title, subject: description, creator: 'farwell' },
    content: [pdfFigure(figure, width)],
  });
}
