import { openSync } from 'fontkit';
import pdfmake from 'pdfmake';
import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces';
import { FONT_FILES } from './fonts';
import type { DrawnFigure } from './render-figure';
import { escapeMarkup, unescapeMarkup } from './text-escapes';

/** Names of the faces in a document; a style of its own is never asked for in both weights and slants at once. */
const FONTS = {
  body: { ...FONT_FILES.body, bolditalics: FONT_FILES.body.bold },
  fallback: { ...FONT_FILES.fallback, bolditalics: FONT_FILES.fallback.bold },
};
const FONT_PATHS: readonly string[] = Object.values(FONTS).flatMap((faces) => Object.values(faces));

/** Sets a document as PDF, its fonts embedded as subsets; nothing is read but the bundled fonts. */
export async function makePdf(definition: TDocumentDefinitions): Promise<Uint8Array> {
  pdfmake.setFonts(FONTS);
  pdfmake.setUrlAccessPolicy(() => false);
  pdfmake.setLocalAccessPolicy((path) => FONT_PATHS.includes(path));
  return pdfmake.createPdf({ defaultStyle: { font: 'body' }, ...definition }).getBuffer();
}

/** A figure as part of a document, of the given width in points. */
export function pdfFigure({ withLetters }: DrawnFigure, width: number): Content {
  const svg = withLetters.replace(/(<text[^>]*>)([^<]*)(?=<\/text>)/g, (_, opening: string, text: string) => {
    const runs = runsOf(unescapeMarkup(text)).map(({ text: run, font }) => {
      const escaped = escapeMarkup(run);
      return font === 'body' ? escaped : `<tspan font-family="${font}">${escaped}</tspan>`;
    });
    return opening + runs.join('');
  });
  // the face of whatever the drawing asks for and this document does not have
  return { svg, width, font: 'body' } as Content;
}

/** A text in runs of the face that has its characters: the library itself would leave a gap. */
export function inRuns(text: string): Content {
  const runs = runsOf(text);
  return runs.length === 1 && runs[0]!.font === 'body' ? text : runs;
}

interface Run {
  text: string;
  readonly font: keyof typeof FONTS;
}

let bodyFace: ReturnType<typeof openSync> | undefined;

function runsOf(text: string): Run[] {
  bodyFace ??= openSync(FONT_FILES.body.normal);
  const face = bodyFace;
  const isInBody = (character: string) =>
    'hasGlyphForCodePoint' in face && face.hasGlyphForCodePoint(character.codePointAt(0)!);
  const runs: Run[] = [];
  for (const character of text) {
    const font = isInBody(character) ? 'body' : 'fallback';
    const last = runs.at(-1);
    // what is set over a letter belongs to the letter's face
    if (last && (last.font === font || /\p{M}/u.test(character))) last.text += character;
    else runs.push({ text: character, font });
  }
  return runs;
}
