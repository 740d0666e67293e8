import { describe, expect, it } from 'vitest';
import { gridOf, temperatureRange, wallLayers } from '../../../solver/grid';
import { WallSystem, type StorageKind } from '../../../solver/heat';
import { layCycle, type Exposure, type GridSetting } from '../../../solver/model';
import { course, film, flux, held, insulated, systemOf, wall, type LayerSpec } from '../../support';
import { denseOf, denseSolve, seeded } from '../../support/solverTools';

const steel: LayerSpec = { thickness: 0.02, conductivity: 45, density: 7850, heatCapacity: 500 };
const brick: LayerSpec = { thickness: 0.1, conductivity: 1.2, density: 2000, heatCapacity: 900 };
const layers: LayerSpec[] = [steel, { ...brick, contact: 2e-3 }, steel];

const ramp = (from: number, to: number) => course(from, [{ to, duration: 100 }]);
const exposures: [string, Exposure][] = [
  ['insulated', insulated],
  ['held', held(300)],
  ['held on a ramp', { kind: 'temperature', temperature: ramp(20, 500) }],
  ['flux', flux(5000)],
  ['flux on a ramp', { kind: 'flux', flux: ramp(0, 5000) }],
  ['film', film(40, 500)],
  ['film, both on ramps', { kind: 'film', coefficient: ramp(10, 200), surroundings: ramp(20, 800) }],
];
const grids: [string, GridSetting, StorageKind][] = [
  ['nodes, plain', { nodes: [4, 6, 3] }, 'plain'],
  ['nodes, fourth order', { nodes: [4, 6, 3] }, 'fourthOrder'],
  ['nodes, fourth order, two in a layer', { nodes: [2, 6, 2] }, 'fourthOrder'],
  ['cells', { cells: [4, 5, 2] }, 'plain'],
];
const cases = exposures.flatMap(([exposure, start]) =>
  grids.map(([grid, setting, storage]) => ({ exposure, grid, start, setting, storage })),
);

/** A wall under one exposure at its start face and a film at its end, with uneven temperatures. */
function uneven(start: Exposure, grid: GridSetting, storage: StorageKind) {
  const project = wall({
    layers,
    initial: 20,
    stages: [{ lasts: 100, start, end: film(15, 25) }],
    settings: { scheme: 'implicit', step: 1, grid },
  });
  const { system } = systemOf(project, storage);
  const random = seeded(11);
  const u = Float64Array.from({ length: system.size }, () => 20 + 400 * random());
  return { system, u };
}

const sum = (values: ArrayLike<number>): number => Array.from(values).reduce((a, b) => a + b, 0);

describe.each(cases)('a wall, start face $exposure, $grid', ({ start, setting, storage }) => {
  const time = 37;

  it('takes in exactly what its faces let through', () => {
    const { system, u } = uneven(start, setting, storage);
    system.evaluate(u, time);
    const throughput = sum(system.inflow.map(Math.abs));
    expect(Math.abs(sum(system.inflow) - sum(system.rates))).toBeLessThan(1e-13 * throughput);
  });

  it('has the slopes of its storage, its inflow and its rates, in the unknowns and in time', () => {
    const { system, u } = uneven(start, setting, storage);
    const at = (v: Float64Array, t: number) => {
      system.evaluate(v, t);
      return { storage: [...system.storage], inflow: [...system.inflow], rates: [...system.rates] };
    };
    // All is linear in u, and nearly so in t.
    const moment = 0.01;
    const [early, late] = [at(u, time - moment), at(u, time + moment)];
    system.linearise(u, time);
    const scale = 1 + Math.max(...late.inflow.map(Math.abs));
    late.inflow.forEach((value, row) => {
      expect(Math.abs((value - early.inflow[row]) / (2 * moment) - system.inflowSlope[row])).toBeLessThan(1e-9 * scale);
    });
    late.rates.forEach((value, heat) => {
      if (system.heldRows.length > 0 && heat === 0) return; // answers for the row, which the time does not enter
      expect(Math.abs((value - early.rates[heat]) / (2 * moment) - system.rateSlopes[heat])).toBeLessThan(1e-9 * scale);
    });
    const base = at(u, time);
    const direction = Float64Array.from(u, (_, i) => Math.cos(3 * i));
    const moved = at(
      u.map((value, i) => value + direction[i]),
      time,
    );
    const product = new Float64Array(system.size);
    system.capacityTimes(direction, product);
    product.forEach((value, row) => expect(Math.abs(moved.storage[row] - base.storage[row] - value)).toBeLessThan(1e-6));
    for (let heat = 0; heat < 2; heat++) {
      expect(Math.abs(moved.rates[heat] - base.rates[heat] - system.rateTimes(heat, direction))).toBeLessThan(1e-11 * scale);
    }
  });

  it('solves a dS/du − b dF/du as dense elimination does', () => {
    const { system, u } = uneven(start, setting, storage);
    system.evaluate(u, time);
    const base = Float64Array.from(system.inflow);
    system.linearise(u, time);
    const capacity = denseOf(system.size, (x, out) => system.capacityTimes(x, out));
    const conduction = denseOf(system.size, (x, out) => {
      system.evaluate(
        u.map((value, i) => value + x[i]),
        time,
      );
      system.inflow.forEach((value, row) => (out[row] = value - base[row]));
    });
    const [a, b] = [4.7, 30];
    const shifted = capacity.map((row, i) =>
      row.map((c, j) => (system.heldRows.includes(i) ? Number(i === j) : a * c - b * conduction[i][j])),
    );
    const rightHandSide = Float64Array.from(u, (_, i) => 1e5 * Math.sin(i));
    const expected = denseSolve(shifted, rightHandSide);
    system.factorise(a, b);
    system.solve(rightHandSide);
    const largest = Math.max(...expected.map(Math.abs));
    rightHandSide.forEach((value, i) => expect(Math.abs(value - expected[i])).toBeLessThan(1e-8 * largest));
  });
});

describe('a wall that is factorised', () => {
  const { system, u } = uneven(film(40, 500), { nodes: 5 }, 'plain');

  it('does so only where the matrix is another', () => {
    const counted = (act: () => void): number => {
      const before = system.factorisations;
      act();
      return system.factorisations - before;
    };
    system.linearise(u, 0);
    expect(counted(() => system.factorise(1, 2))).toBe(1);
    expect(counted(() => system.factorise(1, 2))).toBe(0);
    expect(counted(() => system.factorise(1, 3))).toBe(1);
    system.linearise(u, 50);
    expect(counted(() => system.factorise(1, 3))).toBe(0);
  });

  it('does so again when its film has changed', () => {
    const changing = uneven({ kind: 'film', coefficient: ramp(10, 200), surroundings: 300 }, { nodes: 5 }, 'plain').system;
    changing.linearise(u, 10);
    changing.factorise(1, 2);
    changing.linearise(u, 20);
    changing.factorise(1, 2);
    expect(changing.factorisations).toBe(2);
  });
});

describe('a bonded interface between layers at different temperatures', () => {
  const bonded = (storage: StorageKind, grid: GridSetting) => {
    const project = wall({
      layers: [steel, brick],
      initial: [500, 20],
      stages: [{ lasts: 100 }],
      settings: { scheme: storage === 'plain' ? 'implicit' : 'automatic', step: 1, grid },
    });
    return systemOf(project, storage);
  };

  it.each([
    ['plain', { nodes: [4, 6] }],
    ['fourthOrder', { nodes: [4, 6] }],
    ['fourthOrder', { nodes: [3, 3] }],
    ['fourthOrder', { nodes: [2, 2] }],
    ['fourthOrder', 'automatic'],
  ] as [StorageKind, GridSetting][])('starts with the heat of both, to rounding: %s, %o', (storage, grid) => {
    // Heat is counted from each layer's own start, so the sum over all rows is zero.
    const { system, state } = bonded(storage, grid);
    const exchangeable = 0.02 * 7850 * 500 * 480;
    expect(Math.abs(sum(state.stored))).toBeLessThan(1e-12 * exchangeable);
    expect(system.size).toBe(state.unknowns.length);
  });

  it('starts at the contact temperature of two bodies on the automatic grid: the mean by √(k ρ c)', () => {
    const { state } = bonded('fourthOrder', 'automatic');
    const [a, b] = [Math.sqrt(45 * 7850 * 500), Math.sqrt(1.2 * 2000 * 900)];
    const shared = state.unknowns.filter((temperature) => temperature !== 500 && temperature !== 20);
    expect([...shared].map((temperature) => Math.round(temperature / 4))).toEqual([Math.round((a * 500 + b * 20) / (a + b) / 4)]);
  });
});

describe('a wall in its steady state', () => {
  /** Steady temperatures: one step of dF/du alone. */
  function steady(system: WallSystem, u: Float64Array): Float64Array {
    system.evaluate(u, 0);
    system.linearise(u, 0);
    const change = Float64Array.from(system.inflow);
    system.heldChanges(u, 0, 0, change);
    system.factorise(0, 1);
    system.solve(change);
    return u.map((value, i) => value + change[i]);
  }

  it.each(grids)('conducts exactly through layers, contact and films: %s', (_, grid, storage) => {
    const { system, u } = uneven(film(40, 500), grid, storage);
    const found = steady(system, u);
    const resistance = 1 / 40 + 0.02 / 45 + 0.1 / 1.2 + 2e-3 + 0.02 / 45 + 1 / 15;
    const q = (500 - 25) / resistance;
    const field = new Float64Array(system.points);
    system.report(found, 0, field);
    expect(field[0]).toBeCloseTo(500 - q / 40, 8);
    expect(field[field.length - 1]).toBeCloseTo(25 + q / 15, 8);
    // Both sides of the bonded and of the contact interface.
    const atEdges = [...field].filter((value, i) => i > 0 && system.points > i && value !== field[i - 1]);
    const bonded = 500 - q / 40 - (q * 0.02) / 45;
    const before = bonded - (q * 0.1) / 1.2;
    for (const expected of [bonded, before, before - q * 2e-3]) {
      expect(Math.min(...atEdges.map((value) => Math.abs(value - expected)))).toBeLessThan(1e-8);
    }
  });

  it('recovers the temperature of a face from its balance with cells, and shows a held one as it is', () => {
    const { system, u } = uneven(flux(5000), { cells: 4 }, 'plain');
    const field = new Float64Array(system.points);
    system.report(u, 0, field);
    expect(field[0]).toBeCloseTo(u[0] + (5000 * 0.0025) / 45, 10);
    const other = uneven(held(300), { cells: 4 }, 'plain');
    other.system.report(other.u, 0, field);
    expect(field[0]).toBeCloseTo(300, 10);
  });
});

describe('a held face', () => {
  it('jumps at once when its interval begins, and the heat that takes came through it', () => {
    const project = wall({
      layers: [brick],
      initial: 20,
      stages: [{ lasts: 100, start: held(500) }],
      settings: { scheme: 'implicit', step: 1, grid: { nodes: 5 } },
    });
    const { state } = systemOf(project, 'plain');
    expect(state.unknowns[0]).toBe(500);
    expect(state.through[0]).toBeCloseTo(0.0125 * 2000 * 900 * 480, 6);
    expect(state.stored[0]).toBeCloseTo(state.through[0], 6);
    expect(state.through[1]).toBe(0);
  });

  it('leaves nothing to the balance of its row, whose heat it answers for', () => {
    const { system, u } = uneven(held(300), { nodes: 5 }, 'fourthOrder');
    system.evaluate(u, 0);
    expect(system.heldRows).toEqual([0]);
    expect(system.inflow[0]).toBe(0);
    expect(system.rates[0]).toBeCloseTo(((u[0] - u[1]) * 45) / 0.005, 6);
    expect(system.rateAt(0, (row) => u[row], 0)).toBeNull();
  });
});

describe('a wall of one material', () => {
  it('has as many unknowns as nodes, one less for every bonded interface', () => {
    const size = (contact: number): number => {
      const project = wall({
        layers: [{ ...steel, contact }, steel],
        initial: 20,
        stages: [{ lasts: 1 }],
        settings: { grid: { nodes: 4 } },
      });
      const cycle = layCycle(project);
      const walls = wallLayers(project);
      return new WallSystem(walls, gridOf(project.settings, walls, cycle, temperatureRange(walls, cycle)), cycle, 'plain').size;
    };
    expect(size(0)).toBe(7);
    expect(size(1e-4)).toBe(8);
  });
});
