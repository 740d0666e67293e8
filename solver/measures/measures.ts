/** Everything that is drawn from the history of one run, while it runs. */
import { rowTimes, type LaidCycle, type Project, type Requirement, type RunResult } from '../model';
import { layerAt } from '../grid';
import type { Run, Step } from '../stepping';
import type { Course } from './course';
import { FieldOverStep } from './field';
import { Firsts } from './firsts';
import { FrameRecorder } from './frames';
import { FieldRecorder, Instants, ProbeReading, ProbeRecorder } from './histories';
import { conditionOf, judge } from './judge';
import { Quarters } from './quarters';
import { SlowestFinder } from './slowest';
import { Tally, type Subject } from './tally';
import { layWindow } from './windows';

/** What measures contribute to the result of a run. */
export type Measured = Pick<RunResult, 'answers' | 'first' | 'stages' | 'probes' | 'field' | 'frames'>;

export interface Measures {
  /** Takes in an accepted step; to be called once a step, in order. */
  observe(step: Step): void;
  /** What is known by now, in arrays of its own; final once the run has ended. */
  measured(): Measured;
}

/** Where an extreme moves on inside a step, courses of the field follow it to this part of the wanted accuracy. */
const COURSE_SHARE = 1e-2;

/** Measures of a run of a checked project. */
export function createMeasures(project: Project, { points, cycle, start }: Pick<Run, 'points' | 'cycle' | 'start'>): Measures {
  const quarters = new Quarters(points.position.length);
  const rows = new Instants(rowTimes(project, cycle));
  const field = new FieldOverStep(points, project.part, COURSE_SHARE * project.settings.accuracy);
  const fieldRecorder = new FieldRecorder(field.extremesOf(start), cycle.end);
  const firsts = new Firsts(project.part, (depth) => layerAt(points, depth));
  const slowest = new SlowestFinder(project, points, cycle);
  const frames = new FrameRecorder(points, cycle);
  const recorders = project.probes.map((probe) => new ProbeRecorder(new ProbeReading(project, probe, points), start, cycle.end));
  const probeCourses: Course[] = [];
  const watched = project.requirements.map((requirement) => ({
    requirement,
    tally: new Tally(conditionOf(requirement.must), layWindow(requirement, cycle), cycle.end),
    subject: subjectOf(requirement),
  }));
  let reached = 0;

  function observe(step: Step): void {
    quarters.read(step);
    field.read(quarters);
    const rowsInside = rows.upTo('before', quarters);
    recorders.forEach((recorder, i) => {
      probeCourses[i] = recorder.reading.over(quarters);
      recorder.observe(quarters, probeCourses[i], rowsInside);
    });
    fieldRecorder.observe(quarters, field, rowsInside);
    firsts.observe(quarters, field);
    slowest.observe(quarters);
    frames.observe(quarters);
    for (const { tally, subject } of watched) tally.observe(quarters, subject);
    reached = step.to;
  }

  function subjectOf({ of }: Requirement): Subject {
    if ('probe' in of) {
      const index = project.probes.findIndex(({ id }) => id === of.probe);
      const course = () => probeCourses[index];
      return { course, rough: course, placeAt: () => null };
    }
    const quantity = 'point' in of ? of.point : of.difference;
    return {
      course: () => field.course(quantity),
      rough: () => field.rough(quantity),
      placeAt: (fraction) => ('point' in of ? field.extremesAt(fraction)[of.point].position : null),
    };
  }

  return {
    observe,
    measured: () => ({
      answers: watched.map(({ requirement, tally }) => judge(requirement, tally, cycle, reached)),
      first: { slowest: slowest.whole(), ...firsts.answers() },
      stages: stageTimes(cycle, reached, slowest.stages()),
      probes: recorders.map((recorder) => recorder.history()),
      field: fieldRecorder.history(),
      frames: frames.frames(),
    }),
  };
}

/** The stages begun, the last one up to where the run came. */
function stageTimes(cycle: LaidCycle, reached: number, slowest: Measured['stages'][number]['slowest'][]): Measured['stages'] {
  return cycle.stages.flatMap(({ id, name, start, end }, index) =>
    reached > start ? [{ stage: id, name, start_s: start, end_s: Math.min(end, reached), slowest: slowest[index] }] : [],
  );
}
