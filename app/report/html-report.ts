import { FINDINGS_HEADINGS } from './findings-table';
import {
  DIGITS_NOTE,
  type ReportContent,
  type ReportedFile,
  reportHeading,
  SAFETY_NOTE,
} from './report-content';
import { NOT_COMPUTED, type ResultTable } from './result-table';
import { escapeMarkup, withMinus } from './text-escapes';
import type { TextTable } from './text-table';

/** For screen and paper; nothing is loaded from elsewhere. */
const STYLE = `
:root { color-scheme: light dark; --rule: #8886; --faint: #777; }
body { font: 15px/1.5 'Source Sans 3', 'Helvetica Neue', Arial, 'Liberation Sans', 'Noto Sans', sans-serif; max-width: 62rem; margin: 2rem auto; padding: 0 1rem; }
h1 { font-size: 1.35rem; font-weight: 600; line-height: 1.3; }
h2 { font-size: 1.05rem; font-weight: 600; margin-top: 2rem; }
figure { margin: 1.5rem 0; background: white; padding: 1rem; width: fit-content; }
figure svg { max-width: 100%; height: auto; }
.wide { overflow-x: auto; }
table { border-collapse: collapse; font-variant-numeric: tabular-nums; border-block: 1.5px solid; }
th { font-weight: 600; text-align: right; vertical-align: bottom; padding: .15rem .6rem; }
tbody th { font-weight: inherit; padding-block: .05rem; }
thead tr:last-child th { border-bottom: 1px solid; }
th[colspan] { text-align: center; white-space: nowrap; border-bottom: 1px solid var(--rule); }
td { text-align: right; padding: .05rem .6rem; white-space: nowrap; }
.words td, .words th { text-align: left; white-space: normal; }
.note, footer { color: var(--faint); font-size: .9rem; }
@media print { body { margin: 0; font-size: 10pt; } tr, figure { break-inside: avoid; } .wide { overflow: visible; } }
`;

/**
 * The report as one HTML file that needs nothing else.
 *
 * @param figure - the figure as SVG; absent for a single geometry
 */
export function htmlReport(content: ReportContent, figure: string | undefined): string {
  const { files, table, findings, spectroscopy, withoutFigure } = content;
  const heading = escapeMarkup(reportHeading(content));
  const sections = [
    `<h1>${heading}</h1>`,
    ...files.flatMap(introduction),
    ...(figure ? [`<figure>${figure}</figure>`] : []),
    ...(withoutFigure ? [`<p class="note">No figure: ${escapeMarkup(withoutFigure)}</p>`] : []),
    '<h2>Energies</h2>',
    `<div class="wide">${energyTable(table)}</div>`,
    ...[...table.notes, DIGITS_NOTE].map((note) => `<p class="note">${escapeMarkup(note)}</p>`),
    ...(findings.length > 0
      ? ['<h2>Findings</h2>', findingsTable(content), `<p class="note">${escapeMarkup(SAFETY_NOTE)}</p>`]
      : []),
    ...spectroscopy.flatMap(textTable),
    ...listSection('Cautions', files, ({ cautions }) => cautions),
    ...listSection('Method', files, ({ method }) => method),
  ];
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${heading}</title>
<style>${STYLE}</style>
</head>
<body>
${sections.join('\n')}
</body>
</html>
`;
}

function introduction({ name, sentence, title, notes }: ReportedFile): string[] {
  return [
    ...(name ? [`<p><strong>${escapeMarkup(name)}</strong>: ${escapeMarkup(sentence)}</p>`] : []),
    ...(title ? [`<p><em>${escapeMarkup(title)}</em></p>`] : []),
    ...(notes ? [`<p>${escapeMarkup(notes)}</p>`] : []),
  ];
}

function energyTable({ coordinateHeading, blocks, rows }: ResultTable): string {
  const spanning = blocks.map(({ file, quantity, columns }) => {
    const text = escapeMarkup([file, quantity].filter(Boolean).join(': '));
    return `<th scope="colgroup" colspan="${columns.length}">${text}</th>`;
  });
  const labels = [coordinateHeading, ...blocks.flatMap(({ columns }) => columns)];
  const heads = labels.map((label) => `<th scope="col">${escapeMarkup(label)}</th>`);
  const body = rows.map(({ coordinate, cells }) => {
    const values = cells.map((cell) => `<td>${cell === NOT_COMPUTED ? '–' : withMinus(cell)}</td>`);
    return `<tr><th scope="row">${withMinus(coordinate)}</th>${values.join('')}</tr>`;
  });
  return `<table><thead><tr><td></td>${spanning.join('')}</tr><tr>${heads.join('')}</tr></thead><tbody>${body.join('\n')}</tbody></table>`;
}

function findingsTable({ files, findings }: ReportContent): string {
  const several = files.length > 1;
  const heads = [...(several ? ['File'] : []), ...FINDINGS_HEADINGS].map(
    (head) => `<th scope="col">${head}</th>`,
  );
  const body = findings.map(({ file, level, minimum, energyAtMinimum, depth, onset }) => {
    const cells = [
      ...(several ? [file] : []),
      level,
      minimum,
      withMinus(energyAtMinimum),
      withMinus(depth),
      onset,
    ];
    return `<tr>${cells.map((cell) => `<td>${escapeMarkup(cell)}</td>`).join('')}</tr>`;
  });
  return `<table class="words"><thead><tr>${heads.join('')}</tr></thead><tbody>${body.join('\n')}</tbody></table>`;
}

function textTable({ heading, columns, rows, notes }: TextTable): string[] {
  const heads = columns.map((column) => `<th scope="col">${escapeMarkup(column)}</th>`);
  const body = rows.map(([head = '', ...cells]) => {
    const values = cells.map((cell) => `<td>${escapeMarkup(cell)}</td>`);
    return `<tr><th scope="row">${escapeMarkup(head)}</th>${values.join('')}</tr>`;
  });
  return [
    `<h2>${escapeMarkup(heading)}</h2>`,
    `<div class="wide"><table><thead><tr>${heads.join('')}</tr></thead><tbody>${body.join('\n')}</tbody></table></div>`,
    ...notes.map((note) => `<p class="note">${escapeMarkup(note)}</p>`),
  ];
}

function listSection(
  heading: string,
  files: readonly ReportedFile[],
  linesOf: (file: ReportedFile) => readonly string[],
): string[] {
  const items = files.flatMap((file) =>
    linesOf(file).map(
      (line) =>
        `<li>${file.name ? `<strong>${escapeMarkup(file.name)}</strong>: ` : ''}${escapeMarkup(line)}</li>`,
    ),
  );
  return items.length > 0 ? [`<h2>${heading}</h2>`, `<ul>${items.join('\n')}</ul>`] : [];
}
