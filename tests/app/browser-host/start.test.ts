import { afterEach, describe, expect, it } from 'vitest';
import { type RunningProgram, startProgram } from '../../support/built-program';

/* `npm start` as it is started: the built file, as a process of its own. */

const started: RunningProgram[] = [];
afterEach(() => {
  for (const program of started.splice(0)) program.process.kill('SIGKILL');
});

/** Without a display, so that nothing opens on the screen of whoever runs the tests. */
function start(...argv: string[]): RunningProgram {
  const { DISPLAY: _, WAYLAND_DISPLAY: __, ...environment } = process.env;
  const program = startProgram('start.js', argv, environment);
  started.push(program);
  return program;
}

/** Starts, and reads the address once it is served. */
async function serve(...argv: string[]) {
  const program = start(...argv);
  let stdout = '';
  program.process.stdout?.on('data', (text) => {
    stdout += text;
  });
  await program.saw('Ctrl+C');
  return { ...program, stdout, address: stdout.trim() };
}

async function endOf({ process, ended }: RunningProgram) {
  process.kill('SIGTERM');
  return ended;
}

describe('npm start', () => {
  it('with --no-open prints nothing but an address on standard output, and serves the window there', async () => {
    const { stdout, address } = await serve('--no-open');
    expect(stdout).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/[\w-]{40,}\/\n$/);
    const page = await fetch(address);
    expect(page.status).toBe(200);
    expect(await page.text()).toMatch(/<!doctype html>/i);
    expect((await fetch(new URL('/', address))).status).toBe(404);
  });

  it.each(['SIGINT', 'SIGTERM'] as const)(
    'ends at %s with status 0 and leaves nobody serving',
    async (signal) => {
      const { process, ended, address } = await serve('--no-open');
      process.kill(signal);
      expect(await ended).toMatchObject({ status: 0 });
      await expect(fetch(address)).rejects.toThrow();
    },
  );

  it('refuses an option that it does not have, and shows those that it has', async () => {
    const { status, stdout, stderr } = await start('--no-opne').ended;
    expect(status).toBe(2);
    expect(stderr).toContain('--no-opne');
    expect(stderr).toContain('--no-open');
    expect(stderr).not.toContain('    at ');
    expect(stdout).toBe('');
  });

  it('shows its options when asked', async () => {
    expect(await start('--help').ended).toMatchObject({
      status: 0,
      stdout: expect.stringContaining('--browser'),
    });
  });
});

describe.runIf(process.platform === 'linux')('npm start without a display', () => {
  it('says in one line why there is no desktop window, and serves the same window for a browser', async () => {
    const program = await serve();
    expect((await fetch(program.address)).status).toBe(200);
    expect((await endOf(program)).stderr.split('\n')[0]).toMatch(/no display.*browser/);
  });

  it('asks to open the address by hand where no browser can be started', async () => {
    expect((await endOf(await serve('--browser'))).stderr).toMatch(/open the address/);
  });
});
