/**
 * Order in space, measured: modes of a wall whose course is known exactly, marched in time far more exactly than the grid is.
 * Products of cosines and exponentials: any textbook on conduction, from memory.
 */
import { describe, expect, it } from 'vitest';
import type { Exposure, GridSetting } from '../../../solver/model';
import type { StorageKind } from '../../../solver/heat';
import { expectOrder, film, flux, held, systemOf, wall } from '../../support';
import { interval, march } from '../../support/solverTools';

const thickness = 0.1;
const k = 1.2;
const alpha = k / (2000 * 900);
const end = (0.2 * thickness ** 2) / alpha;

/** A film of Bi = 2: its first root of μ tan μ = Bi. */
const biot = 2;
const filmRoot = (() => {
  let [low, high] = [0, Math.PI / 2 - 1e-9];
  for (let i = 0; i < 100; i++) {
    const middle = (low + high) / 2;
    if (middle * Math.tan(middle) < biot) low = middle;
    else high = middle;
  }
  return low;
})();
const mode = (root: number) => (x: number, t: number) =>
  100 * Math.cos((root * x) / thickness) * Math.exp((-(root ** 2) * alpha * t) / thickness ** 2);

interface Case {
  face: string;
  exposure: Exposure;
  /** Temperature at depth x (m) and time t (s), °C; the start face is insulated. */
  exact: (x: number, t: number) => number;
}
const q = 500;
const cases: Case[] = [
  { face: 'film', exposure: film((biot * k) / thickness, 0), exact: mode(filmRoot) },
  { face: 'held', exposure: held(0), exact: mode(Math.PI / 2) },
  { face: 'insulated', exposure: { kind: 'insulated' }, exact: mode(Math.PI) },
  {
    face: 'flux',
    exposure: flux(q),
    exact: (x, t) => ((q * thickness) / k) * ((alpha * t) / thickness ** 2 + x ** 2 / (2 * thickness ** 2)) + mode(Math.PI)(x, t),
  },
];

/** Largest error of all unknowns at the end, K. */
function errorOn({ exposure, exact }: Case, grid: GridSetting, storage: StorageKind): number {
  const project = wall({
    layers: [{ thickness, conductivity: k, density: 2000, heatCapacity: 900 }],
    initial: 0,
    stages: [{ lasts: end, end: exposure }],
    settings: { scheme: 'implicit', step: 1, grid },
  });
  const { system } = systemOf(project, storage);
  const nodes = 'nodes' in (grid as object);
  const x = Array.from({ length: system.size }, (_, i) =>
    nodes ? (i * thickness) / (system.size - 1) : ((i + 0.5) * thickness) / system.size,
  );
  const from = Float64Array.from(x, (depth) => exact(depth, 0));
  const { state } = march(system, { scheme: 'automatic', accuracy: 1e-9 }, [interval(end)], from);
  return Math.max(...x.map((depth, i) => Math.abs(state.unknowns[i] - exact(depth, end))));
}

describe.each(cases)('under a face that is $face', (one) => {
  const refinements = [6, 12, 24, 48];

  it('plain control volumes with nodes are of second order', () => {
    expectOrder(
      2,
      refinements,
      refinements.map((elements) => errorOn(one, { nodes: elements + 1 }, 'plain')),
      0.15,
    );
  });

  it('cells are of second order', () => {
    expectOrder(
      2,
      refinements,
      refinements.map((cells) => errorOn(one, { cells }, 'plain')),
      0.25,
    );
  });

  it('the weights of the automatic scheme are of fourth order', () => {
    // The one-sided weights at the faces gain faster at first; on coarse grids the two sources of error cancel here and there.
    const fine = [96, 192];
    expectOrder(
      4,
      fine,
      fine.map((elements) => errorOn(one, { nodes: elements + 1 }, 'fourthOrder')),
      0.25,
    );
  });

  it('fourth order is worth having: on 24 elements its error is a hundredth or less', () => {
    const errors = (['plain', 'fourthOrder'] as const).map((storage) => errorOn(one, { nodes: 25 }, storage));
    expect(errors[1]).toBeLessThan(errors[0] / 100);
  });
});

describe('too fine a grid', () => {
  it('runs into rounding: a hundred times finer than good enough, the error is larger again', () => {
    const [good, fine] = [600, 60000].map((elements) => errorOn(cases[1], { nodes: elements + 1 }, 'fourthOrder'));
    console.log(
      good,
      fine,
      [3000, 20000].map((elements) => errorOn(cases[1], { nodes: elements + 1 }, 'fourthOrder')),
    );
    expect(fine).toBeGreaterThan(good);
  });
});
