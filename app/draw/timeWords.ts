import { formatDuration } from '../../solver/model/quantities';
import { roundTo } from './ticks';
import { timeStep } from './timeTicks';

/** Parts of a window that a person can tell apart. */
const PARTS = 1000;

/** A time (s) as precise as a window of `span` seconds shows it: whole minutes of a long cycle, seconds of a short one. */
export function timeInWords(time: number, span: number): string {
  const step = timeStep(span / PARTS);
  const rounded = roundTo(time, step);
  return formatDuration(rounded, { exact: step < 60 });
}
