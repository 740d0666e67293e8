/**
 * The asking side of the conversation: sends jobs to a solver, passes on what it says, and watches over it.
 *
 * Duties:
 * 1. One job at a time. A newer one supersedes the older, of which nothing more is passed on.
 * 2. Every job ends, for whoever listens, by exactly one `done` or `failed`.
 * 3. A solver that ends by itself, or says nothing for SILENCE_S while it owes something, is started again and the job
 *    repeated, with a word about it. When that happens a second time in one job, the job fails, and the solver is started
 *    again with the next job: a plan that breaks the solver cannot do so for ever.
 * 4. A solver that speaks another version of the protocol is not talked to.
 */
import type { Project } from '../../model';
import { FAILURES, type FailureCode } from './failures';
import { PROTOCOL_VERSION, type AboutJob, type FromSolver, type ToSolver } from './messages';
import type { After, Link } from './port';
import { readFromSolver } from './read';

/** Silence that counts as a hang: no message for 5 s; a solver that is asked answers between slices of 25 ms. */
export const SILENCE_S = 5;
/** Time to come up: a busy machine may need seconds to load a process. */
export const START_S = 20;
/** Silence is counted in ticks, not on a clock: a window that slept, or was busy itself, does not blame the solver. */
const TICK_MS = 1000;
/** After this many silent ticks the solver is asked for a sign of life. */
const ASK_AFTER = 3;

/** The solver was lost in the middle of things; `repeated` says that the job in hand was given to the new one. */
export interface Restarted {
  type: 'restarted';
  code: FailureCode;
  message: string;
  repeated: boolean;
}
export type ClientEvent = AboutJob | Restarted;

export interface SolveOptions {
  /** Whether the answers shall get their numerical uncertainty; if not given, those of a single case do. */
  refine?: boolean | undefined;
}

export interface SolverClient {
  /** Asks for the cases of a plan's revision, superseding what runs; returns the number of the job. */
  solve(cases: Project[], revision: number, options?: SolveOptions): number;
  /** Ends the job in hand: it comes to `done` with what was reached, or to `failed` (cancelled) when it had not begun. */
  cancel(): void;
  /** True while a job is owed its end. */
  busy(): boolean;
  listen(handler: (event: ClientEvent) => void): () => void;
  /** Ends the solver; no event follows. */
  close(): void;
}

interface Job {
  job: number;
  revision: number;
  cases: Project[];
  refine: boolean | undefined;
  /** A cancelled job is not repeated. */
  cancelled?: true;
}

export function createSolverClient({ start, after }: { start: () => Promise<Link>; after: After }): SolverClient {
  const handlers = new Set<(event: ClientEvent) => void>();
  let link: Link | null = null;
  let phase: 'off' | 'starting' | 'ready' = 'off';
  /** Rises with every start, so that what an earlier solver still says or does is not heard. */
  let generation = 0;
  let current: Job | null = null;
  let jobs = 0;
  /** Solvers lost since the job in hand was asked for. */
  let losses = 0;
  let silentTicks = 0;
  let pings = 0;
  let stopTick: (() => void) | null = null;

  const tell = (event: ClientEvent): void => handlers.forEach((handler) => handler(event));
  const post = (message: ToSolver): void => link?.port.post(message);

  const ask = (): void => {
    if (current === null) return;
    const { job, revision, cases, refine } = current;
    post({ type: 'solve', job, revision, cases, ...(refine === undefined ? {} : { refine }) });
  };

  const fail = (code: FailureCode, detail?: string): void => {
    if (current === null) return;
    const { job, revision } = current;
    current = null;
    tell({ type: 'failed', job, revision, code, message: detail ?? FAILURES[code] });
  };

  function launch(): void {
    const mine = ++generation;
    const stale = (): boolean => mine !== generation;
    phase = 'starting';
    silentTicks = 0;
    const up = (started: Link): void => {
      if (stale()) return started.kill();
      link = started;
      started.onExit(() => void (stale() || lost('solver-gone')));
      started.port.listen((message) => void (stale() || hear(message)));
    };
    start().then(up, () => void (stale() || lost('not-started')));
  }

  function drop(): void {
    generation++;
    link?.kill();
    link = null;
    phase = 'off';
  }

  function lost(code: FailureCode): void {
    drop();
    losses++;
    if (current?.cancelled) return fail('cancelled');
    if (losses > 1) return fail(code, `${FAILURES[code]} It was tried twice; the plan is unchanged.`);
    const repeated = current !== null;
    launch();
    tell({
      type: 'restarted',
      code,
      message: `${FAILURES[code]} It was started again${repeated ? ' and the run repeated' : ''}; the plan is unchanged.`,
      repeated,
    });
  }

  function hear(raw: unknown): void {
    const message = readFromSolver(raw);
    if (message === null) return;
    if (phase === 'starting') return greet(message);
    silentTicks = 0;
    if (!('job' in message) || message.job !== current?.job) return;
    if (message.type === 'done' || message.type === 'failed') current = null;
    tell(message);
  }

  function greet(message: FromSolver): void {
    if (message.type !== 'ready') return;
    if (message.protocol !== PROTOCOL_VERSION) {
      drop();
      return fail('other-version');
    }
    phase = 'ready';
    silentTicks = 0;
    ask();
  }

  function watch(): void {
    stopTick ??= after(TICK_MS, () => {
      stopTick = null;
      if (current === null) return;
      silentTicks++;
      if (phase === 'ready' && silentTicks === ASK_AFTER) post({ type: 'ping', id: ++pings });
      if (phase === 'ready' && silentTicks >= SILENCE_S) lost('solver-silent');
      else if (phase === 'starting' && silentTicks >= START_S) lost('not-started');
      watch();
    });
  }

  return {
    solve(cases, revision, { refine } = {}) {
      fail('superseded');
      const job = ++jobs;
      current = { job, revision, cases, refine };
      losses = 0;
      silentTicks = 0;
      if (phase === 'off') launch();
      else if (phase === 'ready') ask();
      watch();
      return job;
    },
    cancel() {
      if (current === null) return;
      current.cancelled = true;
      if (phase === 'ready') post({ type: 'cancel', job: current.job });
      else fail('cancelled');
    },
    busy: () => current !== null,
    listen(handler) {
      handlers.add(handler);
      return () => void handlers.delete(handler);
    },
    close() {
      stopTick?.();
      current = null;
      handlers.clear();
      drop();
    },
  };
}
