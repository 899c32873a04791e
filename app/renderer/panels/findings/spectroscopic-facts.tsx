import type { StudyResults } from '#engine';
import { comparedConstants } from '../../../study/compared-constants';
import { formatFixed, formatPlain } from '../../numbers';

interface SpectroscopicFactsProps {
  readonly level: string;
  readonly results: StudyResults;
}

/** Constants of a diatomic molecule beside measured ones; folded until asked for. */
export function SpectroscopicFacts({ level, results }: SpectroscopicFactsProps) {
  const findings = results.findings[level];
  if (!findings?.constants?.diatomic) return null;
  const constants = comparedConstants(results).filter(({ byLevel }) => byLevel.has(level));
  return (
    <details>
      <summary>Constants</summary>
      <dl className="facts">
        {constants.map(({ symbol, name, unit, decimals, byLevel, measured }) => (
          <div key={symbol}>
            <dt>
              <abbr title={name}>{symbol}</abbr>
            </dt>
            <dd>
              {formatFixed(byLevel.get(level) ?? Number.NaN, decimals)} {unit}
              {measured && (
                <span className="hint" title={measured.source}>
                  {' '}
                  measured {formatPlain(Number(measured.value.toFixed(decimals)))}
                </span>
              )}
            </dd>
          </div>
        ))}
      </dl>
      {results.measured?.length === 0 && (
        <p className="absent">No measured constants of this molecule are on file.</p>
      )}
    </details>
  );
}
