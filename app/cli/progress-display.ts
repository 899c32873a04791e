import { SingleBar } from 'cli-progress';
import type { Progress } from '../calculation/progress';
import type { Terminal } from './terminal';
import { durationText } from './wording';

/** Shows how far a calculation is. */
export interface ProgressDisplay {
  show(progress: Progress): void;
  /** takes a drawn bar away, so that lines can follow */
  end(): void;
}

/** A bar on a screen, else a line now and then. */
export function progressDisplay(
  terminal: Terminal,
  now: () => number = () => performance.now(),
): ProgressDisplay {
  return terminal.screen ? drawnBar(terminal.screen) : plainLines(terminal, now);
}

const STAGE_NAMES: Readonly<Record<Progress['stage'], string>> = { points: 'points', minima: 'minima' };

function drawnBar(stream: NodeJS.WriteStream): ProgressDisplay {
  const bar = new SingleBar({
    stream,
    format: '{bar}  {value} of {total} {stage}{left}',
    barCompleteChar: '━',
    barIncompleteChar: '·',
    barsize: 32,
    clearOnComplete: true,
    hideCursor: null,
    // interruption is for the command to handle, not for the bar
    gracefulExit: false,
  });
  return {
    show(progress) {
      const payload = { stage: STAGE_NAMES[progress.stage], left: leftText(progress) };
      if (!bar.isActive) bar.start(progress.total, progress.done, payload);
      bar.setTotal(progress.total);
      bar.update(progress.done, payload);
    },
    end: () => bar.stop(),
  };
}

/** Seldom enough for a log file of a long run. */
const LINE_EVERY_MS = 10_000;

function plainLines({ say }: Terminal, now: () => number): ProgressDisplay {
  let lastLine = now();
  return {
    show(progress) {
      const isComplete = progress.done === progress.total && progress.stage === 'points';
      if (!isComplete && now() - lastLine < LINE_EVERY_MS) return;
      lastLine = now();
      say(`${progress.done} of ${progress.total} ${STAGE_NAMES[progress.stage]}${leftText(progress)}`);
    },
    end: () => undefined,
  };
}

function leftText({ done, total, secondsLeft }: Progress): string {
  return secondsLeft === undefined || done === total ? '' : `, about ${durationText(secondsLeft)} left`;
}
