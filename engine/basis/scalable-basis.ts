import { EngineError } from '../errors';
import type { BasisRequest } from './basis-request';
import type { BasisSet } from './basis-set';
import { slaterFitSize } from './library-index';
import { type ElementScaleFactors, mergeScaleFactors } from './scale-factors';
import { slaterFits, stoNgBasisSet } from './sto-ng';

/** Slater exponents by element and shell, in the form in which a study gives them. */
export type ScaleFactors = Readonly<Record<string, ElementScaleFactors>>;

/** A basis set whose Slater exponents are to be found. */
export interface ScalableBasis {
  /** of every shell of the molecule's elements */
  readonly start: ScaleFactors;
  /** the set with other exponents */
  with(factors: ScaleFactors): BasisSet;
}

/**
 * What a request for optimised scale factors varies; undefined where it asks for none.
 *
 * @param symbols - of the molecule's atoms
 * @throws EngineError `basis.scaleFactor` for a set that is not STO-nG
 */
export function scalableBasis(request: BasisRequest, symbols: readonly string[]): ScalableBasis | undefined {
  if (typeof request === 'string' || !('optimiseScale' in request) || !request.optimiseScale)
    return undefined;
  const gaussians = slaterFitSize(request.name);
  if (gaussians === undefined) {
    throw new EngineError(
      'basis.scaleFactor',
      `Scale factors can be optimised for STO-nG only, not for ${request.name}.`,
      'Choose STO-3G or another STO-nG set, or leave "optimiseScale" out.',
      { symbol: '', shell: '' },
      'basis.optimiseScale',
    );
  }
  const factors = mergeScaleFactors('scaleFactors' in request ? request.scaleFactors : {});
  const elements = [...new Set(symbols)];
  const fitOf = slaterFits(gaussians);
  return {
    start: Object.fromEntries(elements.map((symbol) => [symbol, factors[symbol]])),
    with: (changed) => stoNgBasisSet(gaussians, elements, changed, fitOf),
  };
}
