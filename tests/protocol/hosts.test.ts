/** The same job on every host: what the person reads does not depend on where the solver runs. */
import { MessageChannel as NodeChannel } from 'node:worker_threads';
import { readFileSync } from 'node:fs';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { buildReport, readProject, type Frames, type Project } from '../../solver/model';
import { solve, startSolve } from '../../solver/planning';
import { portPair, startInProcess } from '../../solver/service/hosts';
import { serve, type DesktopPort, type ParentPort } from '../../solver/service/hosts/process';
import { createSolverClient, type Answered, type ClientEvent, type Link, type Port } from '../../solver/service/protocol';

afterEach(() => vi.unstubAllGlobals());

const project = ((): Project => {
  const read = readProject(readFileSync(new URL('../../samples/panel-cure.soak', import.meta.url), 'utf8'));
  if (read.kind !== 'project') throw new Error('the sample does not open');
  return read.project;
})();

/** Runs the project over a link and gives all that was said. */
async function talk(link: Link): Promise<{ events: ClientEvent[]; report: string }> {
  const client = createSolverClient({
    start: () => Promise.resolve(link),
    after: (wait_ms, call) => {
      const timer = setTimeout(call, wait_ms);
      return () => clearTimeout(timer);
    },
  });
  const events: ClientEvent[] = [];
  await new Promise<void>((done) => {
    client.listen((event) => {
      events.push(event);
      if (event.type === 'done' || event.type === 'failed') done();
    });
    client.solve([project], 3);
  });
  client.close();
  const answered = events.flatMap((event) => (event.type === 'answers' && event.final ? [event.result] : []))[0] as Answered;
  const frames = events.flatMap((event) => (event.type === 'frames' ? [event.frames] : []))[0] as Frames;
  const report = buildReport(project, { ...answered, frames });
  return { events, report: JSON.stringify({ ...report, solver: { ...report.solver, wall_s: 0 } }) };
}

const link = (port: Port): Link => ({ port, onExit: () => () => undefined, kill: () => port.close() });

/** The desktop's process host, its parent and ports being Node's own channels with the desktop's manners. */
function processLink(): Link {
  const { port1, port2 } = new NodeChannel();
  const wrap = (handler: (event: { data: unknown }) => void) => (data: unknown) => handler({ data });
  const wrapped = new Map<unknown, (data: unknown) => void>();
  const theirs: DesktopPort = {
    on(event: 'message' | 'close', handler: (event: { data: unknown }) => void) {
      const own = wrap(handler);
      wrapped.set(handler, own);
      return port2.on(event, own);
    },
    off: (_event, handler) => port2.off('message', wrapped.get(handler) as (data: unknown) => void),
    postMessage: (message) => port2.postMessage(message),
    start: () => port2.start(),
    close: () => port2.close(),
  };
  let give: Parameters<ParentPort['on']>[1] = () => undefined;
  serve({ on: (_event, handler) => void (give = handler) });
  give({ data: { solver: 1 }, ports: [theirs] });
  return link({
    post: (message) => port1.postMessage(message),
    listen(handler) {
      port1.on('message', handler);
      return () => void port1.off('message', handler);
    },
    close: () => port1.close(),
  });
}

/** The browser's worker host in a made-up scope; messages are cloned, transferred buffers lost, as between threads. */
async function workerLink(): Promise<Link> {
  const scope = new EventTarget() as EventTarget & { postMessage: (message: unknown, transfer: Transferable[]) => void };
  const said: unknown[] = [];
  let handler: ((message: unknown) => void) | null = null;
  scope.postMessage = (message, transfer) => {
    const arrived = structuredClone(message, { transfer });
    if (handler === null) said.push(arrived);
    else handler(arrived);
  };
  vi.stubGlobal('self', scope);
  vi.resetModules();
  await import('../../solver/service/hosts/worker');
  return link({
    post: (message) => scope.dispatchEvent(new MessageEvent('message', { data: structuredClone(message) })),
    listen(heard) {
      handler = heard;
      queueMicrotask(() => said.splice(0).forEach(heard));
      return () => void (handler = null);
    },
    close: () => undefined,
  });
}

/** Where two long texts part, with a little around it; null where they do not. */
function firstDifference(a: string, b: string): string[] | null {
  if (a === b) return null;
  let at = 0;
  while (a[at] === b[at]) at++;
  return [a, b].map((text) => text.slice(Math.max(0, at - 60), at + 30));
}

describe('a run that is taken in slices and asked on the way', () => {
  it('comes to the same report as one that is left alone', () => {
    const alone = buildReport(project, solve(project));
    const asked = startSolve(project);
    while (!asked.advance(() => true)) {
      asked.result();
      asked.progress();
    }
    expect(firstDifference(JSON.stringify(alone), JSON.stringify(buildReport(project, asked.result())))).toBeNull();
  });
});

describe('a job on a host', () => {
  const hosts: [string, () => Promise<Link>][] = [
    ['in the same process', startInProcess],
    ['in a process of the desktop', () => Promise.resolve(processLink())],
    ['in a worker of the browser', workerLink],
  ];

  it.each(hosts)('%s: answers, then frames, then answers with their uncertainty, then done', async (_, start) => {
    const { events } = await talk(await start());
    const told = events.filter(({ type }) => type !== 'progress');
    expect(told.map(({ type }) => type).slice(-4)).toEqual(['answers', 'frames', 'answers', 'done']);
    const [value, , refined] = told.slice(-4) as Extract<ClientEvent, { type: 'answers' }>[];
    expect(value).toMatchObject({ final: false, refining: true, result: { refinement: null } });
    expect(refined.final).toBe(true);
    for (const { margin, uncertainty } of refined.result.answers) if (margin !== null) expect(uncertainty).toBeGreaterThan(0);
    expect(events.every((event) => 'revision' in event && event.revision === 3)).toBe(true);
    expect(events.at(-1)).toMatchObject({ outcomes: [{ reason: 'finished' }] });
  });

  it('gives the same report, digit for digit, wherever it runs', async () => {
    const reports: string[] = [];
    for (const [, start] of hosts) reports.push((await talk(await start())).report);
    expect(firstDifference(reports[0], reports[1])).toBeNull();
    expect(firstDifference(reports[0], reports[2])).toBeNull();
    expect(reports[0].length).toBeGreaterThan(10_000);
  });
});

describe('ports in memory', () => {
  it('keep what is posted before anybody listens, and its order', async () => {
    const [mine, its] = portPair();
    mine.post(1);
    mine.post(2);
    const heard: unknown[] = [];
    await Promise.resolve();
    its.listen((message) => heard.push(message));
    mine.post(3);
    expect(heard).toEqual([]);
    await new Promise((done) => setImmediate(done));
    expect(heard).toEqual([1, 2, 3]);
  });

  it('carry nothing after one end was closed', async () => {
    const [mine, its] = portPair();
    const heard: unknown[] = [];
    its.listen((message) => heard.push(message));
    mine.post(1);
    mine.close();
    await new Promise((done) => setImmediate(done));
    expect(heard).toEqual([]);
  });

  it('a handler that stops listening hears nothing more', async () => {
    const [mine, its] = portPair();
    const heard: unknown[] = [];
    its.listen((message) => heard.push(message))();
    mine.post(1);
    await new Promise((done) => setImmediate(done));
    expect(heard).toEqual([]);
  });
});
