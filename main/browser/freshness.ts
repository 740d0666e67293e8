/** Whether what was built is as new as what it is built from. */
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';

/** True if `built` is missing or older than any of the files and folders in `sources`. */
export function isStale(built: string, sources: readonly string[]): boolean {
  if (!existsSync(built)) return true;
  const builtAt = statSync(built).mtimeMs;
  return sources.some((source) => existsSync(source) && newest(source) > builtAt);
}

/** The latest change in a file, or in a folder and all below; a folder's own time tells of files removed. */
function newest(path: string): number {
  const { mtimeMs } = statSync(path);
  const isFolder = statSync(path).isDirectory();
  return isFolder ? Math.max(mtimeMs, ...readdirSync(path).map((name) => newest(join(path, name)))) : mtimeMs;
}
