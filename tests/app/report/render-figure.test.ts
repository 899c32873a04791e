import { readFile } from 'node:fs/promises';
import { Resvg } from '@resvg/resvg-wasm';
import { describe, expect, it } from 'vitest';
import { planFigure } from '../../../app/report/figure-plan';
import { type FigureOptions, figureSpecification } from '../../../app/report/figure-specification';
import { FONT_FILES } from '../../../app/report/fonts';
import { type DrawnFigure, drawFigure, renderPng, renderSvg } from '../../../app/report/render-figure';
import { sampleResults } from '../../support/sample-results';

const caption = 'Pull the H–H bond of H₂ from 0.4 to 4 Å in 37 steps.';

async function drawn(options: Partial<FigureOptions> = {}) {
  const planned = planFigure([sampleResults(['RHF', 'CIS', 'CISD', 'FCI'])], ['h2']);
  if (!('plan' in planned)) throw new Error(planned.reason);
  const { widthMillimetres = 85 } = options;
  return drawFigure(
    figureSpecification(planned.plan, { widthMillimetres, caption, ...options }),
    widthMillimetres,
  );
}

describe('drawFigure', () => {
  it('keeps the size of type from the narrow to the wide figure', async () => {
    const sizesOf = ({ withLetters }: DrawnFigure) =>
      new Set([...withLetters.matchAll(/font-size="([^"]*)"/g)].map(([, size]) => size));
    expect(sizesOf(await drawn({ widthMillimetres: 170 }))).toEqual(sizesOf(await drawn()));
  });

  it('has exactly the height asked for, and refuses one without room', async () => {
    const { heightMillimetres } = await drawn({ heightMillimetres: 90 });
    expect(heightMillimetres).toBeCloseTo(90, 9);
    await expect(drawn({ heightMillimetres: 40 })).rejects.toMatchObject({
      code: 'report.figureTooSmall',
      remedy: expect.stringMatching(/^Make it at least \d+ mm high/),
    });
    // what it promises, it keeps
    const error = await drawn({ heightMillimetres: 40 }).catch(
      (reason: Error & { remedy: string }) => reason,
    );
    const least = Number(/\d+/.exec((error as { remedy: string }).remedy)![0]);
    expect((await drawn({ heightMillimetres: least })).heightMillimetres).toBeCloseTo(least, 9);
  });

  it('keeps everything inside the page', async () => {
    for (const widthMillimetres of [85, 170]) {
      const figure = await drawn({ widthMillimetres });
      await renderPng({ ...figure, widthMillimetres: 1 }); // starts the module that measures
      const withoutPaper = figure.withLetters.replace(/<rect[^>]*fill="white"[^>]*>/, '');
      const fontBuffers = [await readFile(FONT_FILES.body.normal)];
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

describe('renderSvg', () => {
  it('has the width asked for on paper, and no letter that needs a font', async () => {
    const figure = await drawn();
    expect(figure.withLetters).toContain('>H–H distance (Å)<');
    const svg = await renderSvg(figure, { title: 'h2', description: caption });
    expect(svg).toMatch(/^<svg [^>]*width="85mm" height="[\d.]+mm"/);
    expect(svg).not.toMatch(/<text|font-family|<image|href=/);
    expect(svg.match(/<path/g)!.length).toBeGreaterThan(100);
  });

  it('says what it shows to those who cannot see it, with names escaped', async () => {
    const svg = await renderSvg(await drawn(), { title: 'a <b> & c', description: caption });
    expect(svg).toContain(`<title>a &lt;b&gt; &amp; c</title><desc>${caption}</desc>`);
  });

  it('looks as the drawing with letters does', async () => {
    const figure = await drawn();
    const outlined = await renderSvg(figure, { title: '', description: '' });
    const small = { widthMillimetres: 8.5 };
    const pictures = await Promise.all(
      [figure.withLetters, outlined].map((withLetters) => renderPng({ ...figure, ...small, withLetters })),
    );
    const [first, second] = pictures.map((png) => Buffer.from(png).length);
    // the same picture, but for rounding in the third decimal of a point
    expect(Math.abs(first! - second!) / first!).toBeLessThan(0.02);
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
    const png = Buffer.from(await renderPng(await drawn()));
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
      const withLetters = `<svg xmlns="http://www.w3.org/2000/svg" width="20" height="20"><text x="2" y="15" font-family="'Source Sans 3', sans-serif">${character}</text></svg>`;
      const figure = { widthMillimetres: 2, heightMillimetres: 2, withLetters };
      pictures.add(Buffer.from(await renderPng(figure)).toString('base64'));
    }
    expect(pictures.size).toBe(characters.length);
  });
});
