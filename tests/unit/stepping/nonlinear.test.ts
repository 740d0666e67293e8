/** The schemes on a body that is not linear in anything: what later bodies (curves, radiation, reactions) will ask of them. */
import { describe, expect, it } from 'vitest';
import type { SchemeSettings } from '../../../solver/stepping';
import { expectOrder, observedOrders } from '../../support';
import { RadiatingLump } from '../../support/solverRadiating';
import { equalSteps, interval, march } from '../../support/solverTools';

const end = 1200;
const heated = () => new RadiatingLump(20, 200, 0.5);
const anyError = 1e9; // K: every step given is taken
const automatic = (): SchemeSettings => ({ scheme: 'automatic', accuracy: anyError });
const reference = equalSteps(heated(), automatic, end, 4000).unknowns[0];
const errorOf = (made: (step: number) => SchemeSettings, steps: number): number =>
  Math.abs(equalSteps(heated(), made, end, steps).unknowns[0] - reference);

describe('a lump that radiates, with a heat capacity that rises', () => {
  it.each<[string, number, (step: number) => SchemeSettings]>([
    ['explicit', 1, (step) => ({ scheme: 'explicit', step })],
    ['implicit', 1, (step) => ({ scheme: 'implicit', step })],
    ['Crank–Nicolson', 2, (step) => ({ scheme: 'crankNicolson', step, dampedSteps: 0 })],
  ])('%s keeps its order with one solve a step', (_, order, made) => {
    const steps = [100, 200, 400];
    expectOrder(
      order,
      steps,
      steps.map((count) => errorOf(made, count)),
      0.15,
    );
  });

  it('automatic is of order 4.5 or better', () => {
    const steps = [10, 20, 40];
    for (const order of observedOrders(
      steps,
      steps.map((count) => errorOf(automatic, count)),
    )) {
      expect(order).toBeGreaterThan(4.5);
    }
  });

  it.each([10, 1, 0.1, 0.01, 0.001])(
    'automatic keeps %f K, with a lag of temperature behind heat below a fifth of it',
    (accuracy) => {
      let worst = 0;
      const course: [number, number][] = [];
      const { loop } = march(heated(), { scheme: 'automatic', accuracy }, [interval(end)], undefined, (time, { unknowns }) => {
        course.push([time, unknowns[0]]);
      });
      for (const [time, temperature] of course) {
        const exact = equalSteps(heated(), automatic, time, 400).unknowns[0];
        worst = Math.max(worst, Math.abs(temperature - exact));
      }
      const { closure, lag } = loop.audit.figures(loop.time);
      expect(worst).toBeLessThan(accuracy);
      expect(lag).toBeLessThan(0.2 * accuracy);
      expect(lag).toBeGreaterThan(0);
      expect(closure).toBeLessThan(1e-13);
    },
  );

  it.each<SchemeSettings>([
    { scheme: 'explicit', step: 2 },
    { scheme: 'implicit', step: 20 },
    { scheme: 'crankNicolson', step: 20, dampedSteps: 4 },
  ])('$scheme keeps the heat although one solve leaves something over', (settings) => {
    const { loop } = march(heated(), settings, [interval(end)]);
    expect(loop.audit.figures(loop.time).closure).toBeLessThan(1e-13);
  });
});

describe('a run that cannot go on', () => {
  it('is not finite where the explicit scheme is driven far above its limit', () => {
    expect(() => march(new RadiatingLump(20, 1500, 0), { scheme: 'explicit', step: 1e6 }, [interval(1e9)])).toThrow('not-finite');
  });

  it('has too small a step where the accuracy lies in the rounding', () => {
    expect(() => march(heated(), { scheme: 'automatic', accuracy: 1e-16 }, [interval(end)])).toThrow(/step-too-small/);
  });
});
