import type { ServerResponse } from 'node:http';
import { PassThrough } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { EventStream } from '../../../app/browser-host/event-stream';

/** A response that keeps what is written to it. */
function openWindow(): { readonly response: ServerResponse; ids(): readonly number[]; text(): string } {
  let text = '';
  const stream = new PassThrough();
  stream.on('data', (chunk: Buffer) => {
    text += chunk.toString();
  });
  const response = Object.assign(stream, { writeHead: () => response }) as unknown as ServerResponse;
  return {
    response,
    text: () => text,
    ids: () => [...text.matchAll(/^id: (\d+)$/gm)].map((match) => Number(match[1])),
  };
}

const point = (done: number) => ({ id: 1, done, total: 9, stage: 'points' });

describe('EventStream', () => {
  it('writes each event as one numbered message with one line of data', () => {
    const events = new EventStream();
    const window = openWindow();
    events.connect(window.response, undefined);
    events.post('calculation:progress', { ...point(1), stage: 'two\nlines' });
    const messages = window
      .text()
      .split('\n\n')
      .filter((message) => message.startsWith('id:'));
    expect(messages).toHaveLength(1);
    const [id, data, ...rest] = messages[0]!.split('\n');
    expect([id, rest]).toEqual(['id: 1', []]);
    expect(JSON.parse(data!.replace(/^data: /, ''))).toEqual({
      name: 'calculation:progress',
      payload: { ...point(1), stage: 'two\nlines' },
    });
  });

  it('gives a window that comes back what it missed, and a new one only what comes next', () => {
    const events = new EventStream();
    for (const done of [1, 2, 3, 4]) events.post('calculation:progress', point(done));
    const returning = openWindow();
    const fresh = openWindow();
    events.connect(returning.response, '2');
    events.connect(fresh.response, undefined);
    events.post('calculation:progress', point(5));
    expect(returning.ids()).toEqual([3, 4, 5]);
    expect(fresh.ids()).toEqual([5]);
  });

  it('is not misled by a number that it never gave out', () => {
    const events = new EventStream();
    events.post('calculation:progress', point(1));
    for (const lastSeen of ['7', '-1', 'x', '']) {
      const window = openWindow();
      events.connect(window.response, lastSeen);
      expect(window.ids()).toEqual([]);
    }
  });

  it('forgets old events rather than growing without end', () => {
    const events = new EventStream();
    for (let done = 0; done < 5000; done++) events.post('calculation:progress', point(done));
    const window = openWindow();
    events.connect(window.response, '0');
    expect(window.ids().length).toBeLessThan(5000);
    expect(window.ids().at(-1)).toBe(5000);
  });

  it('writes nothing more to a window that was closed', async () => {
    const events = new EventStream();
    const window = openWindow();
    events.connect(window.response, undefined);
    window.response.destroy();
    await new Promise((resolve) => setImmediate(resolve));
    events.post('calculation:progress', point(1));
    expect(window.ids()).toEqual([]);
  });
});
