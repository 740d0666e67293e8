/** Follows a scalar against a requirement, step by step: when it held, its best and its worst. Written from the definitions. */
import type { LaidCycle, Requirement } from '../../../solver/model';
import type { MarchedStep } from './march';
import type { Reading } from './subjects';

/** Samples a step, before extremes and crossings are closed in on. */
const SAMPLES = 4;

interface Point {
  time: number;
  value: number;
}

export interface ReferenceAnswer {
  verdict: 'met' | 'not-met' | 'never-reached';
  value: number | null;
  margin: number | null;
  /** Only where it is the time of a crossing: the first instant it holds, or the time when it was held long enough. */
  time: number | null;
  /** Least slope of the scalar at the crossings that the answer rests on, K/s; null where there is none. */
  slope: number | null;
}

interface Hold {
  from: Point;
  to: Point;
  fromSlope: number;
  toSlope: number;
}

export class Watch {
  private readonly requirement: Requirement;
  private readonly reading: Reading;
  private readonly end: number;
  /** Where it counts, and what has to be looked at. */
  private readonly counts: [number, number];
  private readonly looks: [number, number];
  private readonly latest: number | null;
  private readonly holds: Hold[] = [];
  private best: Point | null = null;
  private bestEver: Point | null = null;
  private worst: Point | null = null;
  private atEnd: number | null = null;

  constructor(requirement: Requirement, reading: Reading, cycle: LaidCycle) {
    const { counts, must } = requirement;
    const stageOf = (id: string) => cycle.stages.find((stage) => stage.id === id) ?? cycle.stages[0];
    this.requirement = requirement;
    this.reading = reading;
    this.end = cycle.end;
    this.latest = null;
    this.counts = [0, cycle.end];
    if (counts.kind === 'stage') this.counts = [stageOf(counts.stage).start, stageOf(counts.stage).end];
    if (counts.kind === 'within') {
      const from = counts.from === undefined ? 0 : stageOf(counts.from).start;
      this.latest = from + counts.time;
      this.counts = [from, Math.min(this.latest, cycle.end)];
    }
    if (counts.kind === 'stageEnd') this.counts = [stageOf(counts.stage).end, stageOf(counts.stage).end];
    this.looks = this.counts;
    if (counts.kind === 'within' && must.kind === 'reaches') this.looks = [this.counts[0], cycle.end];
    if (counts.kind === 'stageEnd' && must.kind === 'heldFor') this.looks = [0, this.counts[1]];
  }

  /** How far on the good side of the limit, K. */
  private beyond(value: number): number {
    const { must } = this.requirement;
    const upward =
      must.kind === 'staysAbove' || ((must.kind === 'reaches' || must.kind === 'heldFor') && must.sense === 'atLeast');
    return upward ? value - must.limit : must.limit - value;
  }

  /** Takes in the field at time 0, before it has moved. */
  observeStart(field: Float64Array): void {
    if (this.looks[0] > 0 || this.looks[1] === 0) return;
    const still = new Float64Array(field.length);
    const instant = { stage: 0, from: 0, to: 0, before: field, after: field, slopeBefore: still, slopeAfter: still };
    const point = { time: 0, value: this.reading(instant, 0) };
    this.noteExtremes([point]);
    if (this.beyond(point.value) >= 0) this.open(point, Infinity);
  }

  observe(step: MarchedStep): void {
    const { counts, looks } = this;
    const at = (fraction: number): number => this.reading(step, fraction);
    const timeAt = (fraction: number): number => step.from + fraction * (step.to - step.from);
    if (counts[0] === counts[1] && step.from < counts[0] && step.to >= counts[0] * (1 - 1e-13)) this.atEnd = at(1);
    const fractions = this.fractionsIn(step, looks);
    if (fractions === null) return;
    const samples = withExtremes(fractions, at);
    this.noteExtremes(samples.map(({ fraction, value }) => ({ time: timeAt(fraction), value })));
    for (let i = 0; i < samples.length; i++) {
      const { fraction, value } = samples[i];
      const before = samples[i - 1];
      if (before !== undefined && this.beyond(before.value) >= 0 !== this.beyond(value) >= 0) {
        const crossing = bisect((f) => this.beyond(at(f)), before.fraction, fraction);
        const by = 1e-3 * (fraction - before.fraction);
        const slope =
          Math.abs(at(Math.min(1, crossing + by)) - at(Math.max(0, crossing - by))) / (2 * by * (step.to - step.from));
        const point = { time: timeAt(crossing), value: at(crossing) };
        if (this.beyond(value) >= 0) this.open(point, slope);
        else this.extend(point, slope);
      }
      if (this.beyond(value) >= 0) {
        const point = { time: timeAt(fraction), value };
        const last = this.holds.at(-1);
        if (last === undefined || last.to.time < point.time - Math.max(step.to - step.from, 1e-9)) this.open(point, Infinity);
        else this.extend(point, Infinity);
      }
    }
  }

  private open(point: Point, slope: number): void {
    const last = this.holds.at(-1);
    if (last !== undefined && Math.abs(last.to.time - point.time) <= 1e-12 * this.end) return;
    this.holds.push({ from: point, to: point, fromSlope: slope, toSlope: Infinity });
  }

  private extend(point: Point, slope: number): void {
    const last = this.holds.at(-1);
    if (last === undefined) return this.open(point, slope);
    [last.to, last.toSlope] = [point, slope];
  }

  private fractionsIn(step: MarchedStep, [from, to]: [number, number]): number[] | null {
    const slack = 1e-12 * this.end;
    if (from === to || step.to <= from + slack || step.from >= to - slack) return null;
    const length = step.to - step.from;
    const low = Math.max(0, (from - step.from) / length);
    const high = Math.min(1, (to - step.from) / length);
    const equal = Array.from({ length: SAMPLES + 1 }, (_, i) => (i === SAMPLES ? high : low + ((high - low) * i) / SAMPLES));
    const edges = this.counts.map((time) => (time - step.from) / length).filter((fraction) => fraction > low && fraction < high);
    return [...equal, ...edges].sort((a, b) => a - b);
  }

  private noteExtremes(points: readonly Point[]): void {
    const slack = 1e-12 * this.end;
    for (const point of points) {
      const beyond = this.beyond(point.value);
      if (this.bestEver === null || beyond > this.beyond(this.bestEver.value)) this.bestEver = point;
      if (point.time < this.counts[0] - slack || point.time > this.counts[1] + slack) continue;
      if (this.best === null || beyond > this.beyond(this.best.value)) this.best = point;
      if (this.worst === null || beyond < this.beyond(this.worst.value)) this.worst = point;
    }
  }

  answer(): ReferenceAnswer {
    const { must, counts } = this.requirement;
    if (must.kind === 'heldFor') return this.held(must.duration, counts.kind === 'stageEnd');
    const told = (verdict: ReferenceAnswer['verdict'], value: number): ReferenceAnswer => ({
      verdict,
      value,
      margin: this.beyond(value),
      time: null,
      slope: null,
    });
    if (counts.kind === 'stageEnd') {
      const value = this.atEnd ?? NaN;
      return told(this.beyond(value) >= 0 ? 'met' : 'not-met', value);
    }
    if (must.kind !== 'reaches') {
      const value = this.worst?.value ?? NaN;
      return told(this.beyond(value) >= 0 ? 'met' : 'not-met', value);
    }
    return this.reaches(told);
  }

  private reaches(told: (verdict: ReferenceAnswer['verdict'], value: number) => ReferenceAnswer): ReferenceAnswer {
    const { holds, best, bestEver, latest } = this;
    const value = best?.value ?? NaN;
    if (latest === null) {
      if (holds.length === 0) return told('never-reached', value);
      return { ...told('met', value), ...crossingOf(holds[0].from, holds[0].fromSlope) };
    }
    if (holds.length === 0) return { ...told('never-reached', bestEver?.value ?? NaN), margin: null };
    const margin = latest - holds[0].from.time;
    const crossing = crossingOf(holds[0].from, holds[0].fromSlope);
    return { verdict: margin >= 0 ? 'met' : 'not-met', value, margin, ...crossing };
  }

  private held(duration: number, upToEnd: boolean): ReferenceAnswer {
    const lengthOf = ({ from, to }: Hold): number => to.time - from.time;
    const { holds } = this;
    const slopeOf = (hold: Hold): number | null => finite(Math.min(hold.fromSlope, hold.toSlope));
    if (holds.length === 0) return { verdict: 'never-reached', value: 0, margin: -duration, time: null, slope: null };
    if (upToEnd) {
      const last = holds[holds.length - 1];
      const length = last.to.time >= this.counts[1] * (1 - 1e-12) ? lengthOf(last) : 0;
      const verdict = length >= duration ? 'met' : 'not-met';
      return { verdict, value: length, margin: length - duration, time: null, slope: slopeOf(last) };
    }
    const longest = holds.reduce((most, hold) => (lengthOf(hold) > lengthOf(most) ? hold : most));
    const first = holds.find((hold) => lengthOf(hold) >= duration);
    const margin = lengthOf(longest) - duration;
    if (first === undefined) return { verdict: 'not-met', value: lengthOf(longest), margin, time: null, slope: slopeOf(longest) };
    const time = first.fromSlope === Infinity ? null : first.from.time + duration;
    return { verdict: 'met', value: lengthOf(longest), margin, time, slope: slopeOf(longest) };
  }
}

const finite = (value: number): number | null => (Number.isFinite(value) ? value : null);

/** A requirement that holds from the start of its window has no crossing. */
const crossingOf = ({ time }: Point, slope: number): { time: number | null; slope: number | null } =>
  slope === Infinity ? { time: null, slope: null } : { time, slope };

function withExtremes(fractions: readonly number[], at: (fraction: number) => number): { fraction: number; value: number }[] {
  const samples = fractions.map((fraction) => ({ fraction, value: at(fraction) }));
  const found: { fraction: number; value: number }[] = [];
  // At the ends of a step the slope tells whether an extreme lies before the next sample.
  const last = samples.length - 1;
  for (const [end, inner] of [
    [samples[0], samples[1]],
    [samples[last], samples[last - 1]],
  ] as const) {
    const beside = at(end.fraction + 1e-4 * (inner.fraction - end.fraction));
    const sign = Math.sign(beside - end.value);
    if (sign * (inner.value - end.value) <= 0 && sign !== 0) found.push(golden((f) => sign * at(f), ...ordered(end, inner), at));
  }
  for (let i = 1; i + 1 < samples.length; i++) {
    const [a, b, c] = [samples[i - 1], samples[i], samples[i + 1]];
    const sign = b.value > a.value && b.value >= c.value ? 1 : b.value < a.value && b.value <= c.value ? -1 : 0;
    if (sign !== 0) found.push(golden((f) => sign * at(f), a.fraction, c.fraction, at));
  }
  return [...samples, ...found].sort((a, b) => a.fraction - b.fraction);
}

const ordered = (a: { fraction: number }, b: { fraction: number }): [number, number] => [
  Math.min(a.fraction, b.fraction),
  Math.max(a.fraction, b.fraction),
];

function golden(
  f: (x: number) => number,
  from: number,
  to: number,
  at: (fraction: number) => number,
): { fraction: number; value: number } {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let [a, b] = [from, to];
  let [x, y] = [b - ratio * (b - a), a + ratio * (b - a)];
  let [fx, fy] = [f(x), f(y)];
  for (let i = 0; i < 40; i++) {
    if (fx > fy) {
      [b, y, fy] = [y, x, fx];
      x = b - ratio * (b - a);
      fx = f(x);
    } else {
      [a, x, fx] = [x, y, fy];
      y = a + ratio * (b - a);
      fy = f(y);
    }
  }
  const fraction = 0.5 * (a + b);
  return { fraction, value: at(fraction) };
}

function bisect(f: (x: number) => number, from: number, to: number): number {
  const positive = f(from) >= 0;
  let [a, b] = [from, to];
  for (let i = 0; i < 60; i++) {
    const middle = 0.5 * (a + b);
    if (f(middle) >= 0 === positive) a = middle;
    else b = middle;
  }
  return 0.5 * (a + b);
}
