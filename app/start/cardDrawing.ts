/** A plan as a small drawing: its layers to scale, what its faces meet over time, and the limits of its requirements. */
import { courseLine, extent, layLayers, linearScale, linePath } from '../draw';
import { FACES, layCycle, type FaceId, type LaidCycle, type Line, type Project } from '../../solver/model';
import { tintOf } from '../ui';

export interface CardDrawing {
  layers: { x: number; width: number; tint: string }[];
  /** What the faces meet over time, or the set-point where they meet nothing that changes. */
  courses: string[];
  /** Heights of the temperature limits. */
  limits: number[];
  duration_s: number;
}

/** The drawing's frame, px: the part at the left, the course at the right. */
export const PART = { left: 14, right: 96, top: 14, bottom: 92 } as const;
export const COURSE = { left: 124, right: 262, top: 14, bottom: 92 } as const;
const LEAST_LAYER = 2;

export function drawCard(project: Project): CardDrawing {
  const { layers } = project.part;
  const row = layLayers(
    layers.map((layer) => layer.thickness),
    PART.left,
    PART.right,
    LEAST_LAYER,
  );
  const laid = layCycle(project);
  const courses = coursesOf(laid);
  const limits = project.requirements.filter(({ of }) => !('difference' in of)).map(({ must }) => must.limit);
  const [low, high] = extent([...courses.map(({ value }) => value), limits]) ?? [0, 1];
  const time = linearScale(0, laid.end, COURSE.left, COURSE.right);
  const value = linearScale(low, high > low ? high : low + 1, COURSE.bottom - 4, COURSE.top + 4);
  return {
    layers: layers.map((layer, index) => ({
      x: row.edges[index],
      width: row.edges[index + 1] - row.edges[index],
      tint: tintOf(project, layer.material),
    })),
    courses: courses.map((line) =>
      linePath(
        line.time.map((at) => time.at(at)),
        line.value.map((at) => value.at(at)),
      ),
    ),
    limits: limits.map((limit) => value.at(limit)),
    duration_s: laid.end,
  };
}

/** What the faces meet, where it changes, each course once; the set-point where nothing does. */
function coursesOf(laid: LaidCycle): Line[] {
  const outside = FACES.map((face) => outsideOf(laid, face)).filter(({ value }) => value.some((item) => item !== value[0]));
  const same = outside.length === 2 && JSON.stringify(outside[0]) === JSON.stringify(outside[1]);
  return outside.length === 0 ? [laid.setPoint] : same ? [outside[0]] : outside;
}

/** The temperature outside a face over the whole cycle, °C; a stage that gives none leaves a gap. */
function outsideOf(laid: LaidCycle, face: FaceId): Line {
  const whole: Line = { time: [], value: [] };
  for (const { exposures, start, end } of laid.stages) {
    const exposure = exposures[face];
    const course =
      exposure.kind === 'film' ? exposure.surroundings : exposure.kind === 'temperature' ? exposure.temperature : null;
    const line = course === null ? null : courseLine(course, start, end);
    whole.time.push(...(line?.time ?? [start]));
    whole.value.push(...(line?.value ?? [Number.NaN]));
  }
  return whole;
}
