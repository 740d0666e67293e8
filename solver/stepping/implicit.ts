/**
 * Implicit (backward Euler) with a chosen step.
 *
 *   S(u') = S + h F(u', t')
 *
 * h [s] step, S heat stored, F heat flowing in, ' = end of the step. Order 1 in time, L-stable, no overshoot with plain control
 * volumes whatever the step. Cost a step: two evaluations and one tridiagonal solve (thetaStep.ts); the matrix is factorised
 * once a step size. Source: any textbook, e.g. Hairer & Wanner, Solving ODEs II, section IV.3 (from memory).
 */
import type { HeatSystem } from '../heat';
import { EqualSteps } from './fixedSteps';
import type { Attempt, HeatState, Scheme } from './scheme';
import { ThetaStep } from './thetaStep';

export class Implicit implements Scheme {
  readonly method = 'Backward Euler';
  private readonly step: number;
  private readonly steps = new EqualSteps();
  private readonly theta: ThetaStep;

  /** `step` in s. */
  constructor(system: HeatSystem, state: HeatState, step: number) {
    this.step = step;
    this.theta = new ThetaStep(system, state);
  }

  leave(): void {}

  begin(): void {
    this.steps.reset();
  }

  propose(left: number): number {
    return this.steps.next(left, this.step);
  }

  attempt(time: number, length: number): Attempt {
    return this.theta.take(time, length, 1);
  }

  unknownAt(row: number, fraction: number): number {
    return this.theta.last.unknownAt(row, fraction);
  }

  heatRateAt(heat: number): number {
    return this.theta.last.heatRate(heat);
  }
}
