import { HARTREE_IN_WAVENUMBERS } from '../constants';
import { type CurveFit, fitExtendedRydberg, fitMorse } from '../curves/curve-fit';
import type { CurveFits, DunhamExpansion, FitQuality } from './further-findings';
import type { LevelCurve } from './level-curve';
import type { Dissociation, WellDepth } from './result';
import type { ExpandedWell } from './well-constants';

/** A curve off its fragments at the far end by more than this share of its depth does not tend to their energy. */
const TENDS_TO_LIMIT = 0.02;

/**
 * Closed forms of a curve: Morse and extended Rydberg through the points of the scan up to the limit, and Dunham's
 * series about the minimum. With the limit of the separate fragments where the curve tends to it, else with a fitted
 * one.
 *
 * @param expanded - Taylor series at the minimum, where there is one
 */
export function curveFits(
  curve: LevelCurve,
  dissociation: Dissociation | undefined,
  wellDepth: WellDepth | undefined,
  expanded: ExpandedWell | undefined,
): CurveFits {
  const points = curve.scan.flatMap(({ x, energy }) =>
    energy === undefined ? [] : [{ distance: x * curve.bohrPerUnit, energy }],
  );
  const limit = limitOf(dissociation, wellDepth);
  const options = limit === undefined ? {} : { limit };
  const common = <P>(fit: CurveFit<P>) => ({
    ...qualityOf(fit.residuals, curve.bohrPerUnit),
    limitIsFixed: limit !== undefined,
  });
  const morse = usable(fitMorse(points, options));
  const rydberg = usable(fitExtendedRydberg(points, options));
  return {
    ...(morse && {
      morse: {
        depth: morse.parameters.depth,
        equilibriumDistanceBohr: morse.parameters.equilibrium,
        steepnessPerBohr: morse.parameters.steepness,
        limit: morse.parameters.limit,
        ...common(morse),
      },
    }),
    ...(rydberg && {
      extendedRydberg: {
        depth: rydberg.parameters.depth,
        equilibriumDistanceBohr: rydberg.parameters.equilibrium,
        coefficientsInBohr: rydberg.parameters.coefficients,
        limit: rydberg.parameters.limit,
        ...common(rydberg),
      },
    }),
    ...(expanded && { dunham: dunhamExpansion(expanded, curve.bohrPerUnit) }),
  };
}

function limitOf(
  dissociation: Dissociation | undefined,
  wellDepth: WellDepth | undefined,
): number | undefined {
  if (dissociation?.kind !== 'found' || dissociation.farEndAbove === undefined || !wellDepth)
    return undefined;
  const share = Math.abs(dissociation.farEndAbove / wellDepth.value);
  return share <= TENDS_TO_LIMIT ? dissociation.energy : undefined;
}

/** As many points as parameters would be met exactly and say nothing; a fit that ran away says nothing either. */
function usable<P>(fit: CurveFit<P> | undefined): CurveFit<P> | undefined {
  if (!fit) return undefined;
  const isFinal = fit.termination.kind === 'converged' || fit.termination.kind === 'stagnated';
  return isFinal && Number.isFinite(fit.largestPerCm) ? fit : undefined;
}

function dunhamExpansion({ expansion, stencil }: ExpandedWell, bohrPerUnit: number): DunhamExpansion {
  const { equilibrium, energy, coefficients } = expansion;
  const [, , second, ...higher] = coefficients;
  const [a1, a2, a3, a4] = higher.map((coefficient, k) => (coefficient / second) * equilibrium ** (k + 1));
  const leading = second * equilibrium ** 2;
  const residuals = stencil.map((point) => {
    const xi = point.distance / equilibrium - 1;
    const series = energy + leading * xi * xi * (1 + xi * (a1 + xi * (a2 + xi * (a3 + xi * a4))));
    return { distance: point.distance, residualPerCm: (series - point.energy) * HARTREE_IN_WAVENUMBERS };
  });
  return {
    energy,
    equilibriumDistanceBohr: equilibrium,
    leading,
    coefficients: [a1, a2, a3, a4],
    ...qualityOf(residuals, bohrPerUnit),
  };
}

function qualityOf(residuals: CurveFit<unknown>['residuals'], bohrPerUnit: number): FitQuality {
  const sizes = residuals.map(({ residualPerCm }) => Math.abs(residualPerCm));
  return {
    rootMeanSquarePerCm: Math.hypot(...sizes) / Math.sqrt(sizes.length),
    largestPerCm: Math.max(...sizes),
    points: sizes.length,
    range: [residuals[0].distance / bohrPerUnit, residuals[residuals.length - 1].distance / bohrPerUnit],
  };
}
