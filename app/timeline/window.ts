/** The part of the time axis that is shown: zoomed, moved, and kept inside the cycle. All in s. */
import { clamp } from '../draw';

export type Range = [number, number];

/** The shortest window, as a part of the cycle. */
const SHORTEST = 1 / 2000;

/** The window made shorter (factor below 1) or longer round a time that stays where it is. */
export function zoomed([from, to]: Range, factor: number, around: number, end: number): Range {
  const length = clamp((to - from) * factor, end * SHORTEST, end);
  const share = to > from ? clamp((around - from) / (to - from), 0, 1) : 0.5;
  return placed(around - share * length, length, end);
}

/** The window moved by a time. */
export const moved = ([from, to]: Range, by: number, end: number): Range => placed(from + by, to - from, end);

/** The window as it is if it shows a time; else moved by whole pages until it does. */
export function following(range: Range, time: number, end: number): Range {
  const [from, to] = range;
  const length = to - from;
  if ((time >= from && time <= to) || !(length > 0)) return range;
  // A little of the page before stays in sight.
  return time > to ? placed(time - 0.1 * length, length, end) : placed(time - 0.9 * length, length, end);
}

function placed(from: number, length: number, end: number): Range {
  const start = clamp(from, 0, Math.max(0, end - length));
  return [start, Math.min(end, start + length)];
}
