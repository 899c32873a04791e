import chromiumForServers from '@sparticuz/chromium';
import { type Browser, chromium } from 'playwright-core';

/**
 * A real browser without a screen: on Linux x64 the Chromium that comes as a package, so that no machine needs
 * one installed; elsewhere the installed Chrome.
 */
export async function launchBrowser(): Promise<Browser> {
  if (process.platform !== 'linux' || process.arch !== 'x64') return chromium.launch({ channel: 'chrome' });
  return chromium.launch({
    executablePath: await chromiumForServers.executablePath(),
    // containers have neither a sandbox of the kernel nor a graphics card
    args: ['--no-sandbox', '--disable-gpu'],
  });
}
