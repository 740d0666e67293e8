/** Bodies with every law of format 2 at their faces, in their gaps and inside: exact Jacobians, and no heat lost. */
import { describe, expect, it } from 'vitest';
import type { Exposure, Project, Source } from '../../../solver/model';
import { createRun } from '../../../solver/stepping';
import {
  automatic,
  crankNicolson,
  film,
  implicit,
  systemOf,
  toTheEnd,
  wall,
  type LayerSpec,
  type SchemeRow,
} from '../../support';
import { denseOf } from '../../support/solverTools';

const steel: LayerSpec = { thickness: 0.02, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = {
  thickness: 0.05,
  conductivity: {
    table: [
      [0, 1.2],
      [800, 2],
    ],
  },
  density: 2000,
  heatCapacity: { expression: '800 + 0.3*T' },
};
const gap = { gap: 0.003, emissivities: [0.8, 0.7] as [number, number] };
const quench: Exposure = {
  kind: 'film',
  coefficient: {
    table: [
      [20, 300],
      [120, 9000],
      [300, 4000],
      [500, 350],
      [900, 250],
    ],
  },
  surroundings: 40,
};
const oven: Exposure = {
  kind: 'film',
  coefficient: { correlation: 'naturalVerticalPlate', fluid: 'air', length: 0.5 },
  surroundings: { expression: '400 + 100*sin(t/200)' },
  radiation: { emissivity: 0.8, enclosure: { start: 300, segments: [{ to: 900, duration: 600 }] } },
};
const reacting: Source = { layer: 'l1', power: { expression: '2e5*(1 + 0.002*T) + 1e6*x + 50*t' } };
const pulsed: Source = {
  layer: 'l0',
  power: { start: 1e6, segments: [{ hold: 100 }, { to: -2e5, duration: 300 }, { to: 0, duration: 0 }] },
};

const BODIES: [string, (settings: Partial<Project['settings']>) => Project][] = [
  [
    'a gap, radiation, natural convection and sources in a wall',
    (settings) =>
      wall({
        layers: [{ ...steel, contact: gap }, brick],
        initial: [500, 100],
        stages: [{ lasts: 900, start: oven, end: film(20, 30), sources: [pulsed, reacting] }],
        settings,
      }),
  ],
  [
    'a quenched cylinder with a source that follows its temperature',
    (settings) =>
      wall({
        kind: 'cylinder',
        innerRadius: 0.01,
        layers: [steel, brick],
        initial: 850,
        stages: [{ lasts: 300, start: film(10, 400), end: quench, sources: [reacting] }],
        settings,
      }),
  ],
  [
    'a held face beside a source',
    (settings) =>
      wall({
        kind: 'sphere',
        innerRadius: 0.02,
        layers: [brick, { ...brick, contact: 0 }],
        initial: 100,
        stages: [
          {
            lasts: 300,
            start: { kind: 'temperature', temperature: { expression: '100 + 0.5*t' } },
            end: oven,
            sources: [reacting, { layer: 'l0', power: { expression: '1e5*exp(-T/300)*t' } }],
          },
        ],
        settings,
      }),
  ],
];
const GRIDS = [
  ['nodes', { scheme: 'automatic', grid: { nodes: 6 } }, 'fourthOrder'],
  ['cells', { scheme: 'implicit', step: 1, grid: { cells: 5 } }, 'plain'],
] as const;

describe.each(BODIES)('%s', (_, body) => {
  describe.each(GRIDS)('on %s', (_name, settings, storage) => {
    const { system, state } = systemOf(body(settings), storage);
    const { size } = system;
    // A profile with every temperature off the kinks of the tables.
    const u = Float64Array.from(state.unknowns, (value, row) => value + 13.7 * Math.sin(1 + row) + 0.31);
    const TIME = 57.3;
    const rowsAt = (at: Float64Array, time: number): Float64Array => {
      system.evaluate(at, time);
      return Float64Array.from([...system.inflow, ...system.rates]);
    };

    it('the Jacobian and the slopes of the heats are those of the balances', () => {
      system.evaluate(u, TIME);
      system.linearise(u, TIME);
      const heats = Array.from(
        { length: system.heats },
        (_h, heat) => denseOf(size, (x, out) => out.fill(system.rateTimes(heat, x)))[0],
      );
      // J by solving with it: C/1 − J, undone. Held rows are unit rows.
      const held = new Set(system.heldRows);
      for (let column = 0; column < size; column++) {
        const half = 0.01;
        const moved = (by: number): Float64Array =>
          rowsAt(
            u.map((value, row) => value + (row === column ? by : 0)),
            TIME,
          );
        const [up, down] = [moved(half), moved(-half)];
        const slope = up.map((value, i) => (value - down[i]) / (2 * half));
        system.evaluate(u, TIME);
        system.linearise(u, TIME);
        system.factorise(0, 1);
        // −J e = −column; solving gives e back, where no row is held.
        const back = Float64Array.from(slope.subarray(0, size), (value) => -value);
        for (const row of held) back[row] = row === column ? 1 : 0;
        system.solve(back);
        for (let row = 0; row < size; row++) expect(Math.abs(back[row] - (row === column ? 1 : 0))).toBeLessThan(2e-4);
        heats.forEach((heat, i) => {
          const scale = Math.max(...heat.map(Math.abs));
          expect(Math.abs(heat[column] - slope[size + i])).toBeLessThan(2e-4 * scale + 1e-9);
        });
      }
    });

    it('the slopes by time are those of the balances', () => {
      system.evaluate(u, TIME);
      system.linearise(u, TIME);
      const byTime = [...system.inflowSlope, ...system.rateSlopes];
      const half = 0.01;
      const [up, down] = [rowsAt(u, TIME + half), rowsAt(u, TIME - half)];
      const scale = Math.max(...byTime.map(Math.abs));
      byTime.forEach((slope, i) => expect(Math.abs(slope - (up[i] - down[i]) / (2 * half))).toBeLessThan(1e-5 * scale));
    });

    it('the balances sum to the tracked heats', () => {
      const all = rowsAt(u, TIME);
      const rows = all.subarray(0, size).reduce((sum, value) => sum + value, 0);
      const heats = all.subarray(size).reduce((sum, value) => sum + value, 0);
      const largest = all.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
      expect(Math.abs(rows - heats)).toBeLessThan(1e-12 * largest * size);
    });
  });

  const schemes: SchemeRow[] = [
    automatic(1),
    automatic(0.05),
    implicit(3, { nodes: 11 }),
    implicit(3, { cells: 6 }),
    crankNicolson(3, { nodes: 11 }),
  ];
  it.each(schemes)('loses no heat: $name', ({ under }) => {
    const run = createRun(under(body({})), () => undefined);
    expect(toTheEnd(run).reason).toBe('finished');
    const { closure, in_J, generated_J, stored_J } = run.energy();
    expect(closure).toBeLessThan(1e-9);
    expect(Math.abs(in_J + generated_J - stored_J)).toBeLessThan(1e-9 * (Math.abs(in_J) + Math.abs(generated_J)));
    expect(generated_J).not.toBe(0);
  });
});
