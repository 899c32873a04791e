import type { EventName, Events, HostConnection, Reply, RequestName } from '../../contract/requests';

declare global {
  interface Window {
    /** given by the desktop program's preload script; absent in a browser */
    readonly farwell?: HostConnection;
  }
}

/** The host that this window belongs to: the desktop program, or the server that the page came from. */
export function connect(): HostConnection {
  return window.farwell ?? connectLoopback(document.baseURI);
}

type Message = { readonly [E in EventName]: { readonly name: E; readonly payload: Events[E] } }[EventName];

/**
 * Requests as JSON posts, events as Server-Sent Events, both below `base`.
 *
 * @param base - address of the page, with the token and a slash at its end
 */
export function connectLoopback(base: string): HostConnection {
  const listeners = new Map<EventName, Set<(payload: never) => void>>();
  const source = new EventSource(new URL('events', base));
  // no request before the events can arrive, or the first ones would be lost; if they cannot, the request tells why
  const settled = new Promise<void>((resolve) => {
    source.addEventListener('open', () => resolve(), { once: true });
    source.addEventListener('error', () => resolve(), { once: true });
  });

  // Events travel on a connection of their own and could overtake the reply that says which calculation they
  // belong to, so they wait while such a reply is on its way.
  let startsUnderway = 0;
  const held: Message[] = [];
  source.addEventListener('message', ({ data }: MessageEvent<string>) => {
    held.push(JSON.parse(data) as Message);
    deliver();
  });
  function deliver(): void {
    while (startsUnderway === 0) {
      const message = held.shift();
      if (message === undefined) return;
      for (const listener of listeners.get(message.name) ?? []) listener(message.payload as never);
    }
  }

  async function post(name: RequestName, payload: unknown): Promise<Reply<never>> {
    await settled;
    try {
      // in the default mode a browser names the page's origin, without which the host refuses
      const response = await fetch(new URL('requests', base), {
        method: 'POST',
        headers: { 'Content-Type': 'application/json' },
        body: JSON.stringify({ name, payload }),
      });
      return (await response.json()) as Reply<never>;
    } catch {
      return { ok: false, error: HOST_GONE };
    }
  }

  return {
    async request(name, ...args) {
      if (name !== 'calculation:start') return post(name, args[0]);
      startsUnderway += 1;
      const reply = await post(name, args[0]);
      startsUnderway -= 1;
      // only after the caller has seen the reply
      setTimeout(deliver);
      return reply;
    },
    subscribe(name, listener) {
      const ofName = listeners.get(name) ?? new Set();
      listeners.set(name, ofName.add(listener));
      return () => void ofName.delete(listener);
    },
  };
}

const HOST_GONE = {
  code: 'host.gone',
  place: '',
  message: 'The program behind this window has ended.',
  remedy: 'Save what you have here, then start it again with `npm start`.',
};
