/**
 * The answering side of the conversation: runs jobs in slices and listens between them.
 *
 * A busy loop cannot hear a message, so a run is cut into slices of SLICE_MS; between two of them the port is heard, and a
 * cancel or a newer job takes effect. Nothing here knows a platform: the port, the clock and the way to let messages in are
 * given, so that tests run on made-up ones.
 */
import { checkProject, wordProblem, type Frames, type Outcome, type Project, type RunResult } from '../../model';
import type { Refining, Solving } from '../../planning';
import {
  FAILURES,
  PROTOCOL_VERSION,
  readToSolver,
  type FailureCode,
  type FromSolver,
  type Port,
  type ToSolver,
} from '../protocol';

/** Longest time without listening, ms. */
export const SLICE_MS = 25;
/** Shortest time between two words on progress, ms. */
export const PROGRESS_MS = 100;
/** Shortest time between two provisional answers, ms; also at least ANSWERS_SHARE times what the last ones cost. */
export const ANSWERS_MS = 250;
const ANSWERS_SHARE = 10;
/** Problems worded in one refusal; more would not be read. */
const MAX_PROBLEMS = 8;

export interface RunnerOptions {
  port: Port;
  start: (project: Project) => Solving;
  /** Begins to find the uncertainty of the answers of a run that has ended; without it they get none. */
  refine?: (project: Project, result: RunResult) => Refining;
  /** A clock that never runs backwards, ms. */
  now: () => number;
  /** Calls back after the messages that have arrived were heard. */
  later: (turn: () => void) => void;
  /** Where faults of ours are kept for those who mend them; the person gets a plain message. */
  log?: (fault: unknown) => void;
}

interface Job {
  readonly job: number;
  readonly revision: number;
  readonly projects: Project[];
  readonly outcomes: Outcome[];
  readonly refined: boolean;
  solving: Solving | null;
  refining: Refining | null;
  cancelled: boolean;
  fraction: number;
  nextProgress: number;
  nextAnswers: number;
}

/** Greets the port and answers it until `stop`. A fault inside a job fails that job; the runner goes on. */
export function startRunner({ port, start, refine, now, later, log }: RunnerOptions): { stop: () => void } {
  let current: Job | null = null;
  let turning = false;

  const post = (message: FromSolver, transfer?: ArrayBuffer[]): void => port.post(message, transfer);
  const fail = ({ job, revision }: { job: number; revision: number }, code: FailureCode, detail?: string): void =>
    post({ type: 'failed', job, revision, code, message: detail ?? FAILURES[code] });

  function hear(raw: unknown): void {
    const message = readToSolver(raw);
    if (message === null) return refuse(raw);
    switch (message.type) {
      case 'ping':
        return post({ type: 'pong', id: message.id });
      case 'cancel':
        if (current?.job === message.job) current.cancelled = true;
        return;
      case 'solve':
        return take(message);
      default:
        message satisfies never;
    }
  }

  /** Something that is none of our messages; answered where it names a job, so that nobody waits for it. */
  function refuse(raw: unknown): void {
    const { job, revision } = Object(raw) as { job?: unknown; revision?: unknown };
    if (!Number.isSafeInteger(job)) return log?.(new Error('a message was not understood'));
    fail({ job: job as number, revision: Number.isSafeInteger(revision) ? (revision as number) : 0 }, 'not-understood');
  }

  function take({ job, revision, cases, refine: asked }: Extract<ToSolver, { type: 'solve' }>): void {
    if (current !== null && job <= current.job) return fail({ job, revision }, 'superseded');
    if (current !== null) fail(current, 'superseded');
    current = null;
    const checked = readCases(cases);
    if ('problem' in checked) return fail({ job, revision }, 'invalid-project', checked.problem);
    const began = now();
    current = {
      job,
      revision,
      projects: checked.projects,
      outcomes: [],
      refined: asked ?? cases.length === 1,
      solving: null,
      refining: null,
      cancelled: false,
      fraction: 0,
      nextProgress: began + PROGRESS_MS,
      nextAnswers: began + ANSWERS_MS,
    };
    takeTurn();
  }

  function takeTurn(): void {
    if (turning) return;
    turning = true;
    later(turn);
  }

  function turn(): void {
    turning = false;
    if (current === null) return;
    const job = current;
    try {
      slice(job);
    } catch (fault) {
      log?.(fault);
      current = null;
      fail(job, 'broken', `${FAILURES.broken} ${fault instanceof Error ? fault.message : String(fault)}`);
    }
    if (current !== null) takeTurn();
  }

  function slice(job: Job): void {
    const until = now() + SLICE_MS;
    if (job.refining !== null) return sliceRefining(job, job.refining, until);
    const solving = (job.solving ??= start(job.projects[job.outcomes.length]));
    if (job.cancelled) solving.cancel();
    if (solving.advance(() => now() >= until)) endRun(job, solving);
    else reportWay(job, solving);
  }

  /** The run of a case is over: its answers go out, and are final unless their uncertainty is still sought. */
  function endRun(job: Job, solving: Solving): void {
    const ended = solving.result();
    const refining = (job.refined && !job.cancelled && refine?.(job.projects[job.outcomes.length], ended)) || null;
    const { frames, ...result } = ended;
    const about = aboutCase(job);
    post({ type: 'answers', ...about, final: refining === null, ...(refining === null ? {} : { refining: true }), result });
    post({ type: 'frames', ...about, frames }, buffersOf(frames));
    job.solving = null;
    job.refining = refining;
    if (refining === null) closeCase(job, result.outcome);
  }

  function sliceRefining(job: Job, refining: Refining, until: number): void {
    if (job.cancelled) refining.cancel();
    if (refining.advance(() => now() >= until)) {
      const { frames: _frames, ...result } = refining.result();
      post({ type: 'answers', ...aboutCase(job), final: true, result });
      job.refining = null;
      closeCase(job, result.outcome);
    } else if (now() >= job.nextProgress) {
      const { outcome, stages } = refining.result();
      const at = { time_s: outcome.reached_s, end_s: outcome.reached_s, stage: stages.at(-1)?.stage ?? '' };
      post({ type: 'progress', ...aboutCase(job), ...at, state: 'refining', fraction: refining.progress() });
      job.nextProgress = now() + PROGRESS_MS;
    }
  }

  const aboutCase = (job: Job) => ({ job: job.job, revision: job.revision, case: job.outcomes.length });

  function closeCase(job: Job, outcome: Outcome): void {
    job.outcomes.push(outcome);
    job.nextAnswers = now() + ANSWERS_MS;
    if (job.cancelled) while (job.outcomes.length < job.projects.length) job.outcomes.push(neverBegun());
    if (job.outcomes.length < job.projects.length) return;
    current = null;
    post({ type: 'done', job: job.job, revision: job.revision, outcomes: job.outcomes });
  }

  function reportWay(job: Job, solving: Solving): void {
    const about = aboutCase(job);
    if (now() >= job.nextProgress) {
      const { time_s, end_s, stage, fraction } = solving.progress();
      job.fraction = Math.min(1, Math.max(job.fraction, (job.outcomes.length + fraction) / job.projects.length));
      post({ type: 'progress', ...about, time_s, end_s, stage, fraction: job.fraction });
      job.nextProgress = now() + PROGRESS_MS;
    }
    const began = now();
    if (began >= job.nextAnswers) {
      const { frames: _frames, ...result } = solving.result();
      post({ type: 'answers', ...about, final: false, result });
      const ended = now();
      job.nextAnswers = ended + Math.max(ANSWERS_MS, ANSWERS_SHARE * (ended - began));
    }
  }

  const stopListening = port.listen(hear);
  post({ type: 'ready', protocol: PROTOCOL_VERSION });
  return {
    stop() {
      current = null;
      stopListening();
      port.close();
    },
  };
}

/** The cases as checked projects, or what keeps the first bad one from running, in words. */
function readCases(cases: unknown[]): { projects: Project[] } | { problem: string } {
  const projects: Project[] = [];
  for (const [index, document] of cases.entries()) {
    const read = checkProject(document);
    if (read.kind === 'project') projects.push(read.project);
    else {
      const words = read.kind === 'newer' ? [read.message] : read.problems.map(wordProblem);
      const shown = words.slice(0, MAX_PROBLEMS);
      if (words.length > shown.length) shown.push(`and ${words.length - shown.length} more`);
      return { problem: (cases.length > 1 ? `Case ${index + 1}: ` : '') + shown.join('\n') };
    }
  }
  return { projects };
}

const neverBegun = (): Outcome => ({ reason: 'cancelled', reached_s: 0, stage: null, message: 'Cancelled before it began.' });

/** Every buffer once: arrays may share one. */
function buffersOf(frames: Frames): ArrayBuffer[] {
  const buffers = Object.values(frames).map((array: Frames[keyof Frames]) => array.buffer as ArrayBuffer);
  return [...new Set(buffers)];
}
