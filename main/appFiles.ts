/** Files of the built app by the addresses of a page: nothing outside its folder, no listing, no hidden names. */
import { readFile, realpath } from 'node:fs/promises';
import { join, sep } from 'node:path';

export interface AppFile {
  /** Relative to the built app, with forward slashes. */
  path: string;
  bytes: Buffer;
}

/** The file that an address path ("/assets/a.js", still encoded) names in `folder`; "/" is the page itself. Null for none. */
export async function readAppFile(folder: string, pathname: string): Promise<AppFile | null> {
  const path = pathInside(pathname);
  if (path === null) return null;
  try {
    const [within, file] = await Promise.all([realpath(folder), realpath(join(folder, path))]);
    return file.startsWith(within + sep) ? { path, bytes: await readFile(file) } : null;
  } catch {
    return null; // not there, or a folder
  }
}

function pathInside(pathname: string): string | null {
  let decoded: string;
  try {
    decoded = decodeURIComponent(pathname);
  } catch {
    return null;
  }
  if (decoded === '/' || decoded === '') return 'index.html';
  const names = decoded.replace(/^\//, '').split('/');
  return names.every((name) => /^[\w-][\w.-]*$/.test(name)) ? names.join('/') : null;
}
