/**
 * Plane wall in a fluid. Exact: eigenfunction series, 60 terms in 30-digit arithmetic, checked by Laplace inversion
 * (cases/c01-wall-convection.json). Claim: within 0.1 % of |Ti − Ta| on 50 cells, 0.01 % on 200.
 */
import { describe, expect, it } from 'vitest';
import {
  automatic,
  crankNicolson,
  everyScheme,
  expectWithin,
  film,
  solved,
  temperaturesAt,
  wall,
  wallMeanTheta,
  wallTheta,
  type SchemeRow,
} from '../support';
import wallCase from './cases/c01-wall-convection.json';

const THICKNESS = 0.1; // m
const DIFFUSIVITY = 1e-6; // m²/s
const CONDUCTIVITY = 2; // W/(m·K)
const STEP_K = 1000; // Ti − Ta
const secondsOf = (fourier: number): number => (fourier * THICKNESS ** 2) / DIFFUSIVITY;

/** θ of the wall in K: Ti = 1000 °C, Ta = 0 °C; the middle is the start face. */
const wallWith = (biot: number, until: number) =>
  wall({
    layers: [
      { thickness: THICKNESS, conductivity: CONDUCTIVITY, density: 2000, heatCapacity: CONDUCTIVITY / (DIFFUSIVITY * 2000) },
    ],
    initial: STEP_K,
    stages: [{ lasts: until, end: film((biot * CONDUCTIVITY) / THICKNESS, 0) }],
  });

const biotNumbers = [...new Set(wallCase.dimensionless_expected.map(({ Bi }) => Bi))];
const normal: SchemeRow[] = [
  ...everyScheme({ accuracy: 1, grid: { nodes: 51 }, implicit: 2, crankNicolson: 10 }),
  crankNicolson(10, { cells: 50 }),
];
const fine: SchemeRow[] = [automatic(0.1), crankNicolson(5, { nodes: 201 }), crankNicolson(5, { cells: 200 })];

describe.each([
  ['0.1 % of the step', 1e-3, normal],
  ['0.01 % of the step', 1e-4, fine],
] as const)('a wall cooled by convection, within %s', (_, tolerance, rows) => {
  describe.each(rows)('$name', ({ under }) => {
    it.each(biotNumbers)('temperatures at Bi = %d', (biot) => {
      const expected = wallCase.dimensionless_expected.filter(({ Bi }) => Bi === biot);
      const times = expected.map(({ Fo }) => secondsOf(Fo));
      const plan = under(wallWith(biot, times[times.length - 1]));
      const table = expected.map(({ center, mid, surface }) => [center, mid, surface].map((theta) => theta * STEP_K));
      expectWithin(temperaturesAt(plan, [0, THICKNESS / 2, THICKNESS], times), table, tolerance * STEP_K);
    });

    it.each(biotNumbers)('mean temperature, from the heat that is left, at Bi = %d', (biot) => {
      for (const { Fo, mean } of wallCase.dimensionless_expected.filter(({ Bi }) => Bi === biot)) {
        const { energy } = solved(under(wallWith(biot, secondsOf(Fo))), []);
        const heatPerKelvin = (THICKNESS * CONDUCTIVITY) / DIFFUSIVITY;
        expect(Math.abs(STEP_K + energy.stored_J / heatPerKelvin - mean * STEP_K)).toBeLessThanOrEqual(tolerance * STEP_K);
      }
    });
  });
});

const { dimensional_example: example } = wallCase;

describe.each([automatic(0.08), crankNicolson(0.25, { nodes: 201 })])('a steel plate quenched in a gas, $name', ({ under }) => {
  const plate = (until: number) =>
    under(
      wall({
        layers: [
          {
            thickness: example.L_or_R_m,
            conductivity: example.k_W_mK,
            density: example.rho_kg_m3,
            heatCapacity: example.cp_J_kgK,
          },
        ],
        initial: example.Ti_degC,
        stages: [{ lasts: until, end: film(example.h_W_m2K, example.Ta_degC) }],
      }),
    );
  const step = example.Ti_degC - example.Ta_degC;

  it('is where the series says, within 0.01 % of the step', () => {
    const times = example.expected.map(({ t_s }) => t_s);
    const depths = [0, example.L_or_R_m / 2, example.L_or_R_m];
    const expected = example.expected.map(({ T_center_degC, T_mid_degC, T_surface_degC }) => [
      T_center_degC,
      T_mid_degC,
      T_surface_degC,
    ]);
    expectWithin(temperaturesAt(plate(900), depths, times), expected, 1e-4 * step);
  });

  it('has lost the part of its heat that the series says, within 0.01 %', () => {
    for (const { t_s, Q_over_Q0 } of example.expected) {
      const { energy } = solved(plate(t_s), []);
      const most = step * example.L_or_R_m * example.rho_kg_m3 * example.cp_J_kgK;
      expect(Math.abs(-energy.stored_J / most - Q_over_Q0)).toBeLessThanOrEqual(1e-4);
    }
  });
});

describe('the series of these tests', () => {
  it('gives the tabulated temperatures to nine digits', () => {
    for (const { Bi, Fo, center, mid, surface, mean } of wallCase.dimensionless_expected) {
      expect(wallTheta(Bi, Fo, 0)).toBeCloseTo(center, 9);
      expect(wallTheta(Bi, Fo, 0.5)).toBeCloseTo(mid, 9);
      expect(wallTheta(Bi, Fo, 1)).toBeCloseTo(surface, 9);
      expect(wallMeanTheta(Bi, Fo)).toBeCloseTo(mean, 9);
    }
  });
});
