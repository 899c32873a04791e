import { extractText, getDocumentProxy, getMeta } from 'unpdf';
import { beforeAll, describe, expect, it } from 'vitest';
import { figurePdf } from '../../../app/report/figure-pdf';
import { planFigure } from '../../../app/report/figure-plan';
import { figureSpecification } from '../../../app/report/figure-specification';
import { pdfReport } from '../../../app/report/pdf-report';
import { drawFigure } from '../../../app/report/render-figure';
import { documentOf, withSpectroscopy } from '../../support/reports';

const results = withSpectroscopy(45);

async function drawn(widthMillimetres: number) {
  const planned = planFigure([results], ['h2']);
  if (!('plan' in planned)) throw new Error(planned.reason);
  return drawFigure(figureSpecification(planned.plan, { widthMillimetres }), widthMillimetres);
}

async function wordsOf(pdf: Uint8Array): Promise<string> {
  const { text } = await extractText(await getDocumentProxy(new Uint8Array(pdf)), { mergePages: true });
  return text.replace(/\s+/g, ' ');
}

describe('pdfReport', () => {
  let pdf: Uint8Array;
  let words = '';
  beforeAll(async () => {
    pdf = await pdfReport(documentOf(results), await drawn(170));
    words = await wordsOf(pdf);
  });

  it('has the energies of every point, as the results have them', () => {
    for (const { coordinate, levels } of results.points) {
      const level = levels.FCI;
      if (level?.kind !== 'correlated') throw new Error('sample changed');
      const numbers = [level.energy, level.correlation].map((value) => value.toFixed(6).replace('-', '−'));
      expect(words).toContain(`${coordinate!.toFixed(1)} ${numbers.join(' ')}`);
    }
  });

  it('has the numbers of the findings and of every level', () => {
    const { minimum, vibration } = results.findings.FCI!;
    if (minimum.kind !== 'found' || vibration?.kind !== 'found') throw new Error('sample changed');
    expect(words).toContain(minimum.equilibriumDistance.toFixed(5));
    expect(words).toContain(`−${Math.abs(minimum.energy).toFixed(6)}`);
    for (const { v, energyPerCm, rotationalConstantPerCm } of vibration.levels)
      expect(words).toContain(`${v} ${energyPerCm.toFixed(2)} ${rotationalConstantPerCm.toFixed(4)}`);
  });

  it('shows characters that its first font lacks', () => {
    expect(words).toMatch(/D̄ₑ, centrifugal distortion \(cm⁻¹\)/u);
    expect(words).toContain('rₑ, equilibrium distance (Å)');
  });

  it('embeds its fonts, as subsets, and no picture made of dots', async () => {
    const source = Buffer.from(pdf).toString('latin1');
    const fonts = [...source.matchAll(/\/FontName \/(\S+)/g)].map(([, name]) => name);
    expect(fonts.length).toBeGreaterThanOrEqual(3);
    for (const name of fonts) expect(name).toMatch(/^[A-Z]{6}\+/);
    expect(source.match(/\/FontFile2/g)).toHaveLength(fonts.length);
    expect(source).not.toMatch(/\/Subtype \/Image/);
    const { info } = await getMeta(await getDocumentProxy(new Uint8Array(pdf)));
    expect(info.Title).toBe('Two hydrogen atoms come together');
  });
});

describe('figurePdf', () => {
  it('is a page of the size on paper, with its letters as text', async () => {
    const figure = await drawn(85);
    const pdf = await figurePdf(figure, { title: 'h2', description: '' });
    const page = await (await getDocumentProxy(new Uint8Array(pdf))).getPage(1);
    const [, , width = 0, height = 0] = page.view;
    expect((width * 25.4) / 72).toBeCloseTo(85, 1);
    expect((height * 25.4) / 72).toBeCloseTo(figure.heightMillimetres, 1);
    expect(await wordsOf(pdf)).toContain('H–H distance (Å)');
  });
});
