/**
 * The conversation between an app (or command) and its solver: plain data over a port.
 *
 * Both ways in one place: a job is asked for by `solve`, answered by progress, answers and frames, and ended by exactly one
 * `done` or `failed`. A newer revision of a plan supersedes the older job.
 */
import type { Frames, Outcome, Project, RunResult } from '../../model';

/** Carried by the first message; a solver and an app of different versions do not talk. */
export const PROTOCOL_VERSION = 1;

export type ToSolver =
  | { type: 'solve'; job: number; revision: number; cases: Project[] }
  | { type: 'cancel'; job: number }
  | { type: 'ping'; id: number };

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
      fraction: number;
    }
  /** All that is known of a case except its frames; `final` says that nothing will change any more. */
  | { type: 'answers'; job: number; revision: number; case: number; final: boolean; result: Omit<RunResult, 'frames'> }
  /** Frames of a case, their buffers transferred. */
  | { type: 'frames'; job: number; revision: number; case: number; frames: Frames }
  | { type: 'done'; job: number; revision: number; outcomes: Outcome[] }
  | { type: 'failed'; job: number; revision: number; code: FailureCode; message: string };

/** Why a job could not be carried out: cancelled, connection lost, refused and broken are four different things. */
export const FAILURES = {
  cancelled: 'The run was cancelled.',
  superseded: 'A newer edit took the place of this run.',
  'not-understood': 'The solver did not understand the message.',
  'invalid-project': 'The plan has a problem that keeps it from running.',
  'solver-gone': 'The solver ended and was started again.',
  'solver-silent': 'The solver did not answer any more and was started again.',
  broken: 'The solver met a fault of its own.',
} as const;
export type FailureCode = keyof typeof FAILURES;
