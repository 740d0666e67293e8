/** The host in a browser: a worker for the solver, the browser's own files, and its own question before a tab closes. */
import type { Host, SolverLink } from './contract';
import { createBrowserFiles, type PickingWindow } from './browserFiles';
import { createBrowserJournal } from './browserJournal';
import { windowTitle } from './title';

const nothing = (): void => undefined;
const never = (): (() => void) => nothing;

/** `page` is the window that the app runs in. */
export function createBrowserHost(page: Window, startWorker: () => Worker = solverWorker): Host {
  const files = createBrowserFiles(page as PickingWindow, page.document);
  let edited = false;
  page.addEventListener('beforeunload', (event) => {
    if (edited) event.preventDefault();
  });
  return {
    kind: 'browser',
    viewModifier: 'Alt',
    startSolver: async () => linkTo(startWorker()),
    openFile: () => files.open(),
    openDropped: (file) => files.openDropped(file),
    saveFile: (text, ref, suggestedName, options) => files.save(text, ref, suggestedName, options?.overwriteChanged ?? false),
    setDocument(title, nowEdited) {
      edited = nowEdited;
      page.document.title = windowTitle(title, nowEdited);
    },
    onCloseRequest: never, // the browser asks by itself, see above
    closeNow: () => page.close(),
    onOpenRequest: never,
    onMenuCommand: never,
    recentFiles: async () => [],
    openRecent: async () => null,
    forgetRecentFiles: async () => undefined,
    initialSample: async () => new URLSearchParams(page.location.search).get('sample'),
    journal: createBrowserJournal({ local: page.localStorage, session: page.sessionStorage, locks: page.navigator.locks }),
  };
}

const solverWorker = (): Worker =>
  new Worker(new URL('../../solver/service/hosts/worker.ts', import.meta.url), { type: 'module', name: 'solver' });

function linkTo(worker: Worker): SolverLink {
  const exitHandlers = new Set<(reason: string) => void>();
  // A worker cannot end by itself, but it can fail to load, or meet an error that nobody caught.
  worker.addEventListener('error', (event) => {
    const reason = event.message === '' || event.message === undefined ? 'The solver could not be loaded.' : event.message;
    const told = [...exitHandlers];
    exitHandlers.clear();
    told.forEach((handler) => handler(reason));
  });
  return {
    port: {
      post: (message, transfer = []) => worker.postMessage(message, transfer),
      listen(handler) {
        const heard = (event: MessageEvent): void => handler(event.data);
        worker.addEventListener('message', heard);
        return () => worker.removeEventListener('message', heard);
      },
      close: () => worker.terminate(),
    },
    onExit(handler) {
      exitHandlers.add(handler);
      return () => void exitHandlers.delete(handler);
    },
    kill: () => worker.terminate(),
  };
}
