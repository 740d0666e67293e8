/** The desktop shell: one window, one instance, its files and its solver processes. */
import { Menu, app } from 'electron';
import { join } from 'node:path';
import { createDocuments, createJournal, createRecentFiles } from '../files';
import { answerCalls, forgetRecentFiles, openPath } from './calls';
import { NOTICES } from './contract';
import { log } from './log';
import { menuTemplate } from './menu';
import { readArguments } from './opening';
import { registerScheme, serveApp } from './scheme';
import { createSolvers } from './solvers';
import { openWindow, type PlanWindow } from './window';

const here = import.meta.dirname;
const APP_FILES = join(here, '../../app');
const PRELOAD = join(here, '../preload/preload.cjs');
const SOLVER = join(here, 'solver.js');

app.setName('Soakwright');
registerScheme();
if (app.requestSingleInstanceLock({ args: process.argv.slice(1) })) run();
else app.quit();

function run(): void {
  const settings = (name: string): string => join(app.getPath('userData'), name);
  const documents = createDocuments();
  const recent = createRecentFiles(settings('recent.json'));
  const journal = createJournal(settings('journal'));
  const solvers = createSolvers(SOLVER);
  const asked = readArguments(process.argv.slice(1), process.cwd());
  let sample = asked.sample;
  let plan: PlanWindow | null = null;
  let listening = false;
  /** Files handed over before the page can hear of them. */
  let waiting = asked.files;

  const handOver = (files: string[]): void => {
    waiting.push(...files);
    if (!listening) return;
    for (const path of waiting) void openPath(path, documents, recent).then((reply) => plan?.send(NOTICES.openRequest, reply));
    waiting = [];
  };
  const show = (): void => {
    plan = openWindow(PRELOAD, settings('window.json'));
    plan.window.webContents.on('did-start-navigation', ({ isMainFrame, isSameDocument }) => {
      if (!isMainFrame || isSameDocument) return;
      listening = false;
      solvers.endAll(); // those of the page that was there before
    });
    plan.window.on('closed', () => {
      plan = null;
      listening = false;
      solvers.endAll();
    });
  };

  app.on('second-instance', (_event, _argv, folder, data) => {
    handOver(readArguments((data as { args: string[] }).args, folder).files);
    plan?.focus();
  });
  app.on('open-file', (event, path) => {
    event.preventDefault();
    handOver([path]);
    if (plan === null && app.isReady()) show();
  });
  app.on('activate', () => void (plan === null && show()));
  app.on('window-all-closed', () => void (process.platform !== 'darwin' && app.quit()));

  answerCalls({
    window: () => plan,
    documents,
    recent,
    journal,
    solvers,
    takeSample() {
      const taken = sample;
      sample = null;
      return taken;
    },
    pageReady() {
      listening = true;
      handOver([]);
    },
  });

  void app.whenReady().then(() => {
    log.info(`started, version ${app.getVersion()}, runtime ${process.versions.electron}`);
    serveApp(APP_FILES);
    const command = (name: string): void => plan?.send(NOTICES.menuCommand, name);
    const forget = (): void => void forgetRecentFiles(recent);
    Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(process.platform, { command, forgetRecentFiles: forget })));
    show();
  });
}
