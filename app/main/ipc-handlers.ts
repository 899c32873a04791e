import type { IpcMain } from 'electron';
import type { Handlers, Reply } from '../contract/requests';
import { answer } from '../service/answer';
import { isTrustedSender } from './security';

/** Registers one channel for each of the contract's requests; who asks is checked each time. */
export function registerRequests(ipcMain: Pick<IpcMain, 'handle'>, handlers: Handlers): void {
  for (const name of Object.keys(handlers)) {
    ipcMain.handle(name, async (event, payload: unknown): Promise<Reply<unknown>> => {
      if (!isTrustedSender(event.senderFrame)) return FOREIGN_SENDER;
      return answer(handlers, name, payload);
    });
  }
}

const FOREIGN_SENDER: Reply<never> = {
  ok: false,
  error: {
    code: 'request.foreignSender',
    place: '',
    message: 'Requests are answered for the window of this program only.',
    remedy: 'Close the window and start the program again.',
  },
};
