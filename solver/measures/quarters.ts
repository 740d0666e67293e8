import type { Step } from '../stepping';

/**
 * The field at the fractions 0, ¼, ½, ¾ and 1 of a step: since dense output is at most of the fourth degree, all of the step.
 * Valid as long as the step.
 */
export class Quarters {
  private readonly inner: Float64Array[];
  step!: Step;
  /** Temperatures at the field's points, °C, one array a quarter. */
  rows: readonly Float64Array[] = [];

  constructor(points: number) {
    this.inner = [0, 1, 2].map(() => new Float64Array(points));
  }

  read(step: Step): this {
    this.step = step;
    this.inner.forEach((row, i) => step.at((i + 1) / 4, row));
    this.rows = [step.before, ...this.inner, step.after];
    return this;
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
