/** What LaTeX reads as commands, and characters that its standard fonts lack or set otherwise. */
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
  '|': '\\textbar{}',
  '<': '\\textless{}',
  '>': '\\textgreater{}',
  '"': "''",
  '−': '$-$',
  '±': '$\\pm$',
  '–': '--',
  '—': '---',
  '’': "'",
  '“': '``',
  '”': "''",
  '′': "$'$",
  '″': "$''$",
  '…': '\\ldots{}',
  Å: '\\AA{}',
  '°': '$^\\circ$',
  '×': '$\\times$',
  '·': '$\\cdot$',
  '≤': '$\\leq$',
  '≥': '$\\geq$',
  '≈': '$\\approx$',
  '→': '$\\rightarrow$',
  '∞': '$\\infty$',
  '√': '$\\surd$',
  '⟨': '$\\langle$',
  '⟩': '$\\rangle$',
  '½': '$\\frac{1}{2}$',
  '\u2009': '\\,',
  '\u00a0': '~',
  '\u202f': '\\,',
};

const GREEK = {
  α: 'alpha',
  β: 'beta',
  γ: 'gamma',
  δ: 'delta',
  ε: 'varepsilon',
  ζ: 'zeta',
  θ: 'theta',
  λ: 'lambda',
  μ: 'mu',
  µ: 'mu',
  ν: 'nu',
  ξ: 'xi',
  π: 'pi',
  ρ: 'rho',
  σ: 'sigma',
  φ: 'phi',
  χ: 'chi',
  ψ: 'psi',
  ω: 'omega',
  Γ: 'Gamma',
  Δ: 'Delta',
  Λ: 'Lambda',
  Σ: 'Sigma',
  Π: 'Pi',
  Φ: 'Phi',
  Ψ: 'Psi',
} as const;
const SUPERSCRIPTS: Readonly<Record<string, string>> = {
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
};
const SUBSCRIPTS: Readonly<Record<string, string>> = {
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
};

const TABLE = new Map([
  ...Object.entries(REPLACEMENTS),
  ...Object.entries(GREEK).map(([letter, name]) => [letter, `$\\${name}$`] as const),
]);

const COMBINING_MACRON = '\u0304';
/** What every LaTeX since 2018 sets as it stands: printable ASCII and the letters of western and central Europe. */
const KNOWN = /[\x20-\x7e\u00c0-\u00d6\u00d8-\u00f6\u00f8-\u017f]/;

/** A letter with a macron, a run of raised or lowered characters, or any single one. */
const PIECES = new RegExp(
  `[A-Za-z]${COMBINING_MACRON}|[${Object.keys(SUPERSCRIPTS).join('')}]+|[${Object.keys(SUBSCRIPTS).join('')}]+|.`,
  'gu',
);

/** Text as LaTeX source for any engine: nothing in it can act as a command. */
export const latexText = (text: string): string => text.replace(/\s+/g, ' ').replace(PIECES, latexPiece);

function latexPiece(piece: string): string {
  const [first = ''] = piece;
  if (piece.endsWith(COMBINING_MACRON) && piece !== COMBINING_MACRON) return `$\\bar{${first}}$`;
  if (first in SUPERSCRIPTS) return `\\textsuperscript{${mapped(piece, SUPERSCRIPTS)}}`;
  if (first in SUBSCRIPTS) return `\\textsubscript{${mapped(piece, SUBSCRIPTS)}}`;
  const known = TABLE.get(piece);
  if (known !== undefined) return known;
  // from a name of the user's: named rather than an error of the engine
  return KNOWN.test(piece) ? piece : `(U+${piece.codePointAt(0)!.toString(16).toUpperCase()})`;
}

const mapped = (piece: string, table: Readonly<Record<string, string>>): string =>
  [...piece].map((character) => table[character] ?? '').join('');
