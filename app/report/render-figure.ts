import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { crc32 } from 'node:zlib';
import { initWasm, Resvg } from '@resvg/resvg-wasm';
import { parse, type Spec, View } from 'vega';
import { FONT_FILES, readFont } from './fonts';
import { escapeMarkup } from './text-escapes';

export interface FigureText {
  /** short name of the picture, for screen readers */
  readonly title: string;
  /** what it shows */
  readonly description: string;
}

/** Line drawings in print want more than photographs do. */
const PNG_DOTS_PER_INCH = 600;
const METRES_PER_INCH = 0.0254;

/** A figure of a given size on paper. */
export interface DrawnFigure {
  readonly widthMillimetres: number;
  readonly heightMillimetres: number;
  /** SVG in points with the letters as text: for what embeds fonts by itself */
  readonly withLetters: string;
}

export async function drawFigure(specification: Spec, widthMillimetres: number): Promise<DrawnFigure> {
  const view = new View(parse(specification), { renderer: 'none' });
  try {
    const withLetters = await view.toSVG();
    const { width, height } = sizeInPoints(withLetters);
    return { widthMillimetres, heightMillimetres: (height / width) * widthMillimetres, withLetters };
  } finally {
    view.finalize();
  }
}

function sizeInPoints(svg: string): { readonly width: number; readonly height: number } {
  const [, width, height] = /<svg[^>]*?\bwidth="([\d.]+)"[^>]*?\bheight="([\d.]+)"/.exec(svg) ?? [];
  return { width: Number(width), height: Number(height) };
}

/**
 * The figure as SVG. Letters are outlines: the file looks the same in every program and needs no font, which journals
 * ask for.
 */
export function renderSvg(figure: DrawnFigure, text: FigureText): Promise<string> {
  const { withLetters, widthMillimetres, heightMillimetres } = figure;
  const { width, height } = sizeInPoints(withLetters);
  const opening =
    `<svg xmlns="http://www.w3.org/2000/svg" version="1.1" role="img" width="${widthMillimetres}mm"` +
    ` height="${heightMillimetres.toFixed(2)}mm" viewBox="0 0 ${width} ${height}">` +
    `<title>${escapeMarkup(text.title)}</title><desc>${escapeMarkup(text.description)}</desc>`;
  return withSvg(withLetters, {}, (image) =>
    image
      .toString()
      .replace(/\n\s*/g, '')
      // a thousandth of a point is finer than any press
      .replace(/\d+\.\d{4,}/g, (number) => String(Number(Number(number).toFixed(3))))
      .replace(/<svg[^>]*>/, () => opening),
  );
}

/** The figure as PNG of the same size on paper. */
export function renderPng({ withLetters, widthMillimetres }: DrawnFigure): Promise<Uint8Array> {
  const pixels = Math.round((widthMillimetres / 1000 / METRES_PER_INCH) * PNG_DOTS_PER_INCH);
  return withSvg(withLetters, { fitTo: { mode: 'width', value: pixels } }, (image) => {
    const rendered = image.render();
    const png = rendered.asPng();
    rendered.free();
    return withResolution(png);
  });
}

async function withSvg<T>(
  svg: string,
  options: ConstructorParameters<typeof Resvg>[1] & object,
  use: (image: InstanceType<typeof Resvg>) => T,
): Promise<T> {
  const fontBuffers = await loadRenderer();
  const family = 'Source Sans 3';
  const image = new Resvg(svg, {
    ...options,
    font: { fontBuffers, defaultFontFamily: family, sansSerifFamily: family },
  });
  try {
    return use(image);
  } finally {
    image.free();
  }
}

let loading: Promise<Uint8Array[]> | undefined;

/** The WebAssembly module can be started only once in a process. */
function loadRenderer(): Promise<Uint8Array[]> {
  loading ??= (async () => {
    const require = createRequire(import.meta.url);
    await initWasm(await readFile(require.resolve('@resvg/resvg-wasm/index_bg.wasm')));
    return Promise.all([FONT_FILES.body.normal, FONT_FILES.fallback.normal].map(readFont));
  })();
  return loading;
}

/** Length of signature and header chunk, after which other chunks may stand (PNG specification, 5.2, 11.2.1). */
const PNG_HEADER_LENGTH = 33;

/** Adds the chunk that tells the size on paper (pHYs: pixels per metre; PNG specification, 11.3.4.3). */
function withResolution(png: Uint8Array): Uint8Array {
  const pixelsPerMetre = Math.round(PNG_DOTS_PER_INCH / METRES_PER_INCH);
  const body = Buffer.alloc(13);
  body.write('pHYs', 0, 'latin1');
  body.writeUInt32BE(pixelsPerMetre, 4);
  body.writeUInt32BE(pixelsPerMetre, 8);
  body.writeUInt8(1, 12);
  const chunk = Buffer.alloc(4 + body.length + 4);
  chunk.writeUInt32BE(body.length - 4, 0);
  body.copy(chunk, 4);
  chunk.writeUInt32BE(crc32(body), 4 + body.length);
  return Buffer.concat([png.subarray(0, PNG_HEADER_LENGTH), chunk, png.subarray(PNG_HEADER_LENGTH)]);
}
