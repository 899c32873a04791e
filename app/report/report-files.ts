import type { StudyResults } from '#engine';
import type { ReportOptions, ReportPart } from '../contract/requests';
import { studyCsv } from '../study/csv';
import { studySentence } from '../study/sentence';
import { figurePdf } from './figure-pdf';
import { type FigurePlan, planFigure } from './figure-plan';
import { figureSpecification } from './figure-specification';
import { htmlReport } from './html-report';
import { latexTables } from './latex-tables';
import { markdownReport } from './markdown-report';
import { pdfReport } from './pdf-report';
import { pointsJson } from './points-json';
import { type DrawnFigure, drawFigure, renderPng, renderSvg } from './render-figure';
import { captionOf, reportDocument } from './report-content';
import { type ReportDocument, tablesOf } from './report-document';
import { tableCsv } from './table-csv';

export interface ReportFile {
  readonly part: ReportPart;
  /** relative to the folder of the report */
  readonly name: string;
  readonly content: () => string | Promise<string | Uint8Array>;
}

/** One column of a journal and the whole page. */
const WIDTHS_MILLIMETRES = [85, 170] as const;
/** Of the figure in the report. */
const PAGE_MILLIMETRES = 170;
/** Longer than that, file names of comparisons stop being names. */
const LONGEST_NAME = 80;

/**
 * The files of a report of one study, or of several to be compared: each is made when its content is asked for. A
 * single geometry has no figure, and the report says so.
 *
 * @param names - one a results file, without folder and endings
 * @param options - without a width, figures are made for one column of a journal and for the whole page
 * @throws ReportError `report.coordinatesDiffer` if the results share no axis
 */
export function reportFiles(
  results: readonly StudyResults[],
  names: readonly string[],
  options: ReportOptions = {},
): readonly ReportFile[] {
  const distinct = distinctNames(names);
  const sentences = results.map(({ study }) => studySentence(study));
  const figure = planFigure(results, distinct);
  const document = reportDocument({
    results,
    names: distinct,
    sentences,
    figure: 'plan' in figure ? { key: figure.plan.key } : figure,
  });
  const joined = distinct.join('-and-');
  const base = joined.length <= LONGEST_NAME ? joined : 'comparison';
  const caption = captionOf(
    results.map((file, index) => ({
      name: results.length > 1 ? (distinct[index] ?? '') : '',
      results: file,
    })),
    sentences,
  );
  return [
    ...results.flatMap((file, index): ReportFile[] => [
      { part: 'pointsCsv', name: `${distinct[index]}.csv`, content: () => studyCsv(file) },
      { part: 'pointsJson', name: `${distinct[index]}.points.json`, content: () => pointsJson(file) },
    ]),
    ...('plan' in figure ? figureFiles(figure.plan, base, caption, options) : []),
    ...documentFiles(document, base, 'plan' in figure ? figure.plan : undefined, caption),
  ];
}

function documentFiles(
  document: ReportDocument,
  base: string,
  plan: FigurePlan | undefined,
  caption: string,
): readonly ReportFile[] {
  const figure = onlyOnce(
    async (): Promise<DrawnFigure | undefined> =>
      plan && drawFigure(figureSpecification(plan, { widthMillimetres: PAGE_MILLIMETRES }), PAGE_MILLIMETRES),
  );
  const html = async () => {
    const drawn = await figure();
    return htmlReport(document, drawn && (await renderSvg(drawn, { title: base, description: caption })));
  };
  const picture = plan && `${base}.figure-${PAGE_MILLIMETRES}mm.png`;
  return [
    { part: 'html', name: `${base}.report.html`, content: html },
    { part: 'pdf', name: `${base}.report.pdf`, content: async () => pdfReport(document, await figure()) },
    { part: 'markdown', name: `${base}.report.md`, content: () => markdownReport(document, picture) },
    { part: 'latex', name: `${base}.tables.tex`, content: () => latexTables(document) },
    ...tablesOf(document)
      // of these the body of the report has the beginning only, and the points have files of their own
      .filter(
        ({ id }, index, all) => id !== 'energies' && !all.slice(index + 1).some((other) => other.id === id),
      )
      .map(
        (table): ReportFile => ({
          part: 'tableCsv',
          name: `${base}.tables/${table.id}.csv`,
          content: () => tableCsv(table),
        }),
      ),
  ];
}

function figureFiles(
  plan: FigurePlan,
  base: string,
  caption: string,
  { widthMillimetres, heightMillimetres, hasCaption = true }: ReportOptions,
): readonly ReportFile[] {
  const widths = widthMillimetres === undefined ? WIDTHS_MILLIMETRES : [widthMillimetres];
  return widths.flatMap((width): ReportFile[] => {
    const text = { title: base, description: caption };
    // refuses a size without room at once
    const specification = figureSpecification(plan, {
      widthMillimetres: width,
      ...(heightMillimetres !== undefined && { heightMillimetres }),
      ...(hasCaption && { caption }),
    });
    const figure = onlyOnce(() => drawFigure(specification, width));
    const name = `${base}.figure-${width}${heightMillimetres === undefined ? '' : `x${heightMillimetres}`}mm`;
    return [
      { part: 'figureSvg', name: `${name}.svg`, content: async () => renderSvg(await figure(), text) },
      { part: 'figurePdf', name: `${name}.pdf`, content: async () => figurePdf(await figure(), text) },
      { part: 'figurePng', name: `${name}.png`, content: async () => renderPng(await figure()) },
    ];
  });
}

function onlyOnce<T>(make: () => Promise<T>): () => Promise<T> {
  let made: Promise<T> | undefined;
  return () => {
    made ??= make();
    return made;
  };
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
