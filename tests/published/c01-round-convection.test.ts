/**
 * Solid cylinder and sphere in a fluid. Exact: eigenfunction series, 60 terms in 30-digit arithmetic, checked by Laplace inversion
 * (cases/c01-cylinder-convection.json, c01-sphere-convection.json). Claim: within 0.1 % of |Ti − Ta| on 50 cells, 0.01 % on 200.
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
  type SchemeRow,
} from '../support';
import cylinderCase from './cases/c01-cylinder-convection.json';
import sphereCase from './cases/c01-sphere-convection.json';

const RADIUS = 0.1; // m
const DIFFUSIVITY = 1e-6; // m²/s
const CONDUCTIVITY = 2; // W/(m·K)
const STEP_K = 1000; // Ti − Ta
const secondsOf = (fourier: number): number => (fourier * RADIUS ** 2) / DIFFUSIVITY;

const bodies = [
  { kind: 'cylinder', table: cylinderCase, volume: Math.PI * RADIUS ** 2 },
  { kind: 'sphere', table: sphereCase, volume: (4 / 3) * Math.PI * RADIUS ** 3 },
] as const;

/** θ of the body in K: Ti = 1000 °C, Ta = 0 °C. */
const bodyWith = (kind: 'cylinder' | 'sphere', biot: number, until: number) =>
  wall({
    kind,
    layers: [{ thickness: RADIUS, conductivity: CONDUCTIVITY, density: 2000, heatCapacity: CONDUCTIVITY / (DIFFUSIVITY * 2000) }],
    initial: STEP_K,
    stages: [{ lasts: until, end: film((biot * CONDUCTIVITY) / RADIUS, 0) }],
  });

const normal: SchemeRow[] = [
  ...everyScheme({ accuracy: 1, grid: { nodes: 51 }, implicit: 2, crankNicolson: 10 }),
  crankNicolson(10, { cells: 50 }),
];
const fine: SchemeRow[] = [automatic(0.1), crankNicolson(5, { nodes: 201 }), crankNicolson(5, { cells: 200 })];

describe.each(bodies)('a $kind cooled by convection', ({ kind, table, volume }) => {
  const biotNumbers = [...new Set(table.dimensionless_expected.map(({ Bi }) => Bi))];

  describe.each([
    ['0.1 % of the step', 1e-3, normal],
    ['0.01 % of the step', 1e-4, fine],
  ] as const)('within %s', (_, tolerance, rows) => {
    describe.each(rows)('$name', ({ under }) => {
      it.each(biotNumbers)('centre, halfway and surface at Bi = %d', (biot) => {
        const expected = table.dimensionless_expected.filter(({ Bi }) => Bi === biot);
        const times = expected.map(({ Fo }) => secondsOf(Fo));
        const plan = under(bodyWith(kind, biot, times[times.length - 1]));
        const thetas = expected.map(({ center, mid, surface }) => [center, mid, surface].map((theta) => theta * STEP_K));
        expectWithin(temperaturesAt(plan, [0, RADIUS / 2, RADIUS], times), thetas, tolerance * STEP_K);
      });

      it.each(biotNumbers)('mean temperature, from the heat that is left, at Bi = %d', (biot) => {
        for (const { Fo, mean } of table.dimensionless_expected.filter(({ Bi }) => Bi === biot)) {
          const { energy } = solved(under(bodyWith(kind, biot, secondsOf(Fo))), []);
          const heatPerKelvin = (volume * CONDUCTIVITY) / DIFFUSIVITY;
          expect(Math.abs(STEP_K + energy.stored_J / heatPerKelvin - mean * STEP_K)).toBeLessThanOrEqual(tolerance * STEP_K);
        }
      });
    });
  });

  const { dimensional_example: example } = table;
  const step = example.Ti_degC - example.Ta_degC;
  const plan = (until: number) =>
    wall({
      kind,
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
    });

  it.each([automatic(1e-4 * Math.abs(step)), crankNicolson(0.1, { nodes: 201 })])(
    'of the example is where the series says, within 0.01 % of the step: $name',
    ({ under }) => {
      const times = example.expected.map(({ t_s }) => t_s);
      const expected = example.expected.map(({ T_center_degC, T_mid_degC, T_surface_degC }) => [
        T_center_degC,
        T_mid_degC,
        T_surface_degC,
      ]);
      const depths = [0, example.L_or_R_m / 2, example.L_or_R_m];
      expectWithin(temperaturesAt(under(plan(times[times.length - 1])), depths, times), expected, 1e-4 * Math.abs(step));
    },
  );

  it('says what its heats are per, and takes none through its centre', () => {
    const { energy } = solved(automatic(1).under(plan(60)), []);
    expect(energy.basis).toBe(kind === 'cylinder' ? 'J/m' : 'J');
    expect(energy.byFace_J.start).toBe(0);
    expect(energy.in_J).toBe(energy.byFace_J.end);
  });
});
