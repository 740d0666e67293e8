/** What stands on either side of the part at a time: surroundings, a fixed temperature, a flux, or insulation. */
import { FACES, lineAt, type FaceId, type LaidCycle, type LaidStage, type Project } from '../../solver/model';

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
      const follows = own?.kind === 'film' && typeof own.surroundings === 'object' && 'follow' in own.surroundings;
      const name = follows ? plan.cycle.setPoint.name || 'Set-point' : 'Surroundings';
      return { face, kind: exposure.kind, name, temperature: lineAt(exposure.surroundings, time) };
    }
    if (exposure.kind === 'temperature') {
      return { face, kind: exposure.kind, name: 'Held at', temperature: lineAt(exposure.temperature, time) };
    }
    return { face, kind: exposure.kind, name: exposure.kind === 'flux' ? 'Heat flux' : 'Insulated', temperature: null };
  });
}

/** Lowest and highest temperature outside over the whole cycle, °C; null where there is none. */
export function outsideRange(laid: LaidCycle): [number, number] | null {
  let low = Infinity;
  let high = -Infinity;
  for (const { exposures } of laid.stages) {
    for (const face of FACES) {
      const exposure = exposures[face];
      const line =
        exposure.kind === 'film' ? exposure.surroundings : exposure.kind === 'temperature' ? exposure.temperature : null;
      for (const value of line?.value ?? []) {
        low = Math.min(low, value);
        high = Math.max(high, value);
      }
    }
  }
  return low <= high ? [low, high] : null;
}
