import { describe, expect, it } from 'vitest';
import { linearScale, roundRange, roundStep, roundTo, valueTicks } from '../../../app/draw';

describe('linearScale', () => {
  it('maps values to pixels and back, also on an axis that points up', () => {
    const scale = linearScale(0, 600, 300, 0);
    expect(scale.at(150)).toBe(225);
    expect(scale.valueAt(scale.at(431))).toBeCloseTo(431, 10);
    expect(scale.at(-100)).toBe(350);
  });

  it('puts a domain without length in the middle instead of nowhere', () => {
    const scale = linearScale(20, 20, 0, 100);
    expect(scale.at(20)).toBe(50);
    expect(scale.valueAt(80)).toBe(20);
  });
});

describe('value ticks', () => {
  it('step by 1, 2 or 5 times a power of ten', () => {
    expect([0.3, 1, 1.01, 4, 7, 60].map(roundStep)).toEqual([0.5, 1, 2, 5, 10, 100]);
    expect(roundStep(0)).toBe(1);
    expect(roundStep(Number.NaN)).toBe(1);
  });

  it('lie inside the range and carry no dust of binary fractions', () => {
    expect(valueTicks(0, 1, 11).ticks).toEqual([0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1]);
    expect(valueTicks(21, 587, 7)).toEqual({ ticks: [100, 200, 300, 400, 500], step: 100 });
  });

  it('never number more than asked for', () => {
    for (let most = 2; most < 9; most++) expect(valueTicks(0, 737, most).ticks.length).toBeLessThanOrEqual(most);
  });

  it('end a rounded range, and a flat one gets room either way', () => {
    expect(roundRange(25, 539, 4)).toEqual([0, 600]);
    expect(roundRange(-12, 3, 4)).toEqual([-15, 5]);
    const [low, high] = roundRange(25, 25, 4);
    expect(low).toBeLessThan(25);
    expect(high).toBeGreaterThan(25);
  });

  it('rounds to a step without dust', () => {
    expect(roundTo(0.31, 0.1)).toBe(0.3);
    expect(roundTo(-0.02, 0.1)).toBe(0);
  });
});
