/** What this machine has of what the end-to-end tests need. */
import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';

/** The first of these programs on PATH, or null. */
export function findProgram(...names: string[]): string | null {
  const folders = (process.env['PATH'] ?? '').split(delimiter);
  for (const name of names) {
    for (const folder of folders) {
      const path = join(folder, name);
      if (isProgram(path)) return path;
    }
  }
  return null;
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

export const findChromium = (): string | null => findProgram('chromium', 'chromium-browser');
export const findScreen = (): string | null => findProgram('Xvfb');
