import type { PointResult } from '#engine';
import { formatFixed } from '../../numbers';

/** The scale factors found at the point, where the study has them optimised. */
export function ScaleFactors({
  point: { scaleFactors, scaleOptimisation },
}: {
  readonly point: PointResult;
}) {
  if (scaleFactors === undefined || scaleOptimisation === undefined) return null;
  return (
    <dl className="facts">
      <dt>
        <abbr title={`Slater exponents of lowest ${scaleOptimisation.level} energy`}>
          Scale factors, a₀⁻¹
        </abbr>
      </dt>
      <dd>
        {factorsText(scaleFactors)}
        {!scaleOptimisation.converged && <span className="notConverged"> not converged</span>}
      </dd>
    </dl>
  );
}

/** “Li 1s 2.6959, 2sp 0.7462 · H 1s 1.0215” */
export function factorsText(scaleFactors: NonNullable<PointResult['scaleFactors']>): string {
  return Object.entries(scaleFactors)
    .map(([symbol, shells]) => {
      const factors = Object.entries(shells).map(([shell, factor]) => `${shell} ${formatFixed(factor, 4)}`);
      return `${symbol} ${factors.join(', ')}`;
    })
    .join(' · ');
}
