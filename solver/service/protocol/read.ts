/**
 * What arrives is checked before use. Projects inside `solve` are checked by the runner as any foreign plan is; results
 * come from our own solver, so that only the shape of their message is looked at.
 */
import { z } from 'zod';
import type { Frames, Outcome, Project } from '../../model';
import { FAILURES, type FailureCode } from './failures';
import type { Answered, FromSolver, ToSolver } from './messages';

export const MAX_CASES = 10000;

const whole = z.int().min(0);
const isObject = (value: unknown): boolean => typeof value === 'object' && value !== null && !Array.isArray(value);
const isList = (value: unknown): boolean => Array.isArray(value);

const toSolverSchema = z.discriminatedUnion('type', [
  z.object({
    type: z.literal('solve'),
    job: whole,
    revision: whole,
    cases: z.array(z.custom<Project>(isObject)).min(1).max(MAX_CASES),
    refine: z.boolean().optional(),
  }),
  z.object({ type: z.literal('cancel'), job: whole }),
  z.object({ type: z.literal('ping'), id: whole }),
]);

const about = { job: whole, revision: whole };
const aboutCase = { ...about, case: whole };
const answered = z.custom<Answered>((value) => isObject(value) && isList((value as Answered).answers));
const frames = z.custom<Frames>((value) => isObject(value) && ArrayBuffer.isView((value as Frames).temperature_C));
const outcome = z.custom<Outcome>((value) => isObject(value) && typeof (value as Outcome).reason === 'string');

const fromSolverSchema = z.discriminatedUnion('type', [
  z.object({ type: z.literal('ready'), protocol: whole }),
  z.object({ type: z.literal('pong'), id: whole }),
  z.object({
    type: z.literal('progress'),
    ...aboutCase,
    time_s: z.number(),
    end_s: z.number(),
    stage: z.string(),
    state: z.literal('refining').optional(),
    fraction: z.number().min(0).max(1),
  }),
  z.object({ type: z.literal('answers'), ...aboutCase, final: z.boolean(), refining: z.boolean().optional(), result: answered }),
  z.object({ type: z.literal('frames'), ...aboutCase, frames }),
  z.object({ type: z.literal('done'), ...about, outcomes: z.array(outcome) }),
  z.object({
    type: z.literal('failed'),
    ...about,
    code: z.enum(Object.keys(FAILURES) as [FailureCode, ...FailureCode[]]),
    message: z.string(),
  }),
]);

/** A message as the solver hears it; null when it is none of ours. */
export function readToSolver(message: unknown): ToSolver | null {
  const read = toSolverSchema.safeParse(message);
  return read.success ? read.data : null;
}

/** A message from the solver; null when it is none of ours. */
export function readFromSolver(message: unknown): FromSolver | null {
  const read = fromSolverSchema.safeParse(message);
  return read.success ? read.data : null;
}
