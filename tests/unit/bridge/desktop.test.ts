import { describe, expect, it } from 'vitest';
import { createDesktopHost } from '../../../app/bridge/desktop';
import type { DesktopApi, OpenReply, SaveRequest, SolverExit } from '../../../main/desktop/contract';

const FILE = { path: '/plans/a.soak', name: 'a.soak', text: '{}' };

/** A page that only carries messages, and a desktop that only writes down what it is asked. */
function setUp(replies: Partial<DesktopApi> = {}) {
  const page = Object.assign(new EventTarget(), {}) as unknown as Window;
  const asked: unknown[] = [];
  let exit: ((exit: SolverExit) => void) | undefined;
  let openRequest: ((reply: OpenReply) => void) | undefined;
  let solvers = 0;
  const api = {
    startSolver: async () => ++solvers,
    endSolver: async (solver: number) => void asked.push(['end', solver]),
    openFile: async () => ({ kind: 'opened', file: FILE }),
    saveFile: async (request: SaveRequest) => {
      asked.push(request);
      return { kind: 'saved', path: '/plans/b.soak', name: 'b.soak' };
    },
    setDocument: async (state: unknown) => void asked.push(state),
    onSolverExit: (handler: (exit: SolverExit) => void) => ((exit = handler), () => (exit = undefined)),
    onOpenRequest: (handler: (reply: OpenReply) => void) => ((openRequest = handler), () => undefined),
    recentFiles: async () => [{ path: '/plans/a.soak', name: 'a.soak', opened: '2026-01-01', missing: true }],
    openRecent: async (path: string) => ({ kind: 'opened', file: { ...FILE, path } }),
    ...replies,
  } as unknown as DesktopApi;
  const send = (data: unknown, ports: MessagePort[] = [], source: unknown = page): void => {
    page.dispatchEvent(Object.assign(new Event('message'), { data, ports, source }));
  };
  return {
    host: createDesktopHost(api, page),
    asked,
    send,
    exit: (of: SolverExit) => exit?.(of),
    open: (r: OpenReply) => openRequest?.(r),
  };
}

const portMessage = (solver: number) => ({ kind: 'soakwright-solver-port', solver });

describe('the solver of the desktop host', () => {
  it('is reached through the port that bears its number, whether the port came early or late', async () => {
    const { host, send } = setUp();
    const [early, late] = [new MessageChannel(), new MessageChannel()];
    send(portMessage(1), [early.port1]);
    const first = await host.startSolver();
    const starting = host.startSolver();
    await Promise.resolve();
    send(portMessage(2), [late.port1]);
    const second = await starting;

    for (const [link, channel] of [
      [first, early],
      [second, late],
    ] as const) {
      const heard = new Promise((resolve) => link.port.listen(resolve));
      channel.port2.postMessage({ hello: 1 });
      expect(await heard).toEqual({ hello: 1 });
      const answered = new Promise((resolve) =>
        channel.port2.addEventListener('message', (event) => resolve((event as MessageEvent).data)),
      );
      channel.port2.start();
      link.port.post({ ask: 2 });
      expect(await answered).toEqual({ ask: 2 });
      link.kill();
    }
  });

  it('takes no port from another window', async () => {
    const { host, send } = setUp();
    const foreign = new MessageChannel();
    const own = new MessageChannel();
    send(portMessage(1), [foreign.port1], {});
    send({ kind: 'something else', solver: 1 }, [foreign.port1]);
    send(null);
    send(portMessage(1), [own.port1]);
    const link = await host.startSolver();
    const heard = new Promise((resolve) => link.port.listen(resolve));
    foreign.port2.postMessage('foreign');
    own.port2.postMessage('own');
    expect(await heard).toBe('own');
    link.kill();
    foreign.port1.close();
  });

  it('is missed when it ends, but not when another one does; a kill ends its process', async () => {
    const { host, send, exit, asked } = setUp();
    send(portMessage(1), [new MessageChannel().port1]);
    const link = await host.startSolver();
    const reasons: string[] = [];
    link.onExit((reason) => reasons.push(reason));
    exit({ solver: 7, reason: 'another' });
    exit({ solver: 1, reason: 'The solver process ended unexpectedly (code 9).' });
    expect(reasons).toEqual(['The solver process ended unexpectedly (code 9).']);
    link.kill();
    expect(asked).toEqual([['end', 1]]);
  });
});

describe('files of the desktop host', () => {
  it('are named by what they were opened under', async () => {
    const { host, asked } = setUp();
    const opened = await host.openFile();
    expect(opened).toEqual({ ref: { name: 'a.soak', token: '/plans/a.soak' }, text: '{}' });
    const saved = await host.saveFile('text', opened?.ref ?? null, 'a.soak');
    expect(asked).toEqual([{ text: 'text', path: '/plans/a.soak', suggestedName: 'a.soak', overwriteChanged: false }]);
    expect(saved).toEqual({ kind: 'saved', ref: { name: 'b.soak', token: '/plans/b.soak' } });
  });

  it('are asked for a place when they have none, and written over changes only when told', async () => {
    const { host, asked } = setUp();
    await host.saveFile('text', null, 'new.soak', { overwriteChanged: true });
    expect(asked).toEqual([{ text: 'text', path: null, suggestedName: 'new.soak', overwriteChanged: true }]);
  });

  it('pass on what the desktop says of a save', async () => {
    const changed = setUp({ saveFile: async () => ({ kind: 'changed-on-disk', path: '/p', name: 'p' }) });
    expect(await changed.host.saveFile('', null, '')).toEqual({ kind: 'changed-on-disk', ref: { name: 'p', token: '/p' } });
    const failed = setUp({ saveFile: async () => ({ kind: 'failed', message: 'The disk is full.' }) });
    expect(await failed.host.saveFile('', null, '')).toEqual({ kind: 'failed', message: 'The disk is full.' });
    const cancelled = setUp({ saveFile: async () => ({ kind: 'cancelled' }) });
    expect(await cancelled.host.saveFile('', null, '')).toEqual({ kind: 'cancelled' });
  });

  it('that cannot be opened say why', async () => {
    const { host } = setUp({ openFile: async () => ({ kind: 'failed', message: 'a.soak could not be opened.' }) });
    await expect(host.openFile()).rejects.toThrow('a.soak could not be opened.');
    const closed = setUp({ openFile: async () => ({ kind: 'cancelled' }) });
    expect(await closed.host.openFile()).toBeNull();
  });

  it('handed over arrive as files or as the reason why not', () => {
    const { host, open } = setUp();
    const files: string[] = [];
    const reasons: string[] = [];
    host.onOpenRequest(
      (file) => files.push(file.ref.name),
      (reason) => reasons.push(reason),
    );
    open({ kind: 'opened', file: FILE });
    open({ kind: 'failed', message: 'It is a folder.' });
    expect([files, reasons]).toEqual([['a.soak'], ['It is a folder.']]);
  });

  it('opened lately keep their paths to themselves', async () => {
    const { host } = setUp();
    const [recent] = await host.recentFiles();
    expect(recent).toEqual({ name: 'a.soak', token: '/plans/a.soak', opened: '2026-01-01', missing: true });
    expect((await host.openRecent(recent))?.ref.token).toBe('/plans/a.soak');
  });
});

describe('the title of the window', () => {
  it('has the plan first and a mark while it is edited', () => {
    const { host, asked } = setUp();
    host.setDocument('Forged block', true);
    host.setDocument('', false);
    expect(asked).toEqual([
      { title: '• Forged block – Soakwright', edited: true },
      { title: 'Untitled – Soakwright', edited: false },
    ]);
  });
});
