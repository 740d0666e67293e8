/**
 * What a scheme is: the arithmetic of one step in time. Everything else belongs to the run loop.
 *
 * Duties of a scheme:
 * 1. It is made for one HeatSystem and one HeatState, and moves that state; it knows no dimension, no exposure, no layer.
 * 2. `leave` and `begin` tell it that an interval ends and that the next has begun (the system has entered it); what it needs
 *    to remember across is its own affair. `begin` says whether anything jumped in between. The first interval has no `leave`.
 * 3. `propose` says how far it would step, given what is left of the interval: never further, and `left` itself, or all but
 *    rounding of it, to end on the edge.
 * 4. `attempt` takes one step from `time`. Accepted: the state is that of the end. Rejected: the state is untouched, and the
 *    next proposal is shorter. Failed: the step cannot be taken, with the row where it went wrong. Never an exception.
 * 5. Heat is moved, not made: `stored` changes by what `through` says came in, to rounding, at every accepted step.
 * 6. After an accepted step `unknownAt` is the scheme's own dense output at a fraction of that step, and `heatRateAt` the rate of
 *    a tracked heat by it. Both hold until the next attempt.
 */
import type { HeatSystem } from '../heat';

/** The state of a run. The pair of heat and temperature is carried side by side: 0 = stored − S(unknowns) but for a lag. */
export interface HeatState {
  /** The unknowns of the HeatSystem. */
  readonly unknowns: Float64Array;
  /** Heat carried by every row, J per basis. */
  readonly stored: Float64Array;
  /** Tracked heats since the start, positive into the body, J per basis. */
  readonly through: Float64Array;
}

export function startState(system: HeatSystem): HeatState {
  const unknowns = system.initial();
  system.evaluate(unknowns, 0);
  return { unknowns, stored: Float64Array.from(system.storage), through: new Float64Array(system.heats) };
}

export type Attempt =
  | { readonly kind: 'accepted' }
  | { readonly kind: 'rejected' }
  | { readonly kind: 'failed'; readonly reason: FailedStep; readonly row: number };

/** Why a step cannot be taken. */
export type FailedStep = 'not-finite' | 'step-too-small' | 'not-converged' | 'step-above-limit';

export const ACCEPTED: Attempt = { kind: 'accepted' };
export const REJECTED: Attempt = { kind: 'rejected' };

export interface Scheme {
  /** Name of the method, for the record. */
  readonly method: string;
  leave(time: number): void;
  begin(time: number, jumped: boolean): void;
  propose(left: number): number;
  attempt(time: number, length: number): Attempt;
  unknownAt(row: number, fraction: number): number;
  heatRateAt(heat: number, fraction: number): number;
}
