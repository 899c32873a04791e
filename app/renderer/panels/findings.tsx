import type { LengthUnit, LevelFindings, Study } from '#engine';
import { fragmentsText } from '../../study/fragments-text';
import { groupCautions, neighbourRuns } from '../charts/cautions';
import { scansLength } from '../charts/curves';
import { LevelSwatch } from '../charts/level-swatch';
import { formatFixed, formatPlain } from '../numbers';
import { useWindowState } from '../state/window-context';
import type { Run } from '../state/window-state';
import { convertLength, ENERGY_UNITS, type EnergyUnit, LENGTH_UNITS, toEnergyUnit } from '../units';
import { SpectroscopicFacts } from './spectroscopic-facts';

/** What can be read off each level's curve, and where it should not be trusted. */
export function Findings() {
  const run = useWindowState((state) => state.run);
  const view = useWindowState((state) => state.view);
  if (run === undefined) return <p className="empty">Nothing has been computed yet.</p>;
  const { study, results } = run;
  const lengthUnit = view.lengthUnit ?? study.molecule.unit;
  return (
    <div className="findings">
      {results === undefined ? (
        <p className="empty">Findings are read off the finished curve.</p>
      ) : (
        study.levels.map((level) => {
          const findings = results.findings[level];
          return findings === undefined ? null : (
            <section key={level} className="finding">
              <h3>
                <LevelSwatch level={level} /> {level}
              </h3>
              <FindingFacts {...{ findings, study, lengthUnit, energyUnit: view.energyUnit }} />
              <SpectroscopicFacts level={level} results={results} />
            </section>
          );
        })
      )}
      <CautionList run={run} lengthUnit={lengthUnit} />
    </div>
  );
}

interface FindingFactsProps {
  readonly findings: LevelFindings;
  readonly study: Study;
  readonly lengthUnit: LengthUnit;
  readonly energyUnit: EnergyUnit;
}

function FindingFacts({ findings, study, lengthUnit, energyUnit }: FindingFactsProps) {
  const { symbol, decimals } = ENERGY_UNITS[energyUnit];
  const { minimum, wellDepth, dissociation, instabilityOnset } = findings;
  const where = positionText(study, lengthUnit);
  return (
    <>
      <dl className="facts">
        {minimum.kind === 'found' && (
          <>
            <div>
              <dt>Equilibrium distance</dt>
              <dd>
                {where(minimum.equilibriumDistance, 6)}
                <span className="hint"> ± {where(minimum.uncertainty, 1)}</span>
              </dd>
            </div>
            <div>
              <dt>Energy there</dt>
              <dd>
                {formatFixed(toEnergyUnit(minimum.energy, energyUnit), decimals)} {symbol}
              </dd>
            </div>
          </>
        )}
        {wellDepth !== undefined && (
          <div>
            <dt>
              Well depth, against{' '}
              {wellDepth.against === 'fragments' && dissociation?.kind === 'found'
                ? fragmentsText(study.molecule, dissociation)
                : where(wellDepth.farEnd, 5)}
            </dt>
            <dd>
              {formatFixed(toEnergyUnit(wellDepth.value, energyUnit), decimals)} {symbol}
            </dd>
          </div>
        )}
        {instabilityOnset?.kind === 'found' && (
          <div>
            <dt>
              <abbr title="The lowest eigenvalue of the triplet orbital Hessian passes zero: beyond, different orbitals for different spins lie lower">
                Onset of instability
              </abbr>
            </dt>
            <dd>
              {where(instabilityOnset.coordinate, 5)}
              <span className="hint"> ± {where(instabilityOnset.uncertainty, 1)}</span>
            </dd>
          </div>
        )}
      </dl>
      {instabilityOnset?.kind === 'none' && (
        <p className="absent">No onset of instability: {withoutStop(instabilityOnset.reason)}.</p>
      )}
      {minimum.kind !== 'found' && <p className="absent">{whyNoMinimum(minimum, where)}</p>}
      {minimum.kind === 'found' && wellDepth === undefined && (
        <p className="absent">No well depth: the far end has not converged.</p>
      )}
    </>
  );
}

type PositionText = (value: number, significant: number) => string;

const positionText =
  (study: Study, lengthUnit: LengthUnit): PositionText =>
  (value, significant) =>
    scansLength(study)
      ? `${formatPlain(convertLength(value, study.molecule.unit, lengthUnit), significant)} ${LENGTH_UNITS[lengthUnit].symbol}`
      : `${formatPlain(value, significant)}°`;

export function whyNoMinimum(
  minimum: Exclude<LevelFindings['minimum'], { readonly kind: 'found' }>,
  where: PositionText,
): string {
  switch (minimum.kind) {
    case 'atEdge':
      return `No minimum inside the range: the lowest point is its edge, ${where(minimum.coordinate, 5)}. Widen the range there.`;
    case 'several':
      return `Several minima, near ${minimum.near.map((place) => where(place, 5)).join(', ')}. Narrow the range to one of them.`;
    case 'none':
      return `No minimum: ${withoutStop(minimum.reason)}.`;
  }
}

const withoutStop = (sentence: string) => sentence.replace(/\.$/, '');

function CautionList({ run, lengthUnit }: { readonly run: Run; readonly lengthUnit: LengthUnit }) {
  const groups = groupCautions(run.points);
  const whole = run.results?.cautions ?? [];
  if (groups.length === 0 && whole.length === 0) return null;
  const where = positionText(run.study, lengthUnit);
  const at = (index: number) => {
    const coordinate = run.points[index]?.coordinate ?? null;
    return coordinate === null ? '' : where(coordinate, 4);
  };
  return (
    <section>
      <h3>Cautions</h3>
      <ul className="cautions">
        {whole.map(({ code, level, message }) => (
          <li key={`${code} ${level}`}>
            {level === undefined ? '' : <strong>{level}: </strong>}
            {message}
          </li>
        ))}
        {groups.map(({ caution: { code, level, message }, at: indices }) => (
          <li key={`${code} ${level}`}>
            {level === undefined ? '' : <strong>{level}: </strong>}
            {message}{' '}
            <span className="hint">
              {neighbourRuns(indices)
                .map(([first, last]) => (first === last ? at(first) : `${at(first)} to ${at(last)}`))
                .join(', ')}
            </span>
          </li>
        ))}
      </ul>
    </section>
  );
}
