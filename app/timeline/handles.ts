/** What can be taken hold of on the cycle lane: the points of the set-point, and the ends of stages. */
import { segmentDuration, type LaidCycle, type Project } from '../../solver/model';

/** A point of the set-point. */
export interface SetPointHandle {
  /** Stable while the plan keeps its stages and segments. */
  key: string;
  /** Index of the stage; the start of the cycle belongs to the first. */
  stage: number;
  /** Index of the segment that ends here; 'start' for a start value of the stage, 'cycle' for that of the cycle. */
  at: number | 'start' | 'cycle';
  /** Where it is: cycle time (s) and value (°C). */
  time: number;
  value: number;
  /** Where its segment begins; the same point where there is no segment. */
  from: { time: number; value: number };
  moves: { value: boolean; time: boolean };
}

/** Every point of the set-point that an edit can move, in order of time. Those cut off by the end of their stage are left out. */
export function setPointHandles({ cycle }: Project, laid: LaidCycle): SetPointHandle[] {
  const handles: SetPointHandle[] = [];
  let value = cycle.setPoint.start;
  const first = cycle.stages[0].setPoint;
  if (first?.start === undefined) handles.push(still('cycle', 0, 0, value));
  cycle.stages.forEach((stage, index) => {
    const laidStage = laid.stages[index];
    if (laidStage === undefined) return;
    const { start, end } = laidStage;
    let time = start;
    if (stage.setPoint?.start !== undefined) {
      value = stage.setPoint.start;
      handles.push(still('start', index, time, value));
    }
    for (const [at, segment] of (stage.setPoint?.segments ?? []).entries()) {
      const from = { time, value };
      time += segmentDuration(segment, value);
      if ('to' in segment) value = segment.to;
      const within = time <= end * (1 + 1e-9);
      if (within)
        handles.push({
          key: `${index}:${at}`,
          stage: index,
          at,
          time,
          value,
          from,
          moves: { value: 'to' in segment, time: true },
        });
    }
    value = laidStage.setPoint.value[laidStage.setPoint.value.length - 1];
  });
  return handles;
}

const still = (at: 'start' | 'cycle', stage: number, time: number, value: number): SetPointHandle => ({
  key: `${stage}:${at}`,
  stage,
  at,
  time,
  value,
  from: { time, value },
  moves: { value: true, time: false },
});

/** The end of a stage; `grip` is false where the cycle itself decides when it comes. */
export interface StageGrip {
  stage: number;
  start: number;
  end: number;
  grip: boolean;
}

export const stageGrips = ({ cycle }: Project, laid: LaidCycle): StageGrip[] =>
  laid.stages.map(({ start, end }, stage) => ({ stage, start, end, grip: 'after' in (cycle.stages[stage]?.end ?? {}) }));
