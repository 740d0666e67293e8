/**
 * Order of convergence on a rod with a smooth source: −T″ = g, T = sin 2x + x², and of a mode sin πx that decays; common practice, no
 * source (cases/c14-convergence-order.json holds the errors of the standard schemes). Claim: observed ratio from 100 to 1000 within 5 % of
 * 100 (second order) or 10 (first order), from 10 to 100 between 80 and 110 or 8 and 12; errors within 1 % of those listed.
 */
import { describe, expect, it } from 'vitest';
import { makeScheme, startState, type SchemeSettings } from '../../solver/stepping';
import type { Exposure, GridSetting } from '../../solver/model';
import {
  DecayingMode,
  expectOrder,
  flux,
  held,
  observedOrders,
  steadyWithSource,
  systemOf,
  wall,
  type StageSpec,
} from '../support';
import rod from './cases/c14-convergence-order.json';

const exact = (x: number): number => Math.sin(2 * x) + x * x;
const source = (x: number): number => 4 * Math.sin(2 * x) - 2;
const fluxAtEnd = 2 * Math.cos(2) + 2;

/** Rod of length, conductivity and heat capacity 1: a unit of source in W/m³ is a unit of g. */
const rodOf = (grid: GridSetting, faces: { start: Exposure; end: Exposure }) => {
  const stage: StageSpec = { lasts: 1, ...faces };
  return wall({
    layers: [{ thickness: 1, conductivity: 1, density: 1, heatCapacity: 1 }],
    initial: 0,
    stages: [stage],
    settings: { scheme: 'implicit', step: 1, grid },
  });
};

/** Largest error at the unknowns of a rod with N elements. */
function steadyError(
  kind: 'nodes' | 'cells',
  end: Exposure,
  elements: number,
  storage: 'plain' | 'fourthOrder' = 'plain',
): number {
  const grid = kind === 'nodes' ? { nodes: elements + 1 } : { cells: elements };
  const { system, state } = systemOf(rodOf(grid, { start: held(0), end }), storage);
  const place = Array.from({ length: system.size }, (_, i) => (kind === 'nodes' ? i : i + 0.5) / elements);
  const found = steadyWithSource(system, state, place.map(source));
  return Math.max(...place.map((x, i) => Math.abs(found[i] - exact(x))));
}

/** The case's claim for a ratio of errors under ten times refinement, of a first or second order scheme. */
function expectRatios(errors: number[], order: 1 | 2): void {
  const [coarse, fine] = [errors[1] / errors[0], errors[2] / errors[1]].map((ratio) => 1 / ratio);
  const [low, high] = order === 2 ? [80, 110] : [8, 12];
  expect(coarse).toBeGreaterThanOrEqual(low);
  expect(coarse).toBeLessThanOrEqual(high);
  expect(Math.abs(fine / 10 ** order - 1)).toBeLessThanOrEqual(0.05);
}

describe('order in space', () => {
  it('the flux of the exact solution at the end is the one of the case', () => {
    expect(fluxAtEnd).toBeCloseTo(1.16770632691, 10);
  });

  it.each([
    ['both ends held, nodes', 'nodes', held(exact(1)), rod.largest_error_K.fixed_ends],
    ['a flux into the end, nodes', 'nodes', flux(fluxAtEnd), rod.largest_error_K.flux_end_ghost],
    ['a flux into the end, cells', 'cells', flux(fluxAtEnd), rod.largest_error_K.flux_end_cellcentred],
  ] as const)('%s: second order, with the errors listed', (_, kind, end, listed) => {
    const errors = rod.N.map((elements) => steadyError(kind, end, elements));
    errors.forEach((error, i) => expect(Math.abs(error / listed[i] - 1)).toBeLessThanOrEqual(0.01));
    expectRatios([errors[0], errors[2], errors[3]], 2);
  });

  it.each([
    ['both ends held', held(exact(1))],
    ['a flux into the end', flux(fluxAtEnd)],
  ] as const)('%s: the weights of the automatic scheme are of fourth order', (_, end) => {
    const refinements = [20, 40, 80, 160];
    expectOrder(
      4,
      refinements,
      refinements.map((elements) => steadyError('nodes', end, elements, 'fourthOrder')),
    );
  });
});

/** Error of the amplitude of sin πx after 0.1 s in equal steps. */
function amplitudeError(settingsFor: (step: number) => SchemeSettings, steps: number): number {
  const system = new DecayingMode(Math.PI ** 2, 1);
  const state = startState(system);
  const step = 0.1 / steps;
  const scheme = makeScheme(settingsFor(step), system, state, 0.1);
  scheme.begin(0, true);
  for (let i = 0; i < steps; i++) {
    expect(scheme.attempt(i * step, step)).toEqual({ kind: 'accepted' });
    expect(state.stored[0]).toBeCloseTo(1 + state.through[0], 12);
  }
  return Math.abs(state.unknowns[0] - Math.exp(-(Math.PI ** 2) * 0.1));
}

describe('order in time', () => {
  const { forward_euler, backward_euler, crank_nicolson } = rod.time_error;
  const schemes: [string, 1 | 2, number[], (step: number) => SchemeSettings][] = [
    ['explicit', 1, forward_euler, (step) => ({ scheme: 'explicit', step })],
    ['implicit', 1, backward_euler, (step) => ({ scheme: 'implicit', step })],
    ['Crank–Nicolson', 2, crank_nicolson, (step) => ({ scheme: 'crankNicolson', step, dampedSteps: 0 })],
  ];

  it.each(schemes)('%s has the errors listed', (_, order, listed, settingsFor) => {
    const errors = rod.time_steps.map((steps) => amplitudeError(settingsFor, steps));
    errors.forEach((error, i) => expect(Math.abs(error / listed[i] - 1)).toBeLessThanOrEqual(0.01));
    expectRatios(errors, order);
  });

  it('Crank–Nicolson keeps its order with a damped start', () => {
    const refinements = [20, 40, 80, 160];
    const damped = (step: number): SchemeSettings => ({ scheme: 'crankNicolson', step, dampedSteps: 4 });
    expectOrder(
      2,
      refinements,
      refinements.map((steps) => amplitudeError(damped, steps)),
    );
  });

  it('automatic is of fifth order or better where its steps are given to it', () => {
    const refinements = [2, 4, 8, 16];
    const anyError = 100; // K: no step is rejected
    const errors = refinements.map((steps) => amplitudeError(() => ({ scheme: 'automatic', accuracy: anyError }), steps));
    for (const order of observedOrders(refinements, errors)) expect(order).toBeGreaterThanOrEqual(4.9);
  });
});
