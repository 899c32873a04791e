import type { LevelResult, PointResult } from '#engine';
import { LevelSwatch } from '../../charts/level-swatch';
import { formatFixed } from '../../numbers';
import { ENERGY_UNITS, type EnergyUnit, toEnergyUnit } from '../../units';
import { describeTermination } from './describe-termination';

interface LevelsTableProps {
  readonly point: PointResult;
  readonly levels: readonly string[];
  readonly energyUnit: EnergyUnit;
}

/** The levels side by side: what is compared most. */
export function LevelsTable({ point, levels, energyUnit }: LevelsTableProps) {
  const { symbol, decimals } = ENERGY_UNITS[energyUnit];
  return (
    <table className="numbers levelsTable">
      <thead>
        <tr>
          <th scope="col">Level</th>
          <th scope="col">Energy, {symbol}</th>
          <th scope="col">Correlation</th>
          <th scope="col">
            <abbr title="Weight of the Hartree–Fock determinant">c₀²</abbr>
          </th>
          <th scope="col">⟨S²⟩</th>
        </tr>
      </thead>
      <tbody>
        {levels.map((level) => {
          const result = point.levels[level];
          return (
            <tr key={level} data-unconverged={(result !== undefined && !result.converged) || undefined}>
              <th scope="row">
                <LevelSwatch level={level} /> {level}
              </th>
              {cells(result, energyUnit, decimals)}
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

function cells(result: LevelResult | undefined, unit: EnergyUnit, decimals: number) {
  const energy = (value: number) => formatFixed(toEnergyUnit(value, unit), decimals);
  switch (result?.kind) {
    case undefined:
      return <td colSpan={4}>not computed</td>;
    case 'failed':
      return <td colSpan={4}>{describeTermination(result)}</td>;
    case 'singles':
      return (
        <td colSpan={4} className="words">
          excited states only: single excitations do not lower the ground state, so it stays RHF’s
        </td>
      );
    case 'hartreeFock':
      return (
        <>
          <td>
            <NotConverged isConverged={result.converged} />
            {energy(result.energy)}
          </td>
          <td>–</td>
          <td>–</td>
          <td>{result.sSquared === undefined ? '–' : formatFixed(result.sSquared, 4)}</td>
        </>
      );
    case 'perturbation':
      return (
        <>
          <td>
            <NotConverged isConverged={result.converged} />
            {energy(result.energy)}
          </td>
          <td>{energy(result.correlation)}</td>
          <td>–</td>
          <td>–</td>
        </>
      );
    case 'correlated':
      return (
        <>
          <td>
            <NotConverged isConverged={result.converged} />
            {energy(result.energy)}
          </td>
          <td>{energy(result.correlation)}</td>
          <td>{formatFixed(result.referenceWeight, 4)}</td>
          <td>{formatFixed(result.sSquared, 4)}</td>
        </>
      );
  }
}

function NotConverged({ isConverged }: { readonly isConverged: boolean }) {
  return isConverged ? null : (
    <span className="notConverged" title="not converged">
      × <span className="visuallyHidden">not converged: </span>
    </span>
  );
}
