/**
 * Crank–Nicolson with a chosen step and a damped start.
 *
 *   S(u') = S + h/2 [ F(u, t) + F(u', t') ]
 *
 * h [s] step, S heat stored, F heat flowing in, ' = end of the step. Order 2 in time, A-stable but not L-stable: after a jump the
 * stiff parts of a profile change sign at every step once h > 2/λmax, and die slowly (ringing). So a jump is followed by half
 * steps of backward Euler, which kill them and leave the order at 2: four by default, none is the plain scheme. Cost a step:
 * three evaluations and one tridiagonal solve (thetaStep.ts).
 * Source of the damped start: R. Rannacher, Numerische Mathematik 43 (1984) 309–327; four half steps: M. B. Giles & R. Carter, Journal
 * of Computational Finance 9 (2006) (both from memory).
 */
import type { HeatSystem } from '../heat';
import { EqualSteps } from './fixedSteps';
import type { Attempt, HeatState, Scheme } from './scheme';
import { ThetaStep } from './thetaStep';

export class CrankNicolson implements Scheme {
  readonly method: string;
  private readonly step: number;
  private readonly dampedSteps: number;
  private readonly steps = new EqualSteps();
  private readonly theta: ThetaStep;
  private dampedLeft = 0;

  /** `step` in s; `dampedSteps` half steps of backward Euler after every jump. */
  constructor(system: HeatSystem, state: HeatState, step: number, dampedSteps: number) {
    this.step = step;
    this.dampedSteps = dampedSteps;
    this.method =
      dampedSteps === 0 ? 'Crank–Nicolson' : `Crank–Nicolson, ${dampedSteps} half steps of backward Euler after a jump`;
    this.theta = new ThetaStep(system, state);
  }

  leave(): void {}

  /** A kink without a jump leaves the damping that is due as it is. */
  begin(_time: number, jumped: boolean): void {
    this.steps.reset();
    if (jumped) this.dampedLeft = this.dampedSteps;
  }

  propose(left: number): number {
    return this.steps.next(left, this.dampedLeft > 0 ? this.step / 2 : this.step);
  }

  attempt(time: number, length: number): Attempt {
    const attempt = this.theta.take(time, length, this.dampedLeft > 0 ? 1 : 0.5);
    if (this.dampedLeft > 0) this.dampedLeft--;
    return attempt;
  }

  unknownAt(row: number, fraction: number): number {
    return this.theta.last.unknownAt(row, fraction);
  }

  heatRateAt(heat: number): number {
    return this.theta.last.heatRate(heat);
  }
}
