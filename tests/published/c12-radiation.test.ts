/**
 * A slab that radiates as it cools, and a wall under the standard fire curve. Reference: independent fine numerics with
 * Richardson extrapolation, within 1e-5 K (cases/c12-slab-radiation.json, cases/c12-wall-iso834.json). Claim: 0.1 % of the largest
 * change; the automatic scheme is held to the accuracy asked for.
 */
import { describe, it } from 'vitest';
import type { Exposure, Project } from '../../solver/model';
import { automatic, crankNicolson, expectWithin, film, implicit, temperaturesAt, wall } from '../support';
import slabCase from './cases/c12-slab-radiation.json';
import fireCase from './cases/c12-wall-iso834.json';

const slab = (): Project =>
  wall({
    layers: [{ thickness: 0.08, conductivity: slabCase.inputs.k, density: 1000, heatCapacity: slabCase.inputs.rho_cp / 1000 }],
    initial: 1200,
    stages: [
      {
        lasts: 10800,
        end: { kind: 'film', coefficient: slabCase.inputs.h, surroundings: 30, radiation: { emissivity: slabCase.inputs.eps } },
      },
    ],
  });

const fire: Exposure = {
  kind: 'film',
  coefficient: fireCase.inputs.h,
  surroundings: { expression: '20 + 345*log10(8*t/60 + 1)' },
  radiation: { emissivity: fireCase.inputs.eps },
};
const wallInFire = (): Project =>
  wall({
    layers: [{ thickness: 0.2, conductivity: 1.6, density: 2300, heatCapacity: 1000 }],
    initial: 20,
    stages: [{ lasts: 14400, start: fire, end: film(9, 20) }],
  });

describe.each([
  ['slab that radiates', slab, slabCase, 883],
  ['wall in a standard fire', wallInFire, fireCase, 1107],
] as const)('a %s', (_, project, { positions_m, times_s, expected_T_degC }, change) => {
  it.each([1, 0.1, 0.01])('is met within the accuracy asked for: %d K', (accuracy) => {
    const { under } = automatic(accuracy);
    expectWithin(temperaturesAt(under(project()), positions_m, times_s), expected_T_degC, accuracy);
  });

  it.each([crankNicolson(20, { nodes: 101 }), crankNicolson(20, { cells: 100 }), implicit(2, { nodes: 101 })])(
    'is met within 0.1 % of the change: $name',
    ({ under }) => {
      expectWithin(temperaturesAt(under(project()), positions_m, times_s), expected_T_degC, 1e-3 * change);
    },
  );
});
