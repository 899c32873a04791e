import { join, resolve } from 'node:path';
import type { Session, WebContents } from 'electron';
import { describe, expect, it } from 'vitest';
import {
  isPageAddress,
  isTrustedSender,
  pagePreferences,
  respondWithWindowFile,
  restrictNavigation,
  restrictPermissions,
} from '../../../app/main/security';

describe('isPageAddress', () => {
  it.each(['app://farwell/', 'app://farwell/index.html', 'app://farwell'])('accepts %s', (address) => {
    expect(isPageAddress(address)).toBe(true);
  });

  it.each([
    'app://farwell.attacker.example/',
    'app://farwell:81/',
    'app://other/',
    'https://farwell/',
    'file:///app://farwell/',
    'about:blank',
    'javascript:app://farwell/',
    'not an address',
    '',
  ])('refuses %s', (address) => {
    expect(isPageAddress(address)).toBe(false);
  });
});

describe('isTrustedSender', () => {
  it('is the page’s own top frame, not a frame inside it and not a frame that is gone', () => {
    expect(isTrustedSender({ url: 'app://farwell/', parent: null })).toBe(true);
    expect(isTrustedSender({ url: 'app://farwell/', parent: {} })).toBe(false);
    expect(isTrustedSender({ url: 'https://attacker.example/', parent: null })).toBe(false);
    expect(isTrustedSender(null)).toBe(false);
  });
});

describe('pagePreferences', () => {
  it('give the page a sandbox and no Node', () => {
    expect(pagePreferences('/out')).toMatchObject({
      preload: join('/out', 'preload.cjs'),
      sandbox: true,
      contextIsolation: true,
      nodeIntegration: false,
      webSecurity: true,
      webviewTag: false,
    });
  });
});

describe('respondWithWindowFile', () => {
  const folder = resolve('/out/renderer');
  const files = new Map([[join(folder, 'index.html'), '<p>page</p>']]);
  const readFile = async (path: string) => {
    const content = files.get(path);
    if (content === undefined) throw new Error('absent');
    return new TextEncoder().encode(content);
  };
  const ask = (address: string) => respondWithWindowFile(address, folder, readFile);

  it('sends the page with its policy', async () => {
    const response = await ask('app://farwell/');
    expect(response.status).toBe(200);
    expect(await response.text()).toBe('<p>page</p>');
    expect(response.headers.get('content-type')).toMatch('text/html');
    expect(response.headers.get('content-security-policy')).toContain("connect-src 'none'");
  });

  it('has nothing outside the folder, for other hosts, or where no file is', async () => {
    expect((await ask('app://farwell/..%2fstart.js')).status).toBe(404);
    expect((await ask('app://farwell/absent.js')).status).toBe(404);
    expect((await ask('app://other/index.html')).status).toBe(403);
  });
});

describe('restrictPermissions', () => {
  it('grants the copying of text and refuses everything else', () => {
    type Decide = (granted: boolean) => void;
    let request!: (contents: unknown, permission: string, decide: Decide) => void;
    let check!: (contents: unknown, permission: string) => boolean;
    let device!: () => boolean;
    restrictPermissions({
      setPermissionRequestHandler: (handler: typeof request) => {
        request = handler;
      },
      setPermissionCheckHandler: (handler: typeof check) => {
        check = handler;
      },
      setDevicePermissionHandler: (handler: typeof device) => {
        device = handler;
      },
    } as unknown as Session);

    const isGranted = (permission: string) => {
      let decision: boolean | undefined;
      request(undefined, permission, (granted) => {
        decision = granted;
      });
      expect(check(undefined, permission)).toBe(decision);
      return decision;
    };
    expect(isGranted('clipboard-sanitized-write')).toBe(true);
    for (const permission of [
      'media',
      'geolocation',
      'notifications',
      'clipboard-read',
      'fileSystem',
      'openExternal',
    ]) {
      expect(isGranted(permission)).toBe(false);
    }
    expect(device()).toBe(false);
  });
});

describe('restrictNavigation', () => {
  it('denies new windows and every way to another address', () => {
    const listeners = new Map<string, (event: { preventDefault(): void }) => void>();
    let open!: () => unknown;
    restrictNavigation({
      on: (name: string, listener: (event: { preventDefault(): void }) => void) =>
        listeners.set(name, listener),
      setWindowOpenHandler: (handler: typeof open) => {
        open = handler;
      },
    } as unknown as WebContents);

    expect(open()).toEqual({ action: 'deny' });
    for (const name of ['will-navigate', 'will-frame-navigate', 'will-redirect', 'will-attach-webview']) {
      let isPrevented = false;
      listeners.get(name)?.({
        preventDefault: () => {
          isPrevented = true;
        },
      });
      expect(isPrevented, name).toBe(true);
    }
  });
});
