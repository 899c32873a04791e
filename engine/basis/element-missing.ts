import { EngineError } from '../errors';

/** The refusal of a set that does not have an element of the molecule. */
export function elementMissing(
  basis: string,
  symbol: string,
  covered: readonly string[],
): EngineError<'basis.elementMissing'> {
  return new EngineError(
    'basis.elementMissing',
    `The basis set ${basis} has no functions for ${symbol}; it covers ${covered.join(', ') || 'no element'}.`,
    `Choose a basis set that covers ${symbol}, or spell out its shells in the study.`,
    { basis, symbol },
    'basis',
  );
}
