/** The built app in a real browser and in a real window, with the same things in hand. */
import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { _electron, chromium, type BrowserContext, type ElectronApplication, type Page } from 'playwright-core';
import { serveApp } from '../../../main/browser/server';
import { prepareRuntime } from '../electron-runtime/prepare';
import { findChromium } from './machine';
import { startScreen } from './screen';

const root = resolve(import.meta.dirname, '../../..');

export interface Launched {
  readonly page: Page;
  /** Errors on the page's console, uncaught ones, and breaches of the content policy. */
  readonly complaints: string[];
  close(): Promise<void>;
}

export const CHROMIUM_SWITCHES = [
  '--no-sandbox', // as root there is none
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/**
 * The app in a headless Chromium, from the product's own server; `search` is the page's ("?sample=…"). `withoutPickers` takes
 * the file pickers away, as in a browser that has none; `blank` leaves the opening to the caller.
 */
export async function launchChromium(
  search = '',
  { withoutPickers = false, blank = false } = {},
): Promise<Launched & { context: BrowserContext; url: string }> {
  const executablePath = findChromium();
  if (executablePath === null) throw new Error('Chromium is not on this machine');
  const server = await serveApp(join(root, 'out/app'), 0);
  const browser = await chromium.launch({ executablePath, args: CHROMIUM_SWITCHES });
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, acceptDownloads: true });
  const page = await context.newPage();
  const complaints = gather(page);
  if (withoutPickers)
    await page.addInitScript(() => Object.assign(window, { showOpenFilePicker: undefined, showSaveFilePicker: undefined }));
  if (!blank) await page.goto(server.url + search);
  return {
    page,
    context,
    url: server.url,
    complaints,
    async close() {
      await browser.close();
      await server.close();
    },
  };
}

export interface LaunchedElectron extends Launched {
  readonly app: ElectronApplication;
  /** Where it keeps its settings and its journal. */
  readonly userData: string;
  /** Starts the program once more with the same settings, as a person who opens a file does; gives its exit code. */
  startAgain(...args: string[]): Promise<number | null>;
}

/** The app in its window; `userData` of an earlier launch continues that one's settings, and is left to the caller. */
export async function launchElectron(args: string[] = [], userData?: string): Promise<LaunchedElectron> {
  const runtime = await prepareRuntime();
  if (runtime.kind === 'missing') throw new Error(`the test runtime of Electron is not here: ${runtime.reason}`);
  const screen = await startScreen();
  const settings = userData ?? (await mkdtemp(join(tmpdir(), 'soakwright-settings-')));
  const executablePath = join(runtime.folder, 'electron');
  const base = ['--no-sandbox', '--disable-gpu', `--user-data-dir=${settings}`, root];
  const env = { ...process.env, DISPLAY: screen.display } as Record<string, string>;
  const app = await _electron.launch({ executablePath, args: [...base, ...args], env, cwd: root });
  const program = app.process();
  const page = await app.firstWindow();
  const complaints = gather(page);
  return {
    app,
    page,
    complaints,
    userData: settings,
    async startAgain(...more) {
      const child = spawn(executablePath, [...base, ...more], { env, cwd: root, stdio: 'ignore' });
      const [code] = await once(child, 'exit');
      return code as number | null;
    },
    async close() {
      // A window with unsaved work would ask; these tests have seen what they came for.
      program.kill('SIGKILL');
      await app.close().catch(() => undefined);
      screen.close();
      if (userData === undefined) await rm(settings, { recursive: true, force: true, maxRetries: 10, retryDelay: 200 });
    },
  };
}

export interface Unattended {
  /** When the program was launched, ms as Date.now() tells. */
  readonly began: number;
  /** Attaches to the page that is there now. */
  attach(): Promise<{ page: Page; detach(): Promise<void> }>;
  /** Kills the process that draws the page. */
  killPage(): Promise<void>;
  close(): Promise<void>;
}

/** The app in its window with nobody attached, so that it is on its own when its page goes down. */
export async function launchUnattended(args: string[] = []): Promise<Unattended> {
  const runtime = await prepareRuntime();
  if (runtime.kind === 'missing') throw new Error(`the test runtime of Electron is not here: ${runtime.reason}`);
  const screen = await startScreen();
  const settings = await mkdtemp(join(tmpdir(), 'soakwright-settings-'));
  const began = Date.now();
  const program = spawn(
    join(runtime.folder, 'electron'),
    ['--no-sandbox', '--disable-gpu', '--remote-debugging-port=0', `--user-data-dir=${settings}`, root, ...args],
    { env: { ...process.env, DISPLAY: screen.display }, cwd: root, stdio: ['ignore', 'ignore', 'pipe'] },
  );
  const address = await new Promise<string>((found) => {
    let said = '';
    program.stderr.on('data', (chunk: Buffer) => {
      said += chunk.toString();
      const [, address] = /DevTools listening on (ws:\S+)/.exec(said) ?? [];
      if (address !== undefined) found(address);
    });
  });
  return {
    began,
    async attach() {
      const browser = await chromium.connectOverCDP(address);
      const [context] = browser.contexts();
      const page = context.pages()[0] ?? (await context.waitForEvent('page'));
      return { page, detach: () => browser.close() };
    },
    async killPage() {
      for (const pid of await processesWith('--type=renderer', settings)) process.kill(pid, 'SIGKILL');
    },
    async close() {
      program.kill('SIGKILL');
      await once(program, 'exit');
      screen.close();
      await rm(settings, { recursive: true, force: true, maxRetries: 10, retryDelay: 200 });
    },
  };
}

/** Ids of processes whose command line has all these parts. */
async function processesWith(...parts: string[]): Promise<number[]> {
  const ids = (await readdir('/proc')).filter((name) => /^\d+$/.test(name));
  const lines = await Promise.all(ids.map((id) => readFile(`/proc/${id}/cmdline`, 'utf8').catch(() => '')));
  return ids.filter((_, index) => parts.every((part) => lines[index].includes(part))).map(Number);
}

function gather(page: Page): string[] {
  const complaints: string[] = [];
  page.on('console', (message) => void (message.type() === 'error' && complaints.push(message.text())));
  page.on('pageerror', (error) => complaints.push(String(error)));
  return complaints;
}

/** From now on the person answers every file dialog with this path; null closes it. */
export async function chooseInDialogs({ app }: LaunchedElectron, path: string | null): Promise<void> {
  await app.evaluate(({ dialog }, path) => {
    const canceled = path === null;
    dialog.showOpenDialog = async () => ({ canceled, filePaths: path === null ? [] : [path] });
    dialog.showSaveDialog = async () => ({ canceled, filePath: path ?? '' });
  }, path);
}
