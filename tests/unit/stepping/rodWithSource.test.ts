/**
 * Every scheme on a body of the tests' own, a rod with a source: what stepping asks of a body is enough, and no more than the contract.
 * Manufactured solution −T″ = g, T = sin 2x + x²: common practice, no source.
 */
import { describe, expect, it } from 'vitest';
import type { SchemeSettings } from '../../../solver/stepping';
import { RodWithSource, type RodEnd } from '../../support/solverRod';
import { interval, march } from '../../support/solverTools';

const exact = (x: number): number => Math.sin(2 * x) + x * x;
const source = (x: number): number => 4 * Math.sin(2 * x) - 2;
const flux = 2 * Math.cos(2) + 2;

/** Largest error of the steady state, which one step of backward Euler reaches if it is long enough. */
function steadyError(elements: number, end: RodEnd): number {
  const rod = new RodWithSource(elements, end, source);
  const { state } = march(rod, { scheme: 'implicit', step: 1e12 }, [interval(1e12)]);
  return state.unknowns.reduce((most, value, i) => Math.max(most, Math.abs(value - exact(i / elements))), 0);
}

const halfCell: RodEnd = { flux, formula: 'halfCell' };
const oneSided: RodEnd = { flux, formula: 'oneSided' };

describe('the steady state of a rod with a source', () => {
  it.each<[string, RodEnd, number, number[]]>([
    ['both ends held', { held: exact(1) }, 100, [0.00129199, 1.30367e-5, 1.30365e-7]],
    ['a flux by the balance of a half cell, or a fictitious node', halfCell, 100, [0.00144732, 1.44747e-5, 1.44742e-7]],
    ['a flux by a one-sided difference', oneSided, 10, [0.0815986, 0.00818338, 0.000818569]],
  ])('%s: ten times finer divides the error as the theory says', (_, end, ratio, listed) => {
    const errors = [10, 100, 1000].map((elements) => steadyError(elements, end));
    errors.forEach((error, i) => expect(Math.abs(error / listed[i] - 1)).toBeLessThan(0.01));
    expect(errors[0] / errors[1] / ratio).toBeGreaterThan(0.8);
    expect(errors[0] / errors[1] / ratio).toBeLessThan(1.2);
    expect(Math.abs(errors[1] / errors[2] / ratio - 1)).toBeLessThan(0.05);
  });

  it('runs into rounding on too fine a grid', () => {
    // By order alone 100 000 elements would err by 1.4e-11.
    expect(steadyError(100_000, halfCell)).toBeGreaterThan(1e-10);
  });
});

const schemes: SchemeSettings[] = [
  { scheme: 'explicit', step: 0.004 },
  { scheme: 'implicit', step: 0.01 },
  { scheme: 'crankNicolson', step: 0.01, dampedSteps: 4 },
  { scheme: 'crankNicolson', step: 0.01, dampedSteps: 0 },
  { scheme: 'automatic', accuracy: 1e-4 },
];

describe.each(schemes)('a rod that comes to its steady state: $scheme', (settings) => {
  const rod = () => new RodWithSource(10, halfCell, source);

  it('keeps account of faces and source at every step', () => {
    let steps = 0;
    const { loop } = march(rod(), settings, [interval(3), interval(6, 3)], undefined, () => {
      steps++;
    });
    const { closure, through, stored } = loop.audit.figures(loop.time);
    expect(closure).toBeLessThan(1e-12);
    expect(through[2]).toBeGreaterThan(1);
    expect(stored).toBeGreaterThan(0.1);
    expect(loop.steps).toBe(steps);
  });

  it('comes to the steady state of its grid, whatever the scheme', () => {
    const { state } = march(rod(), settings, [interval(20)]);
    const steady = march(rod(), { scheme: 'implicit', step: 1e12 }, [interval(1e12)]).state;
    state.unknowns.forEach((value, i) => expect(Math.abs(value - steady.unknowns[i])).toBeLessThan(2e-4));
  });
});
