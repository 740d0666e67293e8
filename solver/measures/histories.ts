/**
 * Histories of probes and of the field: every step, every extreme of a probe inside a step, and every output row.
 *
 * Where a temperature jumps between two steps (a face whose temperature is imposed), there are two rows at one time.
 */
import { positionOf, type FieldHistory, type Probe, type ProbeHistory, type Project } from '../model';
import { stencilAt, type Stencil } from '../grid';
import type { FieldPoints } from '../stepping';
import { Course } from './course';
import { differenceInPiece, type Extremes } from './extremes';
import type { FieldOverStep } from './field';
import { Growing } from './growing';
import type { Quarters } from './quarters';

/** An extreme less marked than this is rounding, K. */
const MARKED_K = 1e-6;
/** A difference between the end of a step and the start of the next that is a jump, K. */
const JUMP_K = 1e-9;

/** A probe as it is read in every step. */
export class ProbeReading {
  readonly probe: Probe;
  readonly position_m: number;
  private readonly stencil: Stencil;

  constructor(project: Pick<Project, 'part'>, probe: Probe, points: FieldPoints) {
    const { position_m, layer } = positionOf(project.part, probe.at);
    this.probe = probe;
    this.position_m = position_m;
    this.stencil = stencilAt(points, position_m, layer);
  }

  /** Its temperature over a step, °C. */
  over({ rows }: Quarters): Course {
    const [v0, v1, v2, v3, v4] = rows.map((row) => this.in(row));
    return Course.through(v0, v1, v2, v3, v4);
  }

  /** Its temperature in one profile, °C. */
  in(profile: Float64Array): number {
    const { points, weights } = this.stencil;
    let sum = 0;
    for (let i = 0; i < points.length; i++) sum += weights[i] * profile[points[i]];
    return sum;
  }
}

/** An instant inside a step: its cycle time, s, and its fraction of the step. */
export interface Instant {
  readonly time: number;
  readonly fraction: number;
}

/** Given times, handed out to the steps in which they lie. */
export class Instants {
  private readonly times: Float64Array;
  private next = 0;

  /** `times` ascending, s. */
  constructor(times: Float64Array) {
    this.times = times;
  }

  /** Those before the end of a step, or also at its end, that no earlier step had; to be asked once a step, in order. */
  upTo(end: 'before' | 'at', quarters: Quarters): Instant[] {
    const { to } = quarters.step;
    const found: Instant[] = [];
    for (; this.next < this.times.length; this.next++) {
      const time = this.times[this.next];
      if (end === 'at' ? time > to : time >= to) break;
      found.push({ time, fraction: quarters.fraction(time) });
    }
    return found;
  }
}

export class ProbeRecorder {
  readonly reading: ProbeReading;
  private readonly atStart: number;
  private readonly time = new Growing();
  private readonly temperature = new Growing();

  /** `start`: the profile at time 0, before any exposure acts. */
  constructor(reading: ProbeReading, start: Float64Array) {
    this.reading = reading;
    this.atStart = reading.in(start);
  }

  observe(quarters: Quarters, course: Course, rows: readonly Instant[]): void {
    const samples = course.samples();
    const [before, after] = [samples[0].value, samples[samples.length - 1].value];
    const marked = samples
      .slice(1, -1)
      .filter(({ value }) => Math.abs(value - before) > MARKED_K && Math.abs(value - after) > MARKED_K)
      .map(({ fraction }) => ({ fraction, time: quarters.time(fraction) }));
    if (this.time.length === 0) this.push(quarters.step.from, this.atStart);
    if (Math.abs(this.temperature.last() - before) > JUMP_K) this.push(quarters.step.from, before);
    for (const { time, fraction } of inOrder([...marked, ...rows])) this.push(time, course.at(fraction));
    this.push(quarters.step.to, after);
  }

  private push(time: number, temperature: number): void {
    this.time.push(time);
    this.temperature.push(temperature);
  }

  history(): ProbeHistory {
    const { probe, position_m } = this.reading;
    return {
      probe: probe.id,
      name: probe.name,
      position_m,
      time_s: this.time.toArray(),
      temperature_C: this.temperature.toArray(),
    };
  }
}

export class FieldRecorder {
  private readonly atStart: Extremes;
  private readonly time = new Growing();
  private readonly coldest = new Growing();
  private readonly hottest = new Growing();
  private readonly within = new Growing();

  /** `start`: extremes of the profile at time 0, before any exposure acts. */
  constructor(start: Extremes) {
    this.atStart = start;
  }

  observe(quarters: Quarters, field: FieldOverStep, rows: readonly Instant[]): void {
    const { from, to } = quarters.step;
    if (this.time.length === 0) this.push(from, this.atStart);
    const before = field.extremesAt(0);
    if (this.differs(before)) this.push(from, before);
    for (const { time, fraction } of inOrder(rows)) this.push(time, field.extremesAt(fraction));
    this.push(to, field.extremesAt(1));
  }

  private differs({ coldest, hottest }: Extremes): boolean {
    return Math.abs(this.coldest.last() - coldest.value) > JUMP_K || Math.abs(this.hottest.last() - hottest.value) > JUMP_K;
  }

  private push(time: number, extremes: Extremes): void {
    this.time.push(time);
    this.coldest.push(extremes.coldest.value);
    this.hottest.push(extremes.hottest.value);
    this.within.push(differenceInPiece(extremes));
  }

  history(): FieldHistory {
    return {
      time_s: this.time.toArray(),
      coldest_C: this.coldest.toArray(),
      hottest_C: this.hottest.toArray(),
      withinMaterial_K: this.within.toArray(),
    };
  }
}

/** Instants strictly inside a step, ascending. */
const inOrder = (instants: readonly Instant[]): Instant[] =>
  instants.filter(({ fraction }) => fraction > 0 && fraction < 1).sort((a, b) => a.fraction - b.fraction);
