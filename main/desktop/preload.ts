/** The only bridge between the page and the desktop: named functions, and nothing that could send anything else. */
import { contextBridge, ipcRenderer, webUtils, type IpcRendererEvent } from 'electron';
import { CALLS, NOTICES, type DesktopApi, type OpenReply, type SolverExit, type SolverPortMessage } from './contract';

/** Hears a notice from the moment the page exists, and keeps what comes until somebody listens. */
function notice<T>(channel: string): (handler: (value: T) => void) => () => void {
  const handlers = new Set<(value: T) => void>();
  let kept: T[] = [];
  ipcRenderer.on(channel, (_event, value: T) => {
    if (handlers.size === 0) kept.push(value);
    else handlers.forEach((handler) => handler(value));
  });
  return (handler) => {
    handlers.add(handler);
    kept.forEach((value) => handler(value));
    kept = [];
    return () => void handlers.delete(handler);
  };
}

const onSolverExit = notice<SolverExit>(NOTICES.solverExit);
const onCloseRequest = notice<void>(NOTICES.closeRequest);
const onOpenRequest = notice<OpenReply>(NOTICES.openRequest);
const onMenuCommand = notice<string>(NOTICES.menuCommand);

// A port cannot pass the bridge between the two worlds of a page; a window message carries it across.
ipcRenderer.on(NOTICES.solverPort, (event: IpcRendererEvent, solver: number) => {
  const message: SolverPortMessage = { kind: 'soakwright-solver-port', solver };
  window.postMessage(message, window.origin, event.ports);
});

const api: DesktopApi = {
  startSolver: () => ipcRenderer.invoke(CALLS.startSolver),
  endSolver: (solver) => ipcRenderer.invoke(CALLS.endSolver, solver),
  openFile: () => ipcRenderer.invoke(CALLS.openFile),
  openDropped: (file) => ipcRenderer.invoke(CALLS.openPath, webUtils.getPathForFile(file)),
  openRecent: (path) => ipcRenderer.invoke(CALLS.openRecent, path),
  saveFile: (request) => ipcRenderer.invoke(CALLS.saveFile, request),
  setDocument: (state) => ipcRenderer.invoke(CALLS.setDocument, state),
  closeNow: () => ipcRenderer.invoke(CALLS.closeNow),
  recentFiles: () => ipcRenderer.invoke(CALLS.recentFiles),
  forgetRecentFiles: () => ipcRenderer.invoke(CALLS.forgetRecentFiles),
  initialSample: () => ipcRenderer.invoke(CALLS.initialSample),
  writeJournal: (record) => ipcRenderer.invoke(CALLS.writeJournal, record),
  readJournal: () => ipcRenderer.invoke(CALLS.readJournal),
  clearJournal: () => ipcRenderer.invoke(CALLS.clearJournal),
  onSolverExit,
  onCloseRequest,
  onOpenRequest,
  onMenuCommand,
};

contextBridge.exposeInMainWorld('soakwright', api);
// Not before: until then the other side does not yet see whose page this is.
window.addEventListener('DOMContentLoaded', () => void ipcRenderer.invoke(CALLS.pageReady));
