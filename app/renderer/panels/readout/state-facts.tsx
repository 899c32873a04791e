import type { CorrelatedResult, HartreeFockResult } from '#engine';
import { numbered } from '../../numbered';
import { formatFixed } from '../../numbers';
import type { EnergyUnit } from '../../units';
import { type Fact, Facts } from '../facts';
import { energyText } from '../findings/shown-units';

/* What levels of several kinds say of a state. */

export function dipoleFact([x, y, z]: readonly [number, number, number]): Fact {
  const size = formatFixed(Math.hypot(x, y, z), 5);
  return [
    <abbr key="dipole" title="About the origin of the study’s coordinates">
      Dipole moment, e·a₀
    </abbr>,
    `${size}  (${[x, y, z].map((component) => formatFixed(component, 5)).join(', ')})`,
  ];
}

export function virialFact(parts: HartreeFockResult['energyParts']): Fact {
  if (parts === undefined) return undefined;
  return [
    <abbr key="virial" title="2 for exact wave functions at the minimum of the curve">
      Virial ratio −V/T
    </abbr>,
    formatFixed(parts.virialRatio, 6),
  ];
}

export function unpairedFact(unpaired: CorrelatedResult['unpairedElectrons']): Fact {
  if (unpaired === undefined) return undefined;
  return [
    <abbr
      key="unpaired"
      title={`Σ min(n, 2 − n) over natural occupations (Head-Gordon 2003); Σ n(2 − n) gives ${formatFixed(unpaired.quadratic, 4)}, Σ n²(2 − n)² ${formatFixed(unpaired.quartic, 4)}`}
    >
      Effectively unpaired electrons
    </abbr>,
    formatFixed(unpaired.linear, 4),
  ];
}

/** The parts of the energy, in the order in which they add up. */
export function EnergyPartsList({
  parts,
  isDeterminant = false,
  unit,
}: {
  readonly parts: HartreeFockResult['energyParts'];
  readonly isDeterminant?: boolean;
  readonly unit: EnergyUnit;
}) {
  if (parts === undefined) return null;
  const undivided = isDeterminant ? 'Exchange' : 'Exchange and correlation';
  return (
    <Facts
      facts={[
        ['Kinetic energy', energyText(parts.kinetic, unit)],
        ['Nuclear attraction', energyText(parts.nuclearAttraction, unit)],
        ['Coulomb', energyText(parts.coulomb, unit)],
        ...(parts.exchange !== undefined && parts.correlation !== undefined
          ? ([
              ['Exchange', energyText(parts.exchange, unit)],
              isDeterminant
                ? undefined
                : [
                    <abbr
                      key="correlation"
                      title="Of the repulsion alone: what no one-particle density gives"
                    >
                      Correlation of the repulsion
                    </abbr>,
                    energyText(parts.correlation, unit),
                  ],
            ] satisfies Fact[])
          : ([[undivided, energyText(parts.exchangeCorrelation, unit)]] satisfies Fact[])),
        ['Nuclear repulsion', energyText(parts.nuclearRepulsion, unit)],
      ]}
    />
  );
}

/** Numbers counted from 0, as the results file counts them. */
export function NumberList({ name, values }: { readonly name: string; readonly values: readonly string[] }) {
  return (
    <div className="numberList">
      <h3>{name}</h3>
      <ol start={0}>
        {numbered(values).map(({ number, item: value }) => (
          <li key={number}>
            <span className="ordinal">{number}</span> {value}
          </li>
        ))}
      </ol>
    </div>
  );
}
