import type { Data, Layout, Shape } from 'plotly.js-dist';
import { useEffect, useRef } from 'react';
import { loadPlotly } from './load-plotly';

interface Drawing {
  readonly data: readonly Data[];
  readonly layout: Partial<Layout>;
  readonly shapes: Partial<Shape>[];
}

interface PlotlyChartProps extends Drawing {
  /** position along the axis that was clicked */
  readonly onPick: (x: number) => void;
}

/** The one place where plotly draws. */
export function PlotlyChart({ data, layout, shapes, onPick }: PlotlyChartProps) {
  const place = useRef<HTMLDivElement>(null);
  const painter = useRef<Painter>(undefined);
  const pick = useRef(onPick);
  useEffect(() => {
    pick.current = onPick;
  }, [onPick]);
  useEffect(() => {
    if (place.current === null) return;
    const current = new Painter(place.current, (x) => pick.current(x));
    painter.current = current;
    return () => current.dispose();
  }, []);
  useEffect(() => painter.current?.show({ data, layout, shapes }), [data, layout, shapes]);
  return <div ref={place} className="plotlyChart" />;
}

const CONFIG = { displayModeBar: false, responsive: false, doubleClick: 'reset', showTips: false } as const;

/** After a whole drawing the window has this many times as long for everything else, however slow the machine. */
const REST_FACTOR = 3;
/** Long enough for a press or a key to get in; what has arrived is not held back longer. */
const LONGEST_REST_MS = 400;

/** Draws the latest of what it is shown, at most once a frame; a moved cursor redraws only the shapes. */
class Painter {
  readonly #place: HTMLDivElement;
  readonly #onPick: (x: number) => void;
  #wanted: Drawing | undefined;
  #drawn: Drawing | undefined;
  #isBusy = false;
  #isDisposed = false;
  #restsUntil = 0;

  constructor(place: HTMLDivElement, onPick: (x: number) => void) {
    this.#place = place;
    this.#onPick = onPick;
  }

  show(drawing: Drawing): void {
    this.#wanted = drawing;
    if (!this.#isBusy) void this.#drawUntilUpToDate();
  }

  dispose(): void {
    this.#isDisposed = true;
    if (this.#drawn !== undefined) void loadPlotly().then((plotly) => plotly.purge(this.#place));
  }

  async #drawUntilUpToDate(): Promise<void> {
    this.#isBusy = true;
    while (this.#wanted !== this.#drawn && !this.#isDisposed) {
      await nextFrame();
      const wanted = this.#wanted;
      if (wanted === undefined || this.#isDisposed) break;
      const isOnlyCursor = this.#drawn?.data === wanted.data && this.#drawn.layout === wanted.layout;
      if (!isOnlyCursor && performance.now() < this.#restsUntil) continue;
      await this.#draw(wanted, isOnlyCursor);
    }
    this.#isBusy = false;
  }

  async #draw(drawing: Drawing, isOnlyCursor: boolean): Promise<void> {
    const { data, layout, shapes } = drawing;
    const plotly = await loadPlotly();
    if (this.#isDisposed) return;
    const started = performance.now();
    const isFirst = this.#drawn === undefined;
    this.#drawn = drawing;
    if (isOnlyCursor) {
      await plotly.relayout(this.#place, { shapes });
      return;
    }
    const graph = await plotly.react(this.#place, [...data], { ...layout, shapes }, CONFIG);
    if (isFirst)
      graph.on('plotly_click', ({ points }) => {
        const x = points[0]?.x;
        if (typeof x === 'number') this.#onPick(x);
      });
    const now = performance.now();
    this.#restsUntil = now + Math.min(LONGEST_REST_MS, REST_FACTOR * (now - started));
  }
}

const nextFrame = (): Promise<void> => new Promise((resolve) => requestAnimationFrame(() => resolve()));
