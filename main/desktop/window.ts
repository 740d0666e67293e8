/** The one window: shut off from everything but the app's own pages, and never closed over unsaved work without a question. */
import { BrowserWindow, dialog, nativeTheme, screen, session, type WebContents } from 'electron';
import { NOTICES, type DocumentState } from './contract';
import { log } from './log';
import { keepPlace, readPlace, usablePlace } from './place';
import { ORIGIN } from './scheme';

export interface PlanWindow {
  readonly window: BrowserWindow;
  setDocument(state: DocumentState): void;
  /** Closes without a question: the page has asked. */
  closeNow(): void;
  focus(): void;
  send(channel: string, value?: unknown): void;
}

const PAGE = `${ORIGIN}/index.html`;
const DEFAULT_SIZE = { width: 1440, height: 900 };
/** A page that goes down more often than this in a minute is not put up again without a question. */
const RELOADS_A_MINUTE = 3;

/** `placeStore` remembers where it stood; `preload` is the file of the bridge. */
export function openWindow(preload: string, placeStore: string): PlanWindow {
  const place = usablePlace(
    readPlace(placeStore),
    screen.getAllDisplays().map((display) => display.workArea),
  );
  const window = new BrowserWindow({
    ...(place ?? DEFAULT_SIZE),
    minWidth: 640,
    minHeight: 480,
    show: false,
    backgroundColor: nativeTheme.shouldUseDarkColors ? '#1f1d1a' : '#f4efe6',
    webPreferences: { preload, sandbox: true, contextIsolation: true, nodeIntegration: false, spellcheck: false },
  });
  if (place?.maximized === true) window.maximize();
  window.once('ready-to-show', () => window.show());
  shutOff(window.webContents);
  putUpAgain(window);
  window.on('close', () => {
    const kept = { ...window.getNormalBounds(), maximized: window.isMaximized() };
    keepPlace(placeStore, kept).catch(() => log.warn('place of the window not kept'));
  });
  const guard = guardClosing(window);
  void window.loadURL(PAGE);
  return {
    window,
    ...guard,
    focus() {
      if (window.isMinimized()) window.restore();
      window.focus();
    },
    send: (channel, value) => window.webContents.send(channel, value),
  };
}

/** While the plan is edited, the window closes only when the page says so; a page that is down cannot be asked. */
function guardClosing(window: BrowserWindow): Pick<PlanWindow, 'setDocument' | 'closeNow'> {
  let edited = false;
  let agreed = false;
  window.webContents.on('render-process-gone', () => (edited = false));
  window.on('close', (event) => {
    if (agreed || !edited) return;
    event.preventDefault();
    window.webContents.send(NOTICES.closeRequest);
  });
  return {
    setDocument(state) {
      edited = state.edited;
      window.setTitle(state.title);
      window.setDocumentEdited(state.edited);
    },
    closeNow() {
      agreed = true;
      window.close();
    },
  };
}

/** No other page, no window of its own, no permission but to put text on the clipboard. */
function shutOff(page: WebContents): void {
  page.setWindowOpenHandler(() => ({ action: 'deny' }));
  page.on('will-navigate', (event) => event.preventDefault());
  page.on('will-attach-webview', (event) => event.preventDefault());
  const granted = (permission: string): boolean => permission === 'clipboard-sanitized-write';
  session.defaultSession.setPermissionRequestHandler((_page, permission, decide) => decide(granted(permission)));
  session.defaultSession.setPermissionCheckHandler((_page, permission) => granted(permission));
  session.defaultSession.setDevicePermissionHandler(() => false);
}

/** A page that went down is loaded again and finds its work in the journal. */
function putUpAgain(window: BrowserWindow): void {
  let times: number[] = [];
  window.webContents.on('render-process-gone', (_event, { reason, exitCode }) => {
    log.error(`page gone: ${reason}, code ${exitCode}`);
    if (reason === 'clean-exit') return;
    const now = Date.now();
    times = [...times.filter((time) => now - time < 60_000), now];
    if (times.length <= RELOADS_A_MINUTE || askReload(window)) window.reload();
    else window.close();
  });
}

const askReload = (window: BrowserWindow): boolean =>
  dialog.showMessageBoxSync(window, {
    type: 'error',
    message: 'The page keeps going down.',
    detail: 'Unsaved work is kept and offered at the next start.',
    buttons: ['Try again', 'Close'],
    defaultId: 0,
    cancelId: 1,
  }) === 0;
