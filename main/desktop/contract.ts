/**
 * What the page may ask of the desktop, and what the desktop tells the page: one named function each.
 *
 * The preload puts this on the page as `window.soakwright`; the other side of every call is in calls.ts, which checks who asks
 * and what is asked. A path is only ever one that the person chose.
 */
import type { JournalRecord } from '../files';

export type { JournalRecord };

/** A file in hand: its path is what later calls name it by. */
export interface DesktopFile {
  path: string;
  name: string;
  text: string;
}

/** A file that could be read, or why not, in plain words. */
export type OpenReply = { kind: 'opened'; file: DesktopFile } | { kind: 'cancelled' } | { kind: 'failed'; message: string };

export interface SaveRequest {
  text: string;
  /** null asks where. */
  path: string | null;
  suggestedName: string;
  overwriteChanged: boolean;
}
export type SaveReply =
  | { kind: 'saved'; path: string; name: string }
  | { kind: 'cancelled' }
  | { kind: 'changed-on-disk'; path: string; name: string }
  | { kind: 'failed'; message: string };

export interface RecentFileEntry {
  path: string;
  name: string;
  opened: string;
  missing: boolean;
}

/** How the window stands: its title, and whether closing it would lose work. */
export interface DocumentState {
  title: string;
  edited: boolean;
}

export interface DesktopApi {
  /** Starts a solver process and gives its number; its port comes as a window message, see SOLVER_PORT. */
  startSolver(): Promise<number>;
  endSolver(solver: number): Promise<void>;
  openFile(): Promise<OpenReply>;
  openDropped(file: File): Promise<OpenReply>;
  openRecent(path: string): Promise<OpenReply>;
  saveFile(request: SaveRequest): Promise<SaveReply>;
  setDocument(state: DocumentState): Promise<void>;
  closeNow(): Promise<void>;
  recentFiles(): Promise<RecentFileEntry[]>;
  forgetRecentFiles(): Promise<void>;
  initialSample(): Promise<string | null>;
  writeJournal(record: JournalRecord): Promise<void>;
  readJournal(): Promise<JournalRecord | null>;
  clearJournal(): Promise<void>;
  /** Each returns what stops listening. What came before the first listener is kept for it. */
  onSolverExit(handler: (exit: SolverExit) => void): () => void;
  onCloseRequest(handler: () => void): () => void;
  onOpenRequest(handler: (reply: OpenReply) => void): () => void;
  onMenuCommand(handler: (command: string) => void): () => void;
}

export interface SolverExit {
  solver: number;
  reason: string;
}

/** Names of the calls on the wire, page to desktop. */
export const CALLS = {
  startSolver: 'solver:start',
  endSolver: 'solver:end',
  openFile: 'file:open',
  openPath: 'file:open-dropped',
  openRecent: 'file:open-recent',
  saveFile: 'file:save',
  setDocument: 'window:document',
  closeNow: 'window:close',
  recentFiles: 'recent:list',
  forgetRecentFiles: 'recent:forget',
  initialSample: 'start:sample',
  writeJournal: 'journal:write',
  readJournal: 'journal:read',
  clearJournal: 'journal:clear',
  pageReady: 'page:ready',
} as const;

/** Names of the notices on the wire, desktop to page. */
export const NOTICES = {
  solverPort: 'solver:port',
  solverExit: 'solver:exit',
  closeRequest: 'window:close-request',
  openRequest: 'file:open-request',
  menuCommand: 'menu:command',
} as const;

/** A window message of this kind, from the window itself, carries the port of the solver that it names. */
export interface SolverPortMessage {
  kind: 'soakwright-solver-port';
  solver: number;
}
