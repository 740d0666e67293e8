import { describe, expect, it } from 'vitest';
import { madeUpStep, playField, type FieldFunction } from '../../support/madeUpRun';
import { plan, requirement } from '../../support/plan';

describe('the hottest point and the largest differences', () => {
  it('are found inside steps and between points', () => {
    // A hump that wanders: highest 300 °C, at depth 0.0437 m and 41.7 s.
    const project = plan({ layers: [0.1], stages: [100] });
    const { first } = playField(project, (x, t) => 300 - 4e4 * (x - 0.0437) ** 2 - 0.02 * (t - 41.7) ** 2, { steps: 5 });
    expect(first.hottest?.temperature_C).toBeCloseTo(300, 8);
    expect(first.hottest?.position_m).toBeCloseTo(0.0437, 10);
    expect(first.hottest?.time_s).toBeCloseTo(41.7, 6);
    expect(first.hottest?.layer).toBe('l1');
  });

  it('tell between which depths, when, and in which material', () => {
    const project = plan({ layers: [0.5, 0.5], materials: ['a', 'b'], stages: [100] });
    const bell = (t: number): number => 1 - ((t - 62) / 50) ** 2;
    const { first } = playField(project, (x, t) => 20 + bell(t) * (x <= 0.5 ? 40 * (0.5 - x) : 200 * (x - 0.5)), { steps: 4 });
    expect(first.largestDifference?.value_K).toBeCloseTo(100, 8);
    expect(first.largestDifference?.time_s).toBeCloseTo(62, 5);
    expect(first.largestDifference?.between).toEqual([0.5, 1]);
    expect(first.largestDifferenceInMaterial).toMatchObject({ material: 'b', between: [0.5, 1] });
  });

  it('follow a difference that is largest where the hottest point leaps from one face to the other', () => {
    // Start face cools, end face heats, the middle stays: the difference is smallest where they meet, at 37 s, largest at 0.
    const project = plan({ layers: [1], stages: [100], requirements: [] });
    const { first, field } = playField(project, (x, t) => (x < 0.5 ? 100 - t : 26 + t) * Math.abs(2 * x - 1), { steps: 3 });
    expect(first.hottest?.temperature_C).toBeCloseTo(126, 9);
    expect(first.hottest?.position_m).toBe(1);
    const lowest = Math.min(...field.hottest_C);
    expect(lowest).toBeGreaterThan(63 - 1e-9);
    expect(lowest).toBeLessThan(63.3);
  });

  it('are null where there is no difference', () => {
    const { first } = playField(plan({ stages: [100] }), (_, t) => 20 + t);
    expect(first.largestDifference).toBeNull();
    expect(first.largestDifferenceInMaterial).toBeNull();
    expect(first.hottest).toEqual({ position_m: 0, layer: 'l1', time_s: 100, temperature_C: 120 });
  });

  it('find a point that is hottest only between the quarters of a step', () => {
    // The middle point stays at 100 °C; the others have 99.9, 99.9, 90, 99.9, 99.9 at the quarters and swing above it between.
    const swing = [99.9, 99.9, 90, 99.9, 99.9];
    const points = { position: Float64Array.of(0, 0.05, 0.1), layerStart: Int32Array.of(0, 3) };
    const field: FieldFunction = (_, t, point) => (point === 1 ? 100 : swing[Math.round(t / 25)]);
    const profile = new Float64Array(3);
    const step = madeUpStep(points, field, 0, 100);
    let highest = 0;
    for (let k = 0; k <= 1000; k++) {
      step.at(k / 1000, profile);
      highest = Math.max(highest, ...profile);
    }
    expect(highest).toBeGreaterThan(101);
    const { first } = playField(plan({ layers: [0.1], stages: [100] }), field, { steps: 1, points });
    expect(first.hottest?.temperature_C).toBeCloseTo(highest, 3);
    expect(first.hottest?.position_m).toBe(0);
  });

  it('are at the first instant of a plateau, whatever its rounding', () => {
    const project = plan({ stages: [100], requirements: [requirement({ kind: 'staysBelow', limit: 90 })] });
    const { first, answers } = playField(project, (x, t) => 20 + (t < 40 ? t : 40) * (x === 0 ? 2 : 1) + 1e-13 * t, {
      steps: [40],
    });
    expect(first.hottest?.time_s).toBe(40);
    expect(first.largestDifference?.time_s).toBe(40);
    expect(answers[0].time_s).toBe(40);
  });
});
