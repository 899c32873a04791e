import process from 'node:process';
import type { Finding } from '../calculation/messages';
import type { StageTime } from '../calculation/stage-clock';
import { alignedTable, bytesText } from './wording';

/** Where the time of a run went: computing by stage and level, and what the program itself did by the clock. */
export interface Profile {
  /** seconds of a worker */
  add(kind: Finding['kind'], times: readonly StageTime[]): void;
  /** takes the time of a stretch of the run */
  stretch<T>(name: Stretch, work: () => Promise<T>): Promise<T>;
  /** @param levels - in the order of the columns */
  table(levels: readonly string[]): string;
}

type Stretch = 'computing' | 'writing';

/** Stages in the order of the rows; what belongs to none is named by what was computed. */
const STAGES: readonly StageTime['stage'][] = [
  'integrals',
  'self-consistency',
  'stability',
  'scale factors',
  'symmetry',
  'transformation',
  'CI model space',
  'CI product',
];
const REST: Readonly<Record<Finding['kind'], string>> = {
  point: 'rest of the points',
  followed: 'rest of the neighbours',
  minimum: 'reading the curves',
  limit: 'reading the basis-set limit',
};
const OF: Readonly<Record<Finding['kind'], string>> = {
  point: 'all points',
  followed: 'all neighbours',
  minimum: 'all minima',
  limit: 'all basis-set limits',
};
const SHARED = 'shared';

/**
 * @param now - clock in milliseconds
 * @param mostMemory - bytes that the process has held at most
 */
export function startProfile(
  now: () => number = () => performance.now(),
  mostMemory: () => number = () => 1024 * process.resourceUsage().maxRSS,
): Profile {
  const seconds = new Map<string, Map<string, number>>();
  const stretches = new Map<Stretch, number>();
  const count = (row: string, column: string, value: number) => {
    const cells = seconds.get(row) ?? new Map<string, number>();
    seconds.set(row, cells.set(column, (cells.get(column) ?? 0) + value));
  };
  return {
    add(kind, times) {
      for (const { stage, level = SHARED, seconds: value } of times) {
        count(stage === 'rest' ? REST[kind] : stage, level, value);
        count(OF[kind], level, value);
      }
    },
    async stretch(name, work) {
      const began = now();
      try {
        return await work();
      } finally {
        stretches.set(name, (stretches.get(name) ?? 0) + (now() - began) / 1000);
      }
    },
    table(levels) {
      const columns = [SHARED, ...levels].filter((column) =>
        [...seconds.values()].some((cells) => cells.has(column)),
      );
      const rowsOf = (names: readonly string[]) =>
        names.flatMap((name) => {
          const cells = seconds.get(name);
          if (!cells) return [];
          const total = [...cells.values()].reduce((sum, value) => sum + value, 0);
          return [[name, ...columns.map((column) => secondsText(cells.get(column))), secondsText(total)]];
        });
      const computing = [...STAGES, ...Object.values(REST)];
      return [
        'Where the time went, in seconds of computing:',
        alignedTable([['', ...columns, 'in all'], ...rowsOf(computing), ...rowsOf(Object.values(OF))]),
        `By the clock: ${[...stretches].map(([name, value]) => `${name} ${secondsText(value)} s`).join(', ')}, the whole program ${secondsText(now() / 1000)} s.`,
        `Memory at most ${bytesText(mostMemory())}.`,
      ].join('\n');
    },
  };
}

function secondsText(seconds: number | undefined): string {
  return seconds === undefined ? '–' : seconds.toFixed(3);
}
