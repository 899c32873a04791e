import type { SinglesResult } from '#engine';
import { stateName } from '../../../study/state-name';
import { numbered } from '../../numbered';
import { formatFixed } from '../../numbers';
import { ENERGY_UNITS, type EnergyUnit, toEnergyUnit } from '../../units';
import { Facts } from '../facts';
import { dipoleFact, EnergyPartsList, NumberList, unpairedFact, virialFact } from './state-facts';

/** The states of CIS at a point, and below them what the density of each says. */
export function SinglesStates({
  result,
  unit,
}: {
  readonly result: SinglesResult;
  readonly unit: EnergyUnit;
}) {
  const { symbol, decimals } = ENERGY_UNITS[unit];
  return (
    <>
      <table className="numbers">
        <thead>
          <tr>
            <th scope="col">State</th>
            <th scope="col">Energy, {symbol}</th>
            <th scope="col">
              <abbr title="Above the RHF energy">Excitation</abbr>
            </th>
            <th scope="col">
              <abbr title="Oscillator strength, length form">f</abbr>
            </th>
            <th scope="col">Leading</th>
          </tr>
        </thead>
        <tbody>
          {numbered(result.states).map(({ number, item: state }) => (
            <tr key={number}>
              <th scope="row">
                {number + 1} {stateName(state.spin, state.symmetry)}
              </th>
              <td>{formatFixed(toEnergyUnit(state.energy, unit), decimals)}</td>
              <td>{formatFixed(toEnergyUnit(state.excitation, unit), Math.min(decimals, 6))}</td>
              <td>{formatFixed(state.oscillatorStrength, 4)}</td>
              <td className="words">
                {state.leading
                  .slice(0, 2)
                  .map(({ from, to, weight }) => `${from} → ${to} (${formatFixed(weight, 2)})`)
                  .join(', ')}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {numbered(result.states).map(({ number, item: state }) => (
        <SinglesDensity
          key={number}
          name={`${number + 1} ${stateName(state.spin, state.symmetry)}`}
          state={state}
          unit={unit}
        />
      ))}
    </>
  );
}

/** What the density of a state says of it; folded until asked for. */
function SinglesDensity({
  name,
  state: { naturalOccupations, unpairedElectrons, dipole, energyParts },
  unit,
}: {
  readonly name: string;
  readonly state: SinglesResult['states'][number];
  readonly unit: EnergyUnit;
}) {
  if (!naturalOccupations) return null;
  return (
    <details>
      <summary>Density of {name}</summary>
      <Facts
        facts={[dipole && dipoleFact(dipole), virialFact(energyParts), unpairedFact(unpairedElectrons)]}
      />
      <NumberList
        name="Natural occupations"
        values={naturalOccupations.map((occupation) => formatFixed(occupation, 5))}
      />
      <EnergyPartsList parts={energyParts} unit={unit} />
    </details>
  );
}
