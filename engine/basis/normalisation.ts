import type { ShellDefinition } from './contracted-gaussian';

/**
 * Norm of the bare primitive x^l exp(−αr²): the factor that makes its self-overlap 1,
 * (2α/π)^(3/4) (4α)^(l/2) / √((2l − 1)!!).
 *
 * @param exponent - α, bohr⁻²
 */
export function primitiveNorm(exponent: number, angularMomentum: number): number {
  let oddFactorial = 1;
  for (let odd = 2 * angularMomentum - 1; odd > 1; odd -= 2) oddFactorial *= odd;
  return ((2 * exponent) / Math.PI) ** 0.75 * Math.sqrt((4 * exponent) ** angularMomentum / oddFactorial);
}

/** Overlap of two normalised primitives on one centre, (2√(αβ)/(α + β))^(l + 3/2). */
export function primitiveOverlap(first: number, second: number, angularMomentum: number): number {
  // √α·√β rather than √(αβ), which overflows first
  return ((2 * Math.sqrt(first) * Math.sqrt(second)) / (first + second)) ** (angularMomentum + 1.5);
}

/** ⟨χ|χ⟩ of a contracted function as published, coefficients on normalised primitives; 1 if it is normalised. */
export function selfOverlap({ angularMomentum, exponents, coefficients }: ShellDefinition): number {
  let sum = 0;
  for (let i = 0; i < exponents.length; i++) {
    for (let j = 0; j < exponents.length; j++) {
      sum +=
        coefficients[i] * coefficients[j] * primitiveOverlap(exponents[i], exponents[j], angularMomentum);
    }
  }
  return sum;
}

/** The same function without the primitives that do not contribute. */
export function withoutZeros(shell: ShellDefinition): ShellDefinition {
  if (!shell.coefficients.includes(0)) return shell;
  return {
    angularMomentum: shell.angularMomentum,
    exponents: shell.exponents.filter((_, i) => shell.coefficients[i] !== 0),
    coefficients: shell.coefficients.filter((coefficient) => coefficient !== 0),
  };
}

/** Rounding of printed coefficients changes a self-overlap by less than this; more hints at a misprint. */
const NOTABLE_DEVIATION = 1e-3;

/** A remark for every published contraction that is not normalised, as it may be a misprint. */
export function normalisationNotes(elements: ReadonlyMap<string, readonly ShellDefinition[]>): string[] {
  return [...elements].flatMap(([symbol, shells]) =>
    shells.flatMap((shell, index) => {
      const overlap = selfOverlap(shell);
      if (Math.abs(overlap - 1) <= NOTABLE_DEVIATION) return [];
      return [
        `${symbol}, contraction ${index + 1}: the self-overlap of the published numbers is ${overlap.toPrecision(6)}` +
          ' instead of 1; the function was normalised.',
      ];
    }),
  );
}
