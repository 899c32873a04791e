import type { ShellDefinition } from './contracted-gaussian';
import { selfOverlap } from './normalisation';

/** g functions are the highest that the integrals are written for. */
export const HIGHEST_ANGULAR_MOMENTUM = 4;
/** Exponents outside, bohr⁻², are taken for a mistake: functions wider than 1000 bohr or narrower than a nucleus. */
export const EXPONENT_RANGE = { smallest: 1e-6, largest: 1e9 } as const;
/** A contraction whose self-overlap, over Σc², is below this has cancelled itself away. */
const SMALLEST_SELF_OVERLAP = 1e-10;

/** Why a shell cannot be used. */
export interface ShellProblem {
  /** of the shell, such as `exponents[1]` */
  readonly field: string;
  readonly message: string;
  readonly remedy: string;
}

/** undefined if l is 0, 1, … HIGHEST_ANGULAR_MOMENTUM */
export function angularMomentumProblem(angularMomentum: number): ShellProblem | undefined {
  const isUsable =
    Number.isInteger(angularMomentum) && angularMomentum >= 0 && angularMomentum <= HIGHEST_ANGULAR_MOMENTUM;
  if (isUsable) return undefined;
  return {
    field: 'angularMomentum',
    message: `The angular momentum ${angularMomentum} cannot be used.`,
    remedy: 'Give 0 for s, 1 for p, 2 for d, 3 for f or 4 for g.',
  };
}

/** undefined if the exponent is positive and within EXPONENT_RANGE */
export function exponentProblem(exponent: number, field: string): ShellProblem | undefined {
  if (exponent >= EXPONENT_RANGE.smallest && exponent <= EXPONENT_RANGE.largest) return undefined;
  return {
    field,
    message: `The exponent ${exponent} cannot be used.`,
    remedy: `Give a positive number, in bohr⁻², from ${EXPONENT_RANGE.smallest} to ${EXPONENT_RANGE.largest}.`,
  };
}

/** undefined if the shell makes a normalisable function; otherwise the first reason why not */
export function shellProblem(shell: ShellDefinition): ShellProblem | undefined {
  const { angularMomentum, exponents, coefficients } = shell;
  if (exponents.length === 0) {
    return {
      field: 'exponents',
      message: 'The shell has no exponents.',
      remedy: 'Give at least one, or leave the shell out.',
    };
  }
  if (coefficients.length !== exponents.length) {
    return {
      field: 'coefficients',
      message: `There are ${exponents.length} exponents but ${coefficients.length} coefficients.`,
      remedy: 'Give one coefficient for each exponent.',
    };
  }
  const infinite = coefficients.findIndex((coefficient) => !Number.isFinite(coefficient));
  if (infinite >= 0) {
    return {
      field: `coefficients[${infinite}]`,
      message: `The coefficient ${coefficients[infinite]} is not a finite number.`,
      remedy: 'Give a finite number; it multiplies the normalised primitive.',
    };
  }
  const problem =
    angularMomentumProblem(angularMomentum) ??
    exponents.reduce<ShellProblem | undefined>(
      (found, exponent, i) => found ?? exponentProblem(exponent, `exponents[${i}]`),
      undefined,
    );
  if (problem) return problem;
  const squares = coefficients.reduce((sum, coefficient) => sum + coefficient * coefficient, 0);
  if (selfOverlap(shell) > SMALLEST_SELF_OVERLAP * squares) return undefined;
  return {
    field: 'coefficients',
    message: 'The primitives cancel: the contracted function is zero and cannot be normalised.',
    remedy: 'Correct the coefficients, or leave the shell out.',
  };
}
