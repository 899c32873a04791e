import { randomBytes } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Reply } from '../contract/requests';
import { answer } from '../service/answer';
import { WINDOW_OUT_OF_STEP } from '../service/refusal';
import type { Post, Service } from '../service/service';
import { contentTypeOf, pageHeaders, resolveWindowFile } from '../service/window-files';
import { type Access, admit } from './access';
import { EventStream } from './event-stream';

export interface BrowserHostOptions {
  /** the built window, with index.html */
  readonly rendererFolder: string;
  /** makes the service that answers; `post` sends its events to the windows */
  readonly service: (post: Post) => Service;
  /** 0, the default: any free one */
  readonly port?: number;
}

export interface BrowserHost {
  /** the whole address, token included */
  readonly address: string;
  /** ends open connections and the service */
  close(): Promise<void>;
}

/** 256 bits: not to be guessed, however long one tries. */
const TOKEN_BYTES = 32;
/** Results of a long scan with many states, sent for a report, are smaller. */
const LARGEST_REQUEST_BYTES = 32 * 2 ** 20;

/** Serves the window and its requests on 127.0.0.1, to whoever has the token and to nobody else. */
export async function startBrowserHost(options: BrowserHostOptions): Promise<BrowserHost> {
  const events = new EventStream();
  const token = randomBytes(TOKEN_BYTES).toString('base64url');
  const server = createServer();
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(options.port ?? 0, '127.0.0.1', resolve);
  });
  const access: Access = { host: `127.0.0.1:${(server.address() as AddressInfo).port}`, token };
  const service = options.service((name, payload) => events.post(name, payload));
  const headers = pageHeaders("'self'");

  server.on('request', (request, response) => {
    for (const [name, value] of Object.entries(headers)) response.setHeader(name, value);
    respond(request, response).catch(() => {
      // the window went away in the middle of its request
      response.destroy();
    });
  });

  async function respond(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const { method = '', url = '' } = request;
    const decision = admit({ method, url, headers: request.headers }, access);
    if (!decision.admitted) return sendText(response, decision.status, decision.reason);
    switch (decision.path) {
      case 'requests':
        if (method !== 'POST') return sendText(response, 405, 'Requests are posted.', { Allow: 'POST' });
        return respondToRequest(request, response, service);
      case 'events':
        if (method !== 'GET') return sendText(response, 405, 'Events are read.', { Allow: 'GET' });
        return events.connect(response, request.headers['last-event-id']?.toString());
      default:
        if (method !== 'GET') return sendText(response, 405, 'Files are read.', { Allow: 'GET' });
        return sendFile(response, options.rendererFolder, decision.path);
    }
  }

  return {
    address: `http://${access.host}/${token}/`,
    async close() {
      service.dispose();
      events.close();
      const closed = new Promise((resolve) => server.close(resolve));
      server.closeAllConnections();
      await closed;
    },
  };
}

async function respondToRequest(
  request: IncomingMessage,
  response: ServerResponse,
  service: Service,
): Promise<void> {
  // a form or an image cannot send this type, so another page cannot post without being asked for permission
  if (!/^application\/json\b/i.test(request.headers['content-type'] ?? '')) {
    return sendText(response, 415, 'Requests are JSON.');
  }
  const body = await readBody(request);
  if (body === undefined) return sendReply(response, 413, TOO_LARGE);
  const message = parseMessage(body);
  if (message === undefined) return sendReply(response, 400, UNREADABLE);
  return sendReply(response, 200, await answer(service.handlers, message.name, message.payload));
}

/** @returns undefined if the body is larger than any request of ours; the rest of it is not read */
async function readBody(request: IncomingMessage): Promise<string | undefined> {
  if (Number(request.headers['content-length'] ?? 0) > LARGEST_REQUEST_BYTES) return undefined;
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    size += chunk.length;
    if (size > LARGEST_REQUEST_BYTES) return undefined;
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString('utf8');
}

function parseMessage(body: string): { readonly name?: unknown; readonly payload?: unknown } | undefined {
  try {
    const message: unknown = JSON.parse(body);
    return typeof message === 'object' && message !== null ? message : undefined;
  } catch {
    return undefined;
  }
}

async function sendFile(response: ServerResponse, folder: string, path: string): Promise<void> {
  const file = resolveWindowFile(folder, path);
  const content = file === undefined ? undefined : await readFile(file).catch(() => undefined);
  if (file === undefined || content === undefined) return sendText(response, 404, 'There is no such file.');
  response.writeHead(200, { 'Content-Type': contentTypeOf(file) });
  response.end(content);
}

function sendReply(response: ServerResponse, status: number, reply: Reply<unknown>): void {
  // an oversized body is left unread, after which the connection is of no further use
  if (status === 413) response.setHeader('Connection', 'close');
  response.writeHead(status, { 'Content-Type': 'application/json; charset=utf-8' });
  response.end(JSON.stringify(reply));
}

function sendText(
  response: ServerResponse,
  status: number,
  text: string,
  headers: Readonly<Record<string, string>> = {},
): void {
  response.writeHead(status, { 'Content-Type': 'text/plain; charset=utf-8', ...headers });
  response.end(`${text}\n`);
}

const TOO_LARGE: Reply<never> = {
  ok: false,
  error: {
    code: 'request.tooLarge',
    place: '',
    message: 'What the window sends is larger than 32 MB.',
    remedy: 'Run it from the command line, or leave out what does not belong to it.',
  },
};

const UNREADABLE: Reply<never> = {
  ok: false,
  error: {
    code: 'request.malformed',
    place: '',
    message: 'The request is not readable as JSON.',
    remedy: WINDOW_OUT_OF_STEP,
  },
};
