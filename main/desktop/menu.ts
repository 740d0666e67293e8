/**
 * The system's menu: every command of the app in a menu, with the platform's roles and keys.
 *
 * Commands go to the page by name; what a command does, and whether it may be done now, the page knows.
 */
import type { MenuItemConstructorOptions } from 'electron';

type Item = MenuItemConstructorOptions;

export interface MenuActions {
  /** Hands a command's name to the page. */
  command(name: string): void;
  /** Clears the list of recent files. */
  forgetRecentFiles(): void;
}

export function menuTemplate(platform: NodeJS.Platform, actions: MenuActions): Item[] {
  const command = (label: string, name: string, accelerator?: string): Item => ({
    label,
    accelerator,
    click: () => actions.command(name),
  });
  const separator: Item = { type: 'separator' };
  const mac = platform === 'darwin';
  const file: Item[] = [
    command('&New', 'new', 'CmdOrCtrl+N'),
    command('&Open…', 'open', 'CmdOrCtrl+O'),
    ...(mac ? [{ role: 'recentDocuments', submenu: [{ role: 'clearRecentDocuments' }] } satisfies Item] : []),
    { label: 'Clear list of recent files', click: () => actions.forgetRecentFiles() },
    separator,
    command('&Save', 'save', 'CmdOrCtrl+S'),
    command('Save &as…', 'save-as', 'Shift+CmdOrCtrl+S'),
    separator,
    { role: mac ? 'close' : 'quit' },
  ];
  const edit: Item[] = [
    command('&Undo', 'undo', 'CmdOrCtrl+Z'),
    command('&Redo', 'redo', mac ? 'Shift+Cmd+Z' : 'Ctrl+Y'),
    separator,
    { role: 'cut' },
    { role: 'copy' },
    { role: 'paste' },
    { role: 'selectAll' },
  ];
  const view: Item[] = [
    command('Plan', 'plan', 'CmdOrCtrl+1'),
    command('Start', 'start', 'CmdOrCtrl+2'),
    separator,
    command('SI units', 'units-si'),
    command('US customary units', 'units-us'),
    separator,
    command('Follow the system’s colours', 'theme-system'),
    command('Light', 'theme-light'),
    command('Dark', 'theme-dark'),
    command('High contrast', 'theme-contrast'),
    separator,
    command('Next panel', 'next-panel', 'F6'),
    command('Previous panel', 'previous-panel', 'Shift+F6'),
    separator,
    { role: 'resetZoom' },
    { role: 'zoomIn' },
    { role: 'zoomOut' },
    { role: 'togglefullscreen' },
  ];
  const run: Item[] = [command('Play or pause', 'play'), command('Cancel the run', 'cancel-run')];
  const help: Item[] = [
    command('Keyboard shortcuts', 'shortcuts', 'F1'),
    ...(mac ? [] : [separator, { role: 'about' } satisfies Item]),
  ];
  return [
    ...(mac ? [{ role: 'appMenu' } satisfies Item] : []),
    { label: '&File', submenu: file },
    { label: '&Edit', submenu: edit },
    { label: '&View', submenu: view },
    { label: '&Run', submenu: run },
    ...(mac ? [{ role: 'windowMenu' } satisfies Item] : []),
    { role: 'help', label: '&Help', submenu: help },
  ];
}
