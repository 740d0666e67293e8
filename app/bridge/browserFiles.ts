/**
 * Files in a browser: through the File System Access API where it is there, else by upload and download.
 *
 * With a file handle, saving writes to the same file again, and the browser puts the new content in place in one move. A
 * download cannot be looked at afterwards: each save downloads anew.
 */
import type { FileRef, OpenedFile, SaveOutcome } from './contract';

/** What a file held when it was last read or written here; time and size are all that a page is shown without reading. */
interface Stamp {
  lastModified: number;
  size: number;
}
interface HandleToken {
  kind: 'handle';
  handle: FileSystemFileHandle;
  stamp: Stamp;
}
type Token = HandleToken | { kind: 'download' };

/** The pickers are not in the standard library's types, for not every browser has them. */
interface PickerOptions {
  types: { description: string; accept: Record<string, string[]> }[];
  suggestedName?: string;
}
export interface PickingWindow {
  showOpenFilePicker?: (options: PickerOptions) => Promise<FileSystemFileHandle[]>;
  showSaveFilePicker?: (options: PickerOptions) => Promise<FileSystemFileHandle>;
}

export interface BrowserFiles {
  open(): Promise<OpenedFile | null>;
  openDropped(file: File): Promise<OpenedFile>;
  save(text: string, ref: FileRef | null, suggestedName: string, overwriteChanged: boolean): Promise<SaveOutcome>;
}

const TYPES: PickerOptions['types'] = [{ description: 'Soakwright plan', accept: { 'application/json': ['.soak'] } }];

export function createBrowserFiles(pickers: PickingWindow, page: Document): BrowserFiles {
  return {
    async open() {
      if (pickers.showOpenFilePicker === undefined) return await upload(page);
      const [handle] = await unlessClosed(pickers.showOpenFilePicker({ types: TYPES }), []);
      return handle === undefined ? null : await openHandle(handle);
    },
    openDropped: (file) => readUpload(file),
    async save(text, ref, suggestedName, overwriteChanged) {
      const token = ref?.token as Token | undefined;
      if (token?.kind === 'handle') return await saveHandle(token, text, overwriteChanged);
      if (token?.kind === 'download' || pickers.showSaveFilePicker === undefined)
        return download(page, text, ref?.name ?? suggestedName);
      const handle = await unlessClosed(pickers.showSaveFilePicker({ types: TYPES, suggestedName }), null);
      if (handle === null) return { kind: 'cancelled' };
      return await saveHandle({ kind: 'handle', handle, stamp: { lastModified: 0, size: 0 } }, text, true);
    },
  };
}

/** A picker that the person closed ends in an AbortError, which is no error. */
async function unlessClosed<T, E>(picking: Promise<T>, closed: E): Promise<T | E> {
  try {
    return await picking;
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') return closed;
    throw error;
  }
}

const stampOf = ({ lastModified, size }: File): Stamp => ({ lastModified, size });

async function openHandle(handle: FileSystemFileHandle): Promise<OpenedFile> {
  const file = await handle.getFile();
  const token: Token = { kind: 'handle', handle, stamp: stampOf(file) };
  return { ref: { name: file.name, token }, text: await file.text() };
}

async function saveHandle(token: HandleToken, text: string, overwriteChanged: boolean): Promise<SaveOutcome> {
  const { handle } = token;
  const ref: FileRef = { name: handle.name, token };
  try {
    const before = await handle.getFile().catch(() => null);
    const changed = before !== null && (before.lastModified !== token.stamp.lastModified || before.size !== token.stamp.size);
    if (changed && !overwriteChanged) return { kind: 'changed-on-disk', ref };
    const writing = await handle.createWritable();
    await writing.write(text);
    await writing.close();
    const written: Token = { kind: 'handle', handle, stamp: stampOf(await handle.getFile()) };
    return { kind: 'saved', ref: { name: handle.name, token: written } };
  } catch (error) {
    return { kind: 'failed', message: wordError(error, handle.name) };
  }
}

function wordError(error: unknown, name: string): string {
  const kind = error instanceof DOMException ? error.name : '';
  if (kind === 'NotAllowedError')
    return `${name} could not be saved: the browser was not allowed to write it. Save again and allow it.`;
  if (kind === 'QuotaExceededError') return `${name} could not be saved: the disk is full. The file there is as it was.`;
  if (kind === 'NotFoundError')
    return `${name} could not be saved: its folder is not there any more. Choose another place with Save as.`;
  return `${name} could not be saved (${error instanceof Error ? error.message : String(error)}).`;
}

function upload(page: Document): Promise<OpenedFile | null> {
  const input = page.createElement('input');
  input.type = 'file';
  input.accept = '.soak,.json,application/json';
  return new Promise((resolve, reject) => {
    input.addEventListener('change', () => {
      const file = input.files?.[0];
      if (file === undefined) resolve(null);
      else readUpload(file).then(resolve, reject);
    });
    input.addEventListener('cancel', () => resolve(null));
    input.click();
  });
}

async function readUpload(file: File): Promise<OpenedFile> {
  const token: Token = { kind: 'download' };
  return { ref: { name: file.name, token }, text: await file.text() };
}

function download(page: Document, text: string, name: string): SaveOutcome {
  const address = URL.createObjectURL(new Blob([text], { type: 'application/json' }));
  const link = page.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser reads the content after the click has returned.
  setTimeout(() => URL.revokeObjectURL(address), 60_000);
  const token: Token = { kind: 'download' };
  return { kind: 'saved', ref: { name, token } };
}
