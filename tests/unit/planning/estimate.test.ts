import { describe, expect, it } from 'vitest';
import { estimate } from '../../../solver/planning/uncertainty/estimate';

/** Numbers f(0) + C s^p at sizes. */
const power = (sizes: readonly number[], order: number, c = 0.3, limit = 7) =>
  sizes.map((size) => ({ size, value: limit + c * size ** order }));

describe('the error of a number from a ladder', () => {
  it.each([
    [1, [3, 1, 1 / 3, 1 / 9]],
    [2, [2, 1, 1 / 2]],
    [1, [1, 1 / 2, 1 / 4]],
  ])('of order %d is found with that order, twice for safety', (order, sizes) => {
    const found = estimate(power(sizes, order), order);
    expect(found?.order).toBeCloseTo(order, 10);
    expect(found?.uncertainty).toBeCloseTo(2 * 0.3, 10);
  });

  it('of an order below the theory is found with the order observed', () => {
    const found = estimate(power([2, 1, 1 / 2], 1.4), 2);
    expect(found?.order).toBeCloseTo(1.4, 10);
    expect(found?.uncertainty).toBeCloseTo(0.6, 10);
  });

  it('never takes an order for better than in theory', () => {
    const found = estimate(power([2, 1, 1 / 2], 4), 2);
    expect(found?.order).toBe(2);
    expect(found?.uncertainty).toBeGreaterThan(2 * 0.3 * (1 - 2 ** -4));
  });

  it('never takes an order for worse than half of the theory', () => {
    expect(estimate(power([2, 1, 1 / 2], 0.1), 2)?.order).toBe(1);
  });

  it('is three times the distance where no order shows', () => {
    const swinging = [
      { size: 2, value: 1 },
      { size: 1, value: 2 },
      { size: 1 / 2, value: 1.4 },
    ];
    const found = estimate(swinging, 1);
    expect(found?.order).toBeNull();
    expect(found?.uncertainty).toBeCloseTo(3 * Math.max(1 / (2 - 1), 0.6 / (1 - 1 / 2)), 12);
  });

  it('takes two numbers at the order of theory, with the greater safety', () => {
    const found = estimate(power([1, 1 / 2], 2), 2);
    expect(found).toEqual({ uncertainty: expect.closeTo(3 * 0.3, 10), order: null });
  });

  it('is not known without a finer number, nor without the number itself', () => {
    expect(estimate(power([2, 1], 2), 2)).toBeNull();
    expect(estimate(power([2, 1 / 2], 2), 2)).toBeNull();
    expect(estimate([], 2)).toBeNull();
  });

  it('is 0 where refinement changes nothing', () => {
    expect(estimate(power([2, 1, 1 / 2], 2, 0), 2)?.uncertainty).toBe(0);
  });
});
