import { describe, expect, it } from 'vitest';
import { latexTables } from '../../../app/report/latex-tables';
import { documentOf, withSpectroscopy } from '../../support/reports';
import { sampleResults } from '../../support/sample-results';

/** Commands of the LaTeX kernel, of booktabs and of longtable that tables may use; mathematics among them. */
const COMMANDS = new Set(
  `AA alpha approx bar begin beta bottomrule caption cdot centering chi circ cmidrule delta Delta end endfoot endhead
  footnotesize frac gamma Gamma infty lambda Lambda langle ldots leq geq linewidth medskip midrule mu multicolumn nu omega
  Phi phi pi Pi pm Psi psi raggedright rangle rho rightarrow Sigma sigma surd tabularnewline textasciicircum textasciitilde textbackslash textbar
  textgreater textless textsubscript textsuperscript theta times toprule varepsilon xi zeta`.split(/\s+/),
);

const columnsOf = (line: string): number =>
  line
    .split(/(?<!\\)&/)
    .map((cell) => Number(/\\multicolumn\{(\d+)\}/.exec(cell)?.[1] ?? 1))
    .reduce((a, b) => a + b, 0);

/** What of a source LaTeX would stop at. */
function complaints(source: string): string[] {
  const text = source.replace(/^%.*$/gm, '');
  const commands = [...text.matchAll(/\\([A-Za-z]+)/g)].map(([, name]) => name!);
  const unknown = commands.filter((name) => !COMMANDS.has(name));
  const exotic = [...text].filter((character) => /[^\n\x20-\x7e]/.test(character));
  const plain = text.replace(/\\./g, '');
  let depth = 0;
  let isBalanced = true;
  for (const character of plain) {
    depth += character === '{' ? 1 : character === '}' ? -1 : 0;
    isBalanced &&= depth >= 0;
  }
  const environments: string[] = [];
  for (const [, kind, name] of text.matchAll(/\\(begin|end)\{(\w+)\}/g)) {
    if (kind === 'begin') environments.push(name!);
    else if (environments.pop() !== name) isBalanced = false;
  }
  const lines = plain.split('\n').filter((line) => (line.match(/\$/g)?.length ?? 0) % 2 === 1);
  return [
    ...unknown.map((name) => `\\${name}`),
    ...exotic,
    ...(isBalanced && depth === 0 && environments.length === 0 ? [] : ['unbalanced']),
    ...lines.map((line) => `odd number of $: ${line}`),
    ...[...plain.matchAll(/[#_^%~](?![{])/g)]
      .map(([character]) => character)
      .filter((c) => !'~^'.includes(c)),
  ];
}

describe('latexTables', () => {
  const source = latexTables(documentOf(sampleResults()));

  it('has as many cells in every row as columns', () => {
    const tables = [...source.matchAll(/\\begin\{tabular\}\{([lr]+)\}([\s\S]*?)\\end\{tabular\}/g)];
    expect(tables.length).toBeGreaterThanOrEqual(2);
    for (const [, columns, body] of tables) {
      const rows = body!.split('\n').filter((line) => line.endsWith('\\\\'));
      expect(rows.length).toBeGreaterThan(2);
      for (const row of rows) expect(columnsOf(row)).toBe(columns!.length);
    }
  });

  it('spans each quantity by a rule, captions with the sentence, sets numbers in mathematics', () => {
    expect(source).toContain(
      '\\multicolumn{3}{c}{Energy (hartree)} & \\multicolumn{2}{c}{Correlation energy (hartree)}',
    );
    expect(source).toContain('\\cmidrule(lr){2-4} \\cmidrule(lr){5-6}');
    expect(source).toMatch(/\\caption\{Energies at all points\. Pull the H--H bond of H\\textsubscript\{2\}/);
    expect(source).toMatch(/\$0\.4\$ & \$-\d\.\d{6}\$/);
  });

  it('has the findings, constants and levels too', () => {
    const spectroscopy = latexTables(documentOf(withSpectroscopy(5)));
    for (const caption of ['Read off the curves', 'Constants', 'Levels without rotation'])
      expect(spectroscopy).toContain(`\\caption{${caption}.`);
    expect(spectroscopy).toContain(
      '$\\bar{D}$\\textsubscript{e}, centrifugal distortion (cm\\textsuperscript{$-$1})',
    );
  });

  it('names the files above their columns in a comparison, and breaks a long table across pages', () => {
    const first = sampleResults(['RHF']);
    const shifted = first.points.map((point, index) =>
      index < 10 ? { ...point, coordinate: point.coordinate! + 0.05 } : point,
    );
    const table = latexTables(documentOf(first, { ...first, points: shifted }));
    expect(table).toContain('\\begin{longtable}{rrr}');
    expect(table).toContain('\\multicolumn{1}{c}{a} & \\multicolumn{1}{c}{b}');
    expect(table).toMatch(/\$0\.40\$ & \$-\d\.\d{6}\$ & -- \\\\/);
  });

  it('breaks tables across pages by their lines, those of wrapped words counted', () => {
    const tableOf = (words: string) =>
      latexTables({
        title: 't',
        heading: 'A study',
        blocks: [
          {
            kind: 'table',
            table: {
              id: 't',
              heading: 'Words',
              columns: [{ label: 'Words', content: 'words' }, { label: 'x' }],
              rows: Array.from({ length: 12 }, () => [words, '1']),
              notes: [],
            },
          },
        ],
      });
    expect(tableOf('short')).not.toContain('longtable');
    const wrapped = tableOf('words '.repeat(20));
    expect(wrapped).toContain('\\begin{longtable}{p{0.26\\linewidth}r}');
    expect(wrapped).toMatch(/^\\raggedright words .* & \$1\$ \\\\$/m);
  });

  it.each([
    ['of a study', [sampleResults(['RHF', 'CIS', 'CISD', 'FCI'])]],
    ['of levels and of a comparison', [withSpectroscopy(50), sampleResults()]],
  ])('holds nothing that LaTeX would stop at: %s', (_, results) => {
    const odd = results.map((one) => ({
      ...one,
      study: { ...one.study, basis: { name: '50%_#1 ✂', shells: {} } },
    }));
    expect(complaints(latexTables(documentOf(...odd)))).toEqual([]);
  });
});
