/**
 * Slab in a fluid that grows hotter at a steady rate. Exact: Laplace transform inverted numerically, fixed Talbot, two node counts
 * (cases/c10-ramped-ambient-slab.json). Claim: 0.1 % of the largest change on a normal mesh, 0.01 % on a fine one.
 */
import { describe, expect, it } from 'vitest';
import { automatic, course, crankNicolson, everyScheme, expectWithin, largestChange, solved, temperaturesAt } from '../support';
import ramped from './cases/c10-ramped-ambient-slab.json';
import { wallOf } from './caseWall';

const UNTIL = 86400; // s
const RATE = 0.02; // K/s
const planUntil = (until: number) =>
  wallOf(ramped, [
    {
      lasts: until,
      end: { kind: 'film', coefficient: 25, surroundings: course(20, [{ to: 20 + RATE * until, rate: RATE }]) },
    },
  ]);
const plan = planUntil(UNTIL);
const change = largestChange(ramped.expected_T_degC, ramped.T_initial_degC);

describe('a slab in a fluid that grows hotter at a steady rate', () => {
  it.each(everyScheme({ accuracy: 1.5, grid: { nodes: 21 }, implicit: 10, crankNicolson: 120 }))(
    'within 0.1 % of the largest change: $name',
    ({ under }) => {
      expectWithin(temperaturesAt(under(plan), ramped.positions_m, ramped.times_s), ramped.expected_T_degC, 1e-3 * change);
    },
  );

  it.each([automatic(0.15), crankNicolson(60, { nodes: 101 }), crankNicolson(60, { cells: 100 })])(
    'within 0.01 % of the largest change: $name',
    ({ under }) => {
      expectWithin(temperaturesAt(under(plan), ramped.positions_m, ramped.times_s), ramped.expected_T_degC, 1e-4 * change);
    },
  );

  it('lags behind the fluid as the quasi-steady solution says', () => {
    // Twice as long as the table: there its slowest mode still has 0.55 K to go.
    const [profile] = solved(automatic(0.05).under(planUntil(2 * UNTIL)), [2 * UNTIL]).profiles;
    const fluid = 20 + RATE * 2 * UNTIL;
    const { surface, center } = ramped.quasi_steady.lag_behind_fluid_K;
    expect(Math.abs(fluid - profile(0.1) - surface)).toBeLessThanOrEqual(0.05);
    expect(Math.abs(fluid - profile(0) - center)).toBeLessThanOrEqual(0.05);
  });
});
