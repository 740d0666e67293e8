/** A ramp said in words, and where each of its segments starts. */
import {
  courseAt,
  rampDuration,
  segmentDuration,
  type Course,
  type LaidCycle,
  type LaidExposure,
  type Ramp,
  type Segment,
} from '../../solver/model';
import { formatDuration, formatQuantity, type QuantityKind, type UnitSystem } from '../../solver/model/quantities';
import type { ScheduleKey, ScheduleOf, SegmentKind } from '../commands';

/** Kind of the values of a schedule. */
export const kindOfSchedule = (of: ScheduleOf): QuantityKind => {
  const key: ScheduleKey = of === 'setPoint' ? 'temperature' : of.key;
  return key === 'flux' ? 'heatFlux' : key === 'coefficient' ? 'filmCoefficient' : 'temperature';
};

/** The course of a quantity of an exposure; null where it has none over time. */
export function laidCourse(exposure: LaidExposure, key: ScheduleKey): Course | null {
  switch (exposure.kind) {
    case 'insulated':
      return null;
    case 'temperature':
      return key === 'temperature' ? exposure.temperature : null;
    case 'flux':
      return key === 'flux' ? exposure.flux : null;
    case 'film':
      if (key === 'surroundings') return exposure.surroundings;
      if (key === 'enclosure') return exposure.radiation?.enclosure ?? null;
      return key === 'coefficient' && exposure.coefficient.kind === 'course' ? exposure.coefficient.course : null;
  }
}

/** The value at which a schedule enters a stage; NaN where it is not known. */
export function valueAtStart(laid: LaidCycle | null, stageIndex: number, of: ScheduleOf): number {
  const stage = laid?.stages[stageIndex];
  if (stage === undefined) return Number.NaN;
  if (of === 'setPoint') return stage.setPoint.value[0];
  const course = laidCourse(stage.exposures[of.face], of.key);
  return course === null ? Number.NaN : courseAt(course, stage.start);
}

export interface SegmentCourse {
  segment: Segment;
  /** Value at its start. */
  from: number;
  /** Stage time at its end, s. */
  until: number;
  duration: number;
}

/** The segments of a ramp one after the other, from the value that it enters with. */
export function courseOf(ramp: Ramp, entry: number): SegmentCourse[] {
  let from = ramp.start ?? entry;
  let until = 0;
  return ramp.segments.map((segment) => {
    const duration = segmentDuration(segment, from);
    until += duration;
    const course = { segment, from, until, duration };
    if ('to' in segment) from = segment.to;
    return course;
  });
}

/** A segment of another kind that does the most alike. */
export function segmentOfKind(kind: SegmentKind, { segment, from, duration }: SegmentCourse, kindOfValue: QuantityKind): Segment {
  const to = 'to' in segment ? segment.to : Number.isFinite(from) ? from : 0;
  const time = Number.isFinite(duration) && duration > 0 ? duration : 3600;
  switch (kind) {
    case 'hold':
      return { hold: time };
    case 'jump':
      return { to, duration: 0 };
    case 'duration':
      return { to, duration: Number(time.toPrecision(6)) };
    case 'rate': {
      const slope = Math.abs(to - from) / time;
      const usual = kindOfValue === 'temperature' ? 50 / 3600 : 1;
      return { to, rate: slope > 0 && Number.isFinite(slope) ? Number(slope.toPrecision(6)) : usual };
    }
  }
}

/** "to 180 °C at 20 K/h", "to 180 °C in 3 h 00 min", "3 segments, to 550 °C, 12 h 00 min", "holds". */
export function courseInWords(ramp: Ramp, entry: number, system: UnitSystem): string {
  const { segments } = ramp;
  if (segments.length === 0) return ramp.start === undefined ? 'holds' : `from ${value(ramp.start, system)}`;
  if (segments.length === 1) return segmentInWords(segments[0], system);
  const last = segments.filter((segment) => 'to' in segment).at(-1);
  const target = last === undefined ? '' : ` to ${value(last.to, system)}`;
  const length = rampDuration(ramp, entry);
  return `${segments.length} segments${target}${Number.isFinite(length) ? `, ${formatDuration(length)}` : ''}`;
}

const value = (celsius: number, system: UnitSystem): string => formatQuantity(celsius, 'temperature', system).text;

function segmentInWords(segment: Segment, system: UnitSystem): string {
  if ('hold' in segment) return `holds for ${formatDuration(segment.hold)}`;
  const to = `to ${value(segment.to, system)}`;
  if ('rate' in segment) return `${to} at ${formatQuantity(segment.rate, 'temperatureRate', system).text}`;
  return segment.duration === 0 ? `jumps ${to}` : `${to} in ${formatDuration(segment.duration)}`;
}
