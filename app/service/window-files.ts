import { extname, resolve, sep } from 'node:path';

/*
 * The files that the window is made of, and the headers that both hosts send with them. Each host brings its own
 * way of sending; what may be sent, and under which policy, is decided here once.
 */

/** Whom the page may call: `'self'` over loopback, nobody where requests come through the preload script. */
export type PageConnections = "'self'" | "'none'";

const CONTENT_TYPES: Readonly<Record<string, string>> = {
  '.html': 'text/html; charset=utf-8',
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
  '.json': 'application/json; charset=utf-8',
  '.svg': 'image/svg+xml',
  '.png': 'image/png',
  '.woff2': 'font/woff2',
};

/** Headers for every file of the window. Inline styles are allowed because the charts set them; nothing else is. */
export function pageHeaders(connections: PageConnections): Readonly<Record<string, string>> {
  const policy = [
    "default-src 'none'",
    "script-src 'self'",
    "style-src 'self' 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "font-src 'self'",
    `connect-src ${connections}`,
    "worker-src 'none'",
    "base-uri 'none'",
    "form-action 'none'",
    "frame-ancestors 'none'",
  ];
  return {
    'Content-Security-Policy': policy.join('; '),
    'Cross-Origin-Opener-Policy': 'same-origin',
    'Cross-Origin-Resource-Policy': 'same-origin',
    'X-Content-Type-Options': 'nosniff',
    'Referrer-Policy': 'no-referrer',
    'Cache-Control': 'no-store',
  };
}

/** @returns the type to announce, or undefined for a kind of file that the window does not consist of */
export function contentTypeOf(path: string): string | undefined {
  return CONTENT_TYPES[extname(path).toLowerCase()];
}

/**
 * The file below `folder` that a URL path names; an empty path names the page itself.
 *
 * @param path - as it stands in the URL, still percent-encoded, without the leading slash
 * @returns an absolute path inside `folder`, whether or not a file is there; undefined if the path leads
 *   anywhere else or names a kind of file that the window does not consist of
 */
export function resolveWindowFile(folder: string, path: string): string | undefined {
  const decoded = decode(path);
  // a backslash or a colon would let Windows read another folder or drive into the name
  if (decoded === undefined || /[\0\\:]/.test(decoded)) return undefined;
  const root = resolve(folder);
  const file = resolve(root, `./${decoded === '' ? 'index.html' : decoded}`);
  const isInside = file.startsWith(root + sep);
  return isInside && contentTypeOf(file) !== undefined ? file : undefined;
}

function decode(path: string): string | undefined {
  try {
    return decodeURIComponent(path);
  } catch {
    return undefined;
  }
}
