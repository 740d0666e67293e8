/** Everything that is drawn from the history of one run, while it runs. */
import { rowTimes, type Answer, type LaidCycle, type Project, type Requirement, type RunResult } from '../model';
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
import { Tally } from './tally';
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
const COURSE_SHARE = 1e-3;

/** Measures of a run of a checked project. */
export function createMeasures(project: Project, { points, cycle, start }: Pick<Run, 'points' | 'cycle' | 'start'>): Measures {
  const quarters = new Quarters(points.position.length);
  const rows = new Instants(rowTimes(project, cycle));
  const field = new FieldOverStep(points, project.part, COURSE_SHARE * project.settings.accuracy);
  const fieldRecorder = new FieldRecorder(field.extremesOf(start));
  const firsts = new Firsts(project.part, (depth) => layerAt(points, depth));
  const slowest = new SlowestFinder(project, points, cycle);
  const frames = new FrameRecorder(points, cycle);
  const recorders = project.probes.map((probe) => new ProbeRecorder(new ProbeReading(project, probe, points), start));
  const tallies = project.requirements.map(
    (requirement) => new Tally(conditionOf(requirement.must), layWindow(requirement, cycle), cycle.end),
  );
  let reached = 0;

  function observe(step: Step): void {
    quarters.read(step);
    field.read(quarters);
    const rowsInside = rows.upTo('before', quarters);
    const courses = new Map<string, Course>();
    for (const recorder of recorders) {
      const course = recorder.reading.over(quarters);
      courses.set(recorder.reading.probe.id, course);
      recorder.observe(quarters, course, rowsInside);
    }
    fieldRecorder.observe(quarters, field, rowsInside);
    firsts.observe(quarters, field);
    slowest.observe(quarters);
    frames.observe(quarters);
    project.requirements.forEach((requirement, i) => {
      tallies[i].observe(quarters, courseOf(requirement, courses), placeOf(requirement));
    });
    reached = step.to;
  }

  function courseOf({ of }: Requirement, courses: Map<string, Course>): Course {
    if ('point' in of) return field.course(of.point);
    if ('difference' in of) return field.course(of.difference);
    const course = courses.get(of.probe);
    if (course === undefined) throw new RangeError(`no probe "${of.probe}" in the plan`);
    return course;
  }

  function placeOf({ of }: Requirement): (fraction: number) => number | null {
    if (!('point' in of)) return () => null;
    const { point } = of;
    return (fraction) => field.extremesAt(fraction)[point].position;
  }

  return {
    observe,
    measured: () => ({
      answers: project.requirements.map((requirement, i): Answer => judge(requirement, tallies[i], cycle, reached)),
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
