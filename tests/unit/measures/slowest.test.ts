import { describe, expect, it } from 'vitest';
import { playField, type FieldFunction } from '../../support/madeUpRun';
import { plan } from '../../support/plan';

const LENGTH = 1000;
/** A place that closes on 500 °C with a time constant of its own. */
const closing =
  (constant: (depth: number) => number): FieldFunction =>
  (depth, t) =>
    20 + 480 * (1 - Math.exp(-t / constant(depth)));
/** When such a place is 5 % of its own change from its end. */
const closedAt = (constant: number): number => -constant * Math.log(0.05 + 0.95 * Math.exp(-LENGTH / constant));

describe('the slowest place', () => {
  it('is where the last 5 % of the own change are closed last, refined between points and inside steps', () => {
    const constant = (x: number): number => 200 - 3e4 * (x - 0.043) ** 2;
    const { first } = playField(plan({ layers: [0.1], stages: [LENGTH] }), closing(constant), { steps: 50 });
    expect(first.slowest?.position_m).toBeCloseTo(0.043, 4);
    expect(first.slowest?.time_s).toBeCloseTo(closedAt(200), 1);
    expect(first.slowest).toMatchObject({ layer: 'l1', stage: 's1' });
  });

  it('keeps its time to 1e-6 of the stage when 40 000 steps are joined', () => {
    const project = plan({ layers: [0.1], stages: [LENGTH] });
    const few = { layerStart: Int32Array.of(0, 2), position: Float64Array.of(0, 0.1) };
    const { first } = playField(
      project,
      closing((x) => 100 + 1000 * x),
      { steps: 40000, points: few },
    );
    expect(Math.abs((first.slowest?.time_s ?? 0) - closedAt(200))).toBeLessThan(1e-6 * LENGTH);
    expect(first.slowest?.position_m).toBe(0.1);
  });

  it('leaves out places that change less than 5 % of the largest change', () => {
    // The deepest quarter would be the slowest by far, but moves by 4 K of 400.
    const field: FieldFunction = (x, t) => {
      const slow = x > 0.75;
      return 20 + (slow ? 4 : 400) * (1 - Math.exp(-t / (slow ? 900 : 100)));
    };
    const { first } = playField(plan({ layers: [1], stages: [LENGTH] }), field);
    expect(first.slowest?.position_m).toBeLessThanOrEqual(0.75);
  });

  it('is null where nothing changes by 1 K', () => {
    const { first, stages } = playField(plan({ stages: [100] }), (_, t) => 20 + t / 101);
    expect(first.slowest).toBeNull();
    expect(stages[0].slowest).toBeNull();
  });

  it('counts the last time outside, after an overshoot', () => {
    // 20 → 120 °C, over to 130 and back: within 5 K for good only after the overshoot.
    const project = plan({ layers: [0.1], stages: [100] });
    const { first } = playField(project, (_, t) => (t < 40 ? 20 + 2.75 * t : t < 80 ? 130 - (t - 40) / 4 : 120), {
      steps: [40, 80],
    });
    expect(first.slowest?.time_s).toBeCloseTo(60, 9);
  });

  it('is that of the last stage that heats; stages beside it have their own', () => {
    const project = plan({ layers: [0.1], stages: [100, 100, 100] });
    const heat = (t: number): number => 20 + 4 * t;
    const { first, stages } = playField(project, (x, t) => {
      if (t <= 100) return heat(t);
      return t <= 200 ? heat(t) + x : 820 - 3 * (t - 200) + x;
    });
    expect(first.slowest?.stage).toBe('s2');
    expect(first.slowest?.time_s).toBeCloseTo(195, 6);
    expect(stages.map(({ slowest }) => slowest?.time_s.toFixed(3))).toEqual(['95.000', '195.000', '295.000']);
  });

  it('is that of the last stage that changes where none heats, an insulated rest included', () => {
    const project = plan({ layers: [0.1], stages: [100, 100] });
    // Cooling, then a rest in which heat only evens out: the mean stays.
    const { first } = playField(project, (x, t) => (t <= 100 ? 500 - t : 400) + (200 - t) * (x - 0.05) * 10);
    expect(first.slowest?.stage).toBe('s2');
    // With a heating stage in front, that one is looked at.
    const heated = playField(project, (x, t) => (t <= 100 ? 500 + t : 600) + (200 - t) * (x - 0.05) * 10);
    expect(heated.first.slowest?.stage).toBe('s1');
  });

  it('is given up to the stop of a run that stopped', () => {
    const project = plan({ layers: [0.1], stages: [100, 100] });
    const { first, stages } = playField(project, (_, t) => 20 + t, { steps: 10, until: 150 });
    expect(first.slowest?.time_s).toBeCloseTo(147.5, 9);
    expect(stages.map(({ end_s }) => end_s)).toEqual([100, 150]);
  });
});
