import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import writeFileAtomic from 'write-file-atomic';
import type { StudyResults } from '#engine';
import { studyCsv } from '../study/csv';
import { studySentence } from '../study/sentence';
import { planFigure } from './figure-plan';
import { figureSpecification } from './figure-specification';
import { htmlReport } from './html-report';
import { latexTable } from './latex-table';
import { markdownReport } from './markdown-table';
import { renderPng, renderSvg } from './render-figure';
import { reportContent } from './report-content';

/** One column of a journal and the whole page. */
const WIDTHS_MILLIMETRES = [85, 170] as const;
const HTML_FIGURE_MILLIMETRES = 170;
/** Longer than that, file names of comparisons stop being names. */
const LONGEST_NAME = 80;

/**
 * Writes the report of one study, or of several to be compared, into a folder that is made if need be: figures
 * (SVG and PNG, two widths), a CSV a results file, the report as HTML and as Markdown, a LaTeX table. A single
 * geometry has no figure, and the report says so.
 *
 * @param names - one a results file, without folder and endings
 * @returns the paths written
 * @throws ReportError `report.coordinatesDiffer` if the results share no axis, before anything is written
 */
export async function writeReport(
  results: readonly StudyResults[],
  names: readonly string[],
  outDir: string,
): Promise<string[]> {
  const distinct = distinctNames(names);
  const sentences = results.map(({ study }) => studySentence(study));
  const figure = planFigure(results, distinct);
  const content = reportContent(results, distinct, sentences, 'reason' in figure ? figure.reason : undefined);
  const joined = distinct.join('-and-');
  const base = joined.length <= LONGEST_NAME ? joined : 'comparison';
  const caption = sentences
    .map((sentence, index) => ended(results.length > 1 ? `${distinct[index]}: ${sentence}` : sentence))
    .join(' ');

  const svgs = new Map<number, string>();
  if ('plan' in figure) {
    for (const widthMillimetres of WIDTHS_MILLIMETRES) {
      const specification = figureSpecification(figure.plan, { widthMillimetres, caption });
      svgs.set(
        widthMillimetres,
        await renderSvg(specification, widthMillimetres, { title: joined, description: caption }),
      );
    }
  }
  const files = new Map<string, string | Uint8Array>();
  for (const [index, file] of results.entries()) files.set(`${distinct[index]}.csv`, studyCsv(file));
  files.set(`${base}.report.md`, markdownReport(content));
  files.set(`${base}.report.html`, htmlReport(content, svgs.get(HTML_FIGURE_MILLIMETRES)));
  files.set(`${base}.table.tex`, latexTable(content));
  for (const [widthMillimetres, svg] of svgs) {
    files.set(`${base}.figure-${widthMillimetres}mm.svg`, svg);
    files.set(`${base}.figure-${widthMillimetres}mm.png`, await renderPng(svg, widthMillimetres));
  }
  await mkdir(outDir, { recursive: true });
  const paths: string[] = [];
  for (const [name, body] of files) {
    const path = join(outDir, name);
    await writeFileAtomic(path, typeof body === 'string' ? body : Buffer.from(body));
    paths.push(path);
  }
  return paths;
}

/** Results of the same name from different folders are told apart, and none can leave the folder. */
function distinctNames(names: readonly string[]): readonly string[] {
  const used = new Set<string>();
  return names.map((name) => {
    const safe = name.replace(/[/\\:*?"<>|\p{Cc}]/gu, '-');
    let distinct = safe;
    for (let copy = 2; used.has(distinct); copy += 1) distinct = `${safe}-${copy}`;
    used.add(distinct);
    return distinct;
  });
}

const ended = (sentence: string): string => (/[.!?]$/.test(sentence) ? sentence : `${sentence}.`);
