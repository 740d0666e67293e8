import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SaveRequest } from '../../../main/desktop/contract';
import { tryForbidden } from '../support/forbidden';
import { launchElectron, type LaunchedElectron } from '../support/hosts';

let host: LaunchedElectron;
beforeAll(async () => {
  host = await launchElectron();
});
afterAll(() => host.close());

describe('the window', () => {
  it('shows the app from its own scheme, without a complaint', async () => {
    await host.page.waitForSelector('#app > *');
    expect(host.page.url()).toBe('app://soakwright/index.html');
    expect(await host.page.title()).toContain('Soakwright');
    expect(host.complaints).toEqual([]);
  });

  it('gives the page nothing of Node and only the named calls', async () => {
    const found = await host.page.evaluate(() => ({
      node: ['require', 'process', 'Buffer', 'global', 'module'].filter((name) => name in window),
      calls: Object.keys(window.soakwright).sort(),
    }));
    expect(found.node).toEqual([]);
    expect(found.calls).toEqual([
      'clearJournal',
      'closeNow',
      'endSolver',
      'forgetRecentFiles',
      'initialSample',
      'onCloseRequest',
      'onMenuCommand',
      'onOpenRequest',
      'onSolverExit',
      'openDropped',
      'openFile',
      'openRecent',
      'readJournal',
      'recentFiles',
      'saveFile',
      'setDocument',
      'startSolver',
      'writeJournal',
    ]);
  });

  it('keeps to itself: no other window, no other page, no permission', async () => {
    const tried = await host.page.evaluate(async () => {
      location.assign('https://example.org/');
      return {
        opened: window.open('https://example.org/'),
        place: await new Promise((told) => navigator.geolocation.getCurrentPosition(told, (refusal) => told(refusal.message))),
        notification: await Notification.requestPermission(),
      };
    });
    expect(tried).toEqual({ opened: null, place: 'User denied Geolocation', notification: 'denied' });
    expect(host.page.url()).toBe('app://soakwright/index.html');
    expect(host.app.windows()).toHaveLength(1);
  });

  it('may neither evaluate text nor reach other origins', async () => {
    expect(await tryForbidden(host.page)).toEqual(['connect-src', 'script-src']);
  });

  it('refuses calls that do not have the agreed form', async () => {
    const answers = await host.page.evaluate(async () => {
      const wrong = { text: 1, path: null, suggestedName: 'a.soak', overwriteChanged: false } as unknown as SaveRequest;
      const more = { title: 'a', edited: false, extra: true };
      return [
        await window.soakwright.saveFile(wrong).catch((error: Error) => error.message),
        await window.soakwright.setDocument(more).catch((error: Error) => error.message),
        await window.soakwright.openRecent('').catch((error: Error) => error.message),
      ];
    });
    for (const answer of answers) expect(answer).toContain('not understood');
  });

  it('writes and reads no path that nobody chose', async () => {
    const folder = await mkdtemp(join(tmpdir(), 'soakwright-not-chosen-'));
    const path = join(folder, 'a.soak');
    await writeFile(path, 'theirs');
    const replies = await host.page.evaluate(
      async (path) => [
        await window.soakwright.saveFile({ text: 'mine', path, suggestedName: 'a.soak', overwriteChanged: true }),
        await window.soakwright.openRecent(path),
      ],
      path,
    );
    expect(replies.map((reply) => reply.kind)).toEqual(['failed', 'failed']);
    await rm(folder, { recursive: true });
  });
});

describe('the solver process', () => {
  it('greets the page over a port of its own, and its end is noticed', async () => {
    const before = await solverProcesses(host);
    const solver = await host.page.evaluate(async () => {
      const port = new Promise<MessagePort>((found) =>
        window.addEventListener('message', (event) => {
          if (event.data?.kind === 'soakwright-solver-port') found(event.ports[0]);
        }),
      );
      const solver = await window.soakwright.startSolver();
      const hello = new Promise((heard) => port.then((given) => (given.onmessage = (event) => heard(event.data))));
      const exit = new Promise((told) => window.soakwright.onSolverExit((gone) => gone.solver === solver && told(gone.reason)));
      Object.assign(window, { exitOfTest: exit });
      return { solver, hello: await hello };
    });
    expect(solver.hello).toMatchObject({ type: 'ready' });
    const [own] = (await solverProcesses(host)).filter((pid) => !before.includes(pid));
    process.kill(own, 'SIGKILL');
    expect(await host.page.evaluate(() => (window as unknown as { exitOfTest: Promise<string> }).exitOfTest)).toContain(
      'The solver process ended unexpectedly',
    );
  });
});

const solverProcesses = (host: LaunchedElectron): Promise<number[]> =>
  host.app.evaluate(({ app }) =>
    app
      .getAppMetrics()
      .filter((metric) => metric.name === 'Soakwright solver')
      .map((metric) => metric.pid),
  );
