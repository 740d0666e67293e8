/**
 * The journal of unsaved work in a browser's local storage: one a tab, so that two open plans do not overwrite each other.
 *
 * A tab holds a lock of its journal's name as long as it lives. A journal without a holder was left by a tab that went down.
 */
import type { Host, JournalEntry } from './contract';

const PREFIX = 'soakwright.journal.';
const TAB = 'soakwright.tab';

export interface JournalPlace {
  /** Shared by all tabs. */
  local: Storage;
  /** This tab's own: survives a reload. */
  session: Storage;
  locks: Pick<LockManager, 'request' | 'query'>;
}

/** How long a reloaded page waits for the one before it to let go; longer means that this tab is a copy of another. */
const LET_GO_MS = 500;

export function createBrowserJournal({ local, session, locks }: JournalPlace): Host['journal'] {
  const hold = (name: string): Promise<boolean> =>
    new Promise((resolve) => {
      const held = (): Promise<never> => (resolve(true), new Promise(() => undefined));
      locks.request(name, { signal: AbortSignal.timeout(LET_GO_MS) }, held).catch(() => resolve(false));
    });
  const claim = async (): Promise<string> => {
    const kept = session.getItem(TAB);
    if (kept !== null && (await hold(PREFIX + kept))) return PREFIX + kept;
    const tab = crypto.randomUUID();
    session.setItem(TAB, tab);
    void hold(PREFIX + tab);
    return PREFIX + tab;
  };
  const own = claim();
  /** The journal that was read last: this tab's own, or one that was left behind. */
  let found: string | null = null;

  return {
    write: async (entry) => local.setItem(await own, JSON.stringify(entry)),
    async read() {
      const mine = await own;
      const held = new Set((await locks.query()).held?.map((lock) => lock.name));
      const left = keysOf(local).filter((key) => key === mine || !held.has(key));
      const entries = left
        .flatMap((key) => readEntry(local, key) ?? [])
        .sort((a, b) => b.entry.edited.localeCompare(a.entry.edited));
      found = entries[0]?.key ?? null;
      return entries[0]?.entry ?? null;
    },
    async clear() {
      local.removeItem(await own);
      if (found !== null) local.removeItem(found);
    },
  };
}

const keysOf = (storage: Storage): string[] =>
  Array.from({ length: storage.length }, (_, i) => storage.key(i) ?? '').filter((key) => key.startsWith(PREFIX));

/** What a journal holds; one that is damaged counts as none. Storage writes whole values, so a checksum would add nothing. */
function readEntry(storage: Storage, key: string): { key: string; entry: JournalEntry } | null {
  try {
    const entry = JSON.parse(storage.getItem(key) ?? 'null') as JournalEntry | null;
    const whole = typeof entry?.text === 'string' && typeof entry.title === 'string' && typeof entry.edited === 'string';
    return whole ? { key, entry } : null;
  } catch {
    return null;
  }
}
