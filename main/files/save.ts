/**
 * Saving so that a kill at any instant leaves the old file or the new one, whole.
 *
 * The text goes to a new file in the same folder, is forced to the disk, and takes the old file's name in one move (rename
 * within a file system is atomic under POSIX); then the folder is forced too, or the move itself could be lost.
 */
import { randomBytes } from 'node:crypto';
import { access, constants, open, readdir, realpath, rename, stat, unlink } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { stampOfBytes, type Stamp } from './read';

const TEMPORARY = /^\.(.+)\.(\d+)-[0-9a-f]{8}\.soak-tmp$/;
/** A temporary file that another program could still be writing is younger than this. */
const STALE_MS = 60_000;

/** Writes `text` to `path` and returns the stamp of what now lies there. Throws what the file system says. */
export async function saveText(path: string, text: string): Promise<Stamp> {
  const target = await throughLinks(path);
  const mode = await modeOf(target);
  const bytes = Buffer.from(text, 'utf8');
  const temporary = join(dirname(target), `.${basename(target)}.${process.pid}-${randomBytes(4).toString('hex')}.soak-tmp`);
  try {
    await writeThrough(temporary, bytes, mode);
    await rename(temporary, target);
  } catch (error) {
    await unlink(temporary).catch(() => undefined);
    throw error;
  }
  await syncFolder(dirname(target));
  await removeStale(target);
  return stampOfBytes(bytes);
}

/** Where a link leads: the file behind it is replaced, the link stays. */
async function throughLinks(path: string): Promise<string> {
  return await realpath(path).catch(() => path);
}

/** Permissions of the file to be replaced, or undefined where there is none; one that may not be written is refused. */
async function modeOf(path: string): Promise<number | undefined> {
  const present = await stat(path).catch(() => null);
  if (present === null) return undefined;
  await access(path, constants.W_OK);
  return present.mode & 0o7777;
}

async function writeThrough(path: string, bytes: Buffer, mode: number | undefined): Promise<void> {
  const file = await open(path, 'wx');
  try {
    await file.writeFile(bytes);
    if (mode !== undefined) await file.chmod(mode);
    await file.sync();
  } finally {
    await file.close();
  }
}

async function syncFolder(folder: string): Promise<void> {
  if (process.platform === 'win32') return; // a folder cannot be opened there, and its entries are journalled
  const handle = await open(folder, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}

/** Removes what earlier saves of this file left when they were killed. Never fails: the new file is already in place. */
async function removeStale(target: string): Promise<void> {
  const folder = dirname(target);
  const names = await readdir(folder).catch(() => []);
  for (const name of names) {
    const [, of, writer] = TEMPORARY.exec(name) ?? [];
    if (of !== basename(target) || isRunning(Number(writer))) continue;
    const path = join(folder, name);
    const age = Date.now() - ((await stat(path).catch(() => null))?.mtimeMs ?? Date.now());
    if (age > STALE_MS) await unlink(path).catch(() => undefined);
  }
}

function isRunning(processId: number): boolean {
  try {
    process.kill(processId, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
