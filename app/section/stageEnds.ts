/** The profiles at the stage ends that lie behind the playhead, with their names where they do not crowd. */
import type { Frames, LaidCycle } from '../../solver/model';
import { indexAt, profileAt, textWidth, type Box } from '../draw';
import type { SectionGeometry } from './geometry';
import { profilePath } from './profilePath';

export interface StageEndName {
  text: string;
  x: number;
  y: number;
  box: Box;
}

export interface StageEndProfile {
  id: string;
  path: string;
  /** Null where it would lie on another name. */
  name: StageEndName | null;
}

/** Profiles drawn at most: the latest ones. */
const MOST = 4;
/** Where names stand, as parts of the width: each a step further, so that they do not pile up at the face. */
const FIRST_NAME = 0.04;
const NEXT_NAME = 0.13;

/** How many stages lie behind a time. */
export const stagesBehind = (laid: LaidCycle, time: number): number => laid.stages.filter(({ end }) => end <= time).length;

export function stageEndProfiles(
  laid: LaidCycle,
  behind: number,
  frames: Frames,
  across: Float64Array,
  { left, right, axis }: SectionGeometry,
): StageEndProfile[] {
  const placed: Box[] = [];
  return laid.stages.slice(Math.max(0, behind - MOST), behind).map(({ id, name, end }, index) => {
    const profile = profileAt(frames, end);
    const text = `end of ${name}`;
    const x = left + (right - left) * (FIRST_NAME + NEXT_NAME * index);
    const at = Math.max(0, indexAt(across, x + textWidth(text) / 2));
    const y = axis.scale.at(profile[at]) - 5;
    const box: Box = { x, y: y - 9, width: textWidth(text), height: 12 };
    const crowded = placed.some(
      (other) => other.x < box.x + box.width && box.x < other.x + other.width && Math.abs(other.y - box.y) < 12,
    );
    if (!crowded) placed.push(box);
    return { id, path: profilePath(frames, across, profile, axis.scale), name: crowded ? null : { text, x, y, box } };
  });
}
