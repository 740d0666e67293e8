/** The desktop's side of the calls in contract.ts: who asks is checked, what is asked is checked, then it is done. */
import { BrowserWindow, app, dialog, ipcMain, type IpcMainInvokeEvent, type WebContents } from 'electron';
import { basename } from 'node:path';
import { z } from 'zod';
import { wordFileError, type Documents, type Journal, type RecentFiles } from '../files';
import {
  CALLS,
  NOTICES,
  type OpenReply,
  type RecentFileEntry,
  type SaveReply,
  type SaveRequest,
  type SolverExit,
} from './contract';
import { log } from './log';
import { ORIGIN } from './scheme';
import type { Solvers } from './solvers';
import type { PlanWindow } from './window';

z.config({ jitless: true });

export interface Services {
  window(): PlanWindow | null;
  documents: Documents;
  recent: RecentFiles;
  journal: Journal;
  solvers: Solvers;
  /** The sample that the first page is to open; given once. */
  takeSample(): string | null;
  /** The page listens: what waited for it may come. */
  pageReady(): void;
}

const FILTERS = [
  { name: 'Soakwright plan', extensions: ['soak'] },
  { name: 'All files', extensions: ['*'] },
];

const text = z.string();
const title = z.string().max(1000);
const path = z.string().min(1).max(4096);
const nothing = z.tuple([]);
const saveRequest = z.strictObject({
  text,
  path: path.nullable(),
  suggestedName: z.string().max(255),
  overwriteChanged: z.boolean(),
});
const documentState = z.strictObject({ title, edited: z.boolean() });
const journalRecord = z.strictObject({ title, edited: z.string().max(40), text, fileName: z.string().max(255).nullable() });

/** Answers a call only to our own page in the top frame, and only when what it sends has the agreed form. */
function answer<T extends unknown[], R>(channel: string, form: z.ZodType<T>, act: (page: WebContents, ...args: T) => R): void {
  ipcMain.handle(channel, (event: IpcMainInvokeEvent, ...args: unknown[]) => {
    const frame = event.senderFrame;
    if (frame === null || frame !== event.sender.mainFrame || !frame.url.startsWith(`${ORIGIN}/`)) {
      log.warn(`call ${channel} from elsewhere refused`);
      throw new Error('refused');
    }
    const checked = form.safeParse(args);
    if (!checked.success) {
      log.warn(`call ${channel} with something else than agreed refused`);
      throw new Error(`not understood: ${channel}`);
    }
    return act(event.sender, ...checked.data);
  });
}

export function answerCalls(services: Services): void {
  const { documents, recent, journal, solvers } = services;
  const open = (path: string): Promise<OpenReply> => openPath(path, documents, recent);

  answer(CALLS.startSolver, nothing, (page) =>
    solvers.start(
      (solver, port) => page.postMessage(NOTICES.solverPort, solver, [port]),
      (solver, reason) => {
        const exit: SolverExit = { solver, reason };
        if (!page.isDestroyed()) page.send(NOTICES.solverExit, exit);
      },
    ),
  );
  answer(CALLS.endSolver, z.tuple([z.number()]), (_page, solver) => solvers.end(solver));

  answer(CALLS.openFile, nothing, async (page): Promise<OpenReply> => {
    const chosen = await dialog.showOpenDialog(windowOf(page), { properties: ['openFile'], filters: FILTERS });
    return chosen.canceled ? { kind: 'cancelled' } : await open(chosen.filePaths[0]);
  });
  answer(CALLS.openPath, z.tuple([path]), (_page, dropped) => open(dropped));
  answer(CALLS.openRecent, z.tuple([path]), async (_page, wanted): Promise<OpenReply> => {
    const listed = (await recent.list()).some((entry) => entry.path === wanted);
    return listed ? await open(wanted) : { kind: 'failed', message: `${basename(wanted)} is not in the list of recent files.` };
  });
  answer(CALLS.saveFile, z.tuple([saveRequest]), (page, request) => save(page, request, services));

  answer(CALLS.setDocument, z.tuple([documentState]), (_page, state) => services.window()?.setDocument(state));
  answer(CALLS.closeNow, nothing, () => services.window()?.closeNow());
  answer(CALLS.pageReady, nothing, () => services.pageReady());
  answer(CALLS.initialSample, nothing, () => services.takeSample());

  answer(CALLS.recentFiles, nothing, async (): Promise<RecentFileEntry[]> => {
    return (await recent.list()).map((entry) => ({ ...entry, name: basename(entry.path) }));
  });
  answer(CALLS.forgetRecentFiles, nothing, () => forgetRecentFiles(recent));

  answer(CALLS.writeJournal, z.tuple([journalRecord]), (_page, record) => journal.write(record));
  answer(CALLS.readJournal, nothing, () => journal.read());
  answer(CALLS.clearJournal, nothing, () => journal.clear());
}

export async function forgetRecentFiles(recent: RecentFiles): Promise<void> {
  app.clearRecentDocuments();
  await recent.forget();
}

/** Opens a file that the person chose, wherever the choice was made. */
export async function openPath(path: string, documents: Documents, recent: RecentFiles): Promise<OpenReply> {
  try {
    const text = await documents.open(path);
    await remember(path, recent);
    return { kind: 'opened', file: { path, name: basename(path), text } };
  } catch (error) {
    log.warn(`open failed: ${(error as NodeJS.ErrnoException).code ?? 'unknown'}`);
    return { kind: 'failed', message: wordFileError(error, path, 'open') };
  }
}

async function save(page: WebContents, request: SaveRequest, { documents, recent }: Services): Promise<SaveReply> {
  const path = request.path ?? (await chooseWhere(page, request.suggestedName, documents));
  if (path === null) return { kind: 'cancelled' };
  const name = basename(path);
  try {
    const outcome = await documents.save(path, request.text, { overwriteChanged: request.overwriteChanged });
    if (outcome === 'saved') await remember(path, recent);
    return { kind: outcome, path, name };
  } catch (error) {
    log.warn(`save failed: ${(error as NodeJS.ErrnoException).code ?? 'unknown'}`);
    return { kind: 'failed', message: wordFileError(error, path, 'save') };
  }
}

/** The dialog asks by itself before it gives the name of a file that is there. */
async function chooseWhere(page: WebContents, suggestedName: string, documents: Documents): Promise<string | null> {
  const chosen = await dialog.showSaveDialog(windowOf(page), { defaultPath: suggestedName, filters: FILTERS });
  if (chosen.canceled || chosen.filePath === '') return null;
  documents.take(chosen.filePath);
  return chosen.filePath;
}

/** A list that cannot be kept is no reason to fail a save that is done. */
async function remember(path: string, recent: RecentFiles): Promise<void> {
  app.addRecentDocument(path);
  await recent.add(path).catch((error: unknown) => log.warn(`recent files not kept: ${(error as Error).name}`));
}

function windowOf(page: WebContents): BrowserWindow {
  const window = BrowserWindow.fromWebContents(page);
  if (window === null) throw new Error('refused');
  return window;
}
