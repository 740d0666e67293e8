/** A course as straight pieces that can be drawn. */
import { courseAt, type Course, type Line } from '../../solver/model';

const PIECES = 120;

/** The corners of a line as they are; an expression of time at equal times from `from` to `until` (cycle time, s). */
export function courseLine(course: Course, from: number, until: number): Line {
  if (!('expression' in course)) return course;
  const time = Array.from({ length: PIECES + 1 }, (_, i) => from + (i / PIECES) * (until - from));
  return { time, value: time.map((at) => courseAt(course, at)) };
}
