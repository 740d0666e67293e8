/** The files opened or saved last, newest first, kept in one small file of their own. */
import { access, readFile } from 'node:fs/promises';
import { saveText } from './save';
import { inTurns } from './turns';

const KEPT = 12;

export interface RecentEntry {
  path: string;
  /** ISO date and time. */
  opened: string;
  /** It is not where it was; it stays listed, for a disk may come back. */
  missing: boolean;
}

export interface RecentFiles {
  list(): Promise<RecentEntry[]>;
  add(path: string): Promise<void>;
  forget(): Promise<void>;
}

type Kept = Omit<RecentEntry, 'missing'>;

/** Keeps its list in the file at `store`. A store that cannot be read counts as empty. `now` is the clock. */
export function createRecentFiles(store: string, now: () => Date = () => new Date()): RecentFiles {
  const inTurn = inTurns();
  const write = async (entries: Kept[]): Promise<void> => void (await saveText(store, `${JSON.stringify(entries, null, 2)}\n`));
  return {
    list: () => inTurn(async () => await Promise.all((await readKept(store)).map(markMissing))),
    add: (path) =>
      inTurn(async () => {
        const others = (await readKept(store)).filter((entry) => entry.path !== path);
        await write([{ path, opened: now().toISOString() }, ...others].slice(0, KEPT));
      }),
    forget: () => inTurn(() => write([])),
  };
}

async function readKept(store: string): Promise<Kept[]> {
  try {
    const entries: unknown = JSON.parse(await readFile(store, 'utf8'));
    return Array.isArray(entries) ? entries.filter(isKept) : [];
  } catch {
    return [];
  }
}

const isKept = (entry: unknown): entry is Kept =>
  typeof entry === 'object' &&
  entry !== null &&
  typeof (entry as Kept).path === 'string' &&
  typeof (entry as Kept).opened === 'string';

async function markMissing(entry: Kept): Promise<RecentEntry> {
  const missing = await access(entry.path).then(
    () => false,
    () => true,
  );
  return { path: entry.path, opened: entry.opened, missing };
}
