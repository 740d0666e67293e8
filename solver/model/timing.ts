/**
 * The cycle laid out on the time axis: when stages start and end, and every schedule as straight pieces.
 *
 * All times here are cycle time in s. A line holds its first value before its first point and its last one after its last
 * point; two points at one time are a jump.
 */
import type { Stage } from './cycle';
import type { Coefficient, Correlation, Exposure } from './exposure';
import { evaluatorOf } from './expressions';
import type { PlainSchedule, Ramp, Segment, TemperatureSchedule } from './schedule';
import { TIME_VARIABLES } from './schedule';
import { FACES, type FaceId } from './part';
import type { Project } from './project';

/** Straight pieces through (time[i], value[i]); times never fall. */
export interface Line {
  time: number[];
  value: number[];
}

/** A quantity given as an expression of t (time since `stageStart`) and clock (cycle time); smooth, without kinks. */
export interface TimeExpression {
  expression: string;
  stageStart: number;
}

/** A quantity over cycle time. */
export type Course = Line | TimeExpression;

/** A film coefficient: over time; over the temperature of the face (and time, by expression of Ts, t and clock); by correlation. */
export type LaidCoefficient =
  | { kind: 'course'; course: Line }
  | { kind: 'table'; table: [number, number][] }
  | { kind: 'expression'; expression: string; stageStart: number }
  | ({ kind: 'correlation' } & Correlation);

/** What a face meets during one stage, on cycle time. Radiation alone is a film of coefficient 0 with radiation. */
export type LaidExposure =
  | { kind: 'insulated' }
  | { kind: 'temperature'; temperature: Course }
  | { kind: 'flux'; flux: Course }
  | {
      kind: 'film';
      coefficient: LaidCoefficient;
      surroundings: Course;
      radiation: { emissivity: number; enclosure: Course } | null;
    };

/** Heat given off in a layer during one stage, W/m³: over time, or by an expression of T, x (depth), t and clock. */
export interface LaidSource {
  /** Index of the layer. */
  layer: number;
  power: Line | { expression: string; stageStart: number };
}

export interface LaidStage {
  id: string;
  name: string;
  start: number;
  end: number;
  setPoint: Line;
  exposures: Record<FaceId, LaidExposure>;
  sources: LaidSource[];
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

/** The value of a course at a time; at a jump `side` chooses. Throws RangeError for an expression that crossCheck would refuse. */
export function courseAt(course: Course, time: number, side: 'before' | 'after' = 'after'): number {
  if (!('expression' in course)) return lineAt(course, time, side);
  return evaluatorOf(course.expression, TIME_VARIABLES)([time - course.stageStart, time]);
}

/** Times at which a course has a corner or a jump. */
export const courseCorners = (course: Course): readonly number[] => ('expression' in course ? [] : course.time);

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

/** The quantities that schedules give. */
export type ScheduledQuantity = 'temperature' | 'surroundings' | 'flux' | 'coefficient' | 'enclosure' | 'power';
/** The last values that the own schedules of a face, or of a layer's source, reached, by quantity. */
type Reached = Partial<Record<ScheduledQuantity, number>>;
type AnySchedule = TemperatureSchedule | PlainSchedule;

/** The schedules over time inside an exposure, with the quantity whose last value they carry on from. */
export function schedulesOf(exposure: Exposure): { quantity: ScheduledQuantity; schedule: AnySchedule }[] {
  switch (exposure.kind) {
    case 'insulated':
      return [];
    case 'temperature':
      return [{ quantity: 'temperature', schedule: exposure.temperature }];
    case 'flux':
      return [{ quantity: 'flux', schedule: exposure.flux }];
    case 'radiation':
      return [{ quantity: 'enclosure', schedule: exposure.enclosure }];
    case 'film': {
      const { coefficient, surroundings, radiation } = exposure;
      const list: { quantity: ScheduledQuantity; schedule: AnySchedule }[] = [
        { quantity: 'surroundings', schedule: surroundings },
      ];
      if (typeof coefficient === 'number' || 'segments' in coefficient)
        list.unshift({ quantity: 'coefficient', schedule: coefficient });
      if (radiation?.enclosure !== undefined) list.push({ quantity: 'enclosure', schedule: radiation.enclosure });
      return list;
    }
  }
}

/** The schedules over time of everything in a stage, with the place whose values they carry on from and their path in the stage. */
export function stageSchedules(
  stage: Pick<Stage, 'exposures' | 'sources'>,
): { owner: string; path: (string | number)[]; quantity: ScheduledQuantity; schedule: AnySchedule }[] {
  const faces = FACES.flatMap((face) =>
    schedulesOf(stage.exposures[face]).map(({ quantity, schedule }) => {
      const inner = quantity === 'enclosure' && stage.exposures[face].kind === 'film' ? ['radiation', quantity] : [quantity];
      return { owner: `face ${face}`, path: ['exposures', face, ...inner], quantity, schedule };
    }),
  );
  const sources = (stage.sources ?? []).map(({ layer, power }, index) => ({
    owner: `layer ${layer}`,
    path: ['sources', index, 'power'],
    quantity: 'power' as const,
    schedule: power,
  }));
  return [...faces, ...sources];
}

/** What the own schedules of every face and layer reached so far. */
type AllReached = Map<string, Reached>;
function reachedBy(all: AllReached, owner: string): Reached {
  const known = all.get(owner) ?? {};
  all.set(owner, known);
  return known;
}

/** Lays the cycle of a checked project on the time axis. Throws RangeError where crossCheck would have found a problem. */
export function layCycle(project: Pick<Project, 'cycle' | 'part'>): LaidCycle {
  const { cycle, part } = project;
  const reached: AllReached = new Map();
  const whole: Line = { time: [], value: [] };
  const stages: LaidStage[] = [];
  let setPointNow = cycle.setPoint.start;
  let now = 0;
  for (const stage of cycle.stages) {
    const setPointRamp: Ramp = stage.setPoint ?? { segments: [] };
    const length = 'after' in stage.end ? stage.end.after : longestSchedule(stage, setPointRamp, setPointNow, reached);
    const end = now + length;
    const setPoint = layRamp(setPointRamp, setPointNow, now, end);
    const exposures = {} as Record<FaceId, LaidExposure>;
    for (const face of FACES) {
      exposures[face] = layExposure(stage.exposures[face], {
        setPoint,
        from: now,
        until: end,
        reached: reachedBy(reached, `face ${face}`),
      });
    }
    const sources = (stage.sources ?? []).map(({ layer, power }): LaidSource => {
      const index = part.layers.findIndex((candidate) => candidate.id === layer);
      const place: LayPlace = { setPoint, from: now, until: end, reached: reachedBy(reached, `layer ${layer}`) };
      return { layer: index, power: layPower(power, place) };
    });
    whole.time.push(...setPoint.time);
    whole.value.push(...setPoint.value);
    stages.push({ id: stage.id, name: stage.name, start: now, end, setPoint, exposures, sources });
    setPointNow = endOf(setPoint);
    now = end;
  }
  return { stages, end: now, setPoint: whole };
}

/**
 * Exposures and sources by themselves, outside the cycle, as a stage of one second: the state they lead to is that of their
 * first values. Throws RangeError where crossCheck would have found a problem.
 */
export function layState(
  { part, cycle }: Pick<Project, 'cycle' | 'part'>,
  { exposures, sources }: Pick<Stage, 'exposures' | 'sources'>,
): LaidStage {
  const stage: Stage = { id: 'state', name: '', end: { after: 1 }, exposures, sources };
  return layCycle({ part, cycle: { setPoint: cycle.setPoint, stages: [stage] } }).stages[0];
}

/** Length of a stage that ends when every schedule in it is done, s. */
function longestSchedule(stage: Stage, setPoint: Ramp, setPointNow: number, reached: AllReached): number {
  let longest = rampDuration(setPoint, setPointNow);
  for (const { owner, quantity, schedule } of stageSchedules(stage)) {
    if (typeof schedule === 'object' && 'segments' in schedule) {
      longest = Math.max(longest, rampDuration(schedule, startOf(schedule, reachedBy(reached, owner)[quantity])));
    }
  }
  return longest;
}

/** Where and when a schedule is laid. */
interface LayPlace {
  setPoint: Line;
  from: number;
  until: number;
  reached: Reached;
}

function layExposure(exposure: Exposure, place: LayPlace): LaidExposure {
  switch (exposure.kind) {
    case 'insulated':
      return { kind: 'insulated' };
    case 'temperature':
      return { kind: 'temperature', temperature: laySchedule(exposure.temperature, 'temperature', place) };
    case 'flux':
      return { kind: 'flux', flux: laySchedule(exposure.flux, 'flux', place) };
    case 'radiation': {
      const enclosure = laySchedule(exposure.enclosure, 'enclosure', place);
      const none: LaidCoefficient = { kind: 'course', course: flat(0, place.from, place.until) };
      return {
        kind: 'film',
        coefficient: none,
        surroundings: enclosure,
        radiation: { emissivity: exposure.emissivity, enclosure },
      };
    }
    case 'film': {
      const coefficient = layCoefficient(exposure.coefficient, place);
      const surroundings = laySchedule(exposure.surroundings, 'surroundings', place);
      if (exposure.radiation === undefined) return { kind: 'film', coefficient, surroundings, radiation: null };
      const { emissivity, enclosure } = exposure.radiation;
      const seen = enclosure === undefined ? surroundings : laySchedule(enclosure, 'enclosure', place);
      return { kind: 'film', coefficient, surroundings, radiation: { emissivity, enclosure: seen } };
    }
  }
}

function layCoefficient(coefficient: Coefficient, place: LayPlace): LaidCoefficient {
  if (typeof coefficient === 'number' || 'segments' in coefficient) {
    return { kind: 'course', course: layLine(coefficient, 'coefficient', place) };
  }
  if ('table' in coefficient) return { kind: 'table', table: coefficient.table };
  if ('expression' in coefficient) return { kind: 'expression', expression: coefficient.expression, stageStart: place.from };
  return { kind: 'correlation', ...coefficient };
}

const layPower = (power: PlainSchedule, place: LayPlace): LaidSource['power'] =>
  typeof power === 'object' && 'expression' in power
    ? { expression: power.expression, stageStart: place.from }
    : layLine(power, 'power', place);

function laySchedule(schedule: AnySchedule, quantity: ScheduledQuantity, place: LayPlace): Course {
  if (typeof schedule === 'object' && 'expression' in schedule) {
    const course: TimeExpression = { expression: schedule.expression, stageStart: place.from };
    place.reached[quantity] = courseAt(course, place.until, 'before');
    return course;
  }
  return layLine(schedule, quantity, place);
}

/** Lays a schedule that is straight piece by piece, and notes the value it reached. */
function layLine(schedule: Exclude<AnySchedule, { expression: string }>, quantity: ScheduledQuantity, place: LayPlace): Line {
  const { setPoint, from, until, reached } = place;
  let line: Line;
  if (typeof schedule === 'number') line = flat(schedule, from, until);
  else if ('follow' in schedule)
    line = { time: [...setPoint.time], value: setPoint.value.map((value) => value + schedule.offset) };
  else line = layRamp(schedule, startOf(schedule, reached[quantity]), from, until);
  reached[quantity] = endOf(line);
  return line;
}

function startOf(ramp: Ramp, before: number | undefined): number {
  const start = ramp.start ?? before;
  if (start === undefined) throw new RangeError('a schedule has no start value and nothing was reached before it');
  return start;
}
