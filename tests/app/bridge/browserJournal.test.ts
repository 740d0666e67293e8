import { beforeEach, describe, expect, it } from 'vitest';
import { createBrowserJournal } from '../../../app/bridge/browserJournal';

const entry = (title: string, edited: string) => ({ title, edited, text: '{}', fileName: null });

/** The locks of one browser: held by tabs until they go down. */
function browserLocks() {
  const held = new Set<string>();
  return {
    held,
    locks: {
      request: (name: string, options: { signal: AbortSignal }, callback: () => Promise<unknown>) =>
        held.has(name)
          ? new Promise((_, reject) => options.signal.addEventListener('abort', () => reject(options.signal.reason)))
          : (held.add(name), callback()),
      query: async () => ({ held: [...held].map((name) => ({ name })), pending: [] }),
    } as unknown as LockManager,
  };
}

/** Storage of a tab of its own. */
function tabStorage(): Storage {
  const map = new Map<string, string>();
  return {
    getItem: (key: string) => map.get(key) ?? null,
    setItem: (key: string, value: string) => void map.set(key, value),
  } as unknown as Storage;
}

beforeEach(() => localStorage.clear());

describe('the journal in a browser', () => {
  it('is found again by the same tab after a reload', async () => {
    const { locks, held } = browserLocks();
    const session = tabStorage();
    await createBrowserJournal({ local: localStorage, session, locks }).write(entry('Plan', '2026-01-01T10:00'));
    held.clear(); // the page went down
    const journal = createBrowserJournal({ local: localStorage, session, locks });
    expect(await journal.read()).toEqual(entry('Plan', '2026-01-01T10:00'));
    await journal.clear();
    expect(await journal.read()).toBeNull();
  });

  it('of a tab that lives is not offered to another', async () => {
    const { locks } = browserLocks();
    const one = createBrowserJournal({ local: localStorage, session: tabStorage(), locks });
    await one.write(entry('Mine', '2026-01-01T10:00'));
    const other = createBrowserJournal({ local: localStorage, session: tabStorage(), locks });
    expect(await other.read()).toBeNull();
    await other.write(entry('Theirs', '2026-01-01T11:00'));
    expect((await one.read())?.title).toBe('Mine');
  });

  it('of tabs that went down is offered newest first, and cleared once it was looked at', async () => {
    const { locks, held } = browserLocks();
    for (const [title, edited] of [
      ['Old', '2026-01-01T09:00'],
      ['New', '2026-01-02T09:00'],
    ]) {
      await createBrowserJournal({ local: localStorage, session: tabStorage(), locks }).write(entry(title, edited));
    }
    held.clear();
    const journal = createBrowserJournal({ local: localStorage, session: tabStorage(), locks });
    expect((await journal.read())?.title).toBe('New');
    await journal.clear();
    expect((await journal.read())?.title).toBe('Old');
  });

  it('of a copied tab is its own', async () => {
    const { locks } = browserLocks();
    const session = tabStorage();
    const first = createBrowserJournal({ local: localStorage, session, locks });
    await first.write(entry('First', '2026-01-01T10:00'));
    const copy = createBrowserJournal({ local: localStorage, session, locks });
    await copy.write(entry('Copy', '2026-01-01T11:00'));
    expect((await first.read())?.title).toBe('First');
    expect((await copy.read())?.title).toBe('Copy');
  });

  it('that is damaged counts as none', async () => {
    const { locks } = browserLocks();
    localStorage.setItem('soakwright.journal.x', '{"title":');
    localStorage.setItem('soakwright.journal.y', '{"title":"no text"}');
    expect(await createBrowserJournal({ local: localStorage, session: tabStorage(), locks }).read()).toBeNull();
  });
});
