import { contextBridge, type IpcRendererEvent, ipcRenderer } from 'electron';
import type { EventName, Events, HostConnection, RequestName } from '../contract/requests';

/*
 * The only bridge between the page and the desktop program: the contract's requests and events by name, and no
 * general channel. An object of true values rather than a list, so that the compiler misses none.
 */

const REQUESTS: Readonly<Record<RequestName, true>> = {
  'program:describe': true,
  'samples:list': true,
  'samples:open': true,
  'basis:list': true,
  'basis:show': true,
  'study:check': true,
  'calculation:start': true,
  'report:make': true,
  'calculation:cancel': true,
};

const EVENTS: Readonly<Record<EventName, true>> = {
  'calculation:point': true,
  'calculation:progress': true,
  'calculation:finished': true,
};

const connection: HostConnection = {
  request(name, ...args) {
    if (!Object.hasOwn(REQUESTS, name)) throw new TypeError(`There is no request named “${name}”.`);
    return ipcRenderer.invoke(name, args[0]);
  },
  subscribe<E extends EventName>(name: E, listener: (event: Events[E]) => void) {
    if (!Object.hasOwn(EVENTS, name)) throw new TypeError(`There is no event named “${name}”.`);
    const forward = (_event: IpcRendererEvent, payload: Events[E]) => listener(payload);
    ipcRenderer.on(name, forward);
    return () => void ipcRenderer.off(name, forward);
  },
};

contextBridge.exposeInMainWorld('farwell', connection);
