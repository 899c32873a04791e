import type { ReportBlock, ReportDocument } from './report-document';
import { fullLabel, NO_VALUE, type TextTable } from './text-table';

/**
 * The report as Markdown.
 *
 * @param figureFile - name of a picture in the same folder; absent for a single geometry
 */
export function markdownReport({ heading, blocks }: ReportDocument, figureFile?: string): string {
  return `${[`# ${escapeMarkdown(heading)}`, ...blocks.map((block) => setBlock(block, figureFile))].join('\n\n')}\n`;
}

/** One table by itself, its heading above and its notes below it. */
export function markdownTable({ heading, columns, rows, notes }: TextTable): string {
  const row = (cells: readonly string[]) => `| ${cells.map(escapeMarkdown).join(' | ')} |`;
  const rule = columns.map(({ content }) => (content === 'words' ? ':---' : '---:'));
  const body = rows.map((cells) => row(cells.map((cell) => cell || NO_VALUE)));
  const table = [row(columns.map(fullLabel)), `| ${rule.join(' | ')} |`, ...body].join('\n');
  return [`**${escapeMarkdown(heading)}**`, table, ...notes.map(escapeMarkdown)].join('\n\n');
}

function setBlock(block: ReportBlock, figureFile: string | undefined): string {
  switch (block.kind) {
    case 'section':
      return `## ${escapeMarkdown(block.heading)}`;
    case 'paragraph':
      return block.tone === 'title' ? `*${escapeMarkdown(block.text)}*` : escapeParagraph(block.text);
    case 'figure':
      // a name may hold what ends an address
      return `![${escapeMarkdown(block.caption)}](${encodeURIComponent(figureFile ?? '')})`;
    case 'table':
      return markdownTable(block.table);
    case 'list':
      return block.items
        .map(({ lead, text }) => `- ${lead ? `**${escapeMarkdown(lead)}:** ` : ''}${escapeMarkdown(text)}`)
        .join('\n');
    case 'references':
      return block.references
        .map((reference, index) => `${index + 1}. ${escapeMarkdown(reference)}`)
        .join('\n');
  }
}

/** Text from outside cannot become markup, nor break out of its line or cell. */
const escapeMarkdown = (text: string): string =>
  text.replace(/\s+/g, ' ').replace(/[\\`*_[\]<>|#~]/g, (character) => `\\${character}`);

/** Nor, at the beginning of a paragraph, the beginning of a list. */
const escapeParagraph = (text: string): string =>
  escapeMarkdown(text)
    .replace(/^[-+](?=\s)/, (sign) => `\\${sign}`)
    .replace(/^(\d+)(?=[.)]\s)/, '$1\\');
