/**
 * The conversation between an app (or command) and its solver: plain data over a port.
 *
 * Both ways in one place. The solver speaks first: `ready`, with its version. A job is asked for by `solve`, answered by
 * progress, answers and frames, and ended by exactly one `done` or `failed`. A newer job supersedes the older one; `cancel`
 * ends a running job by a `done` whose outcome is `cancelled` and whose answers reach as far as the run came.
 */
import type { Frames, Outcome, Project, RunResult } from '../../model';
import type { FailureCode } from './failures';

/** Carried by the first message; a solver and an app of different versions do not talk. */
export const PROTOCOL_VERSION = 1;

export type ToSolver =
  /**
   * Job numbers rise; `revision` is the plan's, and comes back with every message about the job. At least one case. `refine`:
   * whether the answers shall get their numerical uncertainty; absent, those of a single case do.
   */
  | { type: 'solve'; job: number; revision: number; cases: Project[]; refine?: boolean | undefined }
  | { type: 'cancel'; job: number }
  | { type: 'ping'; id: number };

/** A run without its frames, which travel by themselves. */
export type Answered = Omit<RunResult, 'frames'>;

export type FromSolver =
  | { type: 'ready'; protocol: number }
  | { type: 'pong'; id: number }
  /** Simulated time of the case in hand, and the part of the whole job done (0 to 1, never backwards). */
  | {
      type: 'progress';
      job: number;
      revision: number;
      case: number;
      time_s: number;
      end_s: number;
      stage: string;
      /** 'refining': the run is over, and its answers are on the way to their uncertainty; the fraction counts that way. */
      state?: 'refining' | undefined;
      fraction: number;
    }
  /**
   * All that is known of a case except its frames; `final` says that nothing will change any more. `refining`: the run is
   * over and its frames follow at once; only uncertainties, and with them verdicts that become thin, are still to come.
   */
  | {
      type: 'answers';
      job: number;
      revision: number;
      case: number;
      final: boolean;
      refining?: boolean | undefined;
      result: Answered;
    }
  /** Frames of a case, their buffers transferred. */
  | { type: 'frames'; job: number; revision: number; case: number; frames: Frames }
  /** One outcome a case; a case that was never begun is `cancelled` at 0 s. */
  | { type: 'done'; job: number; revision: number; outcomes: Outcome[] }
  | { type: 'failed'; job: number; revision: number; code: FailureCode; message: string };

/** Messages about a job, as opposed to the connection. */
export type AboutJob = Extract<FromSolver, { job: number }>;
