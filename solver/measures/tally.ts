/** What is kept of a scalar while it is watched against a condition: when it held, its best and its worst. */
import { beyond, EQUAL_K, type Condition, type Course, type Stretch } from './course';
import type { Quarters } from './quarters';
import type { LaidWindow, Window } from './windows';

/** A value, with when and where. Stage by its index; place as a depth, m, or null where there is none to tell. */
export interface Moment {
  readonly time: number;
  readonly stage: number;
  readonly value: number;
  readonly position: number | null;
}

/** A stretch of cycle time in which the condition held without a break; over stage edges too. */
export interface Hold {
  readonly begin: Moment;
  to: number;
}

/** Times closer than this part of the cycle are one. */
export const SAME_TIME = 1e-12;

/** What a requirement speaks of, over the step in hand. */
export interface Subject {
  /** The course, and a cheaper one: exact at the eighths of the step and, where the course has no kinks, everywhere. */
  course(): Course;
  rough(): Course;
  /** Its place at a fraction of the step, m; null where it has none to tell. */
  placeAt(fraction: number): number | null;
}

export class Tally {
  readonly condition: Condition;
  readonly window: LaidWindow;
  private readonly slack: number;
  /** Holds inside what is looked at, in order. */
  readonly holds: Hold[] = [];
  /** Furthest on the good side of the limit, or nearest to it, and furthest on the bad side: where it counts. */
  best: Moment | null = null;
  worst: Moment | null = null;
  /** Best in all that is looked at. */
  bestEver: Moment | null = null;

  /** `end`: end of the cycle, s. */
  constructor(condition: Condition, window: LaidWindow, end: number) {
    this.condition = condition;
    this.window = window;
    this.slack = SAME_TIME * end;
  }

  /** Takes a step in. */
  observe(quarters: Quarters, subject: Subject): void {
    const { look, counts } = this.window;
    const looked = this.clip(look, quarters);
    if (looked === null) return;
    const rough = subject.rough();
    const course = this.isSettledBy(rough) ? rough : subject.course();
    const momentAt = (fraction: number, value: number): Moment => ({
      time: quarters.time(fraction),
      stage: quarters.step.stage,
      value,
      position: subject.placeAt(fraction),
    });
    for (const { from, to } of course.holds(this.condition, looked)) {
      const last = this.holds.at(-1);
      if (last !== undefined && quarters.time(from) <= last.to + this.slack) last.to = quarters.time(to);
      else this.holds.push({ begin: momentAt(from, course.at(from)), to: quarters.time(to) });
    }
    for (const { fraction, value } of course.samplesIn(looked)) {
      if (this.isBetter(value, this.bestEver)) this.bestEver = momentAt(fraction, value);
    }
    const counted = look === counts ? looked : this.clip(counts, quarters);
    if (counted === null) return;
    for (const { fraction, value } of course.samplesIn(counted)) {
      if (this.isBetter(value, this.best)) this.best = momentAt(fraction, value);
      if (this.isWorse(value, this.worst)) this.worst = momentAt(fraction, value);
    }
  }

  /**
   * Whether the rough course tells as much as the exact one: no limit anywhere near, and its best and worst are at the ends
   * of the step or of no account.
   */
  private isSettledBy(rough: Course): boolean {
    const [low, high] = rough.bounds();
    if (low <= this.condition.limit && this.condition.limit <= high) return false;
    if (rough.monotone) return true;
    return ![low, high].some(
      (value) => this.isBetter(value, this.bestEver) || this.isBetter(value, this.best) || this.isWorse(value, this.worst),
    );
  }

  // By more than rounding, so that a plateau is best, or worst, at its first instant.
  private isBetter(value: number, than: Moment | null): boolean {
    return than === null || this.margin(value) > this.margin(than.value) + EQUAL_K;
  }

  private isWorse(value: number, than: Moment | null): boolean {
    return than === null || this.margin(value) < this.margin(than.value) - EQUAL_K;
  }

  margin(value: number): number {
    return beyond(this.condition, value);
  }

  /**
   * The part of a step that lies in a window, in fractions; null where they share nothing. An instant belongs to the step
   * that ends with it; a stretch shares nothing with a step that only touches it.
   */
  private clip({ from, to }: Window, quarters: Quarters): Stretch | null {
    const { slack } = this;
    const { step } = quarters;
    if (from === to) {
      if (step.from >= to - slack || step.to < to - slack) return null;
      const fraction = step.to <= to + slack ? 1 : quarters.fraction(to);
      return { from: fraction, to: fraction };
    }
    if (step.to <= from + slack || step.from >= to - slack) return null;
    return {
      from: step.from >= from - slack ? 0 : quarters.fraction(from),
      to: step.to <= to + slack ? 1 : quarters.fraction(to),
    };
  }
}
