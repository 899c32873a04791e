import { ToggleButton } from 'react-aria-components';
import { energyColumns } from '../../study/energy-columns';
import { levelWithLines } from '../charts/level-lines';
import { LevelSwatch } from '../charts/level-swatch';
import { useController, useWindowState } from '../state/window-context';
import type { Run } from '../state/window-state';

/** The levels with their lines; each can be taken off the charts and put back. */
export function LevelLegend({ run: { study, points, results } }: { readonly run: Run }) {
  const hidden = useWindowState(({ view }) => view.hiddenLevels);
  const showsVibration = useWindowState(({ view }) => view.showsVibration);
  const vibrating = levelWithLines({ levelsOf: results, hiddenLevels: hidden });
  const controller = useController();
  const columns = energyColumns({ study, points: points.filter((point) => point !== undefined) });
  const hasUnconverged = points.some(
    (point) => point !== undefined && Object.values(point.levels).some(({ converged }) => !converged),
  );
  const hasExcited = columns.some(({ isExcited }) => isExcited);
  return (
    <fieldset className="legend" aria-label="Levels drawn">
      {study.levels.map((level) => (
        <ToggleButton
          key={level}
          className="legendEntry"
          isSelected={!hidden.includes(level)}
          onChange={(isShown) =>
            controller.changeView({
              hiddenLevels: isShown ? hidden.filter((name) => name !== level) : [...hidden, level],
            })
          }
        >
          <LevelSwatch level={level} /> {level}
        </ToggleButton>
      ))}
      {vibrating !== undefined && (
        <ToggleButton
          className="legendEntry"
          isSelected={showsVibration}
          onChange={(isShown) => controller.changeView({ showsVibration: isShown })}
        >
          vibrational levels of {vibrating}
        </ToggleButton>
      )}
      {hasExcited && <span className="hint">open marks excited states, △ triplets</span>}
      {hasUnconverged && <span className="hint">× not converged, not joined to the curve</span>}
    </fieldset>
  );
}
