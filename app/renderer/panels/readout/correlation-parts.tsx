import type { CorrelationParts } from '#engine';
import { formatFixed } from '../../numbers';
import { ENERGY_UNITS, type EnergyUnit, toEnergyUnit } from '../../units';

interface CorrelationPartsProps {
  readonly parts: CorrelationParts;
  readonly unit: EnergyUnit;
}

/** Pairs shown, by size; the file has all. */
const MOST_PAIRS = 8;

/** Where the correlation energy comes from: by excitation rank, and by pairs of orbitals. */
export function CorrelationPartsTables({ parts: { byRank, projected }, unit }: CorrelationPartsProps) {
  const { symbol, decimals } = ENERGY_UNITS[unit];
  const energy = (hartree: number) => formatFixed(toEnergyUnit(hartree, unit), decimals);
  return (
    <>
      <table className="numbers">
        <thead>
          <tr>
            <th scope="col">
              <abbr title="Electrons moved out of the reference determinant">Excitation rank</abbr>
            </th>
            <th scope="col">Weight</th>
            <th scope="col">
              <abbr title="How much the energy changes when this rank is added to the lower ones, coefficients unchanged; adds up to the correlation energy">
                Part, {symbol}
              </abbr>
            </th>
          </tr>
        </thead>
        <tbody>
          {byRank.map((part, rank) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a row is its rank
            <tr key={rank}>
              <th scope="row">{rank}</th>
              <td>{formatFixed(part.weight, 6)}</td>
              <td>{energy(part.energy)}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {projected.kind === 'none' ? (
        <p className="absent">No parts by orbital pair: {projected.reason}</p>
      ) : (
        <PairsTable {...{ projected, energy, symbol }} />
      )}
    </>
  );
}

interface PairsTableProps {
  readonly projected: Extract<CorrelationParts['projected'], { readonly kind: 'found' }>;
  readonly energy: (hartree: number) => string;
  readonly symbol: string;
}

function PairsTable({ projected: { pairs, singles }, energy, symbol }: PairsTableProps) {
  const largest = [...pairs].sort((a, b) => Math.abs(b.energy) - Math.abs(a.energy));
  const shown = largest.slice(0, MOST_PAIRS);
  const others = largest.slice(MOST_PAIRS).reduce((sum, pair) => sum + pair.energy, 0);
  const fromSingles = singles.reduce((sum, single) => sum + single.energy, 0);
  return (
    <table className="numbers">
      <thead>
        <tr>
          <th scope="col">
            <abbr title="Occupied orbitals of the reference, counted from 0; adds up to the correlation energy">
              Orbital pair
            </abbr>
          </th>
          <th scope="col">Equal spin, {symbol}</th>
          <th scope="col">Part, {symbol}</th>
        </tr>
      </thead>
      <tbody>
        {shown.map(({ orbitals, energy: part, sameSpin }) => (
          <tr key={orbitals.join()}>
            <th scope="row">{orbitals.join(', ')}</th>
            <td>{energy(sameSpin)}</td>
            <td>{energy(part)}</td>
          </tr>
        ))}
        {largest.length > MOST_PAIRS && (
          <tr>
            <th scope="row">{largest.length - MOST_PAIRS} other pairs</th>
            <td />
            <td>{energy(others)}</td>
          </tr>
        )}
        {singles.length > 0 && (
          <tr>
            <th scope="row">single excitations</th>
            <td />
            <td>{energy(fromSingles)}</td>
          </tr>
        )}
      </tbody>
    </table>
  );
}
