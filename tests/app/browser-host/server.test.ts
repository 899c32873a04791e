import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { type IncomingMessage, type OutgoingHttpHeaders, request } from 'node:http';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { type BrowserHost, startBrowserHost } from '../../../app/browser-host/server';
import type { Post } from '../../../app/service/service';
import { quietHandlers } from '../../support/handlers';

/* A real server, and requests as any program on this machine could send them. */

let folder: string;
let host: BrowserHost;
let post: Post;
let isDisposed: boolean;

beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'farwell-host-test-'));
  const renderer = join(folder, 'renderer');
  mkdirSync(join(renderer, 'assets'), { recursive: true });
  writeFileSync(join(renderer, 'index.html'), '<p>the page</p>');
  writeFileSync(join(renderer, 'assets', 'main.js'), 'export {};');
  writeFileSync(join(folder, 'secret.json'), 'secret');
  isDisposed = false;
  host = await startBrowserHost({
    rendererFolder: renderer,
    service: (given) => {
      post = given;
      return {
        handlers: quietHandlers({ 'samples:open': ({ id }) => ({ name: id, text: 'ü'.repeat(3) }) }),
        dispose: () => {
          isDisposed = true;
        },
      };
    },
  });
});

afterEach(async () => {
  await host.close();
  rmSync(folder, { recursive: true, force: true });
});

interface Sent {
  readonly method?: string;
  /** below the token */
  readonly path?: string;
  /** instead of token and path */
  readonly wholePath?: string;
  readonly headers?: OutgoingHttpHeaders;
  readonly body?: string;
}

/** Sends exactly what is asked for: `fetch` would tidy paths and set headers of its own. */
function send({ method = 'GET', path = '', wholePath, headers = {}, body }: Sent): Promise<IncomingMessage> {
  const { hostname, port, pathname } = new URL(host.address);
  return new Promise((resolve, reject) => {
    const sent = request(
      { hostname, port, method, path: wholePath ?? pathname + path, headers, agent: false },
      resolve,
    );
    sent.on('error', reject);
    sent.end(body);
  });
}

async function textOf(response: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of response) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString();
}

function ask(body: string, headers: OutgoingHttpHeaders = {}): Promise<IncomingMessage> {
  const standard = { origin: new URL(host.address).origin, 'content-type': 'application/json' };
  return send({ method: 'POST', path: 'requests', headers: { ...standard, ...headers }, body });
}

describe('the address', () => {
  it('is on this machine only, with a new token of at least 128 bits each time', async () => {
    const other = await startBrowserHost({
      rendererFolder: folder,
      service: () => ({ handlers: quietHandlers(), dispose: () => undefined }),
    });
    const tokens = [host.address, other.address].map((address) => new URL(address).pathname.slice(1, -1));
    await other.close();
    expect(new URL(host.address).hostname).toBe('127.0.0.1');
    expect(tokens[0]).not.toBe(tokens[1]);
    for (const token of tokens) expect(Buffer.from(token, 'base64url').length).toBeGreaterThanOrEqual(16);
  });
});

describe('files', () => {
  it('are served with a strict policy, never kept and never guessed at', async () => {
    const response = await send({});
    expect(response.statusCode).toBe(200);
    expect(await textOf(response)).toBe('<p>the page</p>');
    expect(response.headers).toMatchObject({
      'content-type': 'text/html; charset=utf-8',
      'cache-control': 'no-store',
      'referrer-policy': 'no-referrer',
      'x-content-type-options': 'nosniff',
    });
    const policy = response.headers['content-security-policy'];
    expect(policy).toContain("default-src 'none'");
    expect(policy).toContain("script-src 'self';");
    expect(policy).toContain("connect-src 'self'");
  });

  it('include those in folders', async () => {
    const response = await send({ path: 'assets/main.js' });
    expect(response.headers['content-type']).toMatch('text/javascript');
    expect(await textOf(response)).toBe('export {};');
  });

  it.each([
    '../secret.json',
    '%2e%2e/secret.json',
    '..%2fsecret.json',
    '..%5csecret.json',
    'assets/..%2f..%2fsecret.json',
    '%2fetc%2fpasswd',
  ])('outside the window’s folder are out of reach by %s', async (path) => {
    const response = await send({ path });
    expect(response.statusCode).toBe(404);
    expect(await textOf(response)).not.toContain('secret');
  });

  it('that do not exist are not found', async () => {
    expect((await send({ path: 'absent.js' })).statusCode).toBe(404);
  });

  it('are read, not written', async () => {
    const origin = new URL(host.address).origin;
    for (const method of ['POST', 'PUT', 'DELETE']) {
      expect((await send({ method, path: 'index.html', headers: { origin } })).statusCode).toBe(405);
    }
  });
});

describe('strangers', () => {
  it.each([{ host: 'attacker.example' }, { host: 'localhost:1' }])(
    'with the Host header %j are refused',
    async (headers) => {
      expect((await send({ headers })).statusCode).toBe(403);
      expect((await send({ path: 'events', headers })).statusCode).toBe(403);
      expect((await ask('{}', headers)).statusCode).toBe(403);
    },
  );

  it('of another origin are refused', async () => {
    for (const origin of ['http://attacker.example', 'null']) {
      expect((await ask('{"name":"program:describe"}', { origin })).statusCode).toBe(403);
      expect((await send({ path: 'events', headers: { origin } })).statusCode).toBe(403);
    }
  });

  it('without the token find nothing, and are not told that there is something', async () => {
    const { pathname } = new URL(host.address);
    const wrong = `/${'A'.repeat(pathname.length - 2)}/`;
    for (const wholePath of [
      '/',
      '/index.html',
      wrong,
      `${wrong}events`,
      pathname.slice(0, -1),
      pathname.slice(0, -2),
    ]) {
      const response = await send({ wholePath });
      expect(response.statusCode, wholePath).toBe(404);
      expect(response.headers.location).toBeUndefined();
    }
  });
});

describe('requests', () => {
  it('are answered with a reply', async () => {
    const response = await ask('{"name":"samples:open","payload":{"id":"öl"}}');
    expect(response.headers['content-type']).toMatch('application/json');
    expect(JSON.parse(await textOf(response))).toEqual({ ok: true, value: { name: 'öl', text: 'üüü' } });
  });

  it('that the contract does not know are refused in the reply', async () => {
    for (const name of ['"files:read"', '"__proto__"', '"toString"', '7', 'null']) {
      const reply = JSON.parse(await textOf(await ask(`{"name":${name}}`)));
      expect(reply).toMatchObject({ ok: false, error: { code: 'request.unknown' } });
    }
  });

  it.each(['', '{', '7', 'null', '"text"', '{"name":'])(
    'that cannot be read are refused: %s',
    async (body) => {
      const response = await ask(body);
      expect(response.statusCode).toBe(400);
      expect(JSON.parse(await textOf(response))).toMatchObject({
        ok: false,
        error: { code: 'request.malformed' },
      });
    },
  );

  it('need the type that no form can send', async () => {
    for (const type of ['text/plain', 'application/x-www-form-urlencoded', 'application/jsonx']) {
      expect((await ask('{"name":"program:describe"}', { 'content-type': type })).statusCode).toBe(415);
    }
  });

  it('are posted', async () => {
    expect((await send({ path: 'requests' })).statusCode).toBe(405);
  });

  it('larger than any study are refused by their announced size, before they arrive', async () => {
    const headers = { origin: new URL(host.address).origin, 'content-type': 'application/json' };
    const { port, pathname } = new URL(host.address);
    const answer = await new Promise<string>((resolve, reject) => {
      const socket = connect(Number(port), '127.0.0.1', () => {
        const lines = Object.entries({ host: `127.0.0.1:${port}`, ...headers, 'content-length': 1e9 });
        socket.write(
          `POST ${pathname}requests HTTP/1.1\r\n${lines.map(([k, v]) => `${k}: ${v}\r\n`).join('')}\r\n`,
        );
      });
      socket.once('data', (data) => {
        resolve(data.toString());
        socket.destroy();
      });
      socket.once('error', reject);
    });
    expect(answer).toMatch(/^HTTP\/1\.1 413 /);
  });

  it('that grow larger without saying so are refused on the way', async () => {
    const { port, pathname } = new URL(host.address);
    const status = await new Promise<string>((resolve, reject) => {
      const socket = connect(Number(port), '127.0.0.1', () => {
        socket.write(
          `POST ${pathname}requests HTTP/1.1\r\nhost: 127.0.0.1:${port}\r\norigin: http://127.0.0.1:${port}\r\n` +
            'content-type: application/json\r\ntransfer-encoding: chunked\r\n\r\n',
        );
        const chunk = `100000\r\n${'x'.repeat(0x100000)}\r\n`;
        for (let sent = 0; sent < 40; sent++) socket.write(chunk);
      });
      socket.once('data', (data) => resolve(data.toString().split('\r\n')[0]!));
      // the server may close while the rest is still being written
      socket.once('error', reject);
    });
    expect(status).toMatch(/^HTTP\/1\.1 413 /);
  });
});

describe('events', () => {
  it('reach every window, and a window that comes back gets what it missed', async () => {
    const first = await send({ path: 'events' });
    const second = await send({ path: 'events' });
    expect(first.headers['content-type']).toMatch('text/event-stream');
    const progress = { id: 3, done: 1, total: 2, stage: 'points' };
    post('calculation:progress', progress);
    for (const window of [first, second]) {
      expect(await nextEvent(window)).toEqual({ id: 1, name: 'calculation:progress', payload: progress });
    }
    first.destroy();
    post('calculation:finished', { id: 3, outcome: { kind: 'cancelled' } });
    const returned = await send({ path: 'events', headers: { 'last-event-id': '1' } });
    expect(await nextEvent(returned)).toMatchObject({ id: 2, name: 'calculation:finished' });
  });

  it('end with the host, and so does what is being computed', async () => {
    const window = await send({ path: 'events' });
    const ended = new Promise((resolve) => window.once('close', resolve));
    window.resume();
    await host.close();
    await ended;
    expect(isDisposed).toBe(true);
    await expect(send({})).rejects.toThrow();
  });
});

/** The next message of a stream, without what keeps the connection open. */
async function nextEvent(window: IncomingMessage) {
  let text = '';
  for await (const chunk of window.iterator({ destroyOnReturn: false })) {
    text += (chunk as Buffer).toString();
    const match = /^id: (\d+)\ndata: (.*)\n\n/m.exec(text);
    if (match) return { id: Number(match[1]), ...JSON.parse(match[2]!) };
  }
  throw new Error('the stream ended');
}
