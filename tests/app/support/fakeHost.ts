/** A host that keeps everything in memory. */
import type { Host, JournalEntry, OpenedFile, RecentFile, SaveOutcome } from '../../../app/bridge';

export interface FakeHost extends Host {
  /** What the next save dialog or write comes to; default: saved. */
  next: SaveOutcome | null;
  readonly saved: { text: string; name: string | null; options: object | undefined }[];
  /** What the next open dialog gives; an Error is thrown. */
  toOpen: OpenedFile | Error | null;
  held: JournalEntry | null;
  readonly closed: { times: number };
  title: { title: string; edited: boolean } | null;
  askToClose(): void;
  handOver(file: OpenedFile): void;
  menu(command: string): void;
}

export function fakeHost(held: JournalEntry | null = null): FakeHost {
  const on = { close: () => {}, open: (_: OpenedFile) => {}, menu: (_: string) => {} };
  const host: FakeHost = {
    kind: 'desktop',
    viewModifier: 'Ctrl',
    next: null,
    saved: [],
    toOpen: null,
    held,
    closed: { times: 0 },
    title: null,
    askToClose: () => on.close(),
    handOver: (file) => on.open(file),
    menu: (command) => on.menu(command),
    startSolver: () => new Promise(() => {}),
    async openFile() {
      if (host.toOpen instanceof Error) throw host.toOpen;
      return host.toOpen;
    },
    async openDropped(file) {
      return { ref: { name: file.name, token: file.name }, text: await file.text() };
    },
    async saveFile(text, ref, suggestedName, options) {
      host.saved.push({ text, name: ref?.name ?? null, options });
      return host.next ?? { kind: 'saved', ref: ref ?? { name: suggestedName, token: suggestedName } };
    },
    setDocument: (title, edited) => void (host.title = { title, edited }),
    onCloseRequest: (handler) => {
      on.close = handler;
      return () => {};
    },
    closeNow: () => void host.closed.times++,
    onOpenRequest: (handler) => {
      on.open = handler;
      return () => {};
    },
    onMenuCommand: (handler) => {
      on.menu = handler;
      return () => {};
    },
    recentFiles: async (): Promise<RecentFile[]> => [],
    openRecent: async () => null,
    forgetRecentFiles: async () => {},
    initialSample: async () => null,
    journal: {
      write: async (entry) => void (host.held = entry),
      read: async () => host.held,
      clear: async () => void (host.held = null),
    },
  };
  return host;
}
