/** The host on the desktop: every wish goes through the preload's named functions. */
import type { DesktopApi, DesktopFile, OpenReply, SolverPortMessage } from '../../main/desktop/contract';
import type { Port } from '../../solver/service/protocol';
import type { Host, OpenedFile, SolverLink } from './contract';
import { windowTitle } from './title';

/** `page` is the window that the preload's messages arrive in. */
export function createDesktopHost(api: DesktopApi, page: Window): Host {
  const ports = receivePorts(page);
  return {
    kind: 'desktop',
    viewModifier: 'Ctrl',
    startSolver: () => startSolver(api, ports),
    openFile: async () => opened(await api.openFile()),
    async openDropped(file) {
      const dropped = opened(await api.openDropped(file));
      if (dropped === null) throw new Error(`${file.name} could not be opened.`);
      return dropped;
    },
    async saveFile(text, ref, suggestedName, options = {}) {
      const path = ref === null ? null : String(ref.token);
      const { overwriteChanged = false } = options;
      const reply = await api.saveFile({ text, path, suggestedName, overwriteChanged });
      return 'path' in reply ? { kind: reply.kind, ref: { name: reply.name, token: reply.path } } : reply;
    },
    setDocument: (title, edited) => void api.setDocument({ title: windowTitle(title, edited), edited }),
    onCloseRequest: (handler) => api.onCloseRequest(handler),
    closeNow: () => void api.closeNow(),
    onOpenRequest: (handler, failed) =>
      api.onOpenRequest((reply) => {
        if (reply.kind === 'opened') handler(fileOf(reply.file));
        else if (reply.kind === 'failed') failed?.(reply.message);
      }),
    onMenuCommand: (handler) => api.onMenuCommand(handler),
    recentFiles: async () => (await api.recentFiles()).map(({ path, ...entry }) => ({ ...entry, token: path })),
    openRecent: async (file) => opened(await api.openRecent(String(file.token))),
    forgetRecentFiles: () => api.forgetRecentFiles(),
    initialSample: () => api.initialSample(),
    journal: { write: (entry) => api.writeJournal(entry), read: () => api.readJournal(), clear: () => api.clearJournal() },
  };
}

const fileOf = ({ path, name, text }: DesktopFile): OpenedFile => ({ ref: { name, token: path }, text });

function opened(reply: OpenReply): OpenedFile | null {
  if (reply.kind === 'failed') throw new Error(reply.message);
  return reply.kind === 'opened' ? fileOf(reply.file) : null;
}

/** The port of a solver, by its number: it may arrive before or after it is asked for. */
type Ports = (solver: number) => Promise<MessagePort>;

function receivePorts(page: Window): Ports {
  const arrived = new Map<number, MessagePort>();
  const awaited = new Map<number, (port: MessagePort) => void>();
  page.addEventListener('message', (event: MessageEvent) => {
    const message = event.data as Partial<SolverPortMessage> | null;
    if (event.source !== page || message?.kind !== 'soakwright-solver-port' || typeof message.solver !== 'number') return;
    const give = awaited.get(message.solver);
    awaited.delete(message.solver);
    if (give === undefined) arrived.set(message.solver, event.ports[0]);
    else give(event.ports[0]);
  });
  return (solver) => {
    const port = arrived.get(solver);
    arrived.delete(solver);
    return port === undefined ? new Promise((give) => awaited.set(solver, give)) : Promise.resolve(port);
  };
}

async function startSolver(api: DesktopApi, ports: Ports): Promise<SolverLink> {
  const solver = await api.startSolver();
  const port = portOf(await ports(solver));
  return {
    port,
    onExit: (handler) => api.onSolverExit((exit) => void (exit.solver === solver && handler(exit.reason))),
    kill() {
      port.close();
      void api.endSolver(solver);
    },
  };
}

/** The other end is in another process: everything is copied, nothing can be transferred. */
function portOf(given: MessagePort): Port {
  return {
    post: (message) => given.postMessage(message),
    listen(handler) {
      const heard = (event: MessageEvent): void => handler(event.data);
      given.addEventListener('message', heard);
      given.start();
      return () => given.removeEventListener('message', heard);
    },
    close: () => given.close(),
  };
}
