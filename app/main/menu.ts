import { Menu, type MenuItemConstructorOptions } from 'electron';

/**
 * The menu, of standard roles only. It exists for their shortcuts, which macOS takes from nowhere else; reloading
 * is left out because it would lose what is in the window.
 */
export function buildMenu(platform: NodeJS.Platform): Menu {
  const view: MenuItemConstructorOptions = {
    label: 'View',
    submenu: [{ role: 'resetZoom' }, { role: 'zoomIn' }, { role: 'zoomOut' }, { role: 'togglefullscreen' }],
  };
  const common: MenuItemConstructorOptions[] = [{ role: 'editMenu' }, view, { role: 'windowMenu' }];
  return Menu.buildFromTemplate(platform === 'darwin' ? [{ role: 'appMenu' }, ...common] : common);
}
