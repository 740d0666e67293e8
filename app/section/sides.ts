/** What stands on either side of the part at a time: surroundings, a fixed temperature, a flux, or insulation. */
import { courseLine } from '../draw';
import { courseAt, FACES, isSolid, type FaceId, type LaidCycle, type LaidStage, type Project } from '../../solver/model';

export interface Side {
  face: FaceId;
  kind: 'film' | 'temperature' | 'flux' | 'insulated';
  /** Name of what is there. */
  name: string;
  /** Temperature outside, °C; null where the exposure has none. */
  temperature: number | null;
}

/** The stage that holds a time; a stage's end belongs to it, unless it is the start of the next. */
export const stageAt = (laid: LaidCycle, time: number): LaidStage =>
  laid.stages.find(({ end }) => time < end) ?? laid.stages[laid.stages.length - 1];

/** Both sides at a time. */
export function sidesAt(plan: Project, laid: LaidCycle, time: number): Side[] {
  const stage = stageAt(laid, time);
  const exposures = plan.cycle.stages.find(({ id }) => id === stage.id)?.exposures;
  return FACES.map((face) => {
    const exposure = stage.exposures[face];
    const own = exposures?.[face];
    if (exposure.kind === 'film') {
      const schedule = own?.kind === 'film' ? own.surroundings : own?.kind === 'radiation' ? own.enclosure : null;
      const follows = typeof schedule === 'object' && schedule !== null && 'follow' in schedule;
      const around = own?.kind === 'radiation' ? 'Enclosure' : 'Surroundings';
      const name = follows ? plan.cycle.setPoint.name || 'Set-point' : around;
      return { face, kind: exposure.kind, name, temperature: courseAt(exposure.surroundings, time) };
    }
    if (exposure.kind === 'temperature') {
      return { face, kind: exposure.kind, name: 'Held at', temperature: courseAt(exposure.temperature, time) };
    }
    const none = isSolid(plan.part) && face === 'start' ? 'Centre' : 'Insulated';
    return { face, kind: exposure.kind, name: exposure.kind === 'flux' ? 'Heat flux' : none, temperature: null };
  });
}

/** Lowest and highest temperature outside over the whole cycle, °C; null where there is none. */
export function outsideRange(laid: LaidCycle): [number, number] | null {
  let low = Infinity;
  let high = -Infinity;
  for (const { exposures, start, end } of laid.stages) {
    for (const face of FACES) {
      const exposure = exposures[face];
      const course =
        exposure.kind === 'film' ? exposure.surroundings : exposure.kind === 'temperature' ? exposure.temperature : null;
      const line = course === null ? null : courseLine(course, start, end);
      for (const value of line?.value ?? []) {
        low = Math.min(low, value);
        high = Math.max(high, value);
      }
    }
  }
  return low <= high ? [low, high] : null;
}
