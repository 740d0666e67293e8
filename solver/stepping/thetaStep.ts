/**
 * One implicit step: backward Euler and Crank–Nicolson differ in one number.
 *
 *   S(u') = E + h [ (1 − θ) F(u, t) + θ F(u', t') ]      θ = 1 backward Euler, θ = 1/2 Crank–Nicolson
 *
 * u' by Newton's method from u, with r what the equation lacks at the iterate v:
 *
 *   r(v) = E + h [ (1 − θ) F(u, t) + θ F(v, t') ] − S(v),   (C − θ h J) d = r(v),   v ← v + λ d
 *   E' = E + h [ (1 − θ) F(u, t) + θ F(u', t') ]
 *
 * h [s] step, S heat stored, F heat flowing in, C = dS/du and J = dF/du at (v, t'), both exact, E carried heat, ' = end of the step. Where
 * S and F are linear the first iterate is the answer, and no other is sought. λ is 1, or halved until what lacks gets less.
 * The carried heat moves by the very fluxes of the new state, so it is kept whatever the solve left over; that is the lag of u'
 * behind E'. Cost of an iteration: an evaluation, a factorisation and a solve.
 */
import type { HeatSystem } from '../heat';
import { StraightStep } from './fixedSteps';
import type { Attempt, HeatState } from './scheme';

/** Newton is done when its last change is below this, K: it doubles its digits, so that what is left is rounding. */
const CONVERGED_K = 1e-7;
const MOST_ITERATIONS = 40;
const SMALLEST_PART = 1 / 64;

export class ThetaStep {
  /** The last step taken, for dense output. */
  readonly last: StraightStep;
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly iterate: Float64Array;
  private readonly trial: Float64Array;
  private readonly lacking: Float64Array;
  private readonly change: Float64Array;
  private readonly inflow: Float64Array;
  private readonly through: Float64Array;

  constructor(system: HeatSystem, state: HeatState) {
    const column = () => new Float64Array(system.size);
    this.system = system;
    this.state = state;
    this.last = new StraightStep(system, state);
    this.iterate = column();
    this.trial = column();
    this.lacking = column();
    this.change = column();
    this.inflow = column();
    this.through = new Float64Array(system.heats);
  }

  take(time: number, length: number, theta: number): Attempt {
    const { system, state, iterate, change, inflow, through } = this;
    const end = time + length;
    this.last.start(length);
    inflow.fill(0);
    through.fill(0);
    if (theta < 1) {
      system.evaluate(state.unknowns, time);
      this.addRates((1 - theta) * length);
    }
    const failed = this.solve(end, theta * length);
    if (failed !== null) return failed;
    this.addRates(theta * length);
    for (let row = 0; row < system.size; row++) change[row] = iterate[row] - state.unknowns[row];
    return this.last.finish(change, inflow, through, end);
  }

  /** Newton's iterate at `end`, the system evaluated there; or why there is none. `weight` is θ h. */
  private solve(end: number, weight: number): Attempt | null {
    const { system, state, iterate, trial, change, lacking } = this;
    // Held unknowns are known beforehand: from here on nothing is asked of them.
    change.fill(0);
    system.heldChanges(state.unknowns, end, 0, change);
    for (let row = 0; row < system.size; row++) iterate[row] = state.unknowns[row] + change[row];
    let size = this.evaluate(iterate, end, weight);
    for (let i = 0; ; i++) {
      system.linearise(iterate, end);
      change.set(lacking);
      system.heldChanges(iterate, end, 0, change);
      system.factorise(1, weight);
      system.solve(change);
      const { kelvin, row } = system.largestChange(iterate, change);
      if (!(kelvin < Infinity)) return { kind: 'failed', reason: 'not-finite', row };
      let part = 1;
      for (;;) {
        for (let k = 0; k < system.size; k++) trial[k] = iterate[k] + part * change[k];
        const next = this.evaluate(trial, end, weight);
        const better = next <= (1 - part / 4) * size || system.linear || kelvin < CONVERGED_K;
        if (better || part <= SMALLEST_PART) {
          size = next;
          break;
        }
        part /= 2;
      }
      iterate.set(trial);
      if (system.linear || (part === 1 && kelvin < CONVERGED_K)) return null;
      if (i + 1 === MOST_ITERATIONS) return { kind: 'failed', reason: 'not-converged', row };
    }
  }

  /** Evaluates at (v, end), writes what is lacking, and returns its size: the sum over rows, held ones left out. */
  private evaluate(v: Float64Array, end: number, weight: number): number {
    const { system, state, lacking, inflow } = this;
    system.evaluate(v, end);
    let size = 0;
    for (let row = 0; row < system.size; row++) {
      lacking[row] = state.stored[row] + inflow[row] + weight * system.inflow[row] - system.storage[row];
      size += Math.abs(lacking[row]);
    }
    for (const row of system.heldRows) size -= Math.abs(lacking[row]);
    return size;
  }

  /** Adds F and the tracked rates where the system was evaluated last, times a stretch of time. */
  private addRates(stretch: number): void {
    const { system, inflow, through } = this;
    for (let row = 0; row < system.size; row++) inflow[row] += stretch * system.inflow[row];
    for (let heat = 0; heat < system.heats; heat++) through[heat] += stretch * system.rates[heat];
  }
}
