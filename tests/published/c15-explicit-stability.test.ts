/**
 * Largest stable step of the explicit scheme. Exact: 2/λmax of the semi-discrete system, by symmetric eigenvalues; rule
 * Fo (1 + Bi) ≤ 1/2 at the surface: common practice, from memory (cases/c15-explicit-stability.json). Claim: a step 1 % below the limit
 * stays bounded, 2 % above grows.
 */
import { describe, expect, it } from 'vitest';
import { createRun, makeScheme } from '../../solver/stepping';
import { film, systemOf, toTheEnd, wall } from '../support';
import limits from './cases/c15-explicit-stability.json';
import roundLimits from './cases/c15-explicit-stability-cylinder.json';

// k = 15 W/(m·K), ρ = 7900 kg/m³, c = 500 J/(kg·K), L = 0.02 m; the start face is the insulated middle.
type Row = (typeof limits.expected)[number];
const gridOfRow = ({ scheme, M }: Row) => (scheme === 'node' ? { nodes: M + 1 } : { cells: M });
const planOf = (row: Row, step: number, steps: number) =>
  wall({
    layers: [{ thickness: 0.02, conductivity: 15, density: 7900, heatCapacity: 500 }],
    initial: 1,
    stages: [{ lasts: step * steps, end: film(row.h_W_m2K, 0) }],
    settings: { scheme: 'explicit', step, grid: gridOfRow(row) },
  });
const rows = limits.expected.map((row) => ({ ...row, name: `${row.M} ${row.scheme}s, film ${row.h_W_m2K} W/(m²·K)` }));

describe.each(rows)('$name', (row) => {
  const limit = row.exact_limit_dt_s;

  it('the limit shown is 2/λmax, rounded down by no more than 0.1 %', () => {
    const { stability } = createRun(planOf(row, limit / 10, 10), () => undefined);
    expect(stability?.explicit_limit_s).toBeLessThanOrEqual(limit * (1 + 1e-7));
    expect(stability?.explicit_limit_s).toBeGreaterThanOrEqual(limit * (1 - 1.0001e-3));
  });

  it('the step without overshoot is the smallest capacity over conductance', () => {
    const { stability } = createRun(planOf(row, limit / 10, 10), () => undefined);
    expect((stability?.no_overshoot_s ?? 0) / row.positivity_limit_dt_s).toBeCloseTo(1, 6);
  });

  it('a step 1 % below the limit stays bounded', () => {
    let largest = 0;
    let last = 0;
    const run = createRun(planOf(row, 0.99 * limit, 2000), ({ after }) => {
      last = Math.max(...after.map(Math.abs));
      largest = Math.max(largest, last);
    });
    expect(toTheEnd(run).reason).toBe('finished');
    expect(largest).toBeLessThanOrEqual(2);
    expect(last).toBeLessThan(1);
  });

  it('a step 2 % above the limit grows without bound', () => {
    const step = 1.02 * limit;
    const { system, state } = systemOf(planOf(row, step, 2000), 'plain');
    const scheme = makeScheme({ scheme: 'explicit', step }, system, state, 2000 * step);
    scheme.begin(0, true);
    for (let i = 0; i < 2000; i++) scheme.attempt(i * step, step);
    expect(Math.max(...state.unknowns.map(Math.abs))).toBeGreaterThan(1e6);
  });

  it('a step 2 % above the limit is refused, with the limit, the place and what would do', () => {
    const run = createRun(planOf(row, 1.02 * limit, 100), () => {
      throw new Error('a step was taken');
    });
    const outcome = toTheEnd(run);
    expect(outcome).toMatchObject({ reason: 'step-above-limit', reached_s: 0 });
    expect(outcome.message).toContain('Layer 0');
    expect(outcome.remedy?.step_s).toBeLessThanOrEqual(limit);
    expect(outcome.remedy?.step_s).toBeGreaterThan(0.5 * limit);
  });
});

// k = 1.4 W/(m·K), ρ = 2200 kg/m³, c = 880 J/(kg·K), R = 0.06 m, from the centre on.
describe.each(roundLimits.expected.map((row) => ({ ...row, name: `${row.M} ${row.scheme}s, film ${row.h_W_m2K} W/(m²·K)` })))(
  'a solid cylinder of $name',
  (row) => {
    const limit = row.exact_limit_dt_s;
    const planOfCylinder = (step: number, steps: number) =>
      wall({
        kind: 'cylinder',
        layers: [{ thickness: 0.06, conductivity: 1.4, density: 2200, heatCapacity: 880 }],
        initial: 1,
        stages: [{ lasts: step * steps, end: film(row.h_W_m2K, 0) }],
        settings: { scheme: 'explicit', step, grid: row.scheme === 'node' ? { nodes: row.M + 1 } : { cells: row.M } },
      });

    it('has the limit 2/λmax, rounded down by no more than 0.1 %, and the step without overshoot beside it', () => {
      const { stability } = createRun(planOfCylinder(limit / 10, 10), () => undefined);
      expect(stability?.explicit_limit_s).toBeLessThanOrEqual(limit * (1 + 1e-7));
      expect(stability?.explicit_limit_s).toBeGreaterThanOrEqual(limit * (1 - 1.0001e-3));
      expect((stability?.no_overshoot_s ?? 0) / row.positivity_limit_dt_s).toBeCloseTo(1, 6);
    });

    it('stays bounded 1 % below the limit, and is refused 2 % above it', () => {
      let largest = 0;
      const run = createRun(planOfCylinder(0.99 * limit, 2000), ({ after }) => {
        largest = Math.max(largest, ...after.map(Math.abs));
      });
      expect(toTheEnd(run).reason).toBe('finished');
      expect(largest).toBeLessThanOrEqual(2);
      expect(toTheEnd(createRun(planOfCylinder(1.02 * limit, 100), () => undefined)).reason).toBe('step-above-limit');
    });
  },
);
