/** Times worth stopping at: stage ends, crossings and extremes. */
import type { LaidCycle } from '../../solver/model';
import type { Answered } from '../../solver/service/protocol';
import { indexOfLargest } from '../draw';

export interface TimeEvent {
  /** Cycle time, s. */
  time: number;
  label: string;
}

/** Events nearer than this part of the cycle are one: the first named wins. */
const SAME = 1e-6;

/** All events of a cycle and its answers, in order of time; start and end are among them. */
export function eventsOf(laid: LaidCycle, result: Answered | null): TimeEvent[] {
  const stages = laid.stages.map(({ end, name }) => ({ time: end, label: `end of ${name}` }));
  const all = [{ time: 0, label: 'start' }, ...stages, ...(result === null ? [] : eventsOfResult(result, laid.end))];
  const events: TimeEvent[] = [];
  for (const event of all) {
    const inside = event.time >= 0 && event.time <= laid.end;
    if (inside && !events.some((other) => Math.abs(other.time - event.time) <= SAME * laid.end)) events.push(event);
  }
  return events.sort((a, b) => a.time - b.time);
}

const SPAN_WORDS = { holding: 'holds', fulfilled: 'fulfilled', violated: 'limit crossed' } as const;

function eventsOfResult({ answers, first, probes }: Answered, end: number): TimeEvent[] {
  const events: TimeEvent[] = [];
  for (const answer of answers) {
    for (const span of answer.spans) {
      if (span.kind === 'counting') continue;
      for (const time of [span.from_s, span.to_s]) events.push({ time, label: `${answer.name}: ${SPAN_WORDS[span.kind]}` });
    }
    if (answer.time_s !== null)
      events.push({ time: answer.time_s, label: answer.met ? `${answer.name}: met` : `${answer.name}: worst` });
  }
  if (first.slowest) events.push({ time: first.slowest.time_s, label: 'slowest point settles' });
  if (first.hottest) events.push({ time: first.hottest.time_s, label: 'hottest' });
  if (first.largestDifference) events.push({ time: first.largestDifference.time_s, label: 'largest difference' });
  for (const { name, time_s, temperature_C } of probes) {
    const top = indexOfLargest(temperature_C);
    if (top > 0 && time_s[top] < end) events.push({ time: time_s[top], label: `${name} at its highest` });
  }
  return events;
}

/** The first event after a time; null after the last. */
export const nextEvent = (events: readonly TimeEvent[], time: number): TimeEvent | null =>
  events.find((event) => event.time > time + tolerance(events)) ?? null;

/** The last event before a time; null before the first. */
export const previousEvent = (events: readonly TimeEvent[], time: number): TimeEvent | null =>
  events.findLast((event) => event.time < time - tolerance(events)) ?? null;

/** The event nearest to a time, within reach; null if none is. */
export function eventNear(events: readonly TimeEvent[], time: number, reach: number): TimeEvent | null {
  let best: TimeEvent | null = null;
  for (const event of events) {
    const distance = Math.abs(event.time - time);
    if (distance <= reach && (best === null || distance < Math.abs(best.time - time))) best = event;
  }
  return best;
}

const tolerance = (events: readonly TimeEvent[]): number => SAME * (events.at(-1)?.time ?? 0);
