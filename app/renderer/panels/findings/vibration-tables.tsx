import type { Isotopologue, RotatingLevels, StudyMolecule, Vibration } from '#engine';
import { formula } from '../../../study/formula';
import { formatFixed, formatPlain, formatScientific } from '../../numbers';
import { ENERGY_UNITS, type EnergyUnit, toEnergyUnit } from '../../units';

interface VibrationTablesProps {
  readonly vibration: Vibration;
  readonly isotopologues?: readonly Isotopologue[] | undefined;
  readonly molecule: StudyMolecule;
  readonly energyUnit: EnergyUnit;
}

/** The vibrational levels one by one, of the study's isotopes, with rotation and with other masses. */
export function VibrationTables({
  vibration,
  isotopologues = [],
  molecule,
  energyUnit,
}: VibrationTablesProps) {
  if (vibration.kind === 'none') return <p className="absent">No vibrational levels: {vibration.reason}</p>;
  return (
    <details>
      <summary>
        Vibrational levels <span className="hint">{vibration.boundLevels} bound</span>
      </summary>
      <LevelsTable vibration={vibration} />
      <LevelsNote vibration={vibration} />
      {(vibration.rotating ?? []).map((rotating) => (
        <RotatingTable key={rotating.rotation} rotating={rotating} />
      ))}
      {isotopologues.length > 0 && <IsotopologuesTable {...{ isotopologues, molecule, energyUnit }} />}
    </details>
  );
}

type FoundVibration = Extract<Vibration, { readonly kind: 'found' }>;

function LevelsTable({ vibration }: { readonly vibration: FoundVibration }) {
  const far = new Set(vibration.beyondComputedRange);
  return (
    <table className="numbers">
      <thead>
        <tr>
          <th scope="col">v</th>
          <th scope="col">
            <abbr title="Above the minimum of the curve, without rotation">G, cm⁻¹</abbr>
          </th>
          <th scope="col">
            <abbr title="Distance to the next lower level">ΔG, cm⁻¹</abbr>
          </th>
          <th scope="col">
            <abbr title="Rotational constant">B, cm⁻¹</abbr>
          </th>
          <th scope="col">
            <abbr title="Centrifugal distortion">D, cm⁻¹</abbr>
          </th>
        </tr>
      </thead>
      <tbody>
        {vibration.levels.map(
          ({ v, energyPerCm, rotationalConstantPerCm, centrifugalDistortionPerCm }, index, levels) => {
            const below = levels[index - 1];
            return (
              <tr key={v}>
                <th scope="row">
                  {v}
                  {far.has(v) && <abbr title="Rests on the curve beyond its computed points">*</abbr>}
                </th>
                <td>{formatFixed(energyPerCm, 2)}</td>
                <td>{below ? formatFixed(energyPerCm - below.energyPerCm, 2) : ''}</td>
                <td>{formatFixed(rotationalConstantPerCm, 4)}</td>
                <td>
                  {centrifugalDistortionPerCm === undefined
                    ? '–'
                    : formatScientific(centrifugalDistortionPerCm, 3)}
                </td>
              </tr>
            );
          },
        )}
      </tbody>
    </table>
  );
}

/** How good the levels are: a number that is not converged says so where it stands. */
function LevelsNote({ vibration }: { readonly vibration: FoundVibration }) {
  const notes = [
    `Curve between its points good to ${formatPlain(vibration.interpolationErrorPerCm, 1)} cm⁻¹.`,
    ...(vibration.converged ? [] : ['Not converged in grid or range.']),
    ...(vibration.beyondComputedRange.length > 0 ? ['* rests on the curve beyond its computed points.'] : []),
  ];
  return <p className={vibration.converged ? 'hint' : 'notConverged'}>{notes.join(' ')}</p>;
}

function RotatingTable({ rotating }: { readonly rotating: RotatingLevels }) {
  const { rotation, levels, quasiBound, barrierPerCm, converged } = rotating;
  return (
    <table className="numbers">
      <caption>
        J = {rotation}
        {barrierPerCm !== undefined && `, centrifugal barrier at ${formatFixed(barrierPerCm, 1)} cm⁻¹`}
        {!converged && <span className="notConverged">, not converged</span>}
      </caption>
      <thead>
        <tr>
          <th scope="col">v</th>
          <th scope="col">Energy, cm⁻¹</th>
          <th scope="col">Width, cm⁻¹</th>
        </tr>
      </thead>
      <tbody>
        {levels.map(({ v, energyPerCm }) => (
          <tr key={v}>
            <th scope="row">{v}</th>
            <td>{formatFixed(energyPerCm, 2)}</td>
            <td>bound</td>
          </tr>
        ))}
        {quasiBound.map(({ v, energyPerCm, widthPerCm }) => (
          <tr key={v}>
            <th scope="row">{v}</th>
            <td>{formatFixed(energyPerCm, 2)}</td>
            <td>{formatScientific(widthPerCm)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function IsotopologuesTable({
  isotopologues,
  molecule,
  energyUnit,
}: {
  readonly isotopologues: readonly Isotopologue[];
  readonly molecule: StudyMolecule;
  readonly energyUnit: EnergyUnit;
}) {
  const { symbol, decimals } = ENERGY_UNITS[energyUnit];
  return (
    <table className="numbers">
      <caption>Isotopologues, on the same curve</caption>
      <thead>
        <tr>
          <th scope="col">Molecule</th>
          <th scope="col">μ, u</th>
          <th scope="col">ωe, cm⁻¹</th>
          <th scope="col">
            <abbr title="Zero-point energy">G(0), cm⁻¹</abbr>
          </th>
          <th scope="col">D₀, {symbol}</th>
          <th scope="col">Levels</th>
        </tr>
      </thead>
      <tbody>
        {isotopologues.map(({ massNumbers, reducedMassDalton, constants, vibration }) => (
          <tr key={massNumbers.join()}>
            <th scope="row">{isotopologueFormula(molecule, massNumbers)}</th>
            <td>{formatFixed(reducedMassDalton, 6)}</td>
            <td>{constants ? formatFixed(constants.harmonicWavenumberPerCm.value, 2) : '–'}</td>
            {vibration.kind === 'found' ? (
              <>
                <td>{formatFixed(vibration.zeroPointPerCm, 2)}</td>
                <td>
                  {vibration.d0 === undefined
                    ? '–'
                    : formatFixed(toEnergyUnit(vibration.d0, energyUnit), decimals)}
                </td>
                <td>{vibration.boundLevels}</td>
              </>
            ) : (
              <td colSpan={3} className="words">
                {vibration.reason}
              </td>
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** The molecule with these isotopes, all of them named: `HD⁺`, `⁷LiH`. */
export function isotopologueFormula(molecule: StudyMolecule, massNumbers: readonly number[]): string {
  const atoms = molecule.atoms.map((atom, index) => {
    const isotope = massNumbers[index];
    return isotope === undefined ? atom : { ...atom, isotope };
  });
  return formula({ ...molecule, atoms });
}
