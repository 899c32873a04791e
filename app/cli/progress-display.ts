import { SingleBar } from 'cli-progress';
import type { Progress } from '../calculation/progress';
import type { Terminal } from './terminal';
import { counted, durationText } from './wording';

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

function drawnBar(stream: NodeJS.WriteStream): ProgressDisplay {
  const bar = new SingleBar({
    stream,
    format: '{bar}  {text}',
    barCompleteChar: '━',
    barIncompleteChar: '·',
    barsize: 24,
    clearOnComplete: true,
    // cursor and line wrapping stay as they are: a killed process could not restore them
    hideCursor: null,
    linewrap: true,
    // interruption is for the command to handle, not for the bar
    gracefulExit: false,
  });
  return {
    show(progress) {
      const payload = { text: progressText(progress) };
      if (!bar.isActive) bar.start(progress.total, progress.done, payload);
      bar.setTotal(progress.total);
      bar.update(progress.done, payload);
    },
    end: () => bar.stop(),
  };
}

/** Seldom enough for a log file of a long run. */
const LINE_EVERY_MS = 10_000;
/** A sign of life where nothing new can be told. */
const SAME_LINE_EVERY_MS = 120_000;

function plainLines({ say }: Terminal, now: () => number): ProgressDisplay {
  let lastTime = now();
  let lastCount = '';
  return {
    show(progress) {
      const count = countText(progress);
      const everyPointIsDone = progress.stage === 'points' && progress.done === progress.total;
      const pause = everyPointIsDone ? 0 : count === lastCount ? SAME_LINE_EVERY_MS : LINE_EVERY_MS;
      if (now() - lastTime < pause) return;
      lastTime = now();
      lastCount = count;
      say(progressText(progress));
    },
    end: () => undefined,
  };
}

function progressText(progress: Progress): string {
  const { done, total, secondsLeft } = progress;
  if (secondsLeft === undefined || done === total) return countText(progress);
  return `${countText(progress)}, ${secondsLeft < 1 ? '' : 'about '}${durationText(secondsLeft)} left`;
}

function countText({ basis, ...progress }: Progress): string {
  const where = basis ? ` in ${basis.name} (basis ${basis.number} of ${basis.of})` : '';
  return `${pieceText(progress)}${where}`;
}

function pieceText({ stage, done, total }: Omit<Progress, 'basis'>): string {
  switch (stage) {
    case 'points':
      return `${done} of ${counted(total, 'point')}`;
    case 'neighbours':
      return `${done} of ${counted(total, 'point')} compared with their neighbours`;
    case 'minima':
      return `minimum of ${done} of ${counted(total, 'curve')}`;
    case 'limit':
      return `basis-set limit of ${done} of ${counted(total, 'curve')}`;
  }
}
