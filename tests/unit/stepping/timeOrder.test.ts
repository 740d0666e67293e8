/** Order in time, measured: every scheme on walls of few volumes under faces that change, against the same walls in far finer steps. */
import { describe, expect, it } from 'vitest';
import type { Exposure } from '../../../solver/model';
import type { SchemeSettings } from '../../../solver/stepping';
import { course, expectOrder, film, observedOrders, systemOf, wall } from '../../support';
import { equalSteps } from '../../support/solverTools';

const end = 3600;
const ramp = (from: number, to: number) => course(from, [{ to, duration: end }]);
/** Faces, and step counts at which the automatic scheme shows its order: fine enough, and above rounding. */
const faces: [string, Exposure, number[]][] = [
  ['a film whose surroundings change', { kind: 'film', coefficient: 20, surroundings: ramp(20, 600) }, [10, 20, 40]],
  [
    'a film whose coefficient changes as well',
    { kind: 'film', coefficient: ramp(10, 60), surroundings: ramp(20, 600) },
    [100, 200, 400],
  ],
  ['a flux that changes', { kind: 'flux', flux: ramp(0, 4000) }, [10, 20, 40]],
  ['a held temperature that changes', { kind: 'temperature', temperature: ramp(20, 600) }, [10, 20, 40]],
  ['an enclosure that warms', { kind: 'radiation', emissivity: 0.8, enclosure: ramp(20, 700) }, [40, 80, 160]],
  [
    'gas by expression and walls of their own',
    {
      kind: 'film',
      coefficient: { expression: '10 + 0.01*Ts + t/400' },
      surroundings: { expression: '300 - 280*cos(t/900)' },
      radiation: { emissivity: 0.6, enclosure: ramp(20, 500) },
    },
    [80, 160, 320],
  ],
];

const bodyOf = (start: Exposure, grid: { nodes: number } | { cells: number }, storage: 'plain' | 'fourthOrder') =>
  systemOf(
    wall({
      layers: [{ thickness: 0.1, conductivity: 1.2, density: 2000, heatCapacity: 900 }],
      initial: 20,
      stages: [{ lasts: end, start, end: film(15, 20) }],
      settings: { scheme: 'implicit', step: 1, grid },
    }),
    storage,
  ).system;

type Made = (step: number) => SchemeSettings;
const anyError = 1e9; // K: the automatic scheme takes the steps that it is given
const automatic: Made = () => ({ scheme: 'automatic', accuracy: anyError });
const schemes: [string, number, Made][] = [
  ['explicit', 1, (step) => ({ scheme: 'explicit', step })],
  ['implicit', 1, (step) => ({ scheme: 'implicit', step })],
  ['Crank–Nicolson, plain', 2, (step) => ({ scheme: 'crankNicolson', step, dampedSteps: 0 })],
];

describe.each(faces)('under %s', (_, start, automaticSteps) => {
  for (const grid of [{ nodes: 7 }, { cells: 6 }]) {
    const reference = (): Float64Array => equalSteps(bodyOf(start, grid, 'plain'), automatic, end, 2000).unknowns;
    const errors = (made: Made, steps: number[]): number[] => {
      const exact = reference();
      return steps.map((count) => {
        const { unknowns } = equalSteps(bodyOf(start, grid, 'plain'), made, end, count);
        return Math.max(...unknowns.map((value, i) => Math.abs(value - exact[i])));
      });
    };
    const name = 'nodes' in grid ? 'nodes' : 'cells';

    it.each(schemes)(`%s is of its order with ${name}`, (_name, order, made) => {
      const steps = [64, 128, 256, 512];
      expectOrder(order, steps, errors(made, steps), 0.1);
    });

    it.each(schemes)(`%s: steps ten times finer divide the error by 10^order with ${name}`, (_name, order, made) => {
      const [coarse, fine] = errors(made, [60, 600]);
      expect(coarse / fine / 10 ** order).toBeGreaterThan(0.85);
      expect(coarse / fine / 10 ** order).toBeLessThan(1.15);
    });

    it(`automatic is of order 4.5 or better with ${name}`, () => {
      const steps = automaticSteps;
      for (const order of observedOrders(steps, errors(automatic, steps))) expect(order).toBeGreaterThan(4.5);
    });
  }

  it('automatic is of order 4.5 or better with storage of fourth order', () => {
    const at = (count: number) => equalSteps(bodyOf(start, { nodes: 7 }, 'fourthOrder'), automatic, end, count).unknowns;
    const exact = at(2000);
    const steps = automaticSteps;
    const errors = steps.map((count) => Math.max(...at(count).map((value, i) => Math.abs(value - exact[i]))));
    for (const order of observedOrders(steps, errors)) expect(order).toBeGreaterThan(4.5);
  });
});
