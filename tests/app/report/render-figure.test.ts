import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { Resvg } from '@resvg/resvg-wasm';
import { describe, expect, it } from 'vitest';
import { planFigure } from '../../../app/report/figure-plan';
import { figureSpecification } from '../../../app/report/figure-specification';
import { renderPng, renderSvg } from '../../../app/report/render-figure';
import { sampleResults } from '../../support/sample-results';

const FACE = '@expo-google-fonts/source-sans-3/400Regular/SourceSans3_400Regular.ttf';
const caption = 'Pull the H–H bond of H₂ from 0.4 to 4 Å in 37 steps.';

async function drawn(widthMillimetres: number, title = 'h2'): Promise<string> {
  const planned = planFigure([sampleResults(['RHF', 'CIS', 'CISD', 'FCI'])], ['h2']);
  if (!('plan' in planned)) throw new Error(planned.reason);
  const specification = figureSpecification(planned.plan, { widthMillimetres, caption });
  return renderSvg(specification, widthMillimetres, { title, description: caption });
}

describe('renderSvg', () => {
  it('has the width asked for on paper, text as text, and faces that every system has', async () => {
    const svg = await drawn(85);
    expect(svg).toMatch(/^<svg [^>]*width="85mm" height="[\d.]+mm"/);
    const texts = [...svg.matchAll(/<text[^>]*>([^<]*)<\/text>/g)].map(([, text]) => text);
    for (const expected of ['H–H distance (Å)', 'RHF', 'CIS singlets', 'FCI'])
      expect(texts).toContain(expected);
    expect(texts.join(' ')).toContain(caption);
    const faces = [...svg.matchAll(/font-family="([^"]*)"/g)].map(([, face]) => face);
    expect(faces.length).toBeGreaterThan(10);
    for (const face of faces) expect(face).toMatch(/sans-serif$/);
  });

  it('says what it shows to those who cannot see it, with names escaped', async () => {
    const svg = await drawn(85, 'a <b> & c');
    expect(svg).toContain(`<title>a &lt;b&gt; &amp; c</title><desc>${caption}</desc>`);
  });

  it('keeps the size of type from the narrow to the wide figure', async () => {
    const sizesOf = (svg: string) =>
      new Set([...svg.matchAll(/font-size="([^"]*)"/g)].map(([, size]) => size));
    expect(sizesOf(await drawn(170))).toEqual(sizesOf(await drawn(85)));
  });

  it('keeps everything inside the page', async () => {
    for (const widthMillimetres of [85, 170]) {
      const svg = await drawn(widthMillimetres);
      await renderPng(svg, 1); // starts the module that measures
      const withoutPaper = svg
        .replace(/<rect[^>]*fill="white"[^>]*>/, '')
        .replace(/width="\d+mm" height="[\d.]+mm"/, '');
      const fontBuffers = [await readFile(createRequire(import.meta.url).resolve(FACE))];
      const page = new Resvg(withoutPaper, { font: { fontBuffers, defaultFontFamily: 'Source Sans 3' } });
      const drawnArea = page.innerBBox()!;
      expect(drawnArea.width).toBeGreaterThan(page.width / 2);
      expect(drawnArea.x).toBeGreaterThan(0);
      expect(drawnArea.y).toBeGreaterThan(0);
      expect(drawnArea.x + drawnArea.width).toBeLessThan(page.width);
      expect(drawnArea.y + drawnArea.height).toBeLessThan(page.height);
      page.free();
    }
  });
});

describe('renderPng', () => {
  const chunkNames = (png: Uint8Array): string[] => {
    const bytes = Buffer.from(png);
    const names: string[] = [];
    for (let at = 8; at < bytes.length; at += 12 + bytes.readUInt32BE(at))
      names.push(bytes.toString('latin1', at + 4, at + 8));
    return names;
  };

  it('is 85 mm wide at 600 dots an inch and says so', async () => {
    const png = Buffer.from(await renderPng(await drawn(85), 85));
    expect(png.toString('latin1', 1, 4)).toBe('PNG');
    expect(png.readUInt32BE(16)).toBe(2008);
    expect(chunkNames(png).slice(0, 2)).toEqual(['IHDR', 'pHYs']);
    expect(chunkNames(png).at(-1)).toBe('IEND');
    const physical = png.indexOf('pHYs');
    expect((png.readUInt32BE(physical + 4) * 0.0254).toFixed(0)).toBe('600');
  });

  it('draws every character that captions may have: no two of them come out alike as an empty box', async () => {
    const pictures = new Set<string>();
    const characters = ['₂', '⁺', 'ₑ', 'ω', '⟨', '⟩', 'Å', '−', '–', '\uE000'];
    for (const character of characters) {
      const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="20" height="20"><text x="2" y="15" font-family="'Source Sans 3', sans-serif">${character}</text></svg>`;
      pictures.add(Buffer.from(await renderPng(svg, 2)).toString('base64'));
    }
    expect(pictures.size).toBe(characters.length);
  });
});
