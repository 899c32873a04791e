import type { FollowedState, SpinName, StateSymmetry } from '#engine';

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
 * A state along a scan: `1 ¹Σg⁺`, `singlet 2` without symmetry. Of a degenerate pair, which share a name, each has its
 * representation added: `1 ³Πu (B₂u)`.
 */
export function curveName({ spin, symmetry, number }: Omit<FollowedState, 'states'>): string {
  if (!symmetry) return `${spin === 'mixed' ? 'mixed spin' : spin} ${number}`;
  const isDegenerate = (symmetry.term?.lambda ?? 0) > 0;
  const kind = spin === 'mixed' ? `${termName(symmetry)} mixed spin` : stateName(spin, symmetry);
  return `${number} ${kind}${isDegenerate ? ` (${irrepName(symmetry.irrep)})` : ''}`;
}

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
  if (!letter) return irrepName(irrep);
  const raised = term.reflection === undefined ? '' : term.reflection === '+' ? '⁺' : '⁻';
  return `${letter}${term.inversion ?? ''}${raised}`;
}

const irrepName = (irrep: string): string =>
  irrep.replace(/\d/g, (digit) => SUBSCRIPTS[Number(digit)] ?? digit);
