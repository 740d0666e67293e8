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
import type { Quarters } from './quarters';
import { Table } from './table';

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
    return Course.through(this.in(rows[0]), this.in(rows[1]), this.in(rows[2]), this.in(rows[3]), this.in(rows[4]));
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

const NONE: readonly Instant[] = [];

/** Given times, handed out to the steps in which they lie. */
export class Instants {
  private readonly times: Float64Array;
  private next = 0;

  /** `times` ascending, s. */
  constructor(times: Float64Array) {
    this.times = times;
  }

  /** Those before the end of a step, or also at its end, that no earlier step had; to be asked once a step, in order. */
  upTo(end: 'before' | 'at', quarters: Quarters): readonly Instant[] {
    const { to } = quarters.step;
    const due = this.times[this.next];
    if (!(end === 'at' ? due <= to : due < to)) return NONE;
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
  private readonly table: Table;

  /** `start`: the profile at time 0, before any exposure acts; `end`: end of the cycle, s. */
  constructor(reading: ProbeReading, start: Float64Array, end: number) {
    this.reading = reading;
    this.atStart = reading.in(start);
    this.table = new Table(1, end);
  }

  observe(quarters: Quarters, course: Course, rows: readonly Instant[]): void {
    const { table } = this;
    const { from, to } = quarters.step;
    const samples = course.samples();
    const [before, after] = [samples[0].value, samples[samples.length - 1].value];
    if (table.empty) table.add([from, this.atStart], false);
    if (Math.abs(table.last(1) - before) > JUMP_K) table.add([from, before], false);
    if (samples.length > 2 || rows.length > 0) {
      const marked = samples
        .filter(({ value }) => Math.abs(value - before) > MARKED_K && Math.abs(value - after) > MARKED_K)
        .map(({ fraction }) => ({ fraction, time: quarters.time(fraction) }));
      for (const { time, fraction } of inOrder([...marked, ...rows])) table.add([time, course.at(fraction)], false);
    }
    table.add([to, after], true);
  }

  history(): ProbeHistory {
    const { probe, position_m } = this.reading;
    const [time_s, temperature_C] = [this.table.column(0), this.table.column(1)];
    return { probe: probe.id, name: probe.name, position_m, time_s, temperature_C };
  }
}

export class FieldRecorder {
  private readonly atStart: Extremes;
  private readonly table: Table;

  /** `start`: extremes of the profile at time 0, before any exposure acts; `end`: end of the cycle, s. */
  constructor(start: Extremes, end: number) {
    this.atStart = start;
    this.table = new Table(3, end);
  }

  observe(quarters: Quarters, field: FieldOverStep, rows: readonly Instant[]): void {
    const { table } = this;
    const { from, to } = quarters.step;
    if (table.empty) table.add([from, ...figuresOf(this.atStart)], false);
    const before = field.extremesAt(0);
    const jump =
      Math.abs(before.coldest.value - table.last(1)) > JUMP_K || Math.abs(before.hottest.value - table.last(2)) > JUMP_K;
    if (jump) table.add([from, ...figuresOf(before)], false);
    for (const { time, fraction } of inOrder(rows)) table.add([time, ...figuresOf(field.extremesAt(fraction))], false);
    table.add([to, ...figuresOf(field.extremesAt(1))], true);
  }

  history(): FieldHistory {
    const [time_s, coldest_C, hottest_C, withinMaterial_K] = [0, 1, 2, 3].map((column) => this.table.column(column));
    return { time_s, coldest_C, hottest_C, withinMaterial_K };
  }
}

const figuresOf = (extremes: Extremes): [number, number, number] => [
  extremes.coldest.value,
  extremes.hottest.value,
  differenceInPiece(extremes),
];

/** Instants strictly inside a step, ascending. */
const inOrder = (instants: readonly Instant[]): Instant[] =>
  instants.filter(({ fraction }) => fraction > 0 && fraction < 1).sort((a, b) => a.fraction - b.fraction);
