/** The built app in a real browser and in a real window, with the same things in hand. */
import { mkdtemp, rm } from 'node:fs/promises';
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

const CHROMIUM_SWITCHES = [
  '--no-sandbox', // as root there is none
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

/** The app in a headless Chromium, from the product's own server; `search` is the page's ("?sample=…"). */
export async function launchChromium(search = ''): Promise<Launched & { context: BrowserContext; url: string }> {
  const executablePath = findChromium();
  if (executablePath === null) throw new Error('Chromium is not on this machine');
  const server = await serveApp(join(root, 'out/app'), 0);
  const browser = await chromium.launch({ executablePath, args: CHROMIUM_SWITCHES });
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, acceptDownloads: true });
  const page = await context.newPage();
  const complaints = gather(page);
  await page.goto(server.url + search);
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
}

/** The app in its window; `userData` of an earlier launch continues that one's settings, and is left to the caller. */
export async function launchElectron(args: string[] = [], userData?: string): Promise<LaunchedElectron> {
  const runtime = await prepareRuntime();
  if (runtime.kind === 'missing') throw new Error(`the test runtime of Electron is not here: ${runtime.reason}`);
  const screen = await startScreen();
  const settings = userData ?? (await mkdtemp(join(tmpdir(), 'soakwright-settings-')));
  const app = await _electron.launch({
    executablePath: join(runtime.folder, 'electron'),
    args: ['--no-sandbox', '--disable-gpu', `--user-data-dir=${settings}`, root, ...args],
    env: { ...process.env, DISPLAY: screen.display } as Record<string, string>,
    cwd: root,
  });
  const page = await app.firstWindow();
  const complaints = gather(page);
  return {
    app,
    page,
    complaints,
    userData: settings,
    async close() {
      await app.close();
      screen.close();
      if (userData === undefined) await rm(settings, { recursive: true, force: true });
    },
  };
}

function gather(page: Page): string[] {
  const complaints: string[] = [];
  page.on('console', (message) => void (message.type() === 'error' && complaints.push(message.text())));
  page.on('pageerror', (error) => complaints.push(String(error)));
  return complaints;
}
