/**
 * The cycle laid out on the time axis: when stages start and end, and every schedule as straight pieces.
 *
 * All times here are cycle time in s. A line holds its first value before its first point and its last one after its last
 * point; two points at one time are a jump.
 */
import type { Exposure, PlainSchedule, Ramp, Segment, TemperatureSchedule } from './cycle';
import { FACES, type FaceId } from './part';
import type { Project } from './project';

/** Straight pieces through (time[i], value[i]); times never fall. */
export interface Line {
  time: number[];
  value: number[];
}

/** What a face meets during one stage, on cycle time. */
export type LaidExposure =
  | { kind: 'insulated' }
  | { kind: 'temperature'; temperature: Line }
  | { kind: 'flux'; flux: Line }
  | { kind: 'film'; coefficient: Line; surroundings: Line };

export interface LaidStage {
  id: string;
  name: string;
  start: number;
  end: number;
  setPoint: Line;
  exposures: Record<FaceId, LaidExposure>;
}

export interface LaidCycle {
  stages: LaidStage[];
  end: number;
  /** The set-point over the whole cycle. */
  setPoint: Line;
}

/** The value of a line at a time; at a jump `side` chooses: 'before' or 'after' (default). */
export function lineAt(line: Line, time: number, side: 'before' | 'after' = 'after'): number {
  const { time: t, value } = line;
  const last = t.length - 1;
  if (side === 'after' ? time < t[0] : time <= t[0]) return value[0];
  if (side === 'after' ? time >= t[last] : time > t[last]) return value[last];
  let i = 1;
  while (side === 'after' ? t[i] <= time : t[i] < time) i++;
  return value[i - 1] + ((value[i] - value[i - 1]) * (time - t[i - 1])) / (t[i] - t[i - 1]);
}

/** How long the segments last from `start` on, s. */
export function rampDuration(ramp: Ramp, start: number): number {
  let value = ramp.start ?? start;
  let length = 0;
  for (const segment of ramp.segments) {
    length += segmentDuration(segment, value);
    if ('to' in segment) value = segment.to;
  }
  return length;
}

/** How long a segment lasts that starts from `value`, s. */
export function segmentDuration(segment: Segment, value: number): number {
  if ('hold' in segment) return segment.hold;
  return 'duration' in segment ? segment.duration : Math.abs(segment.to - value) / segment.rate;
}

/** Straight pieces of a ramp that starts at cycle time `from` and is cut, or held, at `until`. */
function layRamp(ramp: Ramp, before: number, from: number, until: number): Line {
  let value = ramp.start ?? before;
  let now = from;
  const line: Line = { time: [from], value: [value] };
  for (const segment of ramp.segments) {
    const length = segmentDuration(segment, value);
    const next = 'to' in segment ? segment.to : value;
    if (now + length > until) {
      line.time.push(until);
      line.value.push(value + ((next - value) * (until - now)) / length);
      return line;
    }
    now += length;
    value = next;
    line.time.push(now);
    line.value.push(value);
  }
  if (now < until) {
    line.time.push(until);
    line.value.push(value);
  }
  return line;
}

const flat = (value: number, from: number, until: number): Line => ({ time: [from, until], value: [value, value] });
const endOf = (line: Line): number => line.value[line.value.length - 1];

/** The last values a face's own schedules reached, by quantity. */
type Reached = Record<'temperature' | 'surroundings' | 'flux' | 'coefficient', number | undefined>;
const nothingReached = (): Reached => ({
  temperature: undefined,
  surroundings: undefined,
  flux: undefined,
  coefficient: undefined,
});

/** The schedules inside an exposure, with the quantity whose last value they carry on from. */
export function schedulesOf(exposure: Exposure): { quantity: keyof Reached; schedule: TemperatureSchedule | PlainSchedule }[] {
  switch (exposure.kind) {
    case 'insulated':
      return [];
    case 'temperature':
      return [{ quantity: 'temperature', schedule: exposure.temperature }];
    case 'flux':
      return [{ quantity: 'flux', schedule: exposure.flux }];
    case 'film':
      return [
        { quantity: 'coefficient', schedule: exposure.coefficient },
        { quantity: 'surroundings', schedule: exposure.surroundings },
      ];
  }
}

/** Lays the cycle of a checked project on the time axis. Throws RangeError where crossCheck would have found a problem. */
export function layCycle(project: Pick<Project, 'cycle'>): LaidCycle {
  const { cycle } = project;
  const reached: Record<FaceId, Reached> = { start: nothingReached(), end: nothingReached() };
  const whole: Line = { time: [], value: [] };
  const stages: LaidStage[] = [];
  let setPointNow = cycle.setPoint.start;
  let now = 0;
  for (const stage of cycle.stages) {
    const setPointRamp: Ramp = stage.setPoint ?? { segments: [] };
    const length = 'after' in stage.end ? stage.end.after : longestSchedule(stage.exposures, setPointRamp, setPointNow, reached);
    const end = now + length;
    const setPoint = layRamp(setPointRamp, setPointNow, now, end);
    const exposures = {} as Record<FaceId, LaidExposure>;
    for (const face of FACES) exposures[face] = layExposure(stage.exposures[face], setPoint, reached[face], now, end);
    whole.time.push(...setPoint.time);
    whole.value.push(...setPoint.value);
    stages.push({ id: stage.id, name: stage.name, start: now, end, setPoint, exposures });
    setPointNow = endOf(setPoint);
    now = end;
  }
  return { stages, end: now, setPoint: whole };
}

/** Length of a stage that ends when every schedule in it is done, s. */
function longestSchedule(
  exposures: Record<FaceId, Exposure>,
  setPoint: Ramp,
  setPointNow: number,
  reached: Record<FaceId, Reached>,
): number {
  let longest = rampDuration(setPoint, setPointNow);
  for (const face of FACES) {
    for (const { quantity, schedule } of schedulesOf(exposures[face])) {
      if (typeof schedule === 'object' && 'segments' in schedule) {
        longest = Math.max(longest, rampDuration(schedule, startOf(schedule, reached[face][quantity])));
      }
    }
  }
  return longest;
}

function layExposure(exposure: Exposure, setPoint: Line, reached: Reached, from: number, until: number): LaidExposure {
  const lay = (quantity: keyof Reached, schedule: TemperatureSchedule | PlainSchedule): Line => {
    const line = laySchedule(schedule, setPoint, reached[quantity], from, until);
    reached[quantity] = endOf(line);
    return line;
  };
  switch (exposure.kind) {
    case 'insulated':
      return { kind: 'insulated' };
    case 'temperature':
      return { kind: 'temperature', temperature: lay('temperature', exposure.temperature) };
    case 'flux':
      return { kind: 'flux', flux: lay('flux', exposure.flux) };
    case 'film':
      return {
        kind: 'film',
        coefficient: lay('coefficient', exposure.coefficient),
        surroundings: lay('surroundings', exposure.surroundings),
      };
  }
}

function laySchedule(
  schedule: TemperatureSchedule | PlainSchedule,
  setPoint: Line,
  before: number | undefined,
  from: number,
  until: number,
): Line {
  if (typeof schedule === 'number') return flat(schedule, from, until);
  if ('follow' in schedule) return { time: [...setPoint.time], value: setPoint.value.map((value) => value + schedule.offset) };
  return layRamp(schedule, startOf(schedule, before), from, until);
}

function startOf(ramp: Ramp, before: number | undefined): number {
  const start = ramp.start ?? before;
  if (start === undefined) throw new RangeError('a schedule has no start value and nothing was reached before it');
  return start;
}
