/**
 * Explicit (forward Euler) with a chosen step.
 *
 *   S(u') = S + h F(u, t)      solved as  C d = h F + (E − S(u)),  u' = u + d,  E' = E + h F
 *
 * h [s] step, S heat stored, F heat flowing in, C = dS/du, E carried heat. Order 1 in time. Stable up to h = 2/λmax of the system
 * (stabilityLimit.ts); no overshoot up to the smallest capacity over conductance. Cost a step: one evaluation; with plain
 * control volumes C is diagonal. Source: any textbook, e.g. Hairer & Wanner, Solving ODEs II, section IV.2 (from memory).
 */
import type { HeatSystem } from '../heat';
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

  unknownAt(row: number, fraction: number): number {
    return this.last.unknownAt(row, fraction);
  }

  heatRateAt(heat: number): number {
    return this.last.heatRate(heat);
  }
}
