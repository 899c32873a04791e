import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { cacheSettings } from '../../../app/calculation/cache-settings';

describe('cacheSettings', () => {
  it('takes the place that each platform has for such files', () => {
    const folderOf = (environment: NodeJS.ProcessEnv, platform: NodeJS.Platform) =>
      cacheSettings(environment, platform, '/home/ada')?.folder;
    expect(folderOf({}, 'linux')).toBe(join('/home/ada', '.cache', 'farwell'));
    expect(folderOf({ XDG_CACHE_HOME: '/scratch/ada' }, 'linux')).toBe(join('/scratch/ada', 'farwell'));
    expect(folderOf({ XDG_CACHE_HOME: 'relative' }, 'linux')).toBe(join('/home/ada', '.cache', 'farwell'));
    expect(folderOf({}, 'darwin')).toBe(join('/home/ada', 'Library', 'Caches', 'farwell'));
    expect(folderOf({ LOCALAPPDATA: 'D:/Local' }, 'win32')).toBe(join('D:/Local', 'farwell', 'Cache'));
    expect(folderOf({}, 'win32')).toBe(join('/home/ada', 'AppData', 'Local', 'farwell', 'Cache'));
  });

  it('lets the environment choose folder and size, or turn it off', () => {
    expect(cacheSettings({ FARWELL_CACHE: '/elsewhere', FARWELL_CACHE_MEGABYTES: '12.5' })).toEqual({
      folder: '/elsewhere',
      mostBytes: 12.5e6,
    });
    expect(cacheSettings({ FARWELL_CACHE: '/elsewhere', FARWELL_CACHE_MEGABYTES: 'much' })?.mostBytes).toBe(
      500e6,
    );
    expect(cacheSettings({ FARWELL_CACHE: 'off' })).toBeUndefined();
    expect(cacheSettings({ FARWELL_CACHE_MEGABYTES: '0' })).toBeUndefined();
  });

  it('is off in the tests', () => {
    expect(cacheSettings()).toBeUndefined();
  });
});
