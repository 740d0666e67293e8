/**
 * The journal of unsaved work: the latest state of the plan, beside the settings and never over the user's own file.
 *
 * Its first line is the checksum of the rest, so that a torn or edited journal is not offered as somebody's work.
 */
import { createHash } from 'node:crypto';
import { readFile, rm } from 'node:fs/promises';
import { saveText } from './save';
import { inTurns } from './turns';

export interface JournalRecord {
  title: string;
  /** ISO date and time of the last edit. */
  edited: string;
  text: string;
  fileName: string | null;
}

export interface Journal {
  write(record: JournalRecord): Promise<void>;
  /** The last record, or null where there is none or it is damaged. */
  read(): Promise<JournalRecord | null>;
  clear(): Promise<void>;
}

/** A journal kept in the file at `store`; a write waits for the one before. */
export function createJournal(store: string): Journal {
  const inTurn = inTurns();
  return {
    write: (record) =>
      inTurn(async () => {
        const body = JSON.stringify(record);
        await saveText(store, `${checksum(body)}\n${body}\n`);
      }),
    read: () => inTurn(() => readRecord(store)),
    clear: () => inTurn(() => rm(store, { force: true })),
  };
}

const checksum = (body: string): string => createHash('sha256').update(body).digest('hex');

async function readRecord(store: string): Promise<JournalRecord | null> {
  const content = await readFile(store, 'utf8').catch(() => '');
  const [sum, body] = content.split('\n');
  if (body === undefined || sum !== checksum(body)) return null;
  return JSON.parse(body) as JournalRecord;
}
