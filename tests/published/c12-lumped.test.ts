/**
 * A body that cools or warms as one, by radiation and by film and radiation. Exact: separation of variables
 * (cases/c12-lumped-*.json). Claim: 0.1 % of the time.
 */
import { describe, expect, it } from 'vitest';
import type { Exposure } from '../../solver/model';
import { automatic, crankNicolson, implicit, solved, wall, type SchemeRow } from '../support';
import bothCase from './cases/c12-lumped-convection-radiation.json';
import radiationCase from './cases/c12-lumped-radiation.json';

interface Reached {
  T_degC: number;
  t_s: number;
}

/** A slab that conducts so well that it has one temperature. */
const lumped = (volumeOverArea: number, density: number, heatCapacity: number, initial: number, lasts: number, end: Exposure) =>
  wall({
    layers: [{ thickness: volumeOverArea, conductivity: 1e6, density, heatCapacity }],
    initial,
    stages: [{ lasts, end }],
  });

/** Times of the exact curve within 0.1 %: the temperature there, and the rate at which it moves, between t and 1.001 t. */
function expectTimes({ under }: SchemeRow, project: ReturnType<typeof lumped>, expected: Reached[]): void {
  const times = expected.flatMap(({ t_s }) => [0.999 * t_s, 1.001 * t_s]);
  const { profiles } = solved(under(project), times);
  expected.forEach(({ T_degC }, i) => {
    const [early, late] = [profiles[2 * i](0), profiles[2 * i + 1](0)];
    expect((early - T_degC) * (late - T_degC)).toBeLessThan(0);
  });
}

const schemes = (step: number): SchemeRow[] => [
  automatic(0.1),
  crankNicolson(step, { nodes: 3 }),
  crankNicolson(step, { cells: 2 }),
  implicit(step / 100, { nodes: 3 }),
];

describe.each(schemes(2))('a body cooling by radiation alone, $name', (scheme) => {
  it('reaches every temperature within 0.1 % of the exact time', () => {
    const expected = radiationCase.expected_time_to_reach;
    const radiation: Exposure = { kind: 'radiation', emissivity: 0.8, enclosure: 25 };
    expectTimes(scheme, lumped(0.01, 7800, 600, 900, 1700, radiation), expected);
  });
});

describe.each(schemes(0.5))('a body warmed by gas and walls, $name', (scheme) => {
  it('reaches every temperature within 0.1 % of the exact time', () => {
    const expected = bothCase.expected_time_to_reach;
    const exposure: Exposure = {
      kind: 'film',
      coefficient: 25,
      surroundings: 900,
      radiation: { emissivity: 0.7, enclosure: 900 },
    };
    expectTimes(scheme, lumped(0.006, 7850, 550, 20, 400, exposure), expected);
  });
});
