/** What LaTeX reads as commands, and characters that its standard fonts lack. */
const REPLACEMENTS: Readonly<Record<string, string>> = {
  '\\': '\\textbackslash{}',
  '{': '\\{',
  '}': '\\}',
  $: '\\$',
  '&': '\\&',
  '#': '\\#',
  '%': '\\%',
  _: '\\_',
  '^': '\\textasciicircum{}',
  '~': '\\textasciitilde{}',
  '−': '$-$',
  '–': '--',
  '—': '---',
  '’': "'",
  '“': '``',
  '”': "''",
  '…': '\\ldots{}',
  Å: '\\AA{}',
  '°': '$^\\circ$',
  '×': '$\\times$',
  '·': '$\\cdot$',
  '≤': '$\\leq$',
  '≥': '$\\geq$',
  '≈': '$\\approx$',
  '→': '$\\rightarrow$',
  '⟨': '$\\langle$',
  '⟩': '$\\rangle$',
  '\u2009': '\\,',
  '\u00a0': '~',
  '\u202f': '\\,',
};

const GREEK = {
  α: 'alpha',
  β: 'beta',
  γ: 'gamma',
  δ: 'delta',
  ζ: 'zeta',
  θ: 'theta',
  λ: 'lambda',
  μ: 'mu',
  π: 'pi',
  σ: 'sigma',
  χ: 'chi',
  ω: 'omega',
  Δ: 'Delta',
  Σ: 'Sigma',
  Π: 'Pi',
  Ψ: 'Psi',
} as const;
const SUPERSCRIPTS = {
  '⁰': '0',
  '¹': '1',
  '²': '2',
  '³': '3',
  '⁴': '4',
  '⁵': '5',
  '⁶': '6',
  '⁷': '7',
  '⁸': '8',
  '⁹': '9',
  '⁺': '$+$',
  '⁻': '$-$',
} as const;
const SUBSCRIPTS = {
  '₀': '0',
  '₁': '1',
  '₂': '2',
  '₃': '3',
  '₄': '4',
  '₅': '5',
  '₆': '6',
  '₇': '7',
  '₈': '8',
  '₉': '9',
  ₑ: 'e',
  ₕ: 'h',
} as const;

const TABLE = new Map([
  ...Object.entries(REPLACEMENTS),
  ...Object.entries(GREEK).map(([letter, name]) => [letter, `$\\${name}$`] as const),
  ...Object.entries(SUPERSCRIPTS).map(
    ([letter, raised]) => [letter, `\\textsuperscript{${raised}}`] as const,
  ),
  ...Object.entries(SUBSCRIPTS).map(([letter, lowered]) => [letter, `\\textsubscript{${lowered}}`] as const),
]);

/** Text as LaTeX source for any engine: nothing in it can act as a command. */
export const latexText = (text: string): string =>
  [...text.replace(/\s+/g, ' ')].map((character) => TABLE.get(character) ?? character).join('');
