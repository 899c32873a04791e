import { EngineError } from '../errors';
import { requireElement } from '../molecule/elements';
import type { EvenTemperedShells } from './basis-request';
import type { BasisSet } from './basis-set';
import type { Harmonics, ShellDefinition } from './contracted-gaussian';
import { angularMomentumProblem, exponentProblem, type ShellProblem, shellProblem } from './shell-check';

/** More primitives of one angular momentum than this only make a basis linearly dependent. */
export const LARGEST_EVEN_TEMPERED_COUNT = 100;

/**
 * A basis set spelled out in a study: coefficients multiply normalised primitives, the contracted function is
 * normalised when it is placed.
 *
 * @param shells - by element symbol
 * @throws EngineError `basis.shell` at `basis.shells.H[0].exponents[1]`, `molecule.unknownElement`
 */
export function explicitBasisSet(
  name: string,
  shells: Readonly<Record<string, readonly ShellDefinition[]>>,
  harmonics: Harmonics = 'spherical',
): BasisSet {
  const elements = eachShell(shells, 'basis.shells', shellProblem, (shell) => [shell]);
  return { name, harmonics, elements, citations: [], notes: [] };
}

/**
 * A basis set of single primitives with exponents in geometric progression, smallest·ratio^k.
 *
 * @param evenTempered - by element symbol
 * @throws EngineError `basis.shell` at `basis.evenTempered.H[0].ratio`, `molecule.unknownElement`
 *
 * Source: R. D. Bardo, K. Ruedenberg, J. Chem. Phys. 60, 918 (1974).
 */
export function evenTemperedBasisSet(
  name: string,
  evenTempered: Readonly<Record<string, readonly EvenTemperedShells[]>>,
  harmonics: Harmonics = 'spherical',
): BasisSet {
  const elements = eachShell(evenTempered, 'basis.evenTempered', evenTemperedProblem, evenTemperedShells);
  return { name, harmonics, elements, citations: [], notes: [] };
}

function evenTemperedShells({
  angularMomentum,
  smallest,
  ratio,
  count,
}: EvenTemperedShells): ShellDefinition[] {
  return Array.from({ length: count }, (_, k) => ({
    angularMomentum,
    exponents: [smallest * ratio ** k],
    coefficients: [1],
  }));
}

function evenTemperedProblem(progression: EvenTemperedShells): ShellProblem | undefined {
  const { angularMomentum, smallest, ratio, count } = progression;
  const problem = angularMomentumProblem(angularMomentum) ?? exponentProblem(smallest, 'smallest');
  if (problem) return problem;
  if (!(ratio > 1)) {
    return {
      field: 'ratio',
      message: `The ratio ${ratio} of even-tempered exponents is not greater than 1.`,
      remedy: 'Give a number greater than 1; 2 to 4 is usual.',
    };
  }
  if (!(Number.isInteger(count) && count >= 1 && count <= LARGEST_EVEN_TEMPERED_COUNT)) {
    return {
      field: 'count',
      message: `The number ${count} of even-tempered exponents cannot be used.`,
      remedy: `Give a whole number from 1 to ${LARGEST_EVEN_TEMPERED_COUNT}.`,
    };
  }
  return exponentProblem(smallest * ratio ** (count - 1), 'count');
}

/** Checks every shell of every element, with its place in the study for the refusal, and expands it. */
function eachShell<Shell>(
  byElement: Readonly<Record<string, readonly Shell[]>>,
  path: string,
  problemOf: (shell: Shell) => ShellProblem | undefined,
  expand: (shell: Shell) => readonly ShellDefinition[],
): Record<string, readonly ShellDefinition[]> {
  const elements = Object.entries(byElement).map(([symbol, shells]) => {
    requireElement(symbol, `${path}.${symbol}`);
    const expanded = shells.flatMap((shell, index) => {
      const problem = problemOf(shell);
      if (problem) {
        const { field, message, remedy } = problem;
        const place = `${path}.${symbol}[${index}].${field}`;
        throw new EngineError('basis.shell', message, remedy, { symbol, shell: index }, place);
      }
      return expand(shell);
    });
    return [symbol, expanded] as const;
  });
  return Object.fromEntries(elements);
}
