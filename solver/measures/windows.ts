/** Where in the cycle a requirement counts, laid on cycle time. */
import type { LaidCycle, Requirement } from '../model';

/** A stretch of cycle time, s; an instant where both ends are one. */
export interface Window {
  readonly from: number;
  readonly to: number;
}

export interface LaidWindow {
  /** Where the requirement counts, cut off at the end of the cycle. */
  readonly counts: Window;
  /** What has to be looked at to judge it: more where lateness is told, or a hold that leads up to an instant. */
  readonly look: Window;
  /** Latest time allowed by "within", even after the end of the cycle; null for all else. */
  readonly latest: number | null;
}

export function layWindow({ counts, must }: Pick<Requirement, 'counts' | 'must'>, cycle: LaidCycle): LaidWindow {
  const stageOf = (id: string) => {
    const stage = cycle.stages.find((candidate) => candidate.id === id);
    if (stage === undefined) throw new RangeError(`no stage "${id}" in the cycle`);
    return stage;
  };
  switch (counts.kind) {
    case 'cycle':
      return everything({ from: 0, to: cycle.end });
    case 'stage': {
      const { start, end } = stageOf(counts.stage);
      return everything({ from: start, to: end });
    }
    case 'within': {
      const from = counts.from === undefined ? 0 : stageOf(counts.from).start;
      const latest = from + counts.time;
      const window = { from, to: Math.min(latest, cycle.end) };
      return { counts: window, look: must.kind === 'reaches' ? { from, to: cycle.end } : window, latest };
    }
    case 'stageEnd': {
      const { end } = stageOf(counts.stage);
      const instant = { from: end, to: end };
      return { counts: instant, look: must.kind === 'heldFor' ? { from: 0, to: end } : instant, latest: null };
    }
  }
}

const everything = (window: Window): LaidWindow => ({ counts: window, look: window, latest: null });
