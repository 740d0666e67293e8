/**
 * Cooling of a layer of 1 m from 1000 °C: DIN EN 1991-1-2/NA, annex CC, example 1 (published temperatures quoted, inputs from
 * memory); recomputed by the exact series (cases/c04-annex-cc-cooling.json). Claim: 0.1 K on 50 cells.
 */
import { describe, expect, it } from 'vitest';
import { automatic, crankNicolson, everyScheme, expectWithin, film, temperaturesAt, wall, wallTheta } from '../support';
import cooling from './cases/c04-annex-cc-cooling.json';

const plan = wall({
  layers: [{ thickness: 1, conductivity: 1, density: 1000, heatCapacity: 1 }],
  initial: 1000,
  stages: [{ lasts: 1800, start: film(1, 0) }],
});
const column = (values: number[]): number[][] => values.map((value) => [value]);

describe('a layer that cools from 1000 °C', () => {
  it.each([
    ...everyScheme({ accuracy: 0.1, grid: { nodes: 51 }, implicit: 0.02, crankNicolson: 0.5, explicit: 0.02 }),
    crankNicolson(0.5, { cells: 50 }),
  ])('its insulated face is within 0.1 K of the exact and of the published temperatures: $name', ({ under }) => {
    const found = temperaturesAt(under(plan), [1], cooling.times_s);
    expectWithin(found, column(cooling.expected_T_degC), 0.1);
    // Published to 0.1 K: half a digit more.
    expectWithin(found, column(cooling.published_T_degC), 0.15);
  });

  it.each([automatic(0.1), crankNicolson(0.5, { nodes: 201 })])('so is its front face on a finer mesh: $name', ({ under }) => {
    const [, ...later] = temperaturesAt(under(plan), [0], cooling.times_s);
    expectWithin(later, column(cooling.expected_T_front_face_degC.slice(1)), 0.1);
  });

  it('the published temperatures are those of the series at Bi = 1 to the printed digit', () => {
    cooling.published_T_degC.slice(1).forEach((published, i) => {
      const fourier = cooling.times_s[i + 1] * 1e-3;
      expect(Math.abs(1000 * wallTheta(1, fourier, 0) - published)).toBeLessThanOrEqual(0.0501);
    });
  });
});
