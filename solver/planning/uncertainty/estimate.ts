/**
 * The error of a number from the same number on a ladder of refinement, after Roache's grid convergence index.
 *
 *   f(s) = f(0) + C s^p                                         s size, p order observed
 *   p = ln |f(r) − f(1)| / |f(1) − f(1/r)| / ln r               r ratio of sizes
 *   error of f(1) = |f(1) − f(s)| / |1 − s^p|                   the largest of all s ≠ 1
 *
 * P. J. Roache, Perspective: a method for uniform reporting of grid refinement studies, Journal of Fluids Engineering 116
 * (1994) 405–413. An order is never taken as better than in theory (I. Celik et al., Journal of Fluids Engineering 130 (2008)
 * 078001). Roache's safety factor where an order is observed is 1.25; 2 is what the 95 % took on random plans
 * (tests/references), whose errors come from kinks and from steps that grids choose anew as much as from smooth terms.
 */

/** A number at a size. */
export interface Sample {
  readonly size: number;
  readonly value: number;
}

export interface Estimate {
  /** Half the width of the interval. */
  readonly uncertainty: number;
  /** Order observed; null where the numbers do not converge as an order says, or are too few. */
  readonly order: number | null;
}

/** Where an order is observed, and where it is taken from theory. */
const SAFETY = { observed: 2, assumed: 3 };
/** An order observed below this part of the theory is taken as this part. */
const LEAST_ORDER = 0.5;

/** From samples coarse to fine, size 1 and at least one finer among them; null if not so. `order`: that in theory. */
export function estimate(samples: readonly Sample[], order: number): Estimate | null {
  const at = samples.find(({ size }) => size === 1);
  if (at === undefined || samples[samples.length - 1].size >= 1) return null;
  const observed = observedOrder(samples, order);
  const used = observed ?? order;
  const errors = samples
    .filter(({ size }) => size !== 1)
    .map(({ size, value }) => Math.abs(at.value - value) / Math.abs(1 - size ** used));
  return { uncertainty: Math.max(...errors) * (observed === null ? SAFETY.assumed : SAFETY.observed), order: observed };
}

/** From the first three samples that converge. */
function observedOrder(samples: readonly Sample[], order: number): number | null {
  for (let i = 2; i < samples.length; i++) {
    const [a, b, c] = samples.slice(i - 2, i + 1);
    // Numbers that swing, or drift apart, show no order.
    const ratio = (a.value - b.value) / (b.value - c.value);
    if (ratio > 1) return Math.min(order, Math.max(LEAST_ORDER * order, Math.log(ratio) / Math.log(a.size / b.size)));
  }
  return null;
}
