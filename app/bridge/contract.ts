/**
 * What the app asks of the place it runs in. Desktop and browser each supply one `Host`; nothing else in the app knows which.
 */
import type { Link } from '../../solver/service/protocol';

/** A solver process or worker: a port, and notice of its end. */
export type SolverLink = Link;

/** Where a document came from or went to; `token` is opaque to the app (a path, or a file handle). */
export interface FileRef {
  readonly name: string;
  readonly token: unknown;
}

export interface OpenedFile {
  readonly ref: FileRef;
  readonly text: string;
}

export type SaveOutcome =
  | { kind: 'saved'; ref: FileRef }
  | { kind: 'cancelled' }
  /** The file changed on disk since it was opened or saved; nothing was written. */
  | { kind: 'changed-on-disk'; ref: FileRef }
  | { kind: 'failed'; message: string };

export type CloseChoice = 'save' | 'discard' | 'cancel';

export interface Host {
  readonly kind: 'desktop' | 'browser';
  /** How shortcuts are named here: Ctrl on the desktop, Alt where the browser keeps Ctrl for itself. */
  readonly viewModifier: 'Ctrl' | 'Alt';
  startSolver(): Promise<SolverLink>;
  /** Shows the file dialog; null when the person closed it. Like every opening, throws an Error that says in plain words why not. */
  openFile(): Promise<OpenedFile | null>;
  /** Reads a file dropped on the window. */
  openDropped(file: File): Promise<OpenedFile>;
  /** Writes to `ref`, or asks where (always when `ref` is null). `overwriteChanged` writes even if the file changed on disk. */
  saveFile(
    text: string,
    ref: FileRef | null,
    suggestedName: string,
    options?: { overwriteChanged?: boolean },
  ): Promise<SaveOutcome>;
  /** Marks the window (title, unsaved dot); while `edited`, closing the window asks first through `onCloseRequest`. */
  setDocument(title: string, edited: boolean): void;
  /** Called when the window wants to close with unsaved edits; `answer` tells whether it may. */
  onCloseRequest(handler: () => void): () => void;
  closeNow(): void;
  /** A file handed over at start or by a second start, or chosen in the system's menu; `failed` hears why one could not be read. */
  onOpenRequest(handler: (file: OpenedFile) => void, failed?: (message: string) => void): () => void;
  /** Commands chosen in the system's menu: names of the app's own command list. */
  onMenuCommand(handler: (command: string) => void): () => void;
  /** Recent files, newest first; empty where the host keeps none. */
  recentFiles(): Promise<RecentFile[]>;
  openRecent(file: RecentFile): Promise<OpenedFile | null>;
  forgetRecentFiles(): Promise<void>;
  /** The sample that `npm start` opens at first, or null for the start view; from the command line or the page address. */
  initialSample(): Promise<string | null>;
  /** Recovery journal of unsaved edits: kept by the host, offered at the next start. */
  journal: {
    write(entry: JournalEntry): Promise<void>;
    read(): Promise<JournalEntry | null>;
    clear(): Promise<void>;
  };
}

export interface RecentFile {
  readonly name: string;
  readonly token: unknown;
  readonly opened: string;
  readonly missing: boolean;
}

export interface JournalEntry {
  readonly title: string;
  /** ISO date and time of the last edit. */
  readonly edited: string;
  readonly text: string;
  readonly fileName: string | null;
}
