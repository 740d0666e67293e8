import { describe, expect, it } from 'vitest';
import { nodeWeights, weightOnNode } from '../../../solver/heat/weights';

const graded = Float64Array.of(1, 1.4, 1.9, 1.5, 1.2, 0.8);
const positions = (lengths: Float64Array): number[] => lengths.reduce<number[]>((x, h) => [...x, x[x.length - 1] + h], [0]);

/** What a row stores of a heat content H(x). */
function stored(lengths: Float64Array, kind: 'plain' | 'fourthOrder', heat: (x: number) => number): number[] {
  const { before, here, after, far } = nodeWeights(lengths, kind);
  const x = positions(lengths);
  const last = lengths.length;
  return x.map((_, i) => {
    let sum = here[i] * heat(x[i]);
    if (i > 0) sum += before[i] * heat(x[i - 1]);
    if (i < last) sum += after[i] * heat(x[i + 1]);
    if (i === 0 && last > 1) sum += far[0] * heat(x[2]);
    if (i === last && last > 1) sum += far[last] * heat(x[last - 2]);
    return sum;
  });
}

/** ∫ hat × x^p by Simpson's rule on each element, exact up to third degree in all. */
function moments(lengths: Float64Array, power: number): number[] {
  const x = positions(lengths);
  const out = x.map(() => 0);
  lengths.forEach((h, i) => {
    const [left, middle, right] = [x[i] ** power, (x[i] + h / 2) ** power, x[i + 1] ** power];
    out[i] += (h / 6) * (left + 2 * middle);
    out[i + 1] += (h / 6) * (2 * middle + right);
  });
  return out;
}

describe('storage weights', () => {
  it.each(['plain', 'fourthOrder'] as const)('sum to the layer over all rows: %s', (kind) => {
    const total = stored(graded, kind, () => 1).reduce((a, b) => a + b, 0);
    expect(total).toBeCloseTo(
      graded.reduce((a, b) => a + b, 0),
      13,
    );
  });

  it('of fourth order are exact for a parabola on any spacing, ends included', () => {
    for (const power of [0, 1, 2]) {
      const exact = moments(graded, power);
      stored(graded, 'fourthOrder', (x) => x ** power).forEach((value, i) => expect(value).toBeCloseTo(exact[i], 12));
    }
  });

  it('that are plain are exact for a line only where neighbours are equally far', () => {
    const equal = new Float64Array(4).fill(1);
    const exact = moments(equal, 1);
    const found = stored(equal, 'plain', (x) => x);
    for (const i of [1, 2, 3]) expect(found[i]).toBeCloseTo(exact[i], 13);
    expect(Math.abs(found[0] - exact[0])).toBeGreaterThan(0.1);
  });

  it('of fourth order on equal spacing are (1, 10, 1)/12 inside and (7, 6, −1)/24 at the ends', () => {
    const { before, here, after, far } = nodeWeights(new Float64Array(5).fill(12), 'fourthOrder');
    expect([before[2], here[2], after[2], far[2]]).toEqual([1, 10, 1, 0]);
    expect([here[0] * 2, after[0] * 2, far[0] * 2].map((w) => Number(w.toFixed(12)))).toEqual([7, 6, -1]);
    expect([here[5] * 2, before[5] * 2, far[5] * 2].map((w) => Number(w.toFixed(12)))).toEqual([7, 6, -1]);
  });

  it('take a line in a layer of one element', () => {
    const one = Float64Array.of(6);
    expect(stored(one, 'fourthOrder', (x) => x)).toEqual(moments(one, 1));
  });

  it('are plain in the rows asked for, and nowhere else', () => {
    const { before, after, far, here } = nodeWeights(graded, 'fourthOrder', { start: 2, end: 1 });
    expect([before[0], after[0], far[0], before[1], after[1]]).toEqual([0, 0, 0, 0, 0]);
    expect(here[1]).toBeCloseTo(1.2, 14);
    expect(before[2]).not.toBe(0);
    expect([before[6], far[6]]).toEqual([0, 0]);
    expect(before[5]).not.toBe(0);
  });

  it.each(['plain', 'fourthOrder'] as const)('count every node once in the part that it stands for: %s', (kind) => {
    const weights = nodeWeights(graded, kind);
    const total = weights.here.reduce((sum, _, i) => sum + weightOnNode(weights, i), 0);
    expect(total).toBeCloseTo(
      graded.reduce((a, b) => a + b, 0),
      13,
    );
  });
});
