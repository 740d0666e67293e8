import { describe, expect, it } from 'vitest';
import { envelopeAt, faceFluxAt, fluxProfile, profileAt, runningEnvelope } from '../../../app/draw';
import type { Frames } from '../../../solver/model';

/** Two layers of three points, 20 mm and 10 mm, with a contact between them. */
function frames(rows: number[][], times: number[]): Frames {
  return {
    time_s: Float64Array.from(times),
    position_m: Float64Array.from([0, 0.01, 0.02, 0.02, 0.025, 0.03]),
    layerStart: Int32Array.from([0, 3, 6]),
    temperature_C: Float32Array.from(rows.flat()),
    faceFlux_W_m2: Float32Array.from(times.flatMap((_, i) => [1000 * i, -500 * i])),
  };
}
const three = frames(
  [
    [20, 20, 20, 20, 20, 20],
    [100, 80, 60, 40, 30, 20],
    [50, 60, 60, 50, 40, 30],
  ],
  [0, 100, 200],
);

describe('profileAt', () => {
  it('lies straight between two frames', () => {
    expect([...profileAt(three, 50)]).toEqual([60, 50, 40, 30, 25, 20]);
    expect([...profileAt(three, 100)]).toEqual([100, 80, 60, 40, 30, 20]);
  });

  it('takes the first or last frame outside the run', () => {
    expect(profileAt(three, -5)[0]).toBe(20);
    expect(profileAt(three, 1e9)[0]).toBe(50);
  });

  it('writes into the array it is given', () => {
    const out = new Float64Array(6);
    expect(profileAt(three, 150, out)).toBe(out);
    expect(out[0]).toBe(75);
  });

  it('survives two frames at one time, as at a stage edge', () => {
    const jump = frames(
      [three, three].map((f) => [...f.temperature_C.slice(6, 12)]),
      [100, 100],
    );
    expect(profileAt(jump, 100)[0]).toBe(100);
  });

  it('interpolates the face fluxes alike', () => {
    expect(faceFluxAt(three, 50)).toEqual([500, -250]);
  });
});

describe('the envelope', () => {
  const envelope = runningEnvelope(three);

  it('holds the lowest and highest so far, not those to come', () => {
    const early = envelopeAt(three, envelope, 50, profileAt(three, 50));
    expect([...early.high]).toEqual([60, 50, 40, 30, 25, 20]);
    expect([...early.low]).toEqual([20, 20, 20, 20, 20, 20]);
    const late = envelopeAt(three, envelope, 200, profileAt(three, 200));
    expect([...late.high]).toEqual([100, 80, 60, 50, 40, 30]);
  });

  it('always holds the profile of the moment', () => {
    for (let time = 0; time <= 200; time += 7) {
      const profile = profileAt(three, time);
      const { low, high } = envelopeAt(three, envelope, time, profile);
      profile.forEach((value, i) => {
        expect(value).toBeGreaterThanOrEqual(low[i]);
        expect(value).toBeLessThanOrEqual(high[i]);
      });
    }
  });
});

describe('fluxProfile', () => {
  it('is the conductivity times the slope, with the faces from the run itself', () => {
    const flux = fluxProfile(three, profileAt(three, 100), [2, 5], [4000, -9000]);
    expect(flux.flux[0]).toBe(4000);
    expect(flux.flux[1]).toBeCloseTo((2 * 20) / 0.01, 6);
    expect(flux.flux[3]).toBeCloseTo((5 * 10) / 0.005, 6);
    expect(flux.flux.at(-1)).toBe(9000);
  });

  it('says for each value which layer it is in and how far', () => {
    const flux = fluxProfile(three, profileAt(three, 100), [2, 5], [0, 0]);
    expect(flux.layer).toEqual([0, 0, 0, 1, 1, 1]);
    expect(flux.fraction[1]).toBeCloseTo(0.25, 12);
    expect(flux.fraction[4]).toBeCloseTo(0.75, 12);
  });

  it('does not blow the rounding of stored frames up where points lie close', () => {
    const position = [0, ...Array.from({ length: 40 }, (_, i) => 1e-7 * (i + 1)), 0.05, 0.1];
    const steel: Frames = {
      time_s: Float64Array.from([0]),
      position_m: Float64Array.from(position),
      layerStart: Int32Array.from([0, position.length]),
      temperature_C: Float32Array.from(position.map((x) => 800 - 1000 * x)),
      faceFlux_W_m2: Float32Array.from([45000, -45000]),
    };
    const { flux } = fluxProfile(steel, profileAt(steel, 0), [45], [45000, -45000]);
    for (const value of flux) expect(Math.abs(value - 45000)).toBeLessThan(45);
  });
});
