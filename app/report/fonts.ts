import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';

const require = createRequire(import.meta.url);

/** The bundled faces: where the first ones lack a character, the second ones have it. */
export const FONT_FILES = {
  body: {
    normal: fontFile('@expo-google-fonts/source-sans-3/400Regular/SourceSans3_400Regular.ttf'),
    bold: fontFile('@expo-google-fonts/source-sans-3/600SemiBold/SourceSans3_600SemiBold.ttf'),
    italics: fontFile('@expo-google-fonts/source-sans-3/400Regular_Italic/SourceSans3_400Regular_Italic.ttf'),
  },
  fallback: {
    normal: fontFile('dejavu-fonts-ttf/ttf/DejaVuSans.ttf'),
    bold: fontFile('dejavu-fonts-ttf/ttf/DejaVuSans-Bold.ttf'),
    italics: fontFile('dejavu-fonts-ttf/ttf/DejaVuSans-Oblique.ttf'),
  },
} as const;

function fontFile(name: string): string {
  return require.resolve(name);
}

export const readFont = (path: string): Promise<Uint8Array> => readFile(path);
