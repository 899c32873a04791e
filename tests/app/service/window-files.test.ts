import { join, resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { contentTypeOf, pageHeaders, resolveWindowFile } from '../../../app/service/window-files';

const FOLDER = resolve('/somewhere/out/renderer');

describe('resolveWindowFile', () => {
  it('finds the page itself under an empty path', () => {
    expect(resolveWindowFile(FOLDER, '')).toBe(join(FOLDER, 'index.html'));
  });

  it('finds files in folders below, with encoded characters in their names', () => {
    expect(resolveWindowFile(FOLDER, 'assets/main-1a2b.js')).toBe(join(FOLDER, 'assets', 'main-1a2b.js'));
    expect(resolveWindowFile(FOLDER, 'assets/two%20words.css')).toBe(join(FOLDER, 'assets', 'two words.css'));
  });

  it.each([
    '../start.js',
    '%2e%2e/start.js',
    '..%2fstart.js',
    'assets/../../start.js',
    'assets/%2e%2e%2f%2e%2e%2fstart.js',
    '..\\start.js',
    '..%5cstart.js',
    '/etc/passwd.json',
    '%2fetc%2fpasswd.json',
    'C:/windows/win.json',
    'index.html%00.png',
    '%zz.html',
    '../renderer-of-another/index.html',
  ])('does not leave the folder by %s', (path) => {
    const file = resolveWindowFile(FOLDER, path);
    expect(file === undefined || file.startsWith(join(FOLDER, '/'))).toBe(true);
  });

  it.each(['..%2fstart.js', '../start.js', 'index.html%00.png', '%zz.html', '..%5cstart.js'])(
    'has no file for %s',
    (path) => {
      expect(resolveWindowFile(FOLDER, path)).toBeUndefined();
    },
  );

  it('gives out no kind of file that the window does not consist of', () => {
    expect(resolveWindowFile(FOLDER, 'notes.txt')).toBeUndefined();
    expect(resolveWindowFile(FOLDER, '.env')).toBeUndefined();
    expect(resolveWindowFile(FOLDER, 'assets')).toBeUndefined();
  });
});

describe('contentTypeOf', () => {
  it('is announced in a form that nosniff accepts for scripts and styles', () => {
    expect(contentTypeOf('main.js')).toMatch(/^text\/javascript/);
    expect(contentTypeOf('MAIN.CSS')).toMatch(/^text\/css/);
    expect(contentTypeOf('toString')).toBeUndefined();
  });
});

describe('pageHeaders', () => {
  it('allow scripts from the page’s own origin only, and no plug-ins, frames or forms', () => {
    const policy = pageHeaders("'none'")['Content-Security-Policy']!;
    const directives = new Map(
      policy.split('; ').map((part) => [part.split(' ')[0], part.split(' ').slice(1)]),
    );
    expect(directives.get('default-src')).toEqual(["'none'"]);
    expect(directives.get('script-src')).toEqual(["'self'"]);
    expect(directives.get('connect-src')).toEqual(["'none'"]);
    expect(directives.get('frame-ancestors')).toEqual(["'none'"]);
    expect(directives.get('form-action')).toEqual(["'none'"]);
    expect(policy).not.toContain('unsafe-eval');
  });

  it('let the page reach its own host where requests go over the network', () => {
    expect(pageHeaders("'self'")['Content-Security-Policy']).toContain("connect-src 'self'");
  });
});
