/**
 * Half spaces, as slabs thicker than 6 √(α t). Exact: error-function solutions, H. S. Carslaw and J. C. Jaeger, Conduction of Heat in
 * Solids, 2nd ed., chapter II (cases/c02-*.json); evaluated here a second time with another erfc.
 */
import { describe, expect, it } from 'vitest';
import {
  automatic,
  crankNicolson,
  depthWhere,
  everyScheme,
  expectWithin,
  film,
  filmTheta,
  flux,
  fluxRise,
  heldFaceFlux,
  heldFaceTheta,
  held,
  largestChange,
  solved,
  temperaturesAt,
  wall,
  type Battery,
} from '../support';
import type { Exposure } from '../../solver/model';
import pulse from './cases/c02-flux-pulse.json';
import main from './cases/c02-buried-water-main.json';
import semiInfinite from './cases/c02-semi-infinite.json';
import bodies from './cases/c02-two-bodies-contact.json';

interface SolidCase {
  k_W_mK: number;
  rho_kg_m3: number;
  cp_J_kgK: number;
}
const slab = ({ k_W_mK, rho_kg_m3, cp_J_kgK }: SolidCase, thickness: number) => ({
  thickness,
  conductivity: k_W_mK,
  density: rho_kg_m3,
  heatCapacity: cp_J_kgK,
});
const solidOf = ({ k_W_mK, rho_kg_m3, cp_J_kgK }: SolidCase) => ({
  conductivity: k_W_mK,
  diffusivity: k_W_mK / (rho_kg_m3 * cp_J_kgK),
});

describe('a half space under a step: within 0.2 % of the driving difference', () => {
  const { positions_m: depths, times_s: times } = semiInfinite;
  const solid = solidOf(semiInfinite);
  const INITIAL = 20; // °C
  const plan = (start: Exposure) =>
    wall({ layers: [slab(semiInfinite, 0.32)], initial: INITIAL, stages: [{ lasts: 3600, start }] });
  const battery = (driving: number): Battery => ({
    accuracy: 2e-3 * driving,
    grid: { nodes: 641 },
    implicit: 0.1,
    crankNicolson: 0.5,
  });
  const fluxDriving = largestChange(semiInfinite.expected_T_step_flux, INITIAL);

  describe.each([
    ['temperature', held(250), semiInfinite.expected_T_step_temperature, 230],
    ['flux', flux(4000), semiInfinite.expected_T_step_flux, fluxDriving],
    ['fluid', film(40, 320), semiInfinite.expected_T_convection, 300],
  ] as const)('of its %s', (_, start, expected, driving) => {
    it.each(everyScheme(battery(driving)))('$name', ({ under }) => {
      expectWithin(temperaturesAt(under(plan(start)), depths, times), expected, 2e-3 * driving);
    });
  });

  it.each([automatic(0.1), crankNicolson(0.25, { nodes: 641 })])('flux into the face held at 250 °C, $name', ({ under }) => {
    const found = solved(under(plan(held(250))), times).flux.map(({ start }) => start);
    found.forEach((value, i) => {
      expect(Math.abs(value / semiInfinite.surface_flux_step_temperature_W_m2[i] - 1)).toBeLessThanOrEqual(2e-3);
    });
  });

  it('the tables agree with an evaluation of our own to 1e-6 K', () => {
    const table = (rise: (depth: number, time: number) => number) =>
      times.map((time) => depths.map((depth) => INITIAL + rise(depth, time)));
    const steps = table((depth, time) => 230 * heldFaceTheta(depth, time, solid));
    expectWithin(steps, semiInfinite.expected_T_step_temperature, 1e-6);
    expectWithin(
      table((depth, time) => 4000 * fluxRise(depth, time, solid)),
      semiInfinite.expected_T_step_flux,
      1e-6,
    );
    expectWithin(
      table((depth, time) => 300 * filmTheta(depth, time, 40, solid)),
      semiInfinite.expected_T_convection,
      1e-6,
    );
    const fluxes = times.map((time) => 230 * heldFaceFlux(time, solid));
    expectWithin([fluxes], [semiInfinite.surface_flux_step_temperature_W_m2], 1e-4);
  });
});

describe('a half space heated by a pulse of flux: within 0.5 K', () => {
  const { positions_m: depths, times_s: times } = pulse;
  const plan = wall({
    layers: [slab(pulse, 0.16)],
    initial: 18,
    stages: [{ lasts: 180, start: flux(12000) }, { lasts: 1020 }],
  });

  it.each(everyScheme({ accuracy: 0.5, grid: { nodes: 321 }, implicit: 0.1, crankNicolson: 0.5 }))('$name', ({ under }) => {
    expectWithin(temperaturesAt(under(plan), depths, times), pulse.expected_T_degC, 0.5);
  });

  it('a step of 7 s is cut at the switch-off and stays within 0.5 K later on', () => {
    const [, , , ...later] = temperaturesAt(crankNicolson(7, { nodes: 321 }).under(plan), depths, times);
    expectWithin(later, pulse.expected_T_degC.slice(3), 0.5);
  });

  it('the table agrees with an evaluation of our own to 1e-6 K', () => {
    const solid = solidOf(pulse);
    const table = times.map((time) =>
      depths.map((depth) => 18 + 12000 * (fluxRise(depth, time, solid) - fluxRise(depth, time - 180, solid))),
    );
    expectWithin(table, pulse.expected_T_degC, 1e-6);
  });
});

describe('two half spaces in perfect contact: within 0.5 K', () => {
  // 6 √(α t) is 0.37 m in A and 0.09 m in B; A lies before B.
  const DEPTH_A = 0.4;
  const layer = ({ k, rho, cp }: { k: number; rho: number; cp: number }, thickness: number) =>
    slab({ k_W_mK: k, rho_kg_m3: rho, cp_J_kgK: cp }, thickness);
  const plan = wall({
    layers: [layer(bodies.A, DEPTH_A), layer(bodies.B, 0.1)],
    initial: [bodies.A.T0_degC, bodies.B.T0_degC],
    stages: [{ lasts: 300 }],
  });
  const depths = bodies.positions_m.map((position) => DEPTH_A + position);

  it.each(everyScheme({ accuracy: 0.5, grid: { nodes: [401, 401] }, implicit: 0.02, crankNicolson: 0.1 }))(
    '$name',
    ({ under }) => {
      expectWithin(temperaturesAt(under(plan), depths, bodies.times_s), bodies.expected_T_degC, 0.5);
    },
  );

  it('meet at the temperature weighted by their effusivities', () => {
    const effusivity = ({ k, rho, cp }: { k: number; rho: number; cp: number }): number => Math.sqrt(k * rho * cp);
    const [a, b] = [effusivity(bodies.A), effusivity(bodies.B)];
    const contact = (a * bodies.A.T0_degC + b * bodies.B.T0_degC) / (a + b);
    expect(contact).toBeCloseTo(bodies.expected_contact_temperature_degC, 6);
  });
});

describe('frost after 60 days at the surface: its depth within 2 mm on a mesh of 10 mm', () => {
  const DAYS_60 = 60 * 86400;
  const plan = wall({ layers: [slab(main, 5.5)], initial: 20, stages: [{ lasts: DAYS_60, start: held(-15) }] });

  it.each(everyScheme({ accuracy: 0.05, grid: { nodes: 551 }, implicit: 1200, crankNicolson: 3600 }))('$name', ({ under }) => {
    const [profile] = solved(under(plan), [DAYS_60]).profiles;
    expect(Math.abs(depthWhere(profile, 0, 0.1, 2) - main.expected_depth_m)).toBeLessThanOrEqual(0.002);
    // The published answer is the same, rounded up: F. P. Incropera and D. P. DeWitt, Fundamentals of Heat and Mass Transfer.
    expect(Math.abs(depthWhere(profile, 0, 0.1, 2) - main.published_depth_m)).toBeLessThanOrEqual(0.005);
    // A profile that is 2 mm off is off by this at the steepest.
    const slope = Math.abs(profile(0.01) - profile(0)) / 0.01;
    expectWithin(
      [main.expected_profile_degC.map(([depth]) => profile(depth))],
      [main.expected_profile_degC.map(([, t]) => t)],
      0.002 * slope,
    );
  });
});
