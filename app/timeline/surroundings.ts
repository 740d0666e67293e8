/** The temperatures that act on the part over the whole cycle: the set-point, and surroundings that do not follow it. */
import { courseLine } from '../draw';
import { FACES, type LaidCycle, type LaidExposure, type LaidStage, type Line, type Project } from '../../solver/model';

/** A course over the cycle; NaN breaks it where nothing of the kind acts. */
export interface Course {
  key: string;
  name: string;
  line: Line;
}

function outside(stage: LaidStage, exposure: LaidExposure): Line | null {
  const course = exposure.kind === 'film' ? exposure.surroundings : exposure.kind === 'temperature' ? exposure.temperature : null;
  return course === null ? null : courseLine(course, stage.start, stage.end);
}

const sameLine = (a: Line, b: Line): boolean =>
  a.time.length === b.time.length && a.value.every((value, i) => value === b.value[i]);

/** Whether a face's temperature outside is the set-point itself in a stage. */
const follows = (stage: LaidStage, exposure: LaidExposure): boolean => {
  const line = outside(stage, exposure);
  return line !== null && sameLine(line, stage.setPoint);
};

/** Whether any face follows the set-point in each stage: where none does, the set-point is only a note. */
export const setPointActs = (laid: LaidCycle): boolean[] =>
  laid.stages.map((stage) => FACES.some((face) => follows(stage, stage.exposures[face])));

/**
 * For each face what surrounds it where that is not the set-point; faces with the same course share one. A temperature that
 * never changes, such as the air of the hall, is no course.
 */
export function otherCourses(project: Project, laid: LaidCycle): Course[] {
  const courses: Course[] = [];
  for (const face of FACES) {
    const line: Line = { time: [], value: [] };
    for (const stage of laid.stages) {
      const own = outside(stage, stage.exposures[face]);
      const shown = own !== null && !follows(stage, stage.exposures[face]) ? own : null;
      line.time.push(...(shown?.time ?? [stage.start]));
      line.value.push(...(shown?.value ?? [Number.NaN]));
    }
    const values = line.value.filter(Number.isFinite);
    if (values.length === 0 || (values.length === line.value.length && values.every((value) => value === values[0]))) continue;
    const twin = courses.find((course) => sameCourse(course.line, line));
    if (twin === undefined) courses.push({ key: face, name: `At ${project.part.faces[face].name}`, line });
    else twin.name = 'At both faces';
  }
  return courses;
}

const sameCourse = (a: Line, b: Line): boolean =>
  a.time.length === b.time.length &&
  a.value.every((value, i) => Object.is(value, b.value[i])) &&
  a.time.every((time, i) => time === b.time[i]);
