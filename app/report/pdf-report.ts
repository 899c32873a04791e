import type { Content, ContentTable, TableCell } from 'pdfmake/interfaces';
import { inRuns, makePdf, pdfFigure } from './pdf-maker';
import type { DrawnFigure } from './render-figure';
import type { ReportBlock, ReportDocument } from './report-document';
import { headSpans, NO_VALUE, splitTable, type TextTable } from './text-table';

/** All lengths in points. */
const MARGIN = 56;
const PAGE_WIDTH = 595.28;
const TEXT_SIZE = 9.5;
const TABLE_SIZE = 7.5;
/** Characters of table type that fit between the margins. */
const LINE_LENGTH = 140;
/** Longer words are broken into lines. */
const LONGEST_WORDS = 40;
/** Longer tables are broken across pages. */
const ROWS_TOGETHER = 30;
/** As a fraction of the page's height. */
const LOWEST_HEADING = 0.8;
const RULE = 0.8;
const THIN_RULE = 0.4;
const FAINT = '#555555';

/**
 * The report as PDF on A4, with embedded subset fonts.
 *
 * @param figure - absent for a single geometry
 */
export function pdfReport(
  { title, heading, blocks }: ReportDocument,
  figure: DrawnFigure | undefined,
): Promise<Uint8Array> {
  return makePdf({
    pageSize: 'A4',
    pageMargins: [MARGIN, MARGIN, MARGIN, MARGIN],
    info: { title, subject: heading, creator: 'farwell' },
    defaultStyle: { font: 'body', fontSize: TEXT_SIZE, lineHeight: 1.1 },
    footer: (page, pages) => ({
      text: `${page} / ${pages}`,
      alignment: 'right',
      fontSize: TABLE_SIZE,
      color: FAINT,
      margin: [MARGIN, MARGIN / 2, MARGIN, 0],
    }),
    content: [
      { text: inRuns(heading), fontSize: 14, bold: true, margin: [0, 0, 0, 8] },
      ...setBlocks(blocks, figure),
    ],
    // else its heading stands alone at the foot of a page
    pageBreakBefore: ({ headlineLevel, startPosition }) =>
      headlineLevel === 1 && startPosition.verticalRatio > LOWEST_HEADING,
  });
}

/** Headings of sections stay with what follows them. */
function setBlocks(blocks: readonly ReportBlock[], figure: DrawnFigure | undefined): Content[] {
  let heading: Content[] = [];
  return blocks.flatMap((block) => {
    if (block.kind === 'section') {
      heading = [{ text: inRuns(block.heading), fontSize: 11.5, bold: true, margin: [0, 14, 0, 4] }];
      return [];
    }
    const [first, ...others] = setBlock(block, figure);
    if (!first) return [];
    const joined = heading.length > 0 ? joinHeading(heading, first) : first;
    heading = [];
    return [joined, ...others];
  });
}

function joinHeading(heading: Content[], first: Content): Content {
  const stack = [...heading, first];
  const isShort = typeof first === 'object' && ('unbreakable' in first || 'text' in first);
  return isShort ? { stack, unbreakable: true } : { stack, headlineLevel: 1 };
}

function setBlock(
  block: Exclude<ReportBlock, { kind: 'section' }>,
  figure: DrawnFigure | undefined,
): Content[] {
  switch (block.kind) {
    case 'paragraph':
      return [
        {
          text: inRuns(block.text),
          margin: [0, 0, 0, 5],
          ...(block.tone === 'title' && { italics: true }),
          ...(block.tone === 'note' && { fontSize: TABLE_SIZE + 0.5, color: FAINT }),
        },
      ];
    case 'figure':
      return figure
        ? [
            {
              stack: [
                pdfFigure(figure, PAGE_WIDTH - 2 * MARGIN),
                {
                  text: inRuns(block.caption),
                  fontSize: TABLE_SIZE + 0.5,
                  color: FAINT,
                  margin: [0, 4, 0, 0],
                },
              ],
              unbreakable: true,
              margin: [0, 8, 0, 8],
            },
          ]
        : [];
    case 'table':
      return splitTable(block.table, LINE_LENGTH, 'wrapped').map((table) => setTable(table));
    case 'list':
      return block.items.map(({ lead, text }) => ({
        ul: [{ text: [...(lead ? [{ text: [inRuns(`${lead}: `)], bold: true }] : []), inRuns(text)] }],
        margin: [0, 0, 0, 4],
      }));
    case 'references':
      return block.references.map((reference, index) => ({
        columns: [
          { text: `[${index + 1}]`, width: 26 },
          { text: inRuns(reference), width: '*' },
        ],
        margin: [0, 0, 0, 2],
      }));
  }
}

function setTable({ heading, columns, rows, notes }: TextTable): Content {
  const spans = headSpans(columns);
  const headRows: TableCell[][] = [
    ...spans.map((row) =>
      row.flatMap(({ text, width }): TableCell[] => [
        { text: inRuns(text), bold: true, alignment: 'center', colSpan: width },
        ...Array.from({ length: width - 1 }, (): TableCell => ({ text: '' })),
      ]),
    ),
    columns.map(
      ({ label, content }): TableCell => ({
        text: inRuns(label),
        bold: true,
        alignment: content === 'words' ? 'left' : 'right',
      }),
    ),
  ];
  const body = rows.map((row) =>
    columns.map(
      ({ content }, index): TableCell => ({
        text: inRuns(row[index] || NO_VALUE),
        alignment: content === 'words' ? 'left' : 'right',
      }),
    ),
  );
  const isBroad = columns.map(
    ({ content }, index) =>
      content === 'words' && rows.some((row) => (row[index] ?? '').length > LONGEST_WORDS),
  );
  const table: ContentTable = {
    table: {
      headerRows: headRows.length,
      keepWithHeaderRows: 2,
      dontBreakRows: true,
      widths: isBroad.map((broad) => (broad ? '*' : 'auto')),
      body: [...headRows, ...body],
    },
    layout: {
      hLineWidth: (line) => ruleWidth(line, headRows.length, headRows.length + body.length),
      vLineWidth: () => 0,
      hLineColor: () => '#333333',
      paddingTop: () => 1,
      paddingBottom: () => 1,
      paddingLeft: (column) => (column === 0 ? 0 : 5),
      paddingRight: () => 5,
    },
    fontSize: TABLE_SIZE,
    lineHeight: 1.1,
  };
  const stack: Content[] = [
    { text: inRuns(heading), bold: true, fontSize: TABLE_SIZE + 1, margin: [0, 8, 0, 3] },
    table,
    ...notes.map(
      (note, index): Content => ({
        text: inRuns(note),
        fontSize: TABLE_SIZE,
        color: FAINT,
        margin: [0, index === 0 ? 3 : 1, 0, index === notes.length - 1 ? 6 : 0],
      }),
    ),
  ];
  return rows.length <= ROWS_TOGETHER ? { stack, unbreakable: true } : { stack, headlineLevel: 1 };
}

function ruleWidth(line: number, headRows: number, allRows: number): number {
  if (line === 0 || line === allRows) return RULE;
  return line === headRows ? THIN_RULE : 0;
}
