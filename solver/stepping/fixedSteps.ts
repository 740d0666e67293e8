/**
 * What the schemes of the textbooks share: a chosen step, and straight lines as dense output.
 *
 * A line between the ends of a step errs by h²/8 of the curvature: of the order of the best of these schemes. None of them
 * knows more of the inside of its step.
 */
import type { HeatSystem } from '../heat';
import { ACCEPTED, type Attempt, type HeatState } from './scheme';

/** Divides what is left of an interval into equal steps, none longer than wanted, so that the last one ends on the edge. */
export class EqualSteps {
  private wanted = 0;
  private length = 0;

  /** Forgets the division, at the start of an interval. */
  reset(): void {
    this.wanted = 0;
  }

  next(left: number, wanted: number): number {
    if (wanted !== this.wanted) {
      this.wanted = wanted;
      this.length = left / stepsIn(left, wanted);
    }
    return this.length;
  }
}

/** Number of equal steps no longer than `wanted`, but for rounding, in a stretch of time. */
export const stepsIn = (stretch: number, wanted: number): number => Math.max(1, Math.ceil((stretch / wanted) * (1 - 1e-9)));

/** The last step of a scheme, for its dense output. */
export class StraightStep {
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly before: Float64Array;
  private readonly throughBefore: Float64Array;
  private length = 0;

  constructor(system: HeatSystem, state: HeatState) {
    this.system = system;
    this.state = state;
    this.before = new Float64Array(state.unknowns.length);
    this.throughBefore = new Float64Array(state.through.length);
  }

  /** Before the state moves by a step of this length. */
  start(length: number): void {
    this.length = length;
    this.before.set(this.state.unknowns);
    this.throughBefore.set(this.state.through);
  }

  /**
   * Moves the state to `time`: unknowns by `change`, stored and tracked heats by what flowed in. Held unknowns come last,
   * and what their rows then store more came through the faces that hold them.
   */
  finish(change: Float64Array, inflow: Float64Array, through: Float64Array, time: number): Attempt {
    const { system, state } = this;
    const largest = system.largestChange(state.unknowns, change);
    if (!(largest.kelvin < Infinity)) return { kind: 'failed', reason: 'not-finite', row: largest.row };
    for (let row = 0; row < system.size; row++) {
      state.unknowns[row] += change[row];
      state.stored[row] += inflow[row];
    }
    for (let heat = 0; heat < system.heats; heat++) state.through[heat] += through[heat];
    system.hold(state.unknowns, time, state.stored, state.through);
    return ACCEPTED;
  }

  unknownAt(row: number, fraction: number): number {
    return this.before[row] + fraction * (this.state.unknowns[row] - this.before[row]);
  }

  heatRate(heat: number): number {
    return (this.state.through[heat] - this.throughBefore[heat]) / this.length;
  }
}
