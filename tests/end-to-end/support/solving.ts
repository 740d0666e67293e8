/** Runs of a plan by the command and by the solver of either host, as the document that `run --json` prints. */
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { Page } from 'playwright-core';
import './page';
import { buildReport, type Report } from '../../../solver/model/report';
import type { Frames, Project, RunResult } from '../../../solver/model';

const root = resolve(import.meta.dirname, '../../..');

/** A report without the figure that no two runs share. */
export function comparable(report: Report): Report {
  return { ...report, solver: { ...report.solver, wall_s: 0 } };
}

/** What `soakwright run FILE --json` prints; the runtime is the Node of the tests unless another program is given. */
export function reportOfCommand(file: string): Report {
  const command = join(root, 'out/cli/soakwright.mjs');
  const { status, stdout, stderr } = spawnSync(process.execPath, [command, 'run', file, '--json'], { encoding: 'utf8' });
  if (status !== 0) throw new Error(`the command ended with ${status}: ${stderr}`);
  return JSON.parse(stdout);
}

/** Address of the built worker, relative to the page. */
export function workerAddress(): string {
  const [name] = readdirSync(join(root, 'out/app/solver')).filter((file) => file.startsWith('worker-'));
  return `./solver/${name}`;
}

/** Runs a plan in a solver of the page's own kind: a worker at `worker`, or on the desktop (null) a process. */
export async function reportOfPage(page: Page, project: Project, worker: string | null): Promise<Report> {
  const pieces = await page.evaluate(
    async ([project, worker]) => {
      const port: Pick<MessagePort, 'postMessage'> & EventTarget = worker === null ? await processPort() : workerPort(worker);
      const messages = await new Promise<{ type: string }[]>((done) => {
        const heard: { type: string }[] = [];
        port.addEventListener('message', (event) => {
          const message = (event as MessageEvent).data;
          if (message.type === 'ready') port.postMessage({ type: 'solve', job: 1, revision: 1, cases: [project] });
          heard.push(message);
          if (message.type === 'done' || message.type === 'failed') done(heard);
        });
        if (port instanceof MessagePort) port.start();
      });
      return JSON.stringify(messages, (_key, value) => (ArrayBuffer.isView(value) ? [...(value as Float64Array)] : value));

      function workerPort(address: string): Worker {
        return new Worker(new URL(address, location.href), { type: 'module' });
      }
      async function processPort(): Promise<MessagePort> {
        const ports = new Map<number, MessagePort>();
        window.addEventListener('message', (event) => {
          if (event.data?.kind === 'soakwright-solver-port') ports.set(event.data.solver, event.ports[0]);
        });
        const solver = await window.soakwright.startSolver();
        while (!ports.has(solver)) await new Promise((later) => setTimeout(later, 5));
        return ports.get(solver) as MessagePort;
      }
    },
    [project, worker] as const,
  );
  return buildReport(project, resultOf(JSON.parse(pieces)));
}

type Said = { type: string; final?: boolean; result?: Omit<RunResult, 'frames'>; frames?: Frames; message?: string };

function resultOf(messages: Said[]): RunResult {
  const answers = messages.findLast(({ type, final }) => type === 'answers' && final === true);
  const frames = messages.find(({ type }) => type === 'frames');
  if (answers?.result === undefined || frames?.frames === undefined) throw new Error(messages.at(-1)?.message ?? 'no answers');
  return { ...answers.result, frames: frames.frames };
}
