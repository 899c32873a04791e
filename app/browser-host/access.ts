import { createHash, timingSafeEqual } from 'node:crypto';
import type { IncomingHttpHeaders } from 'node:http';

/** The one address under which the window is reachable. */
export interface Access {
  /** host and port, as a browser writes them into the Host header */
  readonly host: string;
  /** unguessable first part of every path */
  readonly token: string;
}

export interface IncomingRequest {
  readonly method: string;
  /** as on the request line */
  readonly url: string;
  readonly headers: IncomingHttpHeaders;
}

export type Decision =
  | {
      readonly admitted: true;
      /** what follows the token, still percent-encoded, without query */
      readonly path: string;
    }
  | { readonly admitted: false; readonly status: 403 | 404; readonly reason: string };

/**
 * Decides whether a request comes from our own page.
 *
 * The token keeps out other programs and other people's pages; the Host header keeps out a page whose name was
 * made to point at 127.0.0.1; the Origin header, which a browser sends with every POST, keeps out a page that
 * learnt the token. A request without one comes from no page, so the token is what counts.
 */
export function admit(request: IncomingRequest, access: Access): Decision {
  const { headers } = request;
  const origin = `http://${access.host}`;
  if (headers.host !== access.host) return refuse(403, 'This address belongs to one host only.');
  if (headers.origin !== undefined && headers.origin !== origin)
    return refuse(403, 'Other origins are refused.');
  if (headers['sec-fetch-site'] === 'cross-site') return refuse(403, 'Other sites are refused.');

  const path = request.url.split(/[?#]/, 1)[0] ?? '';
  const [, token = '', ...rest] = path.split('/');
  if (rest.length === 0 || !isSame(token, access.token)) return refuse(404, 'There is nothing here.');
  return { admitted: true, path: rest.join('/') };
}

function refuse(status: 403 | 404, reason: string): Decision {
  return { admitted: false, status, reason };
}

/** Takes the same time whatever is wrong; digests make the lengths equal. */
function isSame(given: string, expected: string): boolean {
  const digest = (text: string) => createHash('sha256').update(text).digest();
  return timingSafeEqual(digest(given), digest(expected));
}
