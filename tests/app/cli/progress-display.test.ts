import { PassThrough } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { progressDisplay } from '../../../app/cli/progress-display';
import type { Terminal } from '../../../app/cli/terminal';

function terminal(screen?: NodeJS.WriteStream): Terminal & { readonly said: string[] } {
  const said: string[] = [];
  return { said, screen, say: (line) => void said.push(line), print: () => Promise.resolve() };
}

describe('progressDisplay', () => {
  it('writes plain lines seldom, and one when all points are done, where there is no screen', () => {
    let now = 0;
    const watched = terminal();
    const display = progressDisplay(watched, () => now);
    display.show({ stage: 'points', done: 0, total: 40 });
    display.show({ stage: 'points', done: 1, total: 40, secondsLeft: 390 });
    expect(watched.said).toEqual([]);
    now = 10_000;
    display.show({ stage: 'points', done: 2, total: 40, secondsLeft: 380 });
    display.show({ stage: 'points', done: 3, total: 40, secondsLeft: 370 });
    expect(watched.said).toEqual(['2 of 40 points, about 6 min left']);
    display.show({ stage: 'points', done: 40, total: 40, secondsLeft: 0 });
    expect(watched.said.at(-1)).toBe('40 of 40 points');
    display.show({ stage: 'minima', done: 0, total: 1 });
    now = 20_000;
    display.show({ stage: 'minima', done: 0, total: 1 });
    now = 50_000;
    display.show({ stage: 'minima', done: 0, total: 1 });
    expect(watched.said.slice(2)).toEqual(['minimum of 0 of 1 curve']);
    now = 200_000;
    display.show({ stage: 'minima', done: 0, total: 1 });
    expect(watched.said).toHaveLength(4);
    display.end();
  });

  it('draws a bar with the time left on a screen, and takes it away at the end', () => {
    const stream = Object.assign(new PassThrough(), {
      isTTY: true,
      columns: 80,
      cursorTo: () => true,
      clearLine: () => true,
      moveCursor: () => true,
      clearScreenDown: () => true,
    });
    const watched = terminal(stream as unknown as NodeJS.WriteStream);
    const display = progressDisplay(watched);
    display.show({ stage: 'points', done: 20, total: 40, secondsLeft: 12 });
    display.end();
    const drawn = String(stream.read());
    expect(drawn).toContain('20 of 40 points, about 12 s left');
    expect(watched.said).toEqual([]);
  });
});
