import { evaluatorOf, lineAt, TIME_VARIABLES, type Course } from '../../model';
import type { Interval } from '../system';

/** A quantity over time inside one interval, its ends taken from inside. */
export interface CourseInside {
  at(time: number): number;
  /** Rate of change, per s. */
  slopeAt(time: number): number;
}

export const NO_COURSE: CourseInside = { at: () => 0, slopeAt: () => 0 };

/** Half the width of a difference in time, as a part of the interval. */
const TIME_PART = 1e-6;

export function courseInside(course: Course, interval: Interval): CourseInside {
  return 'expression' in course
    ? new ExpressionInside(evaluatorOf(course.expression, TIME_VARIABLES), course.stageStart, interval)
    : new StraightInside(lineAt(course, interval.from, 'after'), lineAt(course, interval.to, 'before'), interval);
}

/** value + slope × (time since the interval began) */
class StraightInside implements CourseInside {
  private readonly from: number;
  private readonly value: number;
  private readonly slope: number;

  constructor(first: number, last: number, { from, to }: Interval) {
    this.from = from;
    this.value = first;
    this.slope = (last - first) / (to - from);
  }

  at(time: number): number {
    return this.value + this.slope * (time - this.from);
  }

  slopeAt(): number {
    return this.slope;
  }
}

class ExpressionInside implements CourseInside {
  private readonly evaluate: (values: ArrayLike<number>) => number;
  private readonly stageStart: number;
  private readonly interval: Interval;
  private readonly values = [0, 0];

  constructor(evaluate: (values: ArrayLike<number>) => number, stageStart: number, interval: Interval) {
    this.evaluate = evaluate;
    this.stageStart = stageStart;
    this.interval = interval;
  }

  at(time: number): number {
    this.values[0] = time - this.stageStart;
    this.values[1] = time;
    return this.evaluate(this.values);
  }

  slopeAt(time: number): number {
    return timeSlope((at) => this.at(at), time, this.interval);
  }
}

/** Slope of a function of time by a central difference, one-sided at the ends of the interval. */
export function timeSlope(value: (time: number) => number, time: number, { from, to }: Interval): number {
  const half = TIME_PART * (to - from);
  const before = Math.max(from, time - half);
  const after = Math.min(to, time + half);
  return (value(after) - value(before)) / (after - before);
}
