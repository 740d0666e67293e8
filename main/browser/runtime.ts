/** Whether the desktop's runtime is on this machine: its package brings only a downloader, and the download may have failed. */
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

/** `missing` goes into brackets of a sentence for the person. */
export type Runtime = { kind: 'found'; program: string } | { kind: 'missing'; reason: string };

/** `packageFolder` is that of the runtime's package; `override` the folder of a runtime kept elsewhere. */
export function findRuntime(packageFolder: string, override: string | undefined): Runtime {
  const pathFile = join(packageFolder, 'path.txt');
  const named = existsSync(pathFile) ? readFileSync(pathFile, 'utf8').trim() : null;
  if (override !== undefined)
    return check(
      join(override, named ?? programName(process.platform)),
      'not at the place that ELECTRON_OVERRIDE_DIST_PATH names',
    );
  if (named === null) return { kind: 'missing', reason: 'its download was not made; "npx install-electron" makes it' };
  return check(join(packageFolder, 'dist', named), 'its download is not complete; "npx install-electron" makes it anew');
}

const check = (program: string, reason: string): Runtime =>
  existsSync(program) ? { kind: 'found', program } : { kind: 'missing', reason };

function programName(platform: NodeJS.Platform): string {
  if (platform === 'darwin') return 'Electron.app/Contents/MacOS/Electron';
  return platform === 'win32' ? 'electron.exe' : 'electron';
}
