import { useMemo, useRef } from 'react';
import { DARK_CHART, LIGHT_CHART } from '../charts/chart-theme';
import { cursorShapes } from '../charts/cursor-shapes';
import { energyCurves, positions } from '../charts/curves';
import { buildFigure, type FigureRequest } from '../charts/figure';
import { PlotlyChart } from '../charts/plotly-chart';
import { useGround } from '../charts/use-ground';
import { useMedia } from '../controls/use-media';
import { useSize } from '../controls/use-size';
import { type CursorMove, cursorIndex, moveCursor } from '../state/cursor';
import { useController, useWindowState } from '../state/window-context';
import type { Run, View } from '../state/window-state';
import { ChartControls } from './chart-controls';
import { cursorText, nearestIndex } from './cursor-text';
import { LevelLegend } from './level-legend';
import { RunNotes } from './run-notes';

const MOVE_OF_KEY: Readonly<Record<string, CursorMove>> = {
  ArrowLeft: 'previous',
  ArrowRight: 'next',
  PageDown: 'back',
  PageUp: 'ahead',
  Home: 'first',
  End: 'last',
};

/** The curves, what they are shown in, and the cursor on them. */
export function ChartPanel() {
  const run = useWindowState((state) => state.run);
  const view = useWindowState((state) => state.view);
  return (
    <section className="chartPanel" aria-label="Curves">
      <ChartControls />
      {run === undefined ? (
        <p className="empty">Compute the study to see its curves.</p>
      ) : (
        <>
          <LevelLegend run={run} />
          {run.study.scan === undefined ? (
            <p className="empty">One geometry has no curve: its numbers stand beside.</p>
          ) : (
            <Charts run={run} view={view} />
          )}
          <RunNotes run={run} />
        </>
      )}
    </section>
  );
}

function Charts({ run, view }: { readonly run: Run; readonly view: View }) {
  const controller = useController();
  const ground = useGround();
  const place = useRef<HTMLDivElement>(null);
  const size = useSize(place);
  const fontSize = useChartFontSize();
  const { study, points } = run;
  const { energyUnit, energyReference, hiddenLevels } = view;
  const levelsOf = view.showsVibration ? run.results : undefined;
  const curves = run.results?.curves;
  const lengthUnit = view.lengthUnit ?? study.molecule.unit;
  const hasPoints = points.some((point) => point !== undefined);
  const request = useMemo(
    (): FigureRequest => ({
      study,
      points,
      energyUnit,
      energyReference,
      lengthUnit,
      curves,
      hiddenLevels,
      levelsOf,
      theme: { ...(ground === 'dark' ? DARK_CHART : LIGHT_CHART), fontSize },
      zoomKey: [run.text, energyUnit, energyReference, lengthUnit].join('|'),
      size: size ?? UNMEASURED,
    }),
    [
      study,
      points,
      energyUnit,
      energyReference,
      lengthUnit,
      curves,
      hiddenLevels,
      levelsOf,
      ground,
      fontSize,
      run.text,
      size,
    ],
  );
  const figure = useMemo(() => buildFigure(request), [request]);
  const index = cursorIndex(run, view.cursor);
  const shapes = useMemo(() => cursorShapes(request, index), [request, index]);
  const x = positions(study, points, lengthUnit);
  const { missing } = energyCurves(study, points, request);
  return (
    <>
      <div
        ref={place}
        className="charts"
        role="slider"
        tabIndex={0}
        aria-label="Cursor on the curves"
        aria-orientation="horizontal"
        aria-valuemin={0}
        aria-valuemax={Math.max(0, run.total - 1)}
        aria-valuenow={index ?? 0}
        aria-valuetext={index === undefined ? 'no point yet' : cursorText(run, index, energyUnit, lengthUnit)}
        onKeyDown={(event) => {
          const move = MOVE_OF_KEY[event.key];
          if (move === undefined) return;
          event.preventDefault();
          controller.changeView({ cursor: moveCursor(run, index, move) });
        }}
      >
        {size !== undefined && hasPoints && (
          <PlotlyChart
            data={figure.data}
            layout={figure.layout}
            shapes={shapes}
            onPick={(picked) => controller.changeView({ cursor: nearestIndex(x, picked) })}
          />
        )}
      </div>
      {missing.length > 0 && (
        <p className="chartNote">
          {missing.map(({ level, reason }) => `${level} is not drawn: ${reason}.`).join(' ')}
        </p>
      )}
    </>
  );
}

const UNMEASURED = { width: 0, height: 0 };

/** The charts' letters keep step with the window's, which grow with its room. */
function useChartFontSize(): number {
  const isWide = useMedia('(min-width: 1800px)');
  const isVeryWide = useMedia('(min-width: 2400px)');
  return isVeryWide ? 16 : isWide ? 14 : 13;
}
