import type { IpcMain } from 'electron';
import { describe, expect, it } from 'vitest';
import type { Handlers, Reply } from '../../../app/contract/requests';
import { registerRequests } from '../../../app/main/ipc-handlers';
import { quietHandlers } from '../../support/handlers';

const PAGE = { url: 'app://farwell/', parent: null };

/** Registers and gives the way to call what was registered. */
function register(handlers: Handlers) {
  type Listener = (event: { readonly senderFrame: unknown }, payload?: unknown) => Promise<Reply<unknown>>;
  const listeners = new Map<string, Listener>();
  registerRequests(
    { handle: (name: string, listener: Listener) => listeners.set(name, listener) } as unknown as IpcMain,
    handlers,
  );
  return {
    names: [...listeners.keys()],
    call: (name: string, senderFrame: unknown, payload?: unknown) =>
      listeners.get(name)!({ senderFrame }, payload),
  };
}

describe('registerRequests', () => {
  it('opens a channel for each request of the contract and no other', () => {
    const handlers = quietHandlers();
    expect(register(handlers).names.sort()).toEqual(Object.keys(handlers).sort());
  });

  it('answers the page', async () => {
    const { call } = register(quietHandlers({ 'samples:open': ({ id }) => ({ name: id, text: '' }) }));
    expect(await call('samples:open', PAGE, { id: 'a' })).toEqual({
      ok: true,
      value: { name: 'a', text: '' },
    });
    expect(await call('samples:open', PAGE, { id: 1 })).toMatchObject({
      ok: false,
      error: { code: 'request.malformed' },
    });
  });

  it.each([null, { url: 'https://attacker.example/', parent: null }, { ...PAGE, parent: {} }])(
    'does not even look at what %j sends',
    async (frame) => {
      // a handler that is called answers with `internal`
      expect(await register(quietHandlers()).call('program:describe', frame)).toMatchObject({
        ok: false,
        error: { code: 'request.foreignSender' },
      });
    },
  );
});
