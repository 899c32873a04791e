import { describe, expect, it } from 'vitest';
import { admit, type IncomingRequest } from '../../../app/browser-host/access';

const ACCESS = { host: '127.0.0.1:4321', token: 'a-token-nobody-guesses' };

function request(changes: Partial<IncomingRequest> = {}): IncomingRequest {
  const headers = { host: ACCESS.host, origin: `http://${ACCESS.host}`, ...changes.headers };
  return { method: 'POST', url: `/${ACCESS.token}/requests`, ...changes, headers };
}

describe('admit', () => {
  it('lets the page in and tells what it asks for', () => {
    expect(admit(request(), ACCESS)).toEqual({ admitted: true, path: 'requests' });
  });

  it('leaves out the query and the fragment', () => {
    const url = `/${ACCESS.token}/assets/a.js?b=/c#d`;
    expect(admit(request({ method: 'GET', url }), ACCESS)).toEqual({ admitted: true, path: 'assets/a.js' });
  });

  it('lets a first visit in, which has no origin', () => {
    const visit = { method: 'GET', url: `/${ACCESS.token}/`, headers: { host: ACCESS.host } };
    expect(admit(visit, ACCESS)).toEqual({ admitted: true, path: '' });
  });

  it.each([
    'localhost:4321',
    '127.0.0.1',
    '127.0.0.1:4322',
    'attacker.example:4321',
    '127.0.0.1:4321.attacker.example',
  ])('refuses the host %s', (host) => {
    expect(admit(request({ headers: { host } }), ACCESS)).toMatchObject({ admitted: false, status: 403 });
  });

  it('refuses a request without a host', () => {
    const visit = { method: 'GET', url: `/${ACCESS.token}/`, headers: {} };
    expect(admit(visit, ACCESS)).toMatchObject({ admitted: false, status: 403 });
  });

  it.each(['null', 'http://attacker.example', 'https://127.0.0.1:4321', 'http://127.0.0.1:4322', ''])(
    'refuses the origin “%s”',
    (origin) => {
      expect(admit(request({ headers: { origin } }), ACCESS)).toMatchObject({ admitted: false, status: 403 });
    },
  );

  it('admits a post without an origin, which no page can send, for its token alone', () => {
    const headers = { origin: undefined };
    expect(admit(request({ method: 'POST', headers }), ACCESS)).toMatchObject({ admitted: true });
    const url = '/a-guess/requests';
    expect(admit(request({ method: 'POST', url, headers }), ACCESS)).toMatchObject({
      admitted: false,
      status: 404,
    });
  });

  it('refuses what another site sends', () => {
    const headers = { 'sec-fetch-site': 'cross-site' };
    expect(admit(request({ headers }), ACCESS)).toMatchObject({ admitted: false, status: 403 });
  });

  it.each([
    '/',
    '',
    '//',
    `/${ACCESS.token}`,
    `/${ACCESS.token}x/`,
    `/${ACCESS.token.slice(0, -1)}/`,
    `/${ACCESS.token.toUpperCase()}/`,
    `/x/${ACCESS.token}/`,
    `http://${ACCESS.host}/${ACCESS.token}/`,
  ])('has nothing at the path “%s”', (url) => {
    expect(admit(request({ method: 'GET', url }), ACCESS)).toMatchObject({ admitted: false, status: 404 });
  });
});
