/** The reference itself beside exact solutions: it shares nothing with the solver that it judges. */
import { describe, expect, it } from 'vitest';
import type { Project } from '../../solver/model';
import { plan, requirement } from '../support/plan';
import { EMBEDDED, GAMMA, LAST, TIMES, WEIGHTS } from './reference/esdirk';
import { reference } from './reference';

/** 0.1 m of k 40, ρ 8000, cp 500: α = 1e-5 m²/s. */
const atEnd = (parts: Parameters<typeof plan>[0], limit: number): Project =>
  plan({
    ...parts,
    requirements: [requirement({ kind: 'reaches', sense: 'atLeast', limit }, { kind: 'stageEnd', stage: 's1' })],
  });

describe('the reference', () => {
  it('has the coefficients of a method of order 4, embedded order 3', () => {
    const rows = WEIGHTS.map((row, i) => [...row, ...(i > 0 ? [GAMMA] : [])]);
    rows.forEach((row, i) => expect(row.reduce((sum, a) => sum + a, 0)).toBeCloseTo(TIMES[i], 13));
    for (const weights of [LAST, EMBEDDED]) {
      [1, 1 / 2, 1 / 3].forEach((moment, power) =>
        expect(weights.reduce((sum, b, i) => sum + b * TIMES[i] ** power, 0)).toBeCloseTo(moment, 13),
      );
    }
    expect(LAST.reduce((sum, b, i) => sum + b * TIMES[i] ** 3, 0)).toBeCloseTo(1 / 4, 13);
  });

  it('finds the insulated face of a wall whose other face is held, within 1e-4 K and its own doubt', () => {
    const project = atEnd(
      {
        stages: [600],
        exposures: { start: { kind: 'temperature', temperature: 520 }, end: { kind: 'insulated' } },
        probes: [{ id: 'p', name: 'Far', at: { face: 'end' } }],
      },
      100,
    );
    const fourier = (1e-5 * 600) / 0.1 ** 2;
    let left = 0;
    for (let n = 0; n < 40; n++) {
      const m = (n + 0.5) * Math.PI;
      left += ((2 * (-1) ** n) / m) * Math.exp(-m * m * fourier);
    }
    const [{ value, valueDoubt }] = reference(project).answers;
    const exact = 520 + (20 - 520) * left;
    expect(Math.abs((value ?? NaN) - exact)).toBeLessThan(1e-4);
    expect(valueDoubt).toBeLessThan(1e-4);
  });

  it('finds the face of a deep wall under a constant flux, within 1e-4 K', () => {
    const project = atEnd(
      { layers: [0.4], stages: [300], exposures: { start: { kind: 'flux', flux: 1e5 }, end: { kind: 'insulated' } } },
      100,
    );
    const exact = 20 + ((2 * 1e5) / 40) * Math.sqrt((1e-5 * 300) / Math.PI);
    expect(Math.abs((reference(project).answers[0].value ?? NaN) - exact)).toBeLessThan(1e-4);
  });

  it('finds a solid sphere, all of it, that a constant flux warms evenly in the long run', () => {
    const project = atEnd(
      {
        stages: [3000],
        exposures: { start: { kind: 'insulated' }, end: { kind: 'flux', flux: 1e4 } },
        probes: [{ id: 'p', name: 'Face', at: { face: 'end' } }],
      },
      100,
    );
    project.part.kind = 'sphere';
    // Mean rise 3 q t / (ρ c R); the face is q R / (5 k) hotter than the mean.
    const exact = 20 + (3 * 1e4 * 3000) / (8000 * 500 * 0.1) + (1e4 * 0.1) / (5 * 40);
    expect(Math.abs((reference(project).answers[0].value ?? NaN) - exact)).toBeLessThan(1e-4);
  });

  it('keeps the heat of a change of phase: a wall that takes up as much as it is given', () => {
    const project = atEnd({ stages: [8000], exposures: { start: { kind: 'flux', flux: 2e4 }, end: { kind: 'insulated' } } }, 100);
    project.materials[0].latent = [{ heat: 2e5, from: 40, to: 60 }];
    project.requirements[0].of = { point: 'coldest' };
    // 1.6e8 J/m² into 800 kg/m²: 2e5 J/kg stand for the change, which leaves nothing for warmth but what was there.
    const { value } = reference(project).answers[0];
    expect(value).toBeGreaterThan(20);
    expect(value).toBeLessThan(60);
  });
});
