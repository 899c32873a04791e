import type { BasisSetLimit, LevelFindings, LevelLimit, StudyResults } from '#engine';
import { formatFixed } from '../../numbers';
import { ENERGY_UNITS, toEnergyUnit } from '../../units';
import { positionText, type ShownUnits, uncertaintyText } from './shown-units';

interface BasisComparisonProps extends ShownUnits {
  readonly results: StudyResults;
}

/** The same study in several bases side by side, and what a systematic family of them tends to. */
export function BasisComparison({ results, ...units }: BasisComparisonProps) {
  const { study, findings, basis, furtherBases = [], basisSetLimit } = results;
  if (furtherBases.length === 0) return null;
  const sets = [{ basis, findings }, ...furtherBases];
  const hasMinimum = (level: string) => sets.some((set) => set.findings[level]?.minimum.kind === 'found');
  return (
    <section>
      <h3>Basis sets compared</h3>
      {study.levels.filter(hasMinimum).map((level) => (
        <table key={level} className="numbers">
          <caption>{level}</caption>
          <thead>
            <tr>
              <th scope="col">Basis set</th>
              <th scope="col">rₑ</th>
              <th scope="col">Energy, {ENERGY_UNITS[units.energyUnit].symbol}</th>
              <th scope="col">Depth, {ENERGY_UNITS[units.energyUnit].symbol}</th>
              <th scope="col">ωe, cm⁻¹</th>
            </tr>
          </thead>
          <tbody>
            {sets.map((set) => (
              <tr key={set.basis.name}>
                <th scope="row">
                  {set.basis.name} <span className="hint below">{set.basis.functions} functions</span>
                </th>
                <SetCells findings={set.findings[level]} study={study} {...units} />
              </tr>
            ))}
            {basisSetLimit?.kind === 'found' && (
              <LimitRow limit={basisSetLimit.levels[level]} study={study} {...units} />
            )}
          </tbody>
        </table>
      ))}
      {basisSetLimit && <LimitNote limit={basisSetLimit} />}
    </section>
  );
}

function SetCells({
  findings,
  study,
  lengthUnit,
  energyUnit,
}: { readonly findings: LevelFindings | undefined; readonly study: StudyResults['study'] } & ShownUnits) {
  const { decimals } = ENERGY_UNITS[energyUnit];
  if (findings?.minimum.kind !== 'found') return <td colSpan={4}>no minimum found</td>;
  const { minimum, wellDepth, constants } = findings;
  const wavenumber = constants?.diatomic?.harmonicWavenumberPerCm.value;
  return (
    <>
      <td>{positionText(study, lengthUnit)(minimum.equilibriumDistance, 6)}</td>
      <td>{formatFixed(toEnergyUnit(minimum.energy, energyUnit), decimals)}</td>
      <td>{wellDepth ? formatFixed(toEnergyUnit(wellDepth.value, energyUnit), decimals) : '–'}</td>
      <td>{wavenumber === undefined ? '–' : formatFixed(wavenumber, 2)}</td>
    </>
  );
}

function LimitRow({
  limit,
  study,
  lengthUnit,
  energyUnit,
}: { readonly limit: LevelLimit | undefined; readonly study: StudyResults['study'] } & ShownUnits) {
  if (limit?.curve?.kind !== 'found') return null;
  const { equilibriumDistance, energy, wellDepth, constants } = limit.curve;
  const { decimals } = ENERGY_UNITS[energyUnit];
  const cell = (value: number, uncertainty: number) => (
    <td>
      {formatFixed(toEnergyUnit(value, energyUnit), decimals)}
      <span className="hint below">{uncertaintyText(uncertainty, energyUnit)}</span>
    </td>
  );
  const where = positionText(study, lengthUnit);
  const wavenumber = constants.diatomic?.harmonicWavenumberPerCm;
  return (
    <tr>
      <th scope="row">limit</th>
      <td>
        {where(equilibriumDistance.value, 6)}
        <span className="hint below">± {where(equilibriumDistance.uncertainty, 1)}</span>
      </td>
      {cell(energy.value, energy.uncertainty)}
      {wellDepth ? cell(wellDepth.value, wellDepth.uncertainty) : <td>–</td>}
      <td>
        {wavenumber ? formatFixed(wavenumber.value, 1) : '–'}
        {wavenumber && <span className="hint below">± {formatFixed(wavenumber.uncertainty, 1)}</span>}
      </td>
    </tr>
  );
}

function LimitNote({ limit }: { readonly limit: BasisSetLimit }) {
  if (limit.kind === 'none') return <p className="absent">No basis-set limit: {limit.reason}</p>;
  return (
    <p className="hint">
      The limit is extrapolated from {limit.members.map(({ name }) => name).join(', ')}, Hartree–Fock and
      correlation each by itself; its uncertainty covers the spread between formulas and a fair part of what
      extrapolation added.
    </p>
  );
}
