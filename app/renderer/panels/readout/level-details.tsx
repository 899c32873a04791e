import type {
  CorrelatedResult,
  CorrelatedState,
  HartreeFockResult,
  LevelResult,
  PerturbationResult,
} from '#engine';
import { stateName } from '../../../study/state-name';
import { LevelSwatch } from '../../charts/level-swatch';
import { numbered } from '../../numbered';
import { formatFixed, formatScientific } from '../../numbers';
import { ENERGY_UNITS, type EnergyUnit, toEnergyUnit } from '../../units';
import { Facts } from '../facts';
import { energyText } from '../findings/shown-units';
import { CorrelationPartsTables } from './correlation-parts';
import { describeDeterminant } from './describe-determinant';
import { describeTermination } from './describe-termination';
import { LeadingConfigurations } from './leading-configurations';
import { SinglesStates } from './singles-states';
import { dipoleFact, EnergyPartsList, NumberList, unpairedFact, virialFact } from './state-facts';

interface LevelDetailsProps {
  readonly level: string;
  readonly result: LevelResult;
  readonly energyUnit: EnergyUnit;
}

/** Everything else that a level gives at the point. */
export function LevelDetails({ level, result, energyUnit }: LevelDetailsProps) {
  return (
    <details className="detailBlock" open>
      <summary>
        <LevelSwatch level={level} /> <strong>{level}</strong>
        <span className={result.converged ? 'hint' : 'notConverged'}> {describeTermination(result)}</span>
      </summary>
      {result.kind === 'hartreeFock' && <HartreeFockFacts result={result} unit={energyUnit} />}
      {result.kind === 'perturbation' && <PerturbationFacts result={result} unit={energyUnit} />}
      {result.kind === 'singles' && <SinglesStates result={result} unit={energyUnit} />}
      {result.kind === 'correlated' && <CorrelatedFacts result={result} unit={energyUnit} />}
    </details>
  );
}

function HartreeFockFacts({
  result,
  unit,
}: {
  readonly result: HartreeFockResult;
  readonly unit: EnergyUnit;
}) {
  return (
    <>
      <Facts
        facts={[
          ['Iterations', result.iterations],
          dipoleFact(result.dipole),
          virialFact(result.energyParts),
          result.stability && [
            <abbr
              key="stability"
              title="Lowest eigenvalues of the orbital Hessian; a negative one means that a lower solution exists"
            >
              Stability, Eₕ
            </abbr>,
            'own' in result.stability
              ? formatFixed(result.stability.own, 5)
              : `singlet ${formatFixed(result.stability.singlet, 5)}, triplet ${formatFixed(result.stability.triplet, 5)}`,
          ],
        ]}
      />
      <EnergyPartsList parts={result.energyParts} isDeterminant unit={unit} />
      {orbitalSets(result).map(({ name, energies, labels }) => (
        <NumberList
          key={name}
          name={`${name}, ${ENERGY_UNITS[unit].symbol}`}
          values={energies.map((energy, orbital) => {
            const text = formatFixed(toEnergyUnit(energy, unit), unit === 'hartree' ? 5 : 3);
            const label = labels?.[orbital];
            return label ? `${text} ${label}` : text;
          })}
        />
      ))}
    </>
  );
}

/** One list of orbital energies, or one for each spin. */
function orbitalSets({ orbitalEnergies, orbitalSymmetries: labels }: HartreeFockResult) {
  const bySpin = labels && 'alpha' in labels ? labels : { alpha: labels, beta: labels };
  if (!('alpha' in orbitalEnergies)) {
    return [{ name: 'Orbital energies', energies: orbitalEnergies, labels: bySpin.alpha }];
  }
  return [
    { name: 'Alpha orbital energies', energies: orbitalEnergies.alpha, labels: bySpin.alpha },
    { name: 'Beta orbital energies', energies: orbitalEnergies.beta, labels: bySpin.beta },
  ];
}

function PerturbationFacts({
  result,
  unit,
}: {
  readonly result: PerturbationResult;
  readonly unit: EnergyUnit;
}) {
  return (
    <Facts
      facts={[
        ['Built on', result.reference],
        ['Pairs of equal spin', energyText(result.sameSpin, unit)],
        ['Pairs of opposite spin', energyText(result.oppositeSpin, unit)],
      ]}
    />
  );
}

function CorrelatedFacts({ result, unit }: { readonly result: CorrelatedResult; readonly unit: EnergyUnit }) {
  const [ground] = result.states;
  return (
    <>
      <Facts
        facts={[
          ['State', stateName(result.spin, result.symmetry)],
          ['Determinants', formatFixed(result.determinants, 0)],
          ['Iterations', result.iterations],
          ground && ['Residual, Eₕ', formatScientific(ground.residual)],
          dipoleFact(result.dipole),
          virialFact(result.energyParts),
          unpairedFact(result.unpairedElectrons),
          result.davidsonCorrected === undefined
            ? undefined
            : [
                <abbr
                  key="davidson"
                  title="Energy with the estimate (1 − c₀²) × correlation for what the truncation leaves out (Langhoff, Davidson 1974); not an upper bound"
                >
                  Davidson-corrected
                </abbr>,
                energyText(result.davidsonCorrected, unit),
              ],
        ]}
      />
      <NumberList
        name="Natural occupations"
        values={result.naturalOccupations.map((occupation) => formatFixed(occupation, 5))}
      />
      <EnergyPartsList parts={result.energyParts} unit={unit} />
      {result.sizeCorrections && <SizeCorrectionsList corrections={result.sizeCorrections} unit={unit} />}
      {result.correlationParts && <CorrelationPartsTables parts={result.correlationParts} unit={unit} />}
      {ground !== undefined && <LeadingDeterminants state={ground} />}
      {ground?.configurations && <LeadingConfigurations configurations={ground.configurations} />}
      {result.states.length > 1 && <States states={result.states} unit={unit} />}
    </>
  );
}

/** The estimates beside Davidson’s own, which stands with the facts. */
function SizeCorrectionsList({
  corrections,
  unit,
}: {
  readonly corrections: NonNullable<CorrelatedResult['sizeCorrections']>;
  readonly unit: EnergyUnit;
}) {
  const { renormalised, davidsonSilver, pople, meissner, duchDiercksen } = corrections;
  const fact = (name: string, energy: number | undefined) =>
    energy === undefined ? undefined : ([name, energyText(energy, unit)] as const);
  return (
    <Facts
      facts={[
        fact('Renormalised Davidson', renormalised),
        fact('Davidson–Silver', davidsonSilver),
        fact('Pople', pople),
        fact('Meissner', meissner),
        fact('Duch–Diercksen', duchDiercksen),
      ]}
    />
  );
}

function LeadingDeterminants({ state }: { readonly state: CorrelatedState }) {
  if (state.leading.length === 0) return null;
  return (
    <table className="numbers">
      <thead>
        <tr>
          <th scope="col">
            <abbr title="Moves out of the orbitals filled in the reference; orbitals are counted from 0">
              Leading determinants
            </abbr>
          </th>
          <th scope="col">Coefficient</th>
          <th scope="col">Weight</th>
        </tr>
      </thead>
      <tbody>
        {state.leading.map((determinant) => (
          <tr key={`${determinant.alpha.join()} ${determinant.beta.join()}`}>
            <th scope="row">{describeDeterminant(determinant)}</th>
            <td>{formatFixed(determinant.coefficient, 6)}</td>
            <td>{formatFixed(determinant.weight, 6)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function States({
  states,
  unit,
}: {
  readonly states: readonly CorrelatedState[];
  readonly unit: EnergyUnit;
}) {
  const { symbol, decimals } = ENERGY_UNITS[unit];
  return (
    <table className="numbers">
      <thead>
        <tr>
          <th scope="col">State</th>
          <th scope="col">Energy, {symbol}</th>
          <th scope="col">
            <abbr title="Above this level’s lowest state">Excitation</abbr>
          </th>
          <th scope="col">c₀²</th>
          <th scope="col">⟨S²⟩</th>
          <th scope="col">
            <abbr title="Oscillator strength from the lowest state, length form">f</abbr>
          </th>
          <th scope="col">Leading</th>
        </tr>
      </thead>
      <tbody>
        {numbered(states).map(({ number, item: state }) => (
          <tr key={number}>
            <th scope="row">
              {number + 1} {stateName(state.spin, state.symmetry)}
            </th>
            <td>{formatFixed(toEnergyUnit(state.energy, unit), decimals)}</td>
            <td>{formatFixed(toEnergyUnit(state.excitation, unit), Math.min(decimals, 6))}</td>
            <td>{formatFixed(state.referenceWeight, 4)}</td>
            <td>{formatFixed(state.sSquared, 4)}</td>
            <td>{state.oscillatorStrength === undefined ? '' : formatFixed(state.oscillatorStrength, 4)}</td>
            <td className="words">
              {state.leading[0] === undefined ? '' : describeDeterminant(state.leading[0])}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
