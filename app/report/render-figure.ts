import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { crc32 } from 'node:zlib';
import { initWasm, Resvg } from '@resvg/resvg-wasm';
import { parse, type Spec, View } from 'vega';
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
/** Where the bundled faces do not have a character, the second one has. */
const FONT_FILES = [
  '@expo-google-fonts/source-sans-3/400Regular/SourceSans3_400Regular.ttf',
  'dejavu-fonts-ttf/ttf/DejaVuSans.ttf',
] as const;

/** The figure as SVG of the given width on paper; text stays text. */
export async function renderSvg(
  specification: Spec,
  widthMillimetres: number,
  text: FigureText,
): Promise<string> {
  const view = new View(parse(specification), { renderer: 'none' });
  try {
    const drawing = await view.toSVG();
    const [, width, height] = /<svg[^>]*?\bwidth="([\d.]+)"[^>]*?\bheight="([\d.]+)"/.exec(drawing) ?? [];
    const heightMillimetres = (Number(height) / Number(width)) * widthMillimetres;
    const opening =
      `<svg xmlns="http://www.w3.org/2000/svg" version="1.1" role="img" width="${widthMillimetres}mm"` +
      ` height="${heightMillimetres.toFixed(2)}mm" viewBox="0 0 ${width} ${height}">` +
      `<title>${escapeMarkup(text.title)}</title><desc>${escapeMarkup(text.description)}</desc>`;
    return drawing.replace(/<svg[^>]*>/, () => opening);
  } finally {
    view.finalize();
  }
}

/** The SVG as PNG of the same size on paper, with the bundled fonts, so that it is the same on every machine. */
export async function renderPng(svg: string, widthMillimetres: number): Promise<Uint8Array> {
  const fontBuffers = await loadRenderer();
  const pixels = Math.round((widthMillimetres / 1000 / METRES_PER_INCH) * PNG_DOTS_PER_INCH);
  const image = new Resvg(svg, {
    fitTo: { mode: 'width', value: pixels },
    font: { fontBuffers, defaultFontFamily: 'Source Sans 3', sansSerifFamily: 'Source Sans 3' },
  });
  try {
    const rendered = image.render();
    const png = rendered.asPng();
    rendered.free();
    return withResolution(png);
  } finally {
    image.free();
  }
}

let loading: Promise<Uint8Array[]> | undefined;

/** The WebAssembly module can be started only once in a process. */
function loadRenderer(): Promise<Uint8Array[]> {
  const require = createRequire(import.meta.url);
  const load = (file: string): Promise<Uint8Array> => readFile(require.resolve(file));
  loading ??= (async () => {
    await initWasm(await load('@resvg/resvg-wasm/index_bg.wasm'));
    return Promise.all(FONT_FILES.map(load));
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
