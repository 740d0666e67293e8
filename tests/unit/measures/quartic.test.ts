import { describe, expect, it } from 'vitest';
import { quarticThrough, rootBetween, turnsOf, valueOf } from '../../../solver/measures/quartic';

/** (u - a)(u - b)(u - c) as coefficients, integrated: a quartic that turns at a, b and c. */
const turningAt = (a: number, b: number, c: number): number[] => {
  const [k0, k1, k2] = [-a * b * c, a * b + b * c + c * a, -(a + b + c)];
  return [0, k0, k1 / 2, k2 / 3, 1 / 4];
};

describe('quarticThrough', () => {
  it('gives back any quartic from its values at the quarters', () => {
    const p = [7, -3, 12, 40, -25];
    const q = quarticThrough(...([0, 0.25, 0.5, 0.75, 1].map((u) => valueOf(p, u)) as [number, number, number, number, number]));
    q.forEach((c, i) => expect(c).toBeCloseTo(p[i], 11));
  });

  it('meets the first value exactly and keeps a constant constant', () => {
    const q = quarticThrough(20.1, 20.1, 20.1, 20.1, 20.1);
    expect(q).toEqual([20.1, 0, 0, 0, 0]);
  });
});

describe('turnsOf', () => {
  it('finds three turning points, two of them close together', () => {
    const turns = turnsOf(turningAt(0.3, 0.301, 0.9));
    expect(turns).toHaveLength(3);
    [0.3, 0.301, 0.9].forEach((at, i) => expect(turns[i]).toBeCloseTo(at, 9));
  });

  it('finds the one turn of a fourth power, where slope and curvature vanish as well', () => {
    // (u - ½)⁴
    const turns = turnsOf([1 / 16, -1 / 2, 3 / 2, -2, 1]);
    expect(turns).toHaveLength(1);
    expect(turns[0]).toBeCloseTo(0.5, 4);
  });

  it('finds none in a monotone course, nor outside the interval', () => {
    expect(turnsOf([0, 1, 0, 0, 0])).toEqual([]);
    expect(turnsOf([3, 0, 0, 0, 0])).toEqual([]);
    expect(turnsOf(turningAt(-0.5, 1.2, 4))).toEqual([]);
  });
});

describe('rootBetween', () => {
  it('is exact to rounding where Newton alone would run away', () => {
    // Flat in the middle, steep at the ends: u³-like around ½.
    const p = [-1 / 8 - 1e-6, 3 / 4, -3 / 2, 1, 0];
    const root = rootBetween(p, 0, 1);
    expect(root).toBeCloseTo(0.5 + 0.01, 12);
  });

  it('takes an end that is a root itself', () => {
    expect(rootBetween([0, 1, 0, 0, 0], 0, 1)).toBe(0);
    expect(rootBetween([-1, 1, 0, 0, 0], 0, 1)).toBe(1);
  });
});
