/** The temperatures that act on the part over the whole cycle: the set-point, and surroundings that do not follow it. */
import { FACES, type LaidCycle, type LaidExposure, type LaidStage, type Line, type Project } from '../../solver/model';

/** A course over the cycle; NaN breaks it where nothing of the kind acts. */
export interface Course {
  key: string;
  name: string;
  line: Line;
}

const outside = (exposure: LaidExposure): Line | null =>
  exposure.kind === 'film' ? exposure.surroundings : exposure.kind === 'temperature' ? exposure.temperature : null;

const sameLine = (a: Line, b: Line): boolean =>
  a.time.length === b.time.length && a.value.every((value, i) => value === b.value[i]);

/** Whether a face's temperature outside is the set-point itself in a stage. */
const follows = (stage: LaidStage, exposure: LaidExposure): boolean => {
  const line = outside(exposure);
  return line !== null && sameLine(line, stage.setPoint);
};

/** Whether any face follows the set-point in each stage: where none does, the set-point is only a note. */
export const setPointActs = (laid: LaidCycle): boolean[] =>
  laid.stages.map((stage) => FACES.some((face) => follows(stage, stage.exposures[face])));

/** One course a face, of what it meets; faces with the same course share one. NaN where `lineOf` gives nothing. */
function coursesOf(
  project: Project,
  laid: LaidCycle,
  lineOf: (stage: LaidStage, exposure: LaidExposure) => Line | null,
  nameOf: (face: string) => string,
): Course[] {
  const courses: Course[] = [];
  for (const face of FACES) {
    const line: Line = { time: [], value: [] };
    for (const stage of laid.stages) {
      const own = lineOf(stage, stage.exposures[face]);
      line.time.push(...(own?.time ?? [stage.start]));
      line.value.push(...(own?.value ?? [Number.NaN]));
    }
    if (!line.value.some(Number.isFinite)) continue;
    const twin = courses.find((course) => sameCourse(course.line, line));
    if (twin === undefined) courses.push({ key: face, name: nameOf(project.part.faces[face].name), line });
    else twin.name = nameOf('Both faces');
  }
  return courses;
}

const isConstant = ({ value }: Line): boolean => value.every((other) => other === value[0]);

/**
 * For each face what surrounds it where that is not the set-point. A temperature that never changes, such as the air of the
 * hall, is no course.
 */
export const otherCourses = (project: Project, laid: LaidCycle): Course[] =>
  coursesOf(
    project,
    laid,
    (stage, exposure) => (follows(stage, exposure) ? null : outside(exposure)),
    (face) => face,
  ).filter(({ line }) => !isConstant(line));

/** The heat flux that is imposed on each face, W/m². */
export const fluxCourses = (project: Project, laid: LaidCycle): Course[] =>
  coursesOf(
    project,
    laid,
    (_, exposure) => (exposure.kind === 'flux' ? exposure.flux : null),
    (face) => `${face}, flux`,
  ).map((course) => ({ ...course, key: `${course.key} flux` }));

const sameCourse = (a: Line, b: Line): boolean =>
  a.time.length === b.time.length &&
  a.value.every((value, i) => Object.is(value, b.value[i])) &&
  a.time.every((time, i) => time === b.time[i]);
