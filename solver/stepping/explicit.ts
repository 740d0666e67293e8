/**
 * Explicit (forward Euler) with a chosen step.
 *
 *   S(u') = S + h F(u, t)      solved as  C d = h F + (E − S(u)),  u' = u + d,  E' = E + h F
 *
 * h [s] step, S heat stored, F heat flowing in, C = dS/du, E carried heat. Order 1 in time. Stable up to h = 2/λmax of the system
 * (stabilityLimit.ts), which is looked at again at every step where it changes; no overshoot up to the smallest capacity over
 * conductance. Cost a step: one evaluation; with plain
 * control volumes C is diagonal. Source: any textbook, e.g. Hairer & Wanner, Solving ODEs II, section IV.2 (from memory).
 */
import type { HeatSystem } from '../heat';
import { eigenvaluesBelow } from '../linear';
import { EqualSteps, StraightStep } from './fixedSteps';
import type { Attempt, HeatState, Scheme } from './scheme';

export class Explicit implements Scheme {
  readonly method = 'Forward Euler';
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly step: number;
  private readonly steps = new EqualSteps();
  private readonly last: StraightStep;
  private readonly change: Float64Array;
  private readonly inflow: Float64Array;
  private readonly through: Float64Array;

  /** `step` in s. */
  constructor(system: HeatSystem, state: HeatState, step: number) {
    this.system = system;
    this.state = state;
    this.step = step;
    this.last = new StraightStep(system, state);
    this.change = new Float64Array(system.size);
    this.inflow = new Float64Array(system.size);
    this.through = new Float64Array(system.heats);
  }

  leave(): void {}

  begin(): void {
    this.steps.reset();
  }

  propose(left: number): number {
    return this.steps.next(left, this.step);
  }

  attempt(time: number, length: number): Attempt {
    const { system, state, change, inflow, through } = this;
    this.last.start(length);
    system.evaluate(state.unknowns, time);
    system.linearise(state.unknowns, time);
    if (!system.linear) {
      const row = this.rowAboveLimit(length);
      if (row !== null) return { kind: 'failed', reason: 'step-above-limit', row };
    }
    for (let row = 0; row < system.size; row++) {
      inflow[row] = length * system.inflow[row];
      change[row] = inflow[row] + (state.stored[row] - system.storage[row]);
    }
    for (let heat = 0; heat < system.heats; heat++) through[heat] = length * system.rates[heat];
    system.heldChanges(state.unknowns, time + length, 0, change);
    system.factorise(1, 0);
    system.solve(change);
    return this.last.finish(change, inflow, through, time + length);
  }

  /** The fastest row, if a step of this length is above 2/λmax as things are now; null: it is not. */
  private rowAboveLimit(length: number): number | null {
    const matrix = this.system.evenOutRates();
    const { diagonal, beside } = matrix;
    const most = 2 / length;
    let [bound, fastest] = [0, 0];
    for (let row = 0; row < diagonal.length; row++) {
      const left = row > 0 ? Math.abs(beside[row - 1]) : 0;
      const right = row < diagonal.length - 1 ? Math.abs(beside[row]) : 0;
      bound = Math.max(bound, diagonal[row] + left + right);
      if (diagonal[row] > diagonal[fastest]) fastest = row;
    }
    // The largest sum of a row bounds every eigenvalue; only where that is above are they counted.
    return bound <= most || eigenvaluesBelow(matrix, most) === diagonal.length ? null : fastest;
  }

  unknownAt(row: number, fraction: number): number {
    return this.last.unknownAt(row, fraction);
  }

  heatRateAt(heat: number): number {
    return this.last.heatRate(heat);
  }
}
