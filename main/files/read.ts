/** Reading a file, and noticing later that somebody else has changed it. */
import { createHash } from 'node:crypto';
import { readFile, stat } from 'node:fs/promises';

/** No plan comes near this; a wrong choice in a dialog should not fill the memory. */
export const LARGEST_FILE_BYTES = 64 * 2 ** 20;

/** What tells one content of a file from another. */
export type Stamp = string;

export class TooLargeError extends Error {}

/** Text of a file with the stamp of that very text. Throws what the file system says, or TooLargeError. */
export async function readText(path: string): Promise<{ text: string; stamp: Stamp }> {
  const { size } = await stat(path);
  if (size > LARGEST_FILE_BYTES) throw new TooLargeError(path);
  const bytes = await readFile(path);
  return { text: bytes.toString('utf8'), stamp: stampOfBytes(bytes) };
}

/** The stamp of what lies at `path` now, or null where nothing can be read. */
export async function stampOf(path: string): Promise<Stamp | null> {
  return await readFile(path).then(stampOfBytes, () => null);
}

/** Of the content: times and sizes are kept by some tools that copy and restore. */
export const stampOfBytes = (bytes: Buffer): Stamp => createHash('sha256').update(bytes).digest('hex');
