/** The stretches of a cycle that steps may not straddle: between stage edges, jumps and kinks of schedules. */
import type { Interval } from '../heat';
import { FACES, lineAt, type LaidCycle, type LaidExposure, type Line } from '../model';

export interface CycleInterval extends Interval {
  /** Whether anything jumps where it begins. The start of the cycle is a jump. */
  readonly jumped: boolean;
}

export function intervalsOf(cycle: LaidCycle): CycleInterval[] {
  const intervals: CycleInterval[] = [];
  cycle.stages.forEach((stage, index) => {
    const lines = FACES.flatMap((face) => linesOf(stage.exposures[face]));
    const inside = lines.flatMap((line) => line.time).filter((time) => time > stage.start && time < stage.end);
    const edges = [...new Set([stage.start, ...inside, stage.end])].sort((a, b) => a - b);
    for (let i = 0; i + 1 < edges.length; i++) {
      const jumped =
        i > 0
          ? lines.some((line) => jumpsAt(line, edges[i]))
          : index === 0 || FACES.some((face) => exposureJumps(cycle, index, face));
      intervals.push({ stage: index, from: edges[i], to: edges[i + 1], jumped });
    }
  });
  return intervals;
}

const linesOf = (exposure: LaidExposure): Line[] =>
  Object.values(exposure).filter((part): part is Line => typeof part === 'object');

const jumpsAt = (line: Line, time: number): boolean => lineAt(line, time, 'before') !== lineAt(line, time, 'after');

/** Whether what a face meets jumps from the stage before to this one. */
function exposureJumps(cycle: LaidCycle, stage: number, face: 'start' | 'end'): boolean {
  const before = cycle.stages[stage - 1].exposures[face];
  const after = cycle.stages[stage].exposures[face];
  if (before.kind !== after.kind) return true;
  const time = cycle.stages[stage].start;
  const linesAfter = linesOf(after);
  return linesOf(before).some((line, i) => lineAt(line, time, 'before') !== lineAt(linesAfter[i], time, 'after'));
}
