import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync, statSync, utimesSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { openCache } from '../../../app/calculation/result-cache';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();
let count = 0;
/** A cache of its own, in a folder that is not there yet. */
function freshCache(mostBytes = 1e6) {
  const own = join(folder, `${++count}`, 'deeper');
  return {
    own,
    cache: openCache({ folder: own, mostBytes }),
    again: () => openCache({ folder: own, mostBytes }),
  };
}
const key = (i: number) => i.toString(16).padStart(64, '0');
const kilobyte = (i: number) => new Uint8Array(1000).fill(i);

describe('openCache', () => {
  it('gives back every bit of what was kept, to every later opening', () => {
    const { cache, again } = freshCache();
    const value = {
      energy: -1.1 - 2 ** -52,
      none: Number.NaN,
      zero: -0,
      orbitals: new Float64Array([1 / 3, -0]),
    };
    expect(cache.find(key(1))).toBeUndefined();
    cache.keep(key(1), value);
    expect(cache.find(key(1))).toEqual(value);
    expect(again().find(key(1))).toEqual(value);
    expect(again().find(key(2))).toBeUndefined();
  });

  it('drops an entry of which any byte is wrong or missing, and keeps it anew', () => {
    const { own, cache } = freshCache();
    cache.keep(key(1), { energy: -1.5 });
    const path = join(own, readdirSync(own)[0]!);
    const whole = readFileSync(path);
    const damaged = fc.oneof(
      fc
        .tuple(fc.nat(whole.length - 1), fc.integer({ min: 1, max: 255 }))
        .map(([at, change]) => whole.map((byte, i) => (i === at ? byte ^ change : byte))),
      fc.nat(whole.length - 1).map((length) => whole.subarray(0, length)),
    );
    fc.assert(
      fc.property(damaged, (bytes) => {
        writeFileSync(path, bytes);
        expect(cache.find(key(1))).toBeUndefined();
        expect(existsSync(path)).toBe(false);
        cache.keep(key(1), { energy: -1.5 });
        expect(cache.find(key(1))).toEqual({ energy: -1.5 });
      }),
      { seed: 20261201, numRuns: 60 },
    );
  });

  it('does not take one entry for another whose name it was given', () => {
    const { own, cache } = freshCache();
    cache.keep(key(1), 'one');
    cache.keep(key(2), 'two');
    const [first, second] = readdirSync(own).sort();
    writeFileSync(join(own, second!), readFileSync(join(own, first!)));
    expect(cache.find(key(2))).toBeUndefined();
    expect(cache.find(key(1))).toBe('one');
  });

  it('stays within its bound, and lets go first what was not used for longest', () => {
    const { own, cache, again } = freshCache(40_000);
    for (let i = 0; i < 30; i++) {
      cache.keep(key(i), kilobyte(i));
      const used = new Date(Date.now() - 1000 * (100 - i));
      utimesSync(join(own, `${key(i)}.kept`), used, used);
    }
    expect(cache.find(key(0))).toEqual(kilobyte(0)); // used just now
    for (let i = 30; i < 60; i++) cache.keep(key(i), kilobyte(i));
    const size = readdirSync(own).reduce((sum, name) => sum + statSync(join(own, name)).size, 0);
    expect(size).toBeLessThanOrEqual(40_000 * (1 + 1 / 16));
    expect(size).toBeGreaterThan(30_000);
    expect(cache.find(key(1))).toBeUndefined();
    expect(again().find(key(0))).toEqual(kilobyte(0));
    expect(again().find(key(59))).toEqual(kilobyte(59));
  });

  it('never fails where nothing can be written or read', () => {
    const file = join(folder, 'a file');
    writeFileSync(file, '');
    const cache = openCache({ folder: join(file, 'below'), mostBytes: 1e6 });
    cache.keep(key(1), 'lost');
    expect(cache.find(key(1))).toBeUndefined();
    cache.keep(key(2), () => 'no data at all');
    expect(cache.find(key(2))).toBeUndefined();
  });

  it('goes on where another process was killed while it wrote into the same folder', () => {
    const { own, cache } = freshCache(20_000);
    // the second process: writes the same keys, torn at any moment by being killed
    const script = `
      const { writeFileSync, mkdirSync, renameSync, readdirSync, rmSync } = require('node:fs');
      mkdirSync(${JSON.stringify(own)}, { recursive: true });
      for (let i = 0; ; i++) {
        const path = ${JSON.stringify(own)} + '/' + (i % 20).toString(16).padStart(64, '0') + '.kept';
        writeFileSync(path, 'half an entry');
        if (i % 7 === 0) rmSync(path, { force: true });
      }`;
    const other = spawnSync(process.execPath, ['-e', script], { timeout: 300, killSignal: 'SIGKILL' });
    expect(other.signal).toBe('SIGKILL');
    for (let i = 0; i < 40; i++) {
      const found = cache.find(key(i % 20));
      if (found !== undefined) expect(found).toEqual(kilobyte(i % 20));
      cache.keep(key(i % 20), kilobyte(i % 20));
    }
    expect(cache.find(key(19))).toEqual(kilobyte(19));
  });
});
