// @vitest-environment node
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { type BrowserHost, startBrowserHost } from '../../../../app/browser-host/server';
import type { HostConnection } from '../../../../app/contract/requests';
import { connectLoopback } from '../../../../app/renderer/host/connection';
import type { Post } from '../../../../app/service/service';
import { quietHandlers } from '../../../support/handlers';

/*
 * The window's side against the real host. Node has `fetch` but no EventSource, and its `fetch` does not say where it
 * comes from; both are supplied here. The same runs in a real browser in tests/end-to-end.
 */

let host: BrowserHost;
let post: Post;
let release: () => void;
const streams: StreamReader[] = [];

class StreamReader extends EventTarget {
  private readonly abort = new AbortController();
  constructor(url: URL) {
    super();
    streams.push(this);
    void this.read(url).catch(() => this.dispatchEvent(new Event('error')));
  }
  close(): void {
    this.abort.abort();
  }
  private async read(url: URL): Promise<void> {
    const response = await fetch(url, { signal: this.abort.signal });
    this.dispatchEvent(new Event('open'));
    let text = '';
    for await (const chunk of response.body!.pipeThrough(new TextDecoderStream())) {
      text += chunk;
      for (let end = text.indexOf('\n\n'); end >= 0; end = text.indexOf('\n\n')) {
        const data = /^data: (.*)$/m.exec(text.slice(0, end))?.[1];
        text = text.slice(end + 2);
        if (data !== undefined) this.dispatchEvent(new MessageEvent('message', { data }));
      }
    }
  }
}

beforeEach(async () => {
  const released = new Promise<void>((resolve) => {
    release = resolve;
  });
  host = await startBrowserHost({
    rendererFolder: '.',
    service: (given) => {
      post = given;
      const handlers = quietHandlers({
        'samples:open': ({ id }) => ({ name: id, text: 'text' }),
        'calculation:start': async () => {
          await released;
          return { id: 7, points: 2 };
        },
      });
      return { handlers, dispose: () => undefined };
    },
  });
  const { origin } = new URL(host.address);
  const plainFetch = fetch;
  vi.stubGlobal('EventSource', StreamReader);
  vi.stubGlobal('fetch', (url: URL, init: RequestInit = {}) =>
    plainFetch(url, { ...init, headers: { ...(init.headers as Record<string, string>), origin } }),
  );
});

afterEach(async () => {
  for (const stream of streams.splice(0)) stream.close();
  vi.unstubAllGlobals();
  await host.close();
});

const progress = (done: number) => ({ id: 7, done, total: 2, stage: 'points' });
/** Longer than what was sent takes to arrive. */
const pause = () => new Promise((resolve) => setTimeout(resolve, 100));

async function connected(): Promise<HostConnection> {
  const connection = connectLoopback(host.address);
  // answered only when events can arrive
  await connection.request('samples:open', { id: 'any' });
  return connection;
}

describe('connectLoopback', () => {
  it('brings back a value or an error as data', async () => {
    const connection = connectLoopback(host.address);
    expect(await connection.request('samples:open', { id: 'H2' })).toEqual({
      ok: true,
      value: { name: 'H2', text: 'text' },
    });
    expect(await connection.request('samples:open', { id: 7 as unknown as string })).toMatchObject({
      ok: false,
      error: { code: 'request.malformed' },
    });
  });

  it('delivers events to those who want them, until they do not', async () => {
    const connection = await connected();
    const seen: number[] = [];
    const unsubscribe = connection.subscribe('calculation:progress', ({ done }) => seen.push(done));
    connection.subscribe('calculation:point', () => seen.push(-1));
    post('calculation:progress', progress(1));
    await vi.waitFor(() => expect(seen).toEqual([1]));
    unsubscribe();
    post('calculation:progress', progress(2));
    await pause();
    expect(seen).toEqual([1]);
  });

  it('holds events back until the reply has told which calculation they belong to', async () => {
    const connection = await connected();
    const order: string[] = [];
    connection.subscribe('calculation:progress', ({ done }) => order.push(`event ${done}`));
    const started = connection.request('calculation:start', { text: '' }).then(() => order.push('reply'));
    post('calculation:progress', progress(1));
    post('calculation:progress', progress(2));
    await pause();
    expect(order).toEqual([]);
    release();
    await started;
    await vi.waitFor(() => expect(order).toEqual(['reply', 'event 1', 'event 2']));
  });

  it('says so when the host has ended', async () => {
    const connection = await connected();
    await host.close();
    expect(await connection.request('samples:open', { id: 'H2' })).toMatchObject({
      ok: false,
      error: { code: 'host.gone' },
    });
  });
});
