/** Observed orders: refine, and see how fast the error falls. */
import { expect } from 'vitest';

/** Order from every refinement to the next: log of the ratio of errors over log of the ratio of refinements. */
export const observedOrders = (refinements: readonly number[], errors: readonly number[]): number[] =>
  errors.slice(1).map((error, i) => Math.log(errors[i] / error) / Math.log(refinements[i + 1] / refinements[i]));

/** Every observed order within `within` of the theory's. */
export function expectOrder(order: number, refinements: readonly number[], errors: readonly number[], within = 0.2): void {
  for (const observed of observedOrders(refinements, errors)) {
    expect(Math.abs(observed - order), `orders ${observedOrders(refinements, errors)} of errors ${errors}`).toBeLessThanOrEqual(
      within,
    );
  }
}
