/**
 * How long the next step of the automatic scheme should be, from the error of the last.
 *
 * The estimate by an embedded solution of order p goes with h^(p+1), so the step that would just do is h × error^(−1/(p+1)), error
 * counted in parts of what is allowed. Hairer & Wanner, Solving ODEs II, section IV.8 (from memory).
 */

/** Aims below the tolerance, so that most steps are accepted. */
const SAFETY = 0.9;
/** No step grows by more than this: an error estimate seen as zero says little. */
const LARGEST_GROWTH = 6;
/** No step shrinks by more than this after acceptance, or after a rejection. */
const SMALLEST_GROWTH = 0.2;
const SMALLEST_AFTER_REJECTION = 0.1;
/** An error this small is not believed. */
const SMALLEST_ERROR = 1e-8;
/** A step that ends this close to the edge, in parts of what is left, goes to the edge. */
const NEARLY_THERE = 0.999;

export class StepController {
  private readonly exponent: number;
  private wanted = Infinity;
  private rejectedBefore = false;
  private cutShort = false;

  /** `order` is that of the embedded solution. */
  constructor(order: number) {
    this.exponent = -1 / (order + 1);
  }

  /** At the start of an interval: steps begin no longer than `first`. */
  limit(first: number): void {
    this.wanted = Math.min(this.wanted, first);
  }

  /** The next step, given what is left; if that is less than two steps, half of it, so that no scrap remains. */
  propose(left: number): number {
    this.cutShort = this.wanted >= NEARLY_THERE * left;
    if (this.cutShort) return left;
    return this.wanted > 0.5 * left ? 0.5 * left : this.wanted;
  }

  accept(length: number, error: number): void {
    const growth = Math.min(this.rejectedBefore ? 1 : LARGEST_GROWTH, Math.max(SMALLEST_GROWTH, this.factor(error)));
    // A step that was cut short by an edge says nothing against the longer one that was wanted.
    const keep = this.cutShort && length < 0.6 * this.wanted ? this.wanted : 0;
    this.wanted = Math.max(keep, length * growth);
    this.rejectedBefore = false;
  }

  reject(length: number, error: number): void {
    this.wanted = length * Math.max(SMALLEST_AFTER_REJECTION, Math.min(SAFETY, this.factor(error)));
    this.rejectedBefore = true;
  }

  private factor(error: number): number {
    // Single precision: engines differ in the last digits of a power, and a plan has the same digits on all of them.
    return Math.fround(SAFETY * Math.max(error, SMALLEST_ERROR) ** this.exponent);
  }

  /** The step wanted next, however much is left, s. */
  get next(): number {
    return this.wanted;
  }
}
