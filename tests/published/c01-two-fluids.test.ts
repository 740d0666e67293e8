/**
 * Wall between two fluids. Exact: Laplace transform inverted numerically, fixed Talbot, two node counts
 * (cases/c01-wall-two-fluids.json). Claim: 0.1 % of the largest change on a normal mesh, 0.01 % on a fine one.
 */
import { describe, expect, it } from 'vitest';
import { automatic, crankNicolson, everyScheme, expectWithin, film, largestChange, solved, temperaturesAt } from '../support';
import fluids from './cases/c01-wall-two-fluids.json';
import { layersOf, wallOf } from './caseWall';

const plan = wallOf(fluids, [{ lasts: 86400, start: film(35, 95), end: film(8, -5) }]);
const change = largestChange(fluids.expected_T_degC, fluids.T_initial_degC);
const normal = { accuracy: 0.07, grid: { nodes: 51 }, implicit: 1, crankNicolson: 10 };

describe('a wall between two fluids', () => {
  it.each(everyScheme(normal))('within 0.1 % of the largest change: $name', ({ under }) => {
    expectWithin(temperaturesAt(under(plan), fluids.positions_m, fluids.times_s), fluids.expected_T_degC, 1e-3 * change);
  });

  it.each([automatic(0.007), crankNicolson(2, { nodes: 201 }), crankNicolson(2, { cells: 200 })])(
    'within 0.01 % of the largest change: $name',
    ({ under }) => {
      expectWithin(temperaturesAt(under(plan), fluids.positions_m, fluids.times_s), fluids.expected_T_degC, 1e-4 * change);
    },
  );

  it('ends in the steady profile of its resistances in series', () => {
    const [{ thickness, conductivity }] = layersOf(fluids);
    const { profiles, flux } = solved(
      automatic(0.001).under(wallOf(fluids, [{ lasts: 1e7, start: film(35, 95), end: film(8, -5) }])),
      [1e7],
    );
    const through = (95 - -5) / (1 / 35 + thickness / conductivity + 1 / 8);
    expect(profiles[0](0)).toBeCloseTo(95 - through / 35, 3);
    expect(profiles[0](thickness)).toBeCloseTo(-5 + through / 8, 3);
    expect(flux[0].start).toBeCloseTo(through, 3);
    expect(flux[0].end).toBeCloseTo(-through, 3);
  });
});
