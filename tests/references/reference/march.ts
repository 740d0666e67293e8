/** Takes a body through its cycle by ESDIRK4(3), every stage by Newton's method with the exact matrix. */
import type { LaidCycle, LaidStage } from '../../../solver/model';
import { courseCorners, FACES, type LaidExposure } from '../../../solver/model';
import type { Body, Instant } from './body';
import { EMBEDDED, GAMMA, LAST, TIMES, WEIGHTS } from './esdirk';
import { solveTridiagonal } from './tridiagonal';

const STAGES = 6;
const MOST_ITERATIONS = 14;

/** Temperatures and their slopes, K/s, at both ends of a step: a cubic in between. */
export interface MarchedStep {
  readonly stage: number;
  readonly from: number;
  readonly to: number;
  readonly before: Float64Array;
  readonly after: Float64Array;
  readonly slopeBefore: Float64Array;
  readonly slopeAfter: Float64Array;
}

/** Times at which something in a stage has a corner or a jump, from its start to its end. */
export function cornersOf(stage: LaidStage): number[] {
  const times = new Set([stage.start, stage.end]);
  const add = (time: number): void => {
    const slack = 1e-12 * stage.end;
    if (time > stage.start + slack && time < stage.end - slack) times.add(time);
  };
  for (const face of FACES) coursesOf(stage.exposures[face]).forEach((course) => courseCorners(course).forEach(add));
  for (const { power } of stage.sources) courseCorners(power as Parameters<typeof courseCorners>[0]).forEach(add);
  return [...times].sort((a, b) => a - b);
}

function coursesOf(exposure: LaidExposure) {
  switch (exposure.kind) {
    case 'insulated':
      return [];
    case 'temperature':
      return [exposure.temperature];
    case 'flux':
      return [exposure.flux];
    case 'film':
      return [
        exposure.surroundings,
        ...(exposure.coefficient.kind === 'course' ? [exposure.coefficient.course] : []),
        ...(exposure.radiation === null ? [] : [exposure.radiation.enclosure]),
      ];
  }
}

export class March {
  private readonly body: Body;
  private readonly tolerance: number;
  private readonly y: Float64Array;
  /** States of reactions. */
  private readonly r: Float64Array;
  private readonly trial: Float64Array;
  private readonly trialR: Float64Array;
  private readonly flows: Float64Array[]; // dE/dt × volume at each stage
  private readonly rates: Float64Array[];
  private readonly known: Float64Array;
  private readonly knownR: Float64Array;
  private readonly oldHeat: Float64Array;
  private readonly change: Float64Array;
  private readonly scratch: Float64Array;
  /** What one kelvin of the range of temperatures holds, latent heat spread over it, J/(m³·K): weighs errors of heat content. */
  private readonly meanCapacity: readonly number[];
  steps = 0;

  /** `tolerance`: local error allowed in a step, K. */
  constructor(body: Body, temperature: ArrayLike<number>, tolerance: number, range: readonly [number, number]) {
    const array = (): Float64Array => new Float64Array(body.nodes);
    this.body = body;
    this.tolerance = tolerance;
    this.y = body.unknownsOf(temperature);
    this.r = Float64Array.from(body.kinetics, (kinetics) => kinetics?.start ?? 0);
    [this.trial, this.trialR, this.known, this.knownR] = [array(), array(), array(), array()];
    [this.oldHeat, this.change, this.scratch] = [array(), array(), array()];
    this.flows = Array.from({ length: STAGES }, array);
    this.rates = Array.from({ length: STAGES }, array);
    this.meanCapacity = body.chain.substances.map(
      (substance) => (substance.heatAt(range[1]).heat - substance.heatAt(range[0]).heat) / (range[1] - range[0]),
    );
  }

  /** Temperatures now. */
  temperature(): Float64Array {
    this.body.read(this.y);
    return this.body.temperature.slice();
  }

  /** Through the whole cycle; `observe` sees every step. */
  through(cycle: LaidCycle, observe: (step: MarchedStep) => void): void {
    cycle.stages.forEach((stage, index) => {
      const corners = cornersOf(stage);
      for (let i = 1; i < corners.length; i++) this.interval(stage, index, corners[i - 1], corners[i], observe);
    });
  }

  private interval(stage: LaidStage, index: number, from: number, until: number, observe: (step: MarchedStep) => void): void {
    const drift = 1e-6 * (until - from);
    let now = from;
    let size = 1e-7 * (until - from);
    this.settleFaces({ stage, time: from, side: 'after' });
    this.firstFlows({ stage, time: from, side: 'after' });
    let before = this.ends({ stage, time: from, side: 'after' }, drift);
    while (now < until) {
      const left = until - now;
      const length = size >= left * (1 - 1e-9) ? left : size > 0.5 * left ? 0.5 * left : size;
      const to = length === left ? until : now + length;
      const error = this.tryStep(stage, now, length, until);
      if (!(error <= 1)) {
        size = length * (Number.isFinite(error) ? Math.max(0.2, 0.85 * error ** -0.25) : 0.2);
        if (size < 1e-14 * until) throw new Error(`the reference cannot go on at ${now} s`);
        continue;
      }
      this.accept();
      // Never a look back over the corner that the interval began with.
      const after = this.ends({ stage, time: to, side: 'before' }, Math.min(drift, 0.5 * (to - from)));
      observe({
        stage: index,
        from: now,
        to,
        before: before.temperature,
        after: after.temperature,
        slopeBefore: before.slope,
        slopeAfter: after.slope,
      });
      this.steps++;
      before = after;
      now = to;
      size = length * Math.min(4, 0.85 * Math.max(error, 1e-8) ** -0.25);
    }
  }

  /** Local error as a part of what is allowed; infinite where Newton's method fails. */
  private tryStep(stage: LaidStage, now: number, size: number, until: number): number {
    const { body, y, r, trial, trialR, known, knownR, flows, rates, oldHeat } = this;
    const { volume } = body.chain;
    body.read(y);
    oldHeat.set(body.heat);
    trial.set(y);
    for (let s = 1; s < STAGES; s++) {
      for (let i = 0; i < body.nodes; i++) {
        let flow = 0;
        let rate = 0;
        for (let j = 0; j < s; j++) {
          flow += WEIGHTS[s][j] * flows[j][i];
          rate += WEIGHTS[s][j] * rates[j][i];
        }
        known[i] = volume[i] * oldHeat[i] + size * flow;
        knownR[i] = r[i] + size * rate;
      }
      const time = now + TIMES[s] * size;
      const instant: Instant = { stage, time, side: time >= until * (1 - 1e-14) ? 'before' : 'after' };
      if (!this.solveStage(instant, size * GAMMA, rates[s])) return Infinity;
      for (let i = 0; i < body.nodes; i++) {
        flows[s][i] = volume[i] > 0 ? (volume[i] * body.heat[i] - known[i]) / (size * GAMMA) : 0;
      }
    }
    return this.errorOf(size, trialR);
  }

  /** Newton's method for volume × heat = known + weight × balance; nodes of no volume: balance = 0. */
  private solveStage(instant: Instant, weight: number, rates: Float64Array): boolean {
    const { body, trial, trialR, known, knownR, change, scratch, tolerance } = this;
    const { volume } = body.chain;
    const { balance, lower, diagonal, upper, heat, heatSlope, temperatureSlope } = body;
    for (let iteration = 0; iteration < MOST_ITERATIONS; iteration++) {
      body.read(trial);
      body.assemble(instant);
      body.addReactions(knownR, weight, trialR, rates);
      for (let i = 0; i < body.nodes; i++) {
        const w = volume[i] > 0 ? weight : 1;
        change[i] = w * balance[i] + (volume[i] > 0 ? known[i] - volume[i] * heat[i] : 0);
        lower[i] *= -w;
        upper[i] *= -w;
        diagonal[i] = (volume[i] > 0 ? volume[i] * heatSlope[i] : 0) - w * diagonal[i];
      }
      solveTridiagonal(lower, diagonal, upper, change, scratch);
      let largest = 0;
      for (let i = 0; i < body.nodes; i++) {
        trial[i] += change[i];
        largest = Math.max(largest, this.kelvinsOf(i, change[i], temperatureSlope[i]));
      }
      if (!Number.isFinite(largest)) return false;
      if (largest <= 1e-4 * tolerance) {
        body.read(trial);
        return true;
      }
    }
    return false;
  }

  /** A change of an unknown as a temperature; of heat content by the mean capacity where temperature hardly follows. */
  private kelvinsOf(node: number, change: number, slope: number): number {
    const { layer, substances, volume } = this.body.chain;
    if (volume[node] === 0 || !substances[layer[node]].latent) return Math.abs(change);
    return Math.abs(change) * Math.max(slope, 1 / this.meanCapacity[layer[node]]);
  }

  private errorOf(size: number, states: Float64Array): number {
    const { body, change, scratch, flows, rates } = this;
    const { volume } = body.chain;
    for (let i = 0; i < body.nodes; i++) {
      change[i] = 0;
      if (volume[i] === 0) continue;
      for (let s = 0; s < STAGES; s++) change[i] += size * (LAST[s] - EMBEDDED[s]) * flows[s][i];
    }
    // The matrix of the last iteration of the last stage still stands: it damps what is stiff.
    solveTridiagonal(body.lower, body.diagonal, body.upper, change, scratch);
    let largest = 0;
    for (let i = 0; i < body.nodes; i++) {
      let error = this.kelvinsOf(i, change[i], body.temperatureSlope[i]);
      const kinetics = body.kinetics[i];
      if (kinetics !== null) {
        let off = 0;
        for (let s = 0; s < STAGES; s++) off += size * (LAST[s] - EMBEDDED[s]) * rates[s][i];
        // As a part of the state: a reaction of degree 1, or an age, is wanted to the same part as the range of temperatures.
        error = Math.max(error, (100 * Math.abs(off)) / Math.max(1, Math.abs(states[i])));
      }
      largest = Math.max(largest, error);
    }
    return largest / this.tolerance;
  }

  private accept(): void {
    this.y.set(this.trial);
    for (let i = 0; i < this.body.nodes; i++) if (this.body.kinetics[i] !== null) this.r[i] = this.trialR[i];
    this.flows[0].set(this.flows[STAGES - 1]);
    this.rates[0].set(this.rates[STAGES - 1]);
  }

  /** Flows and rates at the start of an interval: the explicit first stage. */
  private firstFlows(instant: Instant): void {
    const { body, y, r, rates, flows, trialR } = this;
    body.read(y);
    body.assemble(instant);
    body.addReactions(r, 0, trialR, rates[0]);
    for (let i = 0; i < body.nodes; i++) flows[0][i] = body.chain.volume[i] > 0 ? body.balance[i] : 0;
  }

  /** Brings the nodes of no volume into balance with their neighbours, whose heat stays. */
  private settleFaces(instant: Instant): void {
    const { body, y, change } = this;
    for (let iteration = 0; iteration < 50; iteration++) {
      body.read(y);
      body.assemble(instant);
      this.solveFaces((i) => -body.balance[i]);
      let largest = 0;
      for (let i = 0; i < body.nodes; i++) {
        if (body.chain.volume[i] > 0) continue;
        y[i] += change[i];
        largest = Math.max(largest, Math.abs(change[i]));
      }
      if (largest <= 1e-4 * this.tolerance) return;
    }
    throw new Error('the faces do not settle');
  }

  /** Leaves in `change` what solves the assembled balances of the nodes of no volume; `right`: of all, cells as given. */
  private solveFaces(right: (node: number) => number, cell: (node: number) => number = () => 0): void {
    const { body, change, scratch } = this;
    const { lower, diagonal, upper } = body;
    for (let i = 0; i < body.nodes; i++) {
      const isCell = body.chain.volume[i] > 0;
      change[i] = isCell ? cell(i) : right(i);
      if (isCell) [lower[i], diagonal[i], upper[i]] = [0, 1, 0];
    }
    solveTridiagonal(lower, diagonal, upper, change, scratch);
  }

  /** Temperatures and their slopes at an end of a step; nodes of no volume follow their neighbours. */
  private ends(instant: Instant, by: number): { temperature: Float64Array; slope: Float64Array } {
    const { body, y, flows, change } = this;
    const { volume } = body.chain;
    body.read(y);
    body.assemble(instant);
    const drift = body.faceDrift(instant, by);
    const last = body.nodes - 1;
    this.solveFaces(
      (i) => -(i === 0 && volume[0] === 0 ? drift[0] : 0) - (i === last ? drift[1] : 0),
      (i) => flows[0][i] / (volume[i] * body.heatSlope[i]),
    );
    return {
      temperature: body.temperature.slice(),
      slope: Float64Array.from(change, (value, i) => value * body.temperatureSlope[i]),
    };
  }

  /** Backward Euler with growing steps until nothing changes: the steady state under the exposures of a stage. */
  toSteady(stage: LaidStage): void {
    const { body, y, trial, known, knownR, rates } = this;
    const instant: Instant = { stage, time: stage.start, side: 'after' };
    for (let size = 1; size < 1e14; size *= 4) {
      body.read(y);
      for (let i = 0; i < body.nodes; i++) known[i] = body.chain.volume[i] * body.heat[i];
      trial.set(y);
      knownR.set(this.r);
      if (!this.solveStage(instant, size, rates[0])) throw new Error('no steady state was found');
      y.set(trial);
    }
  }
}
