import type { BasisSet } from './basis-set';
import type { ShellDefinition } from './contracted-gaussian';
import { elementMissing } from './element-missing';
import { citation } from './published-set';
import { mergeScaleFactors, type ScaleFactorRequest } from './scale-factors';
import { fitSlaterShell, type SlaterFit, type SlaterShell } from './slater-fit';

/** How many Gaussians a Slater function can be fitted by. */
export const STO_SIZES: readonly number[] = [1, 2, 3, 4, 5, 6];

/**
 * STO-nG: every Slater function of exponent ζ of the atom as a least-squares fit of n Gaussians, α = ζ²·α(ζ = 1).
 * The numbers come from our own fit at full precision, not from a table.
 *
 * @param gaussians - n, from 1 to 6
 * @param symbols - the elements wanted, H to Ar
 * @param scaleFactors - Slater exponents in place of the standard molecular ones, by element and shell
 * @param fitOf - the fits, where they are at hand from before
 * @throws EngineError `basis.elementMissing` beyond Ar, `basis.scaleFactor`
 */
export function stoNgBasisSet(
  gaussians: number,
  symbols: readonly string[],
  scaleFactors: ScaleFactorRequest = {},
  fitOf = slaterFits(gaussians),
): BasisSet {
  const name = `STO-${gaussians}G`;
  const factors = mergeScaleFactors(scaleFactors);
  const elements = [...new Set(symbols)].map((symbol): [string, ShellDefinition[]] => {
    if (!Object.hasOwn(factors, symbol)) throw elementMissing(name, symbol, Object.keys(factors));
    const shells = Object.entries(factors[symbol]) as [SlaterShell, number][];
    return [symbol, shells.flatMap(([shell, zeta]) => scaledShells(fitOf(shell), zeta))];
  });
  const changed = Object.entries(scaleFactors).flatMap(([symbol, shells]) =>
    symbols.includes(symbol)
      ? Object.entries(shells).map(([shell, zeta]) => `${symbol} ${shell} ${zeta}`)
      : [],
  );
  return {
    name,
    harmonics: 'spherical',
    elements: Object.fromEntries(elements),
    citations: [citation('hehre1969a'), citation('hehre1970a')],
    notes:
      changed.length === 0 ? [] : [`Slater exponents other than the standard ones: ${changed.join(', ')}.`],
  };
}

/** The fits of n Gaussians, each computed when it is first wanted. */
export function slaterFits(gaussians: number): (shell: SlaterShell) => SlaterFit {
  const fits = new Map<SlaterShell, SlaterFit>();
  return (shell) => {
    const fit = fits.get(shell) ?? fitSlaterShell(shell, gaussians);
    fits.set(shell, fit);
    return fit;
  };
}

/** A fit stretched to the Slater exponent ζ, one shell for each angular momentum. */
function scaledShells(fit: SlaterFit, zeta: number): ShellDefinition[] {
  const exponents = fit.exponents.map((exponent) => exponent * zeta * zeta);
  return fit.coefficients.map((coefficients, angularMomentum) => ({
    angularMomentum,
    exponents,
    coefficients,
  }));
}
