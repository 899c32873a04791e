import { Button } from 'react-aria-components';
import type { PointResult } from '#engine';
import { scansLength } from '../../charts/curves';
import { numbered } from '../../numbered';
import { formatFixed, formatPlain } from '../../numbers';
import { type CursorMove, cursorIndex, moveCursor } from '../../state/cursor';
import { useController, useWindowState } from '../../state/window-context';
import type { Run } from '../../state/window-state';
import { convertLength, ENERGY_UNITS, LENGTH_UNITS, toEnergyUnit } from '../../units';
import { Charges } from './charges';
import { LevelDetails } from './level-details';
import { LevelsTable } from './levels-table';
import { ScaleFactors } from './scale-factors';

/** Every number at the geometry under the cursor. */
export function Readout() {
  const run = useWindowState((state) => state.run);
  const view = useWindowState((state) => state.view);
  const controller = useController();
  if (run === undefined) return <p className="empty">Nothing has been computed yet.</p>;
  const index = cursorIndex(run, view.cursor);
  const point = index === undefined ? undefined : run.points[index];
  if (index === undefined || point === undefined)
    return <p className="empty">The first points are on their way.</p>;
  const { symbol, decimals } = ENERGY_UNITS[view.energyUnit];
  const move = (step: CursorMove) => controller.changeView({ cursor: moveCursor(run, index, step) });
  return (
    <div className="readout">
      <header className="readoutHead">
        <h2>{place(run, point, view.lengthUnit ?? run.study.molecule.unit)}</h2>
        <span className="hint">
          point {index + 1} of {run.total}
        </span>
        <span className="stepper">
          <Button
            className="quietButton"
            aria-label="Cursor to the previous point"
            onPress={() => move('previous')}
          >
            ‹
          </Button>
          <Button className="quietButton" aria-label="Cursor to the next point" onPress={() => move('next')}>
            ›
          </Button>
        </span>
      </header>
      <Cautions point={point} />
      <LevelsTable point={point} levels={run.study.levels} energyUnit={view.energyUnit} />
      <dl className="facts">
        <dt>Nuclear repulsion</dt>
        <dd>
          {formatFixed(toEnergyUnit(point.nuclearRepulsion, view.energyUnit), decimals)} {symbol}
        </dd>
      </dl>
      <ScaleFactors point={point} />
      {run.study.levels.map((level) => {
        const result = point.levels[level];
        return result === undefined ? null : (
          <LevelDetails key={level} level={level} result={result} energyUnit={view.energyUnit} />
        );
      })}
      <Charges point={point} levels={run.study.levels} />
      <Geometry point={point} unit={run.study.molecule.unit} />
    </div>
  );
}

function place({ study }: Run, { coordinate }: PointResult, lengthUnit: 'angstrom' | 'bohr'): string {
  if (coordinate === null) return 'The geometry as given';
  if (!scansLength(study)) return `At ${formatPlain(coordinate, 8)}°`;
  const length = convertLength(coordinate, study.molecule.unit, lengthUnit);
  return `At ${formatPlain(length, 7)} ${LENGTH_UNITS[lengthUnit].symbol}`;
}

function Cautions({ point }: { readonly point: PointResult }) {
  if (point.cautions.length === 0) return null;
  return (
    <ul className="cautions" aria-label="Cautions at this point">
      {point.cautions.map(({ code, level, message }) => (
        <li key={`${code} ${level}`}>
          {level === undefined ? '' : <strong>{level}: </strong>}
          {message}
        </li>
      ))}
    </ul>
  );
}

function Geometry({ point, unit }: { readonly point: PointResult; readonly unit: 'angstrom' | 'bohr' }) {
  return (
    <details className="detailBlock">
      <summary>Geometry, {LENGTH_UNITS[unit].symbol}</summary>
      <table className="numbers">
        <thead>
          <tr>
            <th scope="col">Atom</th>
            <th scope="col">x</th>
            <th scope="col">y</th>
            <th scope="col">z</th>
          </tr>
        </thead>
        <tbody>
          {numbered(point.atoms).map(({ number, item: { element, at, isotope, ghost } }) => (
            <tr key={number}>
              <th scope="row">
                {number} {isotope === undefined ? '' : <sup>{isotope}</sup>}
                {element}
                {ghost ? ' (ghost)' : ''}
              </th>
              {numbered(at).map(({ number: axis, item: value }) => (
                <td key={axis}>{formatFixed(value, 6)}</td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </details>
  );
}
