/** Rows of a ramp: a segment each. */
import {
  addSegment,
  kindOfSegment,
  moveSegment,
  removeSegment,
  schedulePath,
  setSegment,
  setSegmentNumber,
  typedAt,
  type ScheduleOf,
  type SegmentKind,
  type SegmentNumber,
} from '../commands';
import type { Cell, Column, QuantitySpec, Row } from '../ui';
import type { Path, Project, Ramp, Segment, Stage } from '../../solver/model';
import { formatDuration, formatNumber } from '../../solver/model/quantities';
import { courseOf, kindOfSchedule, segmentOfKind, type SegmentCourse } from './course';

export const SEGMENT_COLUMNS: readonly Column[] = [
  { head: '' },
  { head: 'To', width: '17%', align: 'right' },
  { head: 'Rate', width: '17%', align: 'right' },
  { head: 'Time', width: '17%', align: 'right' },
  { head: 'Done at', width: '17%', align: 'right' },
];

const KIND_LABELS: Record<SegmentKind, string> = {
  rate: 'ramp at a rate',
  duration: 'ramp in a time',
  hold: 'hold',
  jump: 'jump',
};

export interface Schedule {
  stage: Stage;
  of: ScheduleOf;
  ramp: Ramp;
  /** Value with which the schedule enters the stage; NaN if unknown. */
  entry: number;
  /** Cycle time at which the stage starts, s; null while it is not known. */
  stageStart: number | null;
}

/** What "Add" adds: a ramp to where it is now, to be changed; a hold after a ramp. */
export function nextSegment({ ramp, entry, of }: Schedule): Segment {
  const last = ramp.segments.at(-1);
  if (last !== undefined && 'to' in last) return { hold: 3600 };
  const reached = ramp.segments.filter((segment) => 'to' in segment).at(-1)?.to ?? ramp.start ?? entry;
  const to = Number.isFinite(reached) ? reached : 20;
  return kindOfSchedule(of) === 'temperature' ? { to: to + 100, rate: 50 / 3600 } : { to, duration: 3600 };
}

export function segmentRows(project: Project, schedule: Schedule): Row[] {
  const { stage, of } = schedule;
  const path = schedulePath(project, stage, of) ?? [];
  return courseOf(schedule.ramp, schedule.entry).map((course, index) => ({
    id: String(index),
    label: `segment ${index + 1}`,
    cells: segmentCells(project, schedule, course, index, [...path, 'segments', index]),
    insert: () => addSegment(stage, of, nextSegment(schedule), index),
    duplicate: () => addSegment(stage, of, course.segment, index),
    move: (by) => moveSegment(stage, of, index, by),
    remove: () => removeSegment(stage, of, index),
  }));
}

const blank: Cell = { kind: 'shown', text: '' };

function segmentCells(project: Project, schedule: Schedule, course: SegmentCourse, index: number, path: Path): Cell[] {
  const { stage, of, stageStart } = schedule;
  const { segment, duration, until } = course;
  const kind = kindOfSegment(segment);
  const valueKind = kindOfSchedule(of);
  const number = (key: SegmentNumber, value: number, spec: QuantitySpec): Cell => ({
    kind: 'quantity',
    spec,
    value,
    typed: typedAt(project, [...path, key]),
    path: [...path, key],
    edit: (entered) => setSegmentNumber(stage, of, index, key, entered),
  });
  const kinds = (['rate', 'duration', 'hold', 'jump'] as const).filter(
    (item) => item !== 'rate' || kind === 'rate' || valueKind === 'temperature',
  );
  const done = stageStart !== null && Number.isFinite(until) ? formatDuration(stageStart + until) : '–';
  return [
    {
      kind: 'choice',
      value: kind,
      options: kinds.map((value) => ({ value, label: KIND_LABELS[value] })),
      path,
      edit: (next) => setSegment(stage, of, index, segmentOfKind(next as SegmentKind, course, valueKind)),
    },
    'to' in segment
      ? number('to', segment.to, {
          name: 'Value reached',
          quantity: valueKind,
          bounds: valueKind === 'filmCoefficient' ? { atLeast: 0 } : {},
        })
      : { kind: 'shown', text: 'holds', muted: true },
    'rate' in segment ? rateCell(segment.rate, valueKind === 'temperature', number) : blank,
    timeCell(segment, duration, number),
    { kind: 'shown', text: done, muted: true },
  ];
}

type NumberCell = (key: SegmentNumber, value: number, spec: QuantitySpec) => Cell;

/** Rates of fluxes and coefficients have no unit that is typed; they come from files and are shown as they are. */
const rateCell = (rate: number, isTemperature: boolean, number: NumberCell): Cell =>
  isTemperature
    ? number('rate', rate, { name: 'Rate', quantity: 'temperatureRate', bounds: { above: 0 } })
    : { kind: 'shown', text: formatNumber(rate), unit: 'a second' };

function timeCell(segment: Segment, duration: number, number: NumberCell): Cell {
  if ('hold' in segment) return number('hold', segment.hold, { name: 'Hold', quantity: 'time', bounds: { atLeast: 0 } });
  if ('rate' in segment) return { kind: 'shown', text: Number.isFinite(duration) ? formatDuration(duration) : '–', muted: true };
  if (segment.duration === 0) return blank;
  return number('duration', segment.duration, { name: 'Time of the ramp', quantity: 'time', bounds: { atLeast: 0 } });
}
