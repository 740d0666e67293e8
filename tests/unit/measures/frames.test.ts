import { describe, expect, it } from 'vitest';
import { MAX_FRAMES } from '../../../solver/measures';
import { playField } from '../../support/madeUpRun';
import { plan } from '../../support/plan';

describe('frames', () => {
  it('are at most 600, at equal times plus every stage edge, first and last instant included', () => {
    const { frames } = playField(plan({ stages: [100, 33.3, 1 / 3] }), (x, t) => x + t, { steps: 3 });
    expect(frames.time_s.length).toBeLessThanOrEqual(MAX_FRAMES);
    expect(frames.time_s.length).toBeGreaterThan(590);
    for (const edge of [0, 100, 133.3, 133.3 + 1 / 3]) expect([...frames.time_s]).toContain(edge);
    expect(new Set(frames.time_s).size).toBe(frames.time_s.length);
  });

  it('stay at most 600 with a hundred stages', () => {
    const { frames } = playField(plan({ stages: Array.from({ length: 100 }, (_, i) => 1 + Math.sqrt(i)) }), () => 20, {
      steps: 1,
    });
    expect(frames.time_s.length).toBeLessThanOrEqual(MAX_FRAMES);
    expect(frames.time_s.length).toBeGreaterThan(500);
  });

  it('carry the dense field and the flux of both faces at their own times', () => {
    const { frames } = playField(plan({ layers: [1], stages: [100] }), (x, t) => x * t ** 2, { steps: 2 });
    const points = frames.position_m.length;
    frames.time_s.forEach((time, frame) => {
      expect(frames.temperature_C[(frame + 1) * points - 1]).toBeCloseTo(time ** 2, 1);
      expect(frames.faceFlux_W_m2[2 * frame]).toBeCloseTo(time, 3);
      expect(frames.faceFlux_W_m2[2 * frame + 1]).toBeCloseTo(-time, 3);
    });
  });

  it('end where a run stopped, in buffers of their own', () => {
    const { frames } = playField(plan({ stages: [100] }), () => 20, { steps: 10, until: 50 });
    expect(frames.time_s.at(-1)).toBeLessThanOrEqual(50);
    expect(frames.time_s.at(-1)).toBeGreaterThan(49.8);
    expect(frames.temperature_C.length).toBe(frames.time_s.length * frames.position_m.length);
    expect(frames.temperature_C.buffer.byteLength).toBe(frames.temperature_C.byteLength);
  });
});
