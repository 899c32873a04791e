import type { ExcitedState, FranckCondon, StateCurve, Study } from '#engine';
import { fragmentsText } from '../../../study/fragments-text';
import { formatFixed } from '../../numbers';
import { Facts } from '../facts';
import { energyText, positionText, type ShownUnits, uncertaintyText } from './shown-units';
import { whyNoMinimum } from './well-facts';

interface ExcitedStatesProps extends ShownUnits {
  readonly states: readonly ExcitedState[];
  readonly curves: readonly StateCurve[];
  readonly study: Study;
}

/** What the curves of the higher states of a level give; folded until asked for. */
export function ExcitedStates({ states, curves, ...shown }: ExcitedStatesProps) {
  if (states.length === 0) return null;
  return (
    <details>
      <summary>Excited states</summary>
      {states.map((state) => (
        <section key={state.curve} className="excitedState">
          <h4>{curves[state.curve]?.name ?? `State ${state.curve + 1}`}</h4>
          <StateFacts state={state} {...shown} />
          {state.franckCondon && <FranckCondonTable franckCondon={state.franckCondon} />}
        </section>
      ))}
    </details>
  );
}

function StateFacts({
  state,
  study,
  lengthUnit,
  energyUnit,
}: { readonly state: ExcitedState; readonly study: Study } & ShownUnits) {
  const { minimum, minimumFrom, vertical, adiabatic, zeroPointToZeroPoint } = state;
  const { dissociation, wellDepth, vibration } = state;
  const where = positionText(study, lengthUnit);
  const estimate = (key: string, { value, uncertainty }: { value: number; uncertainty: number }) => (
    <span key={key}>
      {energyText(value, energyUnit)}
      <span className="hint"> {uncertaintyText(uncertainty, energyUnit)}</span>
    </span>
  );
  return (
    <>
      <Facts
        facts={[
          minimum.kind === 'found'
            ? [
                minimumFrom === 'interpolated' ? (
                  <abbr
                    key="re"
                    title="Of the curve between the points of the scan: further points are too dear"
                  >
                    Equilibrium distance, interpolated
                  </abbr>
                ) : (
                  'Equilibrium distance'
                ),
                <span key="at">
                  {where(minimum.equilibriumDistance, 6)}
                  <span className="hint"> ± {where(minimum.uncertainty, 1)}</span>
                </span>,
              ]
            : undefined,
          vertical && [
            `Vertical excitation, at ${where(vertical.coordinate, 5)}`,
            estimate('vertical', vertical.energy),
          ],
          vertical?.oscillatorStrength === undefined
            ? undefined
            : ['Oscillator strength there', formatFixed(vertical.oscillatorStrength, 5)],
          vertical?.transitionDipole === undefined
            ? undefined
            : ['Transition dipole there, e·a₀', formatFixed(vertical.transitionDipole, 5)],
          adiabatic && ['Tₑ, minimum to minimum', estimate('te', adiabatic)],
          zeroPointToZeroPoint && ['T₀, lowest level to lowest level', estimate('t0', zeroPointToZeroPoint)],
          dissociation?.kind === 'found'
            ? ['Tends to', fragmentsText(study.molecule, dissociation)]
            : undefined,
          wellDepth && [
            wellDepth.against === 'fragments'
              ? 'Well depth, against that'
              : `Well depth, against ${where(wellDepth.farEnd, 5)}`,
            energyText(wellDepth.value, energyUnit),
          ],
          vibration?.kind === 'found' && vibration.d0 !== undefined
            ? ['D₀, from the lowest level', energyText(vibration.d0, energyUnit)]
            : undefined,
        ]}
      />
      {minimum.kind !== 'found' && <p className="absent">{whyNoMinimum(minimum, where)}</p>}
      {dissociation?.kind === 'none' && (
        <p className="absent">No limit of separate fragments: {dissociation.reason}</p>
      )}
    </>
  );
}

/** Upper levels that find room beside the charts. */
const MOST_COLUMNS = 6;
const MOST_ROWS = 4;

function FranckCondonTable({
  franckCondon: { factors, sums, boundLevels, converged },
}: {
  readonly franckCondon: FranckCondon;
}) {
  const columns = Math.min(MOST_COLUMNS, factors[0]?.length ?? 0);
  return (
    <table className="numbers">
      <caption>
        Franck–Condon factors
        {!converged && <span className="notConverged">, not converged</span>}
      </caption>
      <thead>
        <tr>
          <th scope="col">v″ \ v′</th>
          {Array.from({ length: columns }, (_, v) => v).map((v) => (
            <th key={v} scope="col">
              {v}
            </th>
          ))}
          <th scope="col">
            <abbr title={`Sum over all ${boundLevels} bound levels; the rest goes to the continuum`}>Σ</abbr>
          </th>
        </tr>
      </thead>
      <tbody>
        {factors.slice(0, MOST_ROWS).map((row, lower) => (
          // biome-ignore lint/suspicious/noArrayIndexKey: a row is its quantum number
          <tr key={lower}>
            <th scope="row">{lower}</th>
            {row.slice(0, columns).map((factor, upper) => (
              // biome-ignore lint/suspicious/noArrayIndexKey: as above
              <td key={upper}>{formatFixed(factor, 4)}</td>
            ))}
            <td>{formatFixed(sums[lower] ?? Number.NaN, 4)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
