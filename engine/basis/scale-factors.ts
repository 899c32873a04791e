import { EngineError } from '../errors';
import type { SlaterShell } from './slater-fit';

/** Slater exponents of an element's shells, bohr⁻¹. */
export type ElementScaleFactors = Readonly<Partial<Record<SlaterShell, number>>>;

/**
 * Standard molecular Slater exponents of STO-nG, H–Ar.
 *
 * Source: W. J. Hehre, R. F. Stewart, J. A. Pople, J. Chem. Phys. 51, 2657 (1969); He, Ne–Ar and the values of Li, Be, B
 * that replaced those of 1969: W. J. Hehre, R. Ditchfield, R. F. Stewart, J. A. Pople, J. Chem. Phys. 52, 2769 (1970).
 * For 3sp of Na–Cl two series are in use; these give the STO-nG tables that are distributed today, the other
 * (1.21, 1.28, 1.39, 1.55, 1.74, 1.93, 2.14) gives other energies.
 */
export const STANDARD_SCALE_FACTORS: Readonly<Record<string, ElementScaleFactors>> = {
  H: { '1s': 1.24 },
  He: { '1s': 1.69 },
  Li: { '1s': 2.69, '2sp': 0.8 },
  Be: { '1s': 3.68, '2sp': 1.15 },
  B: { '1s': 4.68, '2sp': 1.5 },
  C: { '1s': 5.67, '2sp': 1.72 },
  N: { '1s': 6.67, '2sp': 1.95 },
  O: { '1s': 7.66, '2sp': 2.25 },
  F: { '1s': 8.65, '2sp': 2.55 },
  Ne: { '1s': 9.64, '2sp': 2.88 },
  Na: { '1s': 10.61, '2sp': 3.48, '3sp': 1.75 },
  Mg: { '1s': 11.59, '2sp': 3.9, '3sp': 1.7 },
  Al: { '1s': 12.56, '2sp': 4.36, '3sp': 1.7 },
  Si: { '1s': 13.53, '2sp': 4.83, '3sp': 1.75 },
  P: { '1s': 14.5, '2sp': 5.31, '3sp': 1.9 },
  S: { '1s': 15.47, '2sp': 5.79, '3sp': 2.05 },
  Cl: { '1s': 16.43, '2sp': 6.26, '3sp': 2.1 },
  Ar: { '1s': 17.4, '2sp': 6.74, '3sp': 2.33 },
};

/** Slater exponents outside, bohr⁻¹, are taken for a mistake. */
export const SCALE_FACTOR_RANGE = { smallest: 0.01, largest: 1000 } as const;

/** Slater exponents that a study sets, by element and shell; as read, so keys and values may be anything. */
export type ScaleFactorRequest = Readonly<Record<string, Readonly<Record<string, number>>>>;

/**
 * Standard Slater exponents with those of the study in their place.
 *
 * @throws EngineError `basis.scaleFactor` for an element or shell that STO-nG does not have, or a value outside
 * SCALE_FACTOR_RANGE
 */
export function mergeScaleFactors(
  request: ScaleFactorRequest,
): Readonly<Record<string, ElementScaleFactors>> {
  const merged = new Map(Object.entries(STANDARD_SCALE_FACTORS));
  for (const [symbol, shells] of Object.entries(request)) {
    const standard = merged.get(symbol);
    if (standard === undefined) {
      throw new EngineError(
        'basis.scaleFactor',
        `STO-nG has no element “${symbol}”.`,
        `Use the symbol of an element from H to Ar, such as H or He.`,
        { symbol, shell: '' },
        `basis.scaleFactors.${symbol}`,
      );
    }
    for (const [shell, value] of Object.entries(shells)) checkFactor(symbol, standard, shell, value);
    merged.set(symbol, { ...standard, ...shells });
  }
  return Object.fromEntries(merged);
}

function checkFactor(symbol: string, standard: ElementScaleFactors, shell: string, value: number): void {
  const place = `basis.scaleFactors.${symbol}.${shell}`;
  if (!Object.hasOwn(standard, shell)) {
    throw new EngineError(
      'basis.scaleFactor',
      `${symbol} has no shell “${shell}” in STO-nG.`,
      `Its shells are ${Object.keys(standard).join(', ')}.`,
      { symbol, shell },
      place,
    );
  }
  if (!(value >= SCALE_FACTOR_RANGE.smallest && value <= SCALE_FACTOR_RANGE.largest)) {
    throw new EngineError(
      'basis.scaleFactor',
      `The Slater exponent ${value} of ${symbol} ${shell} cannot be used.`,
      `Give a number from ${SCALE_FACTOR_RANGE.smallest} to ${SCALE_FACTOR_RANGE.largest}; ` +
        `the standard value is ${standard[shell as SlaterShell]}.`,
      { symbol, shell },
      place,
    );
  }
}
