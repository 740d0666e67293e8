import type { Step } from '../stepping';

/**
 * The field at the fractions 0, ¼, ½, ¾ and 1 of a step: since dense output is at most of the fourth degree, all of the step.
 * Valid as long as the step.
 */
export class Quarters {
  step!: Step;
  /** Temperatures at the field's points, °C, one array a quarter. */
  readonly rows: Float64Array[];

  /** Whether every point moves along a straight line, as the schemes with a chosen step do. */
  straight = false;

  constructor(points: number) {
    this.rows = [0, 1, 2, 3, 4].map(() => new Float64Array(points));
  }

  read(step: Step): void {
    const { rows } = this;
    this.step = step;
    rows[0] = step.before;
    for (let i = 1; i < 4; i++) step.at(i / 4, rows[i]);
    rows[4] = step.after;
    this.straight = isStraight(rows);
  }

  /** Cycle time at a fraction of the step, s; the ends are met exactly. */
  time(fraction: number): number {
    const { from, to } = this.step;
    return fraction === 1 ? to : from + fraction * (to - from);
  }

  fraction(time: number): number {
    const { from, to } = this.step;
    return Math.min(1, Math.max(0, (time - from) / (to - from)));
  }
}

/** Rounding of a straight line, K. */
const STRAIGHT_K = 1e-9;

function isStraight([r0, r1, r2, r3, r4]: readonly Float64Array[]): boolean {
  for (let i = 0; i < r0.length; i++) {
    const move = r4[i] - r0[i];
    if (Math.abs(r0[i] + 0.5 * move - r2[i]) > STRAIGHT_K) return false;
    if (Math.abs(r0[i] + 0.25 * move - r1[i]) > STRAIGHT_K || Math.abs(r0[i] + 0.75 * move - r3[i]) > STRAIGHT_K) return false;
  }
  return true;
}
