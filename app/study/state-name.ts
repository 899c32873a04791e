import type { SpinName, StateSymmetry } from '#engine';

const MULTIPLICITIES: Readonly<Record<Exclude<SpinName, 'mixed'>, string>> = {
  singlet: '¹',
  doublet: '²',
  triplet: '³',
  quartet: '⁴',
  quintet: '⁵',
  sextet: '⁶',
  septet: '⁷',
};
const LETTERS = ['Σ', 'Π', 'Δ', 'Φ', 'Γ'];
const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';

/**
 * A state as spectroscopists write it, as far as it is known: `¹Σg⁺`, of molecules that are not linear `¹B₁`; without
 * symmetry the word for its spin.
 */
export function stateName(spin: SpinName, symmetry: StateSymmetry | undefined): string {
  if (!symmetry) return spin;
  const name = termName(symmetry);
  return spin === 'mixed' ? `${name}, mixed spin` : `${MULTIPLICITIES[spin]}${name}`;
}

function termName({ irrep, term }: StateSymmetry): string {
  const letter = term && LETTERS[term.lambda];
  if (!letter) return irrep.replace(/\d/g, (digit) => SUBSCRIPTS[Number(digit)] ?? digit);
  const raised = term.reflection === undefined ? '' : term.reflection === '+' ? '⁺' : '⁻';
  return `${letter}${term.inversion ?? ''}${raised}`;
}
