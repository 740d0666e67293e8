/**
 * The automatic scheme: a stiffly accurate Rosenbrock method on the pair of heat content and temperature.
 *
 *   E' = F(u, t),   0 = E − S(u)
 *
 * Stage i in transformed form, with C = dS/du and J = dF/du at the start of the step:
 *
 *   (C/γ − h J) U[i] = h F(u[i], t[i]) + D[i]/γ + Σ c[i][j] V[j] + d[i] h² ∂F/∂t,   D[i] = E[i] − S(u[i]),   V[i] = C U[i] − D[i]
 *   u[i] = u + Σ a[i][j] U[j],   E[i] = E + Σ a[i][j] V[j],   t[i] = t + τ[i] h
 *
 * The step adds the last point and its stage; the last U is the error estimate. A tracked heat Q is one more quantity like E:
 *
 *   W[i] = γ ( h (q + ∂q/∂u U[i]) + Σ c[i][j] W[j] + d[i] h² ∂q/∂t )
 *
 * so that the sum of E changes by the sum of Q to rounding at any tolerance. No iteration: one factorisation and eight solves.
 * A held unknown is the limit of an ever stronger film: U[i] = held(t[i]) − u[i] + d[i] h held', V[i] = 0; no order is lost.
 *
 * h [s] step, E [J] carried heat, S heat stored, F [W] heat flowing in, u unknowns; coefficients in rodas5pCoefficients.ts. Order 5
 * in time, L-stable. Sources: G. Steinebach, BIT Numerical Mathematics 63 (2023); Hairer & Wanner, Solving ODEs II, IV.7 and VI.4.
 */
import type { HeatSystem } from '../heat';
import { COUPLING, DENSE, GAMMA, POINTS, TIMES, TIME_SLOPES } from './rodas5pCoefficients';
import { ACCEPTED, REJECTED, type Attempt, type HeatState, type Scheme } from './scheme';
import { Stages } from './stages';
import { StepController } from './stepController';

const STAGES = POINTS.length;
const LAST = STAGES - 1;
const EMBEDDED_ORDER = 4;
/** Error of one step allowed, in parts of the wanted accuracy: steps add up, and the grid has its share. */
const LOCAL_PART = 0.3;
/**
 * The stock method takes the last stage alone as the error. Where dF/du changes within a step (a film coefficient on a steep ramp)
 * that stage can vanish by luck while the one before is large: an error of five accuracies went through. This part of the
 * stage before counts as well; where dF/du is constant it did not decide in any problem measured.
 */
const STAGE_BEFORE_PART = 0.2;
/** After a jump, the row that it hits hardest may move by this many local errors in the first step. */
const FIRST_STEP_ERRORS = 50;
/** The first step is never below this part of the cycle, nor any other below the second: time must still move. */
const SMALLEST_FIRST_STEP = 1e-12;
const SMALLEST_STEP = 1e-14;

export class Automatic implements Scheme {
  readonly method = 'RODAS5P, order 5(4)';
  private readonly system: HeatSystem;
  private readonly state: HeatState;
  private readonly localError: number;
  private readonly cycleEnd: number;
  private readonly controller = new StepController(EMBEDDED_ORDER);
  // Scratch, made once: the stage's point, its right-hand side (then U), D, and C U.
  private readonly point: Float64Array;
  private readonly carried: Float64Array;
  private readonly stage: Float64Array;
  private readonly lag: Float64Array;
  private readonly product: Float64Array;
  private readonly unknownStages: Stages;
  private readonly heatStages: Stages;
  private readonly throughStages: Stages;
  // The last accepted step, for dense output; its polynomials are worked out when first asked for.
  private readonly before: Float64Array;
  private readonly throughBefore: Float64Array;
  private readonly dense: Float64Array;
  private denseKnown = false;
  /** Size of the last stage but one, K. */
  private changeBefore = 0;
  private length = 0;
  /** F, ∂F/∂t and the rates of held unknowns at the end of the last interval, under its exposures. */
  private readonly inflowBefore: Float64Array;
  private readonly slopeBefore: Float64Array;
  private readonly heldRateBefore: Float64Array;
  private linearised = false;

  /** `accuracy` in K; `cycleEnd` in s. */
  constructor(system: HeatSystem, state: HeatState, accuracy: number, cycleEnd: number) {
    const column = () => new Float64Array(system.size);
    this.system = system;
    this.state = state;
    this.localError = LOCAL_PART * accuracy;
    this.cycleEnd = cycleEnd;
    this.point = column();
    this.carried = column();
    this.stage = column();
    this.lag = column();
    this.product = column();
    this.unknownStages = new Stages(system.size);
    this.heatStages = new Stages(system.size);
    this.throughStages = new Stages(system.heats);
    this.before = column();
    this.throughBefore = new Float64Array(system.heats);
    this.dense = new Float64Array(3 * system.size);
    this.inflowBefore = column();
    this.slopeBefore = column();
    this.heldRateBefore = column();
    this.controller.limit(0.1 * cycleEnd);
  }

  leave(time: number): void {
    this.look(time);
    this.inflowBefore.set(this.system.inflow);
    this.slopeBefore.set(this.system.inflowSlope);
    this.heldRateBefore.set(this.stage);
  }

  begin(time: number): void {
    this.look(time);
    this.controller.limit(Math.max(this.firstStep(), SMALLEST_FIRST_STEP * this.cycleEnd));
    this.linearised = true;
  }

  /** F and ∂F/∂t in the system, and the rates of held unknowns in the scratch of a stage. */
  private look(time: number): void {
    const { system, state } = this;
    system.evaluate(state.unknowns, time);
    system.linearise(state.unknowns, time);
    this.stage.fill(0);
    system.heldChanges(state.unknowns, time, 1, this.stage);
  }

  /** The step in which what changed at the edge, acting on each row alone, moves none by more than some local errors. */
  private firstStep(): number {
    const { system, inflowBefore, slopeBefore, heldRateBefore, localError } = this;
    const allowed = FIRST_STEP_ERRORS * localError;
    let first = Infinity;
    for (let row = 0; row < system.size; row++) {
      const heat = allowed * Math.abs(system.rowCapacity[row]);
      const jump = Math.abs(system.inflow[row] - inflowBefore[row]);
      const kink = Math.abs(system.inflowSlope[row] - slopeBefore[row]);
      const rate = Math.abs(this.stage[row] - heldRateBefore[row]);
      if (jump > 0) first = Math.min(first, heat / jump);
      if (kink > 0) first = Math.min(first, Math.sqrt(heat / kink));
      if (rate > 0) first = Math.min(first, allowed / rate);
    }
    return first;
  }

  propose(left: number): number {
    return this.controller.propose(left);
  }

  attempt(time: number, length: number): Attempt {
    const { system, state } = this;
    this.denseKnown = false;
    system.evaluate(state.unknowns, time);
    if (!this.linearised) {
      system.linearise(state.unknowns, time);
      this.linearised = true;
    }
    system.factorise(1 / GAMMA, length);
    this.point.set(state.unknowns);
    this.carried.set(state.stored);
    for (let i = 0; i < STAGES; i++) {
      const stageTime = time + TIMES[i] * length;
      if (i > 0) {
        this.moveToStage(i);
        system.evaluate(this.point, stageTime);
      }
      this.solveStage(i, stageTime, length);
      if (i === LAST - 1) this.changeBefore = system.largestChange(this.point, this.stage).kelvin;
    }
    const { kelvin, row } = system.largestChange(this.point, this.stage);
    const error = Math.max(kelvin, STAGE_BEFORE_PART * this.changeBefore) / this.localError;
    if (error <= 1) {
      this.controller.accept(length, error);
      this.accept(time + length, length);
      return ACCEPTED;
    }
    this.controller.reject(length, error < Infinity ? error : Infinity);
    if (this.controller.next >= SMALLEST_STEP * this.cycleEnd) return REJECTED;
    return { kind: 'failed', reason: error < Infinity ? 'step-too-small' : 'not-finite', row };
  }

  /** The point of stage i. From the seventh stage on it is the last point moved by the last stage. */
  private moveToStage(i: number): void {
    const { unknownStages, heatStages, point, carried, state } = this;
    if (i >= 6) {
      unknownStages.addStage(point, i - 1, point);
      heatStages.addStage(carried, i - 1, carried);
    } else {
      unknownStages.combine(state.unknowns, POINTS[i], point);
      heatStages.combine(state.stored, POINTS[i], carried);
    }
  }

  /** U, V and W of stage i, the system being evaluated at its point. */
  private solveStage(i: number, time: number, length: number): void {
    const { system, stage, lag, carried, product, heatStages, throughStages } = this;
    const { inflow, storage, inflowSlope } = system;
    const timeSlope = TIME_SLOPES[i] * length * length;
    for (let row = 0; row < system.size; row++) {
      const d = carried[row] - storage[row];
      lag[row] = d;
      stage[row] = length * inflow[row] + d / GAMMA + timeSlope * inflowSlope[row];
    }
    if (i > 0) heatStages.combine(stage, COUPLING[i], stage);
    system.heldChanges(this.point, time, TIME_SLOPES[i] * length, stage);
    system.solve(stage);
    system.capacityTimes(stage, product);
    this.unknownStages.store(i, stage);
    heatStages.storeDifference(i, product, lag);
    for (const row of system.heldRows) heatStages.set(row, i, 0);
    for (let heat = 0; heat < system.heats; heat++) {
      const rate = length * (system.rates[heat] + system.rateTimes(heat, stage)) + timeSlope * system.rateSlopes[heat];
      throughStages.set(heat, i, GAMMA * (rate + throughStages.sum(heat, COUPLING[i])));
    }
  }

  private accept(end: number, length: number): void {
    const { state, unknownStages, heatStages, throughStages } = this;
    this.before.set(state.unknowns);
    this.throughBefore.set(state.through);
    unknownStages.addStage(this.point, LAST, state.unknowns);
    heatStages.addStage(this.carried, LAST, state.stored);
    for (let heat = 0; heat < state.through.length; heat++) {
      state.through[heat] += throughStages.sum(heat, POINTS[LAST]) + throughStages.get(heat, LAST);
    }
    this.system.hold(state.unknowns, end, state.stored, state.through);
    this.length = length;
    this.linearised = false;
  }

  unknownAt(row: number, x: number): number {
    if (!this.denseKnown) this.workOutDense();
    const { dense } = this;
    const bend = dense[3 * row] + x * (dense[3 * row + 1] + x * dense[3 * row + 2]);
    return (1 - x) * this.before[row] + x * (this.state.unknowns[row] + (1 - x) * bend);
  }

  private workOutDense(): void {
    for (let row = 0; row < this.system.size; row++) {
      for (let m = 0; m < 3; m++) this.dense[3 * row + m] = this.unknownStages.sum(row, DENSE[m]);
    }
    this.denseKnown = true;
  }

  heatRateAt(heat: number, x: number): number {
    const [k1, k2, k3] = DENSE.map((weights) => this.throughStages.sum(heat, weights));
    const bend = k1 + x * (k2 + x * k3);
    const slope = this.state.through[heat] - this.throughBefore[heat] + (1 - 2 * x) * bend + x * (1 - x) * (k2 + 2 * x * k3);
    return slope / this.length;
  }
}
