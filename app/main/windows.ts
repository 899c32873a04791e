import { join } from 'node:path';
import { BrowserWindow } from 'electron';
import { PAGE_ORIGIN, pagePreferences, restrictNavigation } from './security';

/** Opens the program's one window. */
export function openWindow(programFolder: string): BrowserWindow {
  const outFolder = join(programFolder, 'out');
  const window = new BrowserWindow({
    title: 'Farwell',
    width: 1280,
    height: 800,
    minWidth: 800,
    minHeight: 560,
    icon: join(programFolder, 'app', 'resources', 'icon.png'),
    autoHideMenuBar: true,
    // shown once drawn, so that no white page flashes up first
    show: false,
    webPreferences: pagePreferences(outFolder),
  });
  restrictNavigation(window.webContents);
  window.once('ready-to-show', () => window.show());
  void window.loadURL(`${PAGE_ORIGIN}/`);
  return window;
}

export function bringToFront(window: BrowserWindow): void {
  if (window.isMinimized()) window.restore();
  window.show();
  window.focus();
}
