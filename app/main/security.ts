import { join } from 'node:path';
import type { Session, WebContents, WebPreferences } from 'electron';
import { contentTypeOf, pageHeaders, resolveWindowFile } from '../service/window-files';

/** Scheme of the page; unlike `file:` it can be given an origin, headers and a fence around one folder. */
export const SCHEME = 'app';
export const PAGE_ORIGIN = `${SCHEME}://farwell`;

/** The page runs without Node, in a world apart from the preload script, in a sandboxed process. */
export function pagePreferences(outFolder: string): WebPreferences {
  return {
    preload: join(outFolder, 'preload.cjs'),
    sandbox: true,
    contextIsolation: true,
    nodeIntegration: false,
    nodeIntegrationInWorker: false,
    nodeIntegrationInSubFrames: false,
    webviewTag: false,
    webSecurity: true,
    allowRunningInsecureContent: false,
    navigateOnDragDrop: false,
    spellcheck: false,
  };
}

/** Whether a message, by the address and place of the frame that sent it, comes from our own page. */
export function isTrustedSender(
  frame: { readonly url: string; readonly parent: unknown } | null | undefined,
): boolean {
  return frame !== null && frame !== undefined && frame.parent === null && isPageAddress(frame.url);
}

/** Whether an address is the page's own. `URL.origin` is `null` for most custom schemes, so its parts are compared. */
export function isPageAddress(address: string): boolean {
  if (!URL.canParse(address)) return false;
  const { protocol, host } = new URL(address);
  return `${protocol}//${host}` === PAGE_ORIGIN;
}

/**
 * Answers the page's request for a file of itself.
 *
 * @param readFile - rejects where no file is
 */
export async function respondWithWindowFile(
  address: string,
  rendererFolder: string,
  readFile: (path: string) => Promise<Uint8Array<ArrayBuffer>>,
): Promise<Response> {
  const headers = pageHeaders("'none'");
  if (!isPageAddress(address)) return new Response('Other hosts are refused.', { status: 403, headers });
  const file = resolveWindowFile(rendererFolder, new URL(address).pathname.slice(1));
  const content = file === undefined ? undefined : await readFile(file).catch(() => undefined);
  if (file === undefined || content === undefined) {
    return new Response('There is no such file.', { status: 404, headers });
  }
  return new Response(content, { headers: { ...headers, 'Content-Type': contentTypeOf(file) ?? '' } });
}

/** Permissions that the page has a use for: copying numbers, nothing else. */
const GRANTED_PERMISSIONS: ReadonlySet<string> = new Set(['clipboard-sanitized-write']);

export function restrictPermissions(session: Pick<Session, RestrictedBySession>): void {
  session.setPermissionRequestHandler((_contents, permission, decide) => {
    decide(GRANTED_PERMISSIONS.has(permission));
  });
  session.setPermissionCheckHandler((_contents, permission) => GRANTED_PERMISSIONS.has(permission));
  session.setDevicePermissionHandler(() => false);
}
type RestrictedBySession =
  | 'setPermissionRequestHandler'
  | 'setPermissionCheckHandler'
  | 'setDevicePermissionHandler';

/** The page stays the page: no other address in its place, in a frame or in a new window. */
export function restrictNavigation(contents: Pick<WebContents, 'on' | 'setWindowOpenHandler'>): void {
  contents.setWindowOpenHandler(() => ({ action: 'deny' }));
  contents.on('will-navigate', (event) => event.preventDefault());
  contents.on('will-frame-navigate', (event) => event.preventDefault());
  contents.on('will-redirect', (event) => event.preventDefault());
  contents.on('will-attach-webview', (event) => event.preventDefault());
}
