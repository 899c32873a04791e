import { readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { NOMINAL_SPEEDS } from '#engine';
import { machineSpeeds } from '../../../app/calculation/speeds';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();
afterEach(() => vi.unstubAllEnvs());

describe('machineSpeeds', () => {
  it('measures every kind of work once, and remembers it in the folder of the cache', async () => {
    vi.stubEnv('FARWELL_CACHE', folder);
    const measured = await machineSpeeds();
    expect(Object.keys(measured).sort()).toEqual(Object.keys(NOMINAL_SPEEDS).sort());
    for (const speed of Object.values(measured)) expect(speed).toBeGreaterThan(0);
    expect(await machineSpeeds()).toEqual(measured);
    const [name] = readdirSync(folder);
    writeFileSync(join(folder, name!), '{"integrals": 1}');
    expect(Object.keys(await machineSpeeds())).toHaveLength(Object.keys(NOMINAL_SPEEDS).length);
  });
});
