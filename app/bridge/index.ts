/** Door of the bridge: the host that the app runs in. */
import type { DesktopApi } from '../../main/desktop/contract';
import { createBrowserHost } from './browser';
import type { Host } from './contract';
import { createDesktopHost } from './desktop';

export type { CloseChoice, FileRef, Host, JournalEntry, OpenedFile, RecentFile, SaveOutcome, SolverLink } from './contract';

let found: Host | undefined;

/** The desktop where its preload is there, else the browser; the same one at every call. */
export function host(): Host {
  const { soakwright } = window as { soakwright?: DesktopApi };
  found ??= soakwright === undefined ? createBrowserHost(window) : createDesktopHost(soakwright, window);
  return found;
}
