/** Edits of the ramp/hold segments of a schedule: the set-point of a stage, or a face's own. */
import type { FaceId, Path, Project, Ramp, Segment, Stage } from '../../solver/model';
import { valueAt } from '../../solver/model';
import { called, type Command, type Entered } from './command';
import { enterAt, indexOfId, insertAfter, moveItem, writeAt } from './edit';

export type ScheduleKey = 'temperature' | 'surroundings' | 'flux' | 'coefficient' | 'enclosure';
/** Which schedule of a stage is meant: its set-point, or one of the quantities of a face. */
export type ScheduleOf = 'setPoint' | { face: FaceId; key: ScheduleKey };

export type SegmentKind = 'rate' | 'duration' | 'hold' | 'jump';

/** A jump is a segment of duration 0. */
export function kindOfSegment(segment: Segment): SegmentKind {
  if ('hold' in segment) return 'hold';
  if ('rate' in segment) return 'rate';
  return segment.duration === 0 ? 'jump' : 'duration';
}

/** Path of a schedule in the document, or null where the stage is gone. */
export function schedulePath(project: Project, stage: { id: string }, of: ScheduleOf): Path | null {
  const index = indexOfId(project.cycle.stages, stage.id);
  if (index < 0) return null;
  const path = ['cycle', 'stages', index];
  if (of === 'setPoint') return [...path, 'setPoint'];
  const beside = of.key === 'enclosure' && project.cycle.stages[index].exposures[of.face].kind === 'film';
  return [...path, 'exposures', of.face, ...(beside ? ['radiation'] : []), of.key];
}

/** The ramp there; the set-point of a stage without one is a ramp without segments; null where it is none. */
export function rampAt(project: Project, stage: { id: string }, of: ScheduleOf): Ramp | null {
  const path = schedulePath(project, stage, of);
  const schedule = path === null ? undefined : valueAt(project, path);
  if (schedule === undefined && of === 'setPoint' && path !== null) return { segments: [] };
  return typeof schedule === 'object' && schedule !== null && 'segments' in schedule ? (schedule as Ramp) : null;
}

function changeSegments(project: Project, stage: Stage, of: ScheduleOf, change: (segments: Segment[]) => Segment[]): Project {
  const path = schedulePath(project, stage, of);
  const ramp = rampAt(project, stage, of);
  if (path === null || ramp === null) return project;
  const segments = change(ramp.segments);
  if (segments === ramp.segments) return project;
  const empty = of === 'setPoint' && segments.length === 0 && ramp.start === undefined;
  return writeAt(project, path, empty ? undefined : { ...ramp, segments });
}

const what = (stage: Stage, of: ScheduleOf): string =>
  of === 'setPoint' ? `set-point of ${called(stage, 'stage')}` : `${of.key} in ${called(stage, 'stage')}`;

export const addSegment = (stage: Stage, of: ScheduleOf, segment: Segment, after = Number.MAX_SAFE_INTEGER): Command => ({
  name: `Add segment to ${what(stage, of)}`,
  apply: (project) => changeSegments(project, stage, of, (segments) => insertAfter(segments, after, segment)),
});

export const removeSegment = (stage: Stage, of: ScheduleOf, at: number): Command => ({
  name: `Remove segment ${at + 1} of ${what(stage, of)}`,
  apply: (project) =>
    changeSegments(project, stage, of, (segments) =>
      at < segments.length ? segments.filter((_, index) => index !== at) : segments,
    ),
});

export const moveSegment = (stage: Stage, of: ScheduleOf, at: number, by: number): Command => ({
  name: `Move segment ${at + 1} of ${what(stage, of)}`,
  apply: (project) => changeSegments(project, stage, of, (segments) => moveItem(segments, at, by)),
});

/** Replaces a segment, for a change of its kind. */
export const setSegment = (stage: Stage, of: ScheduleOf, at: number, segment: Segment): Command => ({
  name: `Segment ${at + 1} of ${what(stage, of)}`,
  apply: (project) =>
    changeSegments(project, stage, of, (segments) => (at < segments.length ? writeAt(segments, [at], segment) : segments)),
});

const NUMBER_NAMES = { to: 'Target', rate: 'Rate', duration: 'Time', hold: 'Hold' } as const;
export type SegmentNumber = keyof typeof NUMBER_NAMES;

/** One number of a segment that has it. */
export const setSegmentNumber = (stage: Stage, of: ScheduleOf, at: number, key: SegmentNumber, entered: Entered): Command => ({
  name: `${NUMBER_NAMES[key]} of ${what(stage, of)}, segment ${at + 1}, to ${entered.text}`,
  apply: (project) => {
    const path = schedulePath(project, stage, of);
    const segment = rampAt(project, stage, of)?.segments[at];
    return path === null || segment === undefined || !(key in segment)
      ? project
      : enterAt(project, [...path, 'segments', at, key], entered);
  },
});

/** The value a schedule starts from in this stage; null: it carries on from the last one reached. */
export const setRampStart = (stage: Stage, of: ScheduleOf, entered: Entered | null): Command => ({
  name: `Start of ${what(stage, of)} ${entered === null ? 'where it was' : `to ${entered.text}`}`,
  apply: (project) => {
    const path = schedulePath(project, stage, of);
    const ramp = rampAt(project, stage, of);
    if (path === null || ramp === null) return project;
    if (entered !== null) {
      const there = valueAt(project, path) === undefined ? writeAt(project, path, ramp) : project;
      return enterAt(there, [...path, 'start'], entered);
    }
    const segments = { segments: ramp.segments };
    return writeAt(project, path, of === 'setPoint' && ramp.segments.length === 0 ? undefined : segments);
  },
});
