/**
 * A source switched on in a slab and in a solid cylinder. Exact: Laplace transforms inverted by Talbot's method with two node counts
 * (cases/c10-source-*-transient.json). Claim: 0.1 % of the largest change at a normal mesh, 0.01 % at a fine one.
 */
import { describe, expect, it } from 'vitest';
import type { Project } from '../../solver/model';
import { automatic, crankNicolson, expectWithin, film, solved, temperaturesAt, wall, type SchemeRow } from '../support';
import cylinderCase from './cases/c10-source-cylinder-transient.json';
import slabCase from './cases/c10-source-slab-transient.json';

type Power = { power: number } | { expression: string };
const withSource = (
  kind: 'wall' | 'cylinder',
  given: typeof slabCase,
  coefficient: number,
  around: number,
  power: Power,
): Project => {
  const [{ to_m, k_W_mK, rho_cp_J_m3K }] = given.layers;
  return wall({
    kind,
    layers: [{ thickness: to_m, conductivity: k_W_mK, density: 1000, heatCapacity: rho_cp_J_m3K / 1000 }],
    initial: given.T_initial_degC,
    stages: [
      {
        lasts: given.times_s[given.times_s.length - 1],
        end: film(coefficient, around),
        sources: [{ layer: 'l0', power: 'power' in power ? power.power : power }],
      },
    ],
  });
};

describe.each([
  ['slab', (power: Power) => withSource('wall', slabCase, 250, 20, power), slabCase],
  ['solid cylinder', (power: Power) => withSource('cylinder', cylinderCase, 60, 25, power), cylinderCase],
] as const)('a %s', (_, project, given) => {
  const { positions_m, times_s, expected_T_degC, T_initial_degC } = given;
  const power = given.layers[0].source_W_m3;
  const change = Math.max(...expected_T_degC.flat()) - T_initial_degC;
  const schemes: [SchemeRow, number][] = [
    [automatic(0.1), 0.1],
    [automatic(0.01), 0.01],
    [crankNicolson(2, { nodes: 51 }), 1e-3 * change],
    [crankNicolson(2, { cells: 50 }), 1e-3 * change],
    [crankNicolson(0.5, { nodes: 201 }), 1e-4 * change],
  ];

  it.each(schemes)('is as warm as the exact solution: $name within %d K', ({ under }, within) => {
    expectWithin(temperaturesAt(under(project({ power })), positions_m, times_s), expected_T_degC, within);
  });

  it('is the same where the source is an expression that comes to the same', () => {
    const expression = `${power} + 0*T + 0*x + 0*t`;
    const { under } = automatic(0.01);
    expectWithin(temperaturesAt(under(project({ expression })), positions_m, times_s), expected_T_degC, 0.01);
  });

  it('keeps account of what the source gave', () => {
    const { energy } = solved(automatic(0.1).under(project({ power })), []);
    const [{ to_m }] = given.layers;
    const volume = energy.basis === 'J/m' ? Math.PI * to_m ** 2 : to_m;
    expect(energy.generated_J / (power * volume * times_s[times_s.length - 1])).toBeCloseTo(1, 12);
    expect(energy.closure).toBeLessThan(1e-12);
  });
});
