/**
 * `npm start [-- FILE]`: builds the app if it has to, then opens its window; where the desktop's runtime cannot be had, says so
 * and serves the same app to a browser on this machine.
 */
import { spawn, spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { basename, join, resolve } from 'node:path';
import { samples } from '../../samples/list';
import { isStale } from './freshness';
import { openBrowser } from './openBrowser';
import { findRuntime } from './runtime';
import { serveApp } from './server';

const root = resolve(import.meta.dirname, '../..');
const inRoot = (path: string): string => join(root, path);
const say = (line: string): void => console.log(line);

const SOURCES = ['app', 'main', 'solver', 'samples', 'package-lock.json', 'vite.config.ts', 'electron.config.ts'].map(inRoot);
const BUILT = [inRoot('out/app/index.html'), inRoot('out/desktop/main/main.js')];

function build(): boolean {
  say('Building Soakwright …');
  const { status } = spawnSync('npm', ['run', '--silent', 'build'], {
    cwd: root,
    stdio: ['ignore', 'ignore', 'inherit'],
    shell: true,
  });
  return status === 0;
}

/** A window that ends so soon after its start, and not well, did not come up: there may be no screen to show it on. */
const CAME_UP_MS = 5000;

/** Runs the window and ends with it. */
function startDesktop(program: string, file: string | undefined, sample: string): void {
  const args = file !== undefined ? [resolve(file)] : [`--sample=${sample}`];
  // As root, as in a container, the runtime refuses to start its sandbox; without root it is never switched off.
  const asRoot = process.getuid?.() === 0 ? ['--no-sandbox'] : [];
  const started = performance.now();
  const child = spawn(program, [...asRoot, root, ...args], { stdio: 'inherit' });
  const failed = (): void => void startBrowser("Electron's runtime could not open a window here", file, sample);
  child.once('error', failed);
  child.once('exit', (code) => {
    if (code !== 0 && performance.now() - started < CAME_UP_MS) failed();
    else process.exit(code ?? 1);
  });
}

async function startBrowser(reason: string, file: string | undefined, sample: string): Promise<void> {
  const server = await serveApp(inRoot('out/app'));
  const url = file === undefined ? `${server.url}?sample=${sample}` : server.url;
  say(`${reason}, so Soakwright opens in your browser: ${url}`);
  if (file !== undefined) say(`A page cannot be handed a file from here: choose ${basename(file)} with Open in the page.`);
  if (!(await openBrowser(url))) say('No browser could be opened from here: open that address in one on this machine.');
  say('It runs until you press Ctrl C here.');
  process.once('SIGINT', () => void server.close().then(() => process.exit(0)));
}

const [file] = process.argv.slice(2);
/** What a start without a file opens. */
const sample = samples[0].id;
if (file !== undefined && !existsSync(file)) {
  console.error(`There is no file ${file}.`);
  process.exit(5);
}
if (BUILT.some((built) => isStale(built, SOURCES)) && !build()) {
  console.error('The build failed; its messages stand above.');
  process.exit(70);
}
const runtime = findRuntime(inRoot('node_modules/electron'), process.env['ELECTRON_OVERRIDE_DIST_PATH']);
if (runtime.kind === 'found') startDesktop(runtime.program, file, sample);
else await startBrowser(`Electron's runtime is not here (${runtime.reason})`, file, sample);
