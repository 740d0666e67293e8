/**
 * The steady state of a body: F(u, t) = 0 at one time.
 *
 * Newton's method with the exact Jacobian, damped by the natural monotonicity test: a part λ of the step d is taken where the
 * simplified correction at its end, by the same Jacobian, is shorter than (1 − λ/4) |d|. It is a length in kelvin, so the test
 * knows no units and no scales. Where no part passes, time is used instead: steps of backward Euler, each allowed to
 * be longer the less the last one changed, until Newton takes over; they end in a state that is stable.
 * Source of the test: P. Deuflhard, Newton Methods for Nonlinear Problems, section 3.3 (from memory).
 */
import type { HeatSystem } from '../heat';

export type SteadySolution =
  | { readonly kind: 'steady'; readonly iterations: number }
  | { readonly kind: 'none'; readonly row: number; readonly kelvin: number; readonly finite: boolean };

/** Last change of a steady state, K. */
const CONVERGED = 1e-9;
const MOST_ITERATIONS = 60;
const SMALLEST_PART = 1 / 256;
/** Change that a step in time may bring, and the one that makes the next longer, K. */
const LARGEST_CHANGE = 200;
const SMALL_CHANGE = 20;
const MOST_TIME_STEPS = 400;
/** Steps this many times the pace see nothing but the steady state. */
const LONG = 1e6;

/**
 * Moves unknowns of a body that has entered an interval to its steady state at `time`. `pace` (s) is a first step in time, of
 * the order in which the body follows its surroundings.
 */
export function solveSteady(system: HeatSystem, unknowns: Float64Array, time: number, pace: number): SteadySolution {
  const newton = new Newton(system, unknowns, time);
  const first = newton.run();
  if (first.kind === 'steady') return first;
  let step = pace;
  for (let i = 0; i < MOST_TIME_STEPS; i++) {
    const kelvin = newton.stepInTime(step);
    if (kelvin <= LARGEST_CHANGE) {
      if (kelvin < SMALL_CHANGE) step *= 4;
    } else step /= 4;
    // Where nothing at all drives the body its Jacobian may be singular, and time is the only judge.
    if (kelvin < CONVERGED && step > LONG * pace) return { kind: 'steady', iterations: newton.iterations + i };
    if (i % 10 === 9 && kelvin < SMALL_CHANGE) {
      const again = newton.run();
      if (again.kind === 'steady') return again;
    }
  }
  return newton.run();
}

class Newton {
  private readonly system: HeatSystem;
  private readonly unknowns: Float64Array;
  private readonly time: number;
  private readonly change: Float64Array;
  private readonly trial: Float64Array;
  private readonly correction: Float64Array;
  iterations = 0;

  constructor(system: HeatSystem, unknowns: Float64Array, time: number) {
    this.system = system;
    this.unknowns = unknowns;
    this.time = time;
    this.change = new Float64Array(system.size);
    this.trial = new Float64Array(system.size);
    this.correction = new Float64Array(system.size);
  }

  /** Newton's method from the unknowns as they are; they move only where it converges. */
  run(): SteadySolution {
    const { system, unknowns } = this;
    const start = Float64Array.from(unknowns);
    let last = { kelvin: Infinity, row: 0 };
    for (let i = 0; i < MOST_ITERATIONS; i++) {
      this.iterations++;
      this.linearise();
      system.factorise(0, 1);
      this.residual(unknowns, this.change);
      system.solve(this.change);
      last = { ...system.largestChange(unknowns, this.change) };
      if (!(last.kelvin < Infinity)) break;
      const part = last.kelvin < CONVERGED ? 1 : this.partOf(last.kelvin);
      if (part === 0) break;
      for (let row = 0; row < system.size; row++) unknowns[row] += part * this.change[row];
      if (last.kelvin < CONVERGED) return { kind: 'steady', iterations: this.iterations };
    }
    unknowns.set(start);
    return { kind: 'none', row: last.row, kelvin: last.kelvin, finite: last.kelvin < Infinity };
  }

  /** The part of the change that may be taken, 1 or less; 0: none. */
  private partOf(kelvin: number): number {
    const { system, unknowns, change, trial, correction } = this;
    for (let part = 1; part >= SMALLEST_PART; part /= 2) {
      for (let row = 0; row < system.size; row++) trial[row] = unknowns[row] + part * change[row];
      this.residual(trial, correction);
      system.solve(correction);
      // Near the end rounding decides how short a correction can be.
      if (system.largestChange(trial, correction).kelvin <= Math.max((1 - part / 4) * kelvin, CONVERGED / 10)) return part;
    }
    return 0;
  }

  /** One step of backward Euler by one Newton iteration; taken where it changes no temperature too much. Its change in K. */
  stepInTime(step: number): number {
    const { system, unknowns, change } = this;
    this.linearise();
    system.factorise(1 / step, 1);
    this.residual(unknowns, change);
    system.solve(change);
    const { kelvin } = system.largestChange(unknowns, change);
    if (kelvin <= LARGEST_CHANGE) for (let row = 0; row < system.size; row++) unknowns[row] += change[row];
    return kelvin;
  }

  private linearise(): void {
    this.system.evaluate(this.unknowns, this.time);
    this.system.linearise(this.unknowns, this.time);
  }

  /** F at some unknowns, and what held ones have still to change. */
  private residual(at: Float64Array, out: Float64Array): void {
    this.system.evaluate(at, this.time);
    out.set(this.system.inflow);
    this.system.heldChanges(at, this.time, 0, out);
  }
}
