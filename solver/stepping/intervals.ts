/** The stretches of a cycle that steps may not straddle: between stage edges, jumps and kinks of schedules. */
import type { Interval } from '../heat';
import { coursesOf } from '../materials';
import { courseAt, courseCorners, FACES, type Course, type LaidCycle, type LaidStage } from '../model';

export interface CycleInterval extends Interval {
  /** Whether anything jumps where it begins. The start of the cycle is a jump. */
  readonly jumped: boolean;
}

export function intervalsOf(cycle: LaidCycle): CycleInterval[] {
  const intervals: CycleInterval[] = [];
  cycle.stages.forEach((stage, index) => {
    const courses = stageCourses(stage);
    const inside = courses.flatMap((course) => courseCorners(course)).filter((time) => time > stage.start && time < stage.end);
    const edges = [...new Set([stage.start, ...inside, stage.end])].sort((a, b) => a - b);
    for (let i = 0; i + 1 < edges.length; i++) {
      const jumped =
        i > 0 ? courses.some((course) => jumpsAt(course, edges[i])) : index === 0 || stageJumps(cycle.stages[index - 1], stage);
      intervals.push({ stage: index, from: edges[i], to: edges[i + 1], jumped });
    }
  });
  return intervals;
}

/** Everything in a stage that follows time. */
const stageCourses = ({ exposures, sources }: LaidStage): Course[] => [
  ...FACES.flatMap((face) => coursesOf(exposures[face])),
  ...sources.flatMap(({ power }) => ('expression' in power ? [] : [power])),
];

const jumpsAt = (course: Course, time: number): boolean => courseAt(course, time, 'before') !== courseAt(course, time, 'after');

/** Whether anything in the part's surroundings, or a source, jumps from one stage to the next. */
function stageJumps(before: LaidStage, after: LaidStage): boolean {
  if (lawsOf(before) !== lawsOf(after)) return true;
  const next = stageCourses(after);
  return stageCourses(before).some(
    (course, i) => courseAt(course, after.start, 'before') !== courseAt(next[i], after.start, 'after'),
  );
}

/** All of a stage that is no course over time, as a text to compare. */
function lawsOf({ exposures, sources }: LaidStage): string {
  const faces = FACES.map((face) => {
    const exposure = exposures[face];
    if (exposure.kind !== 'film') return exposure.kind;
    const { coefficient, radiation } = exposure;
    return ['film', coefficient.kind === 'course' ? 'course' : coefficient, radiation?.emissivity];
  });
  return JSON.stringify([faces, sources.map(({ layer, power }) => [layer, 'expression' in power ? power : 'course'])]);
}
