import type { ListItem, ReportBlock, ReportDocument } from './report-document';
import { escapeMarkup } from './text-escapes';
import { headSpans, NO_VALUE, type TableColumn, type TextTable } from './text-table';

/** For screen and paper; nothing is loaded from elsewhere. */
const STYLE = `
:root { color-scheme: light dark; --rule: #8886; --faint: #666; }
@media (prefers-color-scheme: dark) { :root { --faint: #aaa; } }
body { font: 15px/1.5 'Source Sans 3', 'Helvetica Neue', Arial, 'Liberation Sans', 'Noto Sans', sans-serif; max-width: 62rem; margin: 2rem auto; padding: 0 1rem; }
h1 { font-size: 1.35rem; font-weight: 600; line-height: 1.3; }
h2 { font-size: 1.1rem; font-weight: 600; margin-top: 2.2rem; }
p, li { max-width: 46rem; }
.title { font-style: italic; }
figure { margin: 1.5rem 0; }
figure svg { background: white; max-width: 100%; height: auto; }
figcaption, .note { color: var(--faint); font-size: .9rem; }
figcaption { max-width: 46rem; }
.wide { overflow-x: auto; margin-top: 1.2rem; }
table { border-collapse: collapse; font-variant-numeric: tabular-nums; border-bottom: 1.5px solid; }
caption { text-align: left; font-weight: 600; padding-bottom: .3rem; white-space: nowrap; }
thead tr:first-child > * { border-top: 1.5px solid; }
th { font-weight: 600; text-align: right; vertical-align: bottom; padding: .15rem .6rem; }
tbody th { font-weight: inherit; padding-block: .05rem; }
thead tr:last-child th { border-bottom: 1px solid; }
th[colspan] { text-align: center; border-bottom: 1px solid var(--rule); }
td { text-align: right; padding: .05rem .6rem; }
.words { text-align: left; }
@media print { body { margin: 0; font-size: 10pt; } tr, figure { break-inside: avoid; } .wide { overflow: visible; } }
`;

/**
 * The report as one HTML file that needs nothing else.
 *
 * @param figure - the figure as SVG; absent for a single geometry
 */
export function htmlReport({ title, heading, blocks }: ReportDocument, figure: string | undefined): string {
  return `<!DOCTYPE html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escapeMarkup(title)}</title>
<style>${STYLE}</style>
</head>
<body>
<main>
<h1>${escapeMarkup(heading)}</h1>
${blocks.map((block) => setBlock(block, figure)).join('\n')}
</main>
</body>
</html>
`;
}

function setBlock(block: ReportBlock, figure: string | undefined): string {
  switch (block.kind) {
    case 'section':
      return `<h2>${escapeMarkup(block.heading)}</h2>`;
    case 'paragraph':
      return `<p${block.tone ? ` class="${block.tone}"` : ''}>${escapeMarkup(block.text)}</p>`;
    case 'figure':
      return `<figure>\n${figure ?? ''}\n<figcaption>${escapeMarkup(block.caption)}</figcaption>\n</figure>`;
    case 'table':
      return setTable(block.table);
    case 'list':
      return `<ul>\n${block.items.map(setItem).join('\n')}\n</ul>`;
    case 'references':
      return `<ol>\n${block.references.map((reference) => `<li>${escapeMarkup(reference)}</li>`).join('\n')}\n</ol>`;
  }
}

const setItem = ({ lead, text }: ListItem): string =>
  `<li>${lead ? `<strong>${escapeMarkup(lead)}:</strong> ` : ''}${escapeMarkup(text)}</li>`;

function setTable({ heading, columns, rows, notes }: TextTable): string {
  const classOf = (column: TableColumn | undefined) => (column?.content === 'words' ? ' class="words"' : '');
  const spans = headSpans(columns).map((row) => {
    const heads = row.map(({ text, width }) => {
      if (!text) return width > 1 ? `<td colspan="${width}"></td>` : '<td></td>';
      return `<th scope="colgroup" colspan="${width}">${escapeMarkup(text)}</th>`;
    });
    return `<tr>${heads.join('')}</tr>`;
  });
  const labels = columns.map(
    (column) => `<th scope="col"${classOf(column)}>${escapeMarkup(column.label)}</th>`,
  );
  const body = rows.map(([head = '', ...cells]) => {
    const values = cells.map(
      (cell, index) => `<td${classOf(columns[index + 1])}>${escapeMarkup(cell || NO_VALUE)}</td>`,
    );
    return `<tr><th scope="row"${classOf(columns[0])}>${escapeMarkup(head)}</th>${values.join('')}</tr>`;
  });
  return `<div class="wide">
<table>
<caption>${escapeMarkup(heading)}</caption>
<thead>${[...spans, `<tr>${labels.join('')}</tr>`].join('\n')}</thead>
<tbody>
${body.join('\n')}
</tbody>
</table>
</div>
${notes.map((note) => `<p class="note">${escapeMarkup(note)}</p>`).join('\n')}`;
}
