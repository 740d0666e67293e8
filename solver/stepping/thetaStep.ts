/**
 * One implicit step with one solve: backward Euler and Crank–Nicolson differ in one number.
 *
 *   S(u') = S + h [ (1 − θ) F(u, t) + θ F(u', t') ]      θ = 1 backward Euler, θ = 1/2 Crank–Nicolson
 *
 * u' by one Newton step from u, which is exact where S and F are linear in u:
 *
 *   (C − θ h J) d = h [ (1 − θ) F(u, t) + θ F(u, t') ] + (E − S(u)),   u' = u + d
 *   E' = E + h [ (1 − θ) F(u, t) + θ F(u', t') ]
 *
 * h [s] step, S heat stored, F heat flowing in, C = dS/du, J = dF/du at (u, t'), E carried heat, ' = end of the step. The carried heat
 * moves by the very fluxes of the new state, so it is kept whatever the solve left over; that is the lag of u' behind E'.
 */
import type { HeatSystem } from '../heat';
import { StraightStep } from './fixedSteps';
import type { Attempt, HeatState } from './scheme';

export class ThetaStep {
  /** The last step taken, for dense output. */
  readonly last: StraightStep;
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly atEnd: Float64Array;
  private readonly change: Float64Array;
  private readonly inflow: Float64Array;
  private readonly through: Float64Array;

  constructor(system: HeatSystem, state: HeatState) {
    this.system = system;
    this.state = state;
    this.last = new StraightStep(system, state);
    this.atEnd = new Float64Array(system.size);
    this.change = new Float64Array(system.size);
    this.inflow = new Float64Array(system.size);
    this.through = new Float64Array(system.heats);
  }

  take(time: number, length: number, theta: number): Attempt {
    const { system, state, atEnd, change, inflow, through } = this;
    const { unknowns, stored } = state;
    const end = time + length;
    this.last.start(length);
    inflow.fill(0);
    through.fill(0);
    if (theta < 1) this.addRates(unknowns, time, (1 - theta) * length);
    system.evaluate(unknowns, end);
    for (let row = 0; row < system.size; row++) {
      change[row] = inflow[row] + theta * length * system.inflow[row] + (stored[row] - system.storage[row]);
    }
    system.linearise(unknowns, end);
    system.heldChanges(unknowns, end, 0, change);
    system.factorise(1, theta * length);
    system.solve(change);
    for (let row = 0; row < system.size; row++) atEnd[row] = unknowns[row] + change[row];
    this.addRates(atEnd, end, theta * length);
    return this.last.finish(change, inflow, through, end);
  }

  /** Adds F and the tracked rates at (u, time), times a stretch of time. */
  private addRates(u: Float64Array, time: number, stretch: number): void {
    const { system, inflow, through } = this;
    system.evaluate(u, time);
    for (let row = 0; row < system.size; row++) inflow[row] += stretch * system.inflow[row];
    for (let heat = 0; heat < system.heats; heat++) through[heat] += stretch * system.rates[heat];
  }
}
