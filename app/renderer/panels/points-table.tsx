import { energyColumns } from '../../study/energy-columns';
import { positions, scansLength } from '../charts/curves';
import { numbered } from '../numbered';
import { commonDecimals, formatFixed } from '../numbers';
import { cursorIndex } from '../state/cursor';
import { useController, useWindowState } from '../state/window-context';
import { ENERGY_UNITS, LENGTH_UNITS, toEnergyUnit } from '../units';

/** Finer than any geometry is known. */
const COORDINATE_DECIMALS = 6;

/** All energies of all points; a click puts the cursor on a row. */
export function PointsTable() {
  const run = useWindowState((state) => state.run);
  const view = useWindowState((state) => state.view);
  const controller = useController();
  if (run === undefined) return <p className="empty">Nothing has been computed yet.</p>;
  const { study, points } = run;
  const lengthUnit = view.lengthUnit ?? study.molecule.unit;
  const x = positions(study, points, lengthUnit);
  const columns = energyColumns({
    study,
    points: points.filter((point) => point !== undefined),
    curves: run.results?.curves,
  });
  const { symbol, decimals } = ENERGY_UNITS[view.energyUnit];
  const coordinateDecimals = commonDecimals(
    x.filter((value) => value !== null),
    COORDINATE_DECIMALS,
  );
  const cursor = cursorIndex(run, view.cursor);
  return (
    <div className="pointsTable">
      <table className="numbers">
        <caption>Energies, {symbol}; × not converged, △ caution</caption>
        <thead>
          <tr>
            <th scope="col">
              {scansLength(study) ? LENGTH_UNITS[lengthUnit].symbol : study.scan ? '°' : 'Point'}
            </th>
            {columns.map(({ label }) => (
              <th scope="col" key={label}>
                {label}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {numbered(points).map(({ number: index, item: point }) =>
            point === undefined ? null : (
              <tr
                key={index}
                aria-current={index === cursor || undefined}
                onClick={() => controller.changeView({ cursor: index })}
              >
                <th scope="row">
                  {point.cautions.length > 0 && (
                    <span className="cautionMark" title="caution">
                      △
                    </span>
                  )}
                  {x[index] == null ? 'as given' : formatFixed(x[index], coordinateDecimals)}
                </th>
                {columns.map(({ label, entryAt }) => {
                  const entry = entryAt(point);
                  return (
                    <td key={label} data-unconverged={(entry !== undefined && !entry.converged) || undefined}>
                      {entry === undefined
                        ? '–'
                        : formatFixed(toEnergyUnit(entry.energy, view.energyUnit), decimals)}
                      {entry !== undefined && !entry.converged && ' ×'}
                    </td>
                  );
                })}
              </tr>
            ),
          )}
        </tbody>
      </table>
    </div>
  );
}
