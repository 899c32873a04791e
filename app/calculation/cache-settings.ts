import { homedir } from 'node:os';
import { isAbsolute, join } from 'node:path';
import process from 'node:process';

/** Where computed points are kept between runs, and how much of them. */
export interface CacheSettings {
  readonly folder: string;
  /** what was not used for longest goes first when there is more */
  readonly mostBytes: number;
}

const DEFAULT_MEGABYTES = 500;
/** In `FARWELL_CACHE`: keep nothing, look nothing up. */
const OFF = 'off';

/**
 * From the environment: `FARWELL_CACHE` is `off` or a folder, by default the platform's own place for such files;
 * `FARWELL_CACHE_MEGABYTES` bounds its size.
 *
 * @returns undefined where there is to be none
 */
export function cacheSettings(
  environment: Readonly<NodeJS.ProcessEnv> = process.env,
  platform: NodeJS.Platform = process.platform,
  home: string = homedir(),
): CacheSettings | undefined {
  const { FARWELL_CACHE: chosen = '', FARWELL_CACHE_MEGABYTES: size = '' } = environment;
  const megabytes = /^\d+(\.\d+)?$/.test(size) ? Number(size) : DEFAULT_MEGABYTES;
  if (chosen === OFF || megabytes === 0) return undefined;
  return { folder: chosen || defaultFolder(environment, platform, home), mostBytes: megabytes * 1e6 };
}

function defaultFolder(
  environment: Readonly<NodeJS.ProcessEnv>,
  platform: NodeJS.Platform,
  home: string,
): string {
  if (platform === 'darwin') return join(home, 'Library', 'Caches', 'farwell');
  if (platform === 'win32') {
    return join(environment.LOCALAPPDATA || join(home, 'AppData', 'Local'), 'farwell', 'Cache');
  }
  // XDG Base Directory Specification: a relative path is to be ignored
  const { XDG_CACHE_HOME: caches = '' } = environment;
  return join(isAbsolute(caches) ? caches : join(home, '.cache'), 'farwell');
}
