import { type ChildProcess, execFileSync, spawn } from 'node:child_process';
import { once } from 'node:events';
import { afterEach, beforeAll, describe, expect, it } from 'vitest';

/* `npm start` as it is started: the built file, as a process of its own. */

beforeAll(() => {
  execFileSync(process.execPath, ['app/build.mjs', '--if-changed']);
});

const children: ChildProcess[] = [];
afterEach(() => {
  for (const child of children.splice(0)) child.kill('SIGKILL');
});

/** Without a display, so that nothing opens on the screen of whoever runs the tests. */
function start(...args: string[]) {
  const { DISPLAY: _, WAYLAND_DISPLAY: __, ...env } = process.env;
  const child = spawn(process.execPath, ['out/start.js', ...args], {
    env,
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  children.push(child);
  const output = { out: '', err: '' };
  child.stdout.on('data', (chunk) => {
    output.out += chunk;
  });
  child.stderr.on('data', (chunk) => {
    output.err += chunk;
  });
  const ended = once(child, 'close').then(([status, signal]) => ({ status, signal, ...output }));
  const serving = async () => {
    while (!output.err.includes('Ctrl+C')) await Promise.race([once(child.stderr, 'data'), ended]);
    return output.out.trim();
  };
  return { child, output, ended, serving };
}

describe('npm start', () => {
  it('with --no-open prints nothing but an address on standard output, and serves the window there', async () => {
    const { output, serving } = start('--no-open');
    const address = await serving();
    expect(output.out).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/[\w-]{40,}\/\n$/);
    const page = await fetch(address);
    expect(page.status).toBe(200);
    expect(await page.text()).toMatch(/<!doctype html>/i);
    expect((await fetch(new URL('/', address))).status).toBe(404);
  });

  it.each(['SIGINT', 'SIGTERM'] as const)(
    'ends at %s with status 0 and leaves nobody serving',
    async (signal) => {
      const { child, ended, serving } = start('--no-open');
      const address = await serving();
      child.kill(signal);
      expect(await ended).toMatchObject({ status: 0, signal: null });
      await expect(fetch(address)).rejects.toThrow();
    },
  );

  it('refuses an option that it does not have, and shows those that it has', async () => {
    const { ended } = start('--no-opne');
    const { status, err, out } = await ended;
    expect(status).toBe(2);
    expect(err).toContain('--no-opne');
    expect(err).toContain('--no-open');
    expect(err).not.toContain('    at ');
    expect(out).toBe('');
  });

  it('shows its options when asked', async () => {
    expect(await start('--help').ended).toMatchObject({
      status: 0,
      out: expect.stringContaining('--browser'),
    });
  });
});

describe.runIf(process.platform === 'linux')('npm start without a display', () => {
  it('says in one line why there is no desktop window, and serves the same window for a browser', async () => {
    const { output, serving } = start();
    const address = await serving();
    expect(output.err.split('\n')[0]).toMatch(/no display.*browser/);
    expect((await fetch(address)).status).toBe(200);
  });

  it('asks to open the address by hand where no browser can be started', async () => {
    const { output, serving } = start('--browser');
    await serving();
    expect(output.err).toMatch(/open the address/);
  });
});
