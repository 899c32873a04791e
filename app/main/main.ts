import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { app, BrowserWindow, ipcMain, Menu, protocol, session } from 'electron';
import { createService } from '../service/service';
import { commandLineOf } from './command-line';
import { registerRequests } from './ipc-handlers';
import { buildMenu } from './menu';
import { respondWithWindowFile, restrictPermissions, SCHEME } from './security';
import { bringToFront, openWindow } from './windows';

/* The desktop program. Built to out/electron-main.js, so the program's folder is one up, packed or not. */

const PROGRAM_FOLDER = join(import.meta.dirname, '..');

const commandLine = commandLineOf(process.argv, app.isPackaged);
if (commandLine !== undefined) {
  // loaded here only: the window needs none of it
  const { runCommandLine } = await import('../cli/main');
  app.dock?.hide();
  app.exit(await runCommandLine(commandLine));
} else if (app.requestSingleInstanceLock()) {
  // both must happen before Electron is ready, so not after any waiting
  app.enableSandbox();
  protocol.registerSchemesAsPrivileged([{ scheme: SCHEME, privileges: { standard: true, secure: true } }]);
  app.on('second-instance', () => BrowserWindow.getAllWindows().forEach(bringToFront));
  app.on('window-all-closed', () => app.quit());
  void app.whenReady().then(showProgram);
} else {
  app.quit();
}

function showProgram(): void {
  const rendererFolder = join(PROGRAM_FOLDER, 'out', 'renderer');
  restrictPermissions(session.defaultSession);
  protocol.handle(SCHEME, ({ url }) => respondWithWindowFile(url, rendererFolder, (path) => readFile(path)));
  Menu.setApplicationMenu(buildMenu(process.platform));

  const service = createService({
    host: 'desktop',
    samplesFolder: join(PROGRAM_FOLDER, 'sample-molecules'),
    post: (name, payload) => {
      for (const { webContents } of BrowserWindow.getAllWindows()) webContents.send(name, payload);
    },
  });
  app.on('will-quit', () => service.dispose());
  registerRequests(ipcMain, service.handlers);
  openWindow(PROGRAM_FOLDER);
}
