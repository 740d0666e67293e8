import { describe, expect, it } from 'vitest';
import { layCycle, rowTimes } from '../../../solver/model';
import { playField } from '../../support/madeUpRun';
import { plan } from '../../support/plan';

const at = (times: Float64Array, values: Float64Array, time: number): number => values[times.indexOf(time)];

describe('the history of a probe', () => {
  it('has every step, and the extreme inside a step at its own time', () => {
    const project = plan({ stages: [100], probes: [{ id: 'p', name: 'Face', at: { face: 'end' } }] });
    const { probes } = playField(project, (_, t) => 100 - (t - 33.3) ** 2 / 10, { steps: [10, 60] });
    const { time_s, temperature_C } = probes[0];
    for (const time of [0, 10, 60, 100]) expect([...time_s]).toContain(time);
    const top = temperature_C.indexOf(Math.max(...temperature_C));
    expect(time_s[top]).toBeCloseTo(33.3, 9);
    expect(temperature_C[top]).toBeCloseTo(100, 11);
    expect([...time_s]).toEqual([...time_s].sort((a, b) => a - b));
  });

  it('has every output row to the digit, read from dense output', () => {
    const project = { ...plan({ stages: [60, 40] }), output: { interval: 7 } };
    const { probes } = playField(project, (_, t) => t ** 2 / 50, { steps: 1 });
    const rows = rowTimes(project, layCycle(project));
    expect([...rows].filter((time) => time % 7 !== 0)).toEqual([60, 100]);
    for (const time of rows) expect(at(probes[0].time_s, probes[0].temperature_C, time)).toBeCloseTo(time ** 2 / 50, 11);
  });

  it('shows a jump of an imposed temperature as two rows at one time', () => {
    const project = plan({ stages: [50, 50] });
    const smooth = playField(project, () => 20);
    expect(smooth.probes[0].time_s.filter((time) => time === 50)).toHaveLength(1);
    const { probes, field } = playField(project, (depth, _time, _point, stage) => (depth === 0 && stage === 1 ? 200 : 20));
    const { time_s, temperature_C } = probes[0];
    const first = time_s.indexOf(50);
    expect(first).toBeGreaterThan(0);
    expect([...time_s.slice(first, first + 2)]).toEqual([50, 50]);
    expect([...temperature_C.slice(first, first + 2)]).toEqual([20, 200]);
    expect(time_s.filter((time) => time === 50)).toHaveLength(2);
    expect(field.time_s.filter((time) => time === 50)).toHaveLength(2);
  });

  it('reads between points with the accuracy of six of them, on the named side of a contact', () => {
    const project = plan({
      layers: [0.5, 0.5],
      contacts: [0.01],
      probes: [
        { id: 'a', name: 'Before', at: { interface: 'l1', side: 'before' } },
        { id: 'b', name: 'After', at: { interface: 'l1', side: 'after' } },
        { id: 'c', name: 'On the edge', at: { depth: 0.5 } },
        { id: 'd', name: 'Between', at: { layer: 'l2', fraction: 0.333 } },
      ],
    });
    const { probes } = playField(project, (depth, _, point) => (point < 11 ? Math.exp(depth) : 50 + depth ** 5), { steps: 1 });
    const last = probes.map(({ temperature_C }) => temperature_C.at(-1));
    expect(last[0]).toBeCloseTo(Math.exp(0.5), 12);
    expect(last[1]).toBeCloseTo(50 + 0.5 ** 5, 12);
    expect(last[2]).toBe(last[0]);
    expect(last[3]).toBeCloseTo(50 + 0.6665 ** 5, 11);
    expect(probes[3].position_m).toBeCloseTo(0.6665, 15);
  });

  it('leaves out extremes that are only rounding', () => {
    const project = { ...plan({ stages: [100] }), output: { interval: 100 } };
    const { probes } = playField(project, (_, t) => 20 + 1e-13 * Math.sin(40 * t), { steps: 10 });
    expect(probes[0].time_s.length).toBeLessThanOrEqual(12);
  });
});

describe('the history of the field', () => {
  it('has the coldest, the hottest and the largest difference within one material at every step', () => {
    const project = plan({ layers: [0.5, 0.5], materials: ['a', 'b'], stages: [100] });
    const { field } = playField(project, (depth, t) => 20 + t * (1 - depth) ** 2, { steps: 4 });
    for (const time of [25, 50, 75, 100]) {
      expect(at(field.time_s, field.coldest_C, time)).toBeCloseTo(20, 10);
      expect(at(field.time_s, field.hottest_C, time)).toBeCloseTo(20 + time, 10);
      expect(at(field.time_s, field.withinMaterial_K, time)).toBeCloseTo(0.75 * time, 10);
    }
  });
});
