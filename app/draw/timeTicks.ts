/**
 * Ticks of elapsed time: 1-2-5-10-30 seconds and minutes, 1-2-6-12 hours, 1-2-7 days.
 *
 * Labels are plain numbers of the unit in the axis title as long as those stay short ("18", and whole days bold: "24 h");
 * far from the start, where they would not, they spell the time out ("38 h", "38 h 10 min").
 */
import { roundStep } from './ticks';

export type TimeUnit = 's' | 'min' | 'h' | 'd';

export interface TimeTick {
  /** Cycle time, s. */
  time: number;
  label: string;
  /** A whole one of the next larger unit. */
  strong: boolean;
}

export interface TimeTicks {
  major: TimeTick[];
  /** Times of the small ticks between, s. */
  minor: number[];
  /** Unit for the axis title; null where the labels spell it out. */
  unit: TimeUnit | null;
}

const LENGTH: Record<TimeUnit, number> = { s: 1, min: 60, h: 3600, d: 86400 };
const LARGER: Record<TimeUnit, { unit: TimeUnit; length: number } | null> = {
  s: { unit: 'min', length: 60 },
  min: { unit: 'h', length: 3600 },
  h: { unit: 'd', length: 86400 },
  d: null,
};
const STEPS = [
  ...[1, 2, 5, 10, 30],
  ...[1, 2, 5, 10, 30].map((minutes) => minutes * 60),
  ...[1, 2, 6, 12].map((hours) => hours * 3600),
  ...[1, 2, 7].map((days) => days * 86400),
];
/** Up to here labels in seconds, or in minutes, stay plain numbers, s. */
const PLAIN_UNTIL: Record<TimeUnit, number> = { s: 600, min: 6 * 3600, h: Infinity, d: Infinity };
/** Room a label needs, px. */
const PLAIN_GAP = 46;
const SPELT_GAP = 92;
const MINOR_GAP = 12;

/** Ticks between two cycle times (s) on an axis `width` pixels long. */
export function timeTicks(from: number, to: number, width: number): TimeTicks {
  if (!(to > from) || !(width > 0)) return { major: [], minor: [], unit: 's' };
  const perPixel = (to - from) / width;
  let step = stepOf(perPixel * PLAIN_GAP);
  let unit = unitOf(step);
  const plain = to <= PLAIN_UNTIL[unit];
  if (!plain) {
    step = stepOf(perPixel * SPELT_GAP);
    unit = unitOf(step);
  }
  const spelt = to > PLAIN_UNTIL[unit];
  const major = multiples(step, from, to).map((time) => (spelt ? speltTick(time) : plainTick(time, unit)));
  const small = minorStep(step, perPixel * MINOR_GAP);
  const minor = multiples(small, from, to).filter((time) => Math.abs(time / step - Math.round(time / step)) > 1e-6);
  return { major, minor, unit: spelt ? null : unit };
}

function stepOf(size: number): number {
  if (size < 1) return roundStep(size);
  return STEPS.find((step) => step >= size) ?? roundStep(size / STEPS[STEPS.length - 1]) * STEPS[STEPS.length - 1];
}

function unitOf(step: number): TimeUnit {
  if (step >= LENGTH.d) return 'd';
  if (step >= LENGTH.h) return 'h';
  return step >= LENGTH.min ? 'min' : 's';
}

/** The smallest step that divides `step` and keeps its ticks apart; `step` itself when there is none. */
function minorStep(step: number, size: number): number {
  if (step <= 1) return step / 5 >= size ? step / 5 : step;
  return STEPS.find((small) => small >= size && small < step && step % small === 0) ?? step;
}

function multiples(step: number, from: number, to: number): number[] {
  const times: number[] = [];
  for (let k = Math.ceil(from / step - 1e-9); k * step <= to + step * 1e-9; k++) times.push(Number((k * step).toPrecision(12)));
  return times;
}

const isWhole = (time: number, length: number): boolean => Math.abs(time / length - Math.round(time / length)) < 1e-9;

function plainTick(time: number, unit: TimeUnit): TimeTick {
  const larger = LARGER[unit];
  const strong = larger !== null && time > 0 && isWhole(time, larger.length);
  const number = String(Number((time / LENGTH[unit]).toPrecision(10)));
  return { time, label: strong ? `${number} ${unit}` : number, strong };
}

function speltTick(time: number): TimeTick {
  const hours = Math.floor(time / 3600 + 1e-9);
  const minutes = Math.floor((time - hours * 3600) / 60 + 1e-9);
  const seconds = Number((time - hours * 3600 - minutes * 60).toPrecision(6));
  if (seconds > 1e-6) return { time, label: `${minutes} min ${seconds} s`, strong: false };
  if (minutes > 0)
    return { time, label: hours > 0 ? `${hours} h ${String(minutes).padStart(2, '0')} min` : `${minutes} min`, strong: false };
  return { time, label: `${hours} h`, strong: true };
}
