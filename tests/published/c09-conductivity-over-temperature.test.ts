/**
 * Conductivity that rises with temperature. Steady: Kirchhoff's transformation, exact (cases/c09-kT-steady.json); claim 0.01 K on 50 cells.
 * Transient: finite volumes on three grids with Richardson's extrapolation, none published (cases/c09-kT-transient.json); claim 0.1 % of the largest
 * change on 100 cells with small steps.
 */
import { describe, expect, it } from 'vitest';
import type { Curve } from '../../solver/model';
import { automatic, crankNicolson, everyScheme, expectWithin, held, implicit, solved, temperaturesAt, wall } from '../support';
import steady from './cases/c09-kT-steady.json';
import transient from './cases/c09-kT-transient.json';

/** k = 1.2 (1 + 0.0015 T): straight, so two points tell all of it. */
const rising: Curve = {
  table: [
    [0, 1.2],
    [1000, 3],
  ],
};
const { r1_m: inner, r2_m: outer } = steady;

describe.each(['wall', 'cylinder', 'sphere'] as const)('a %s between two temperatures', (kind) => {
  const expected = steady.expected[kind === 'wall' ? 'plane' : kind];
  const plan = wall({
    kind,
    innerRadius: kind === 'wall' ? 0 : inner,
    layers: [{ thickness: outer - inner, conductivity: rising, density: 2000, heatCapacity: 900 }],
    initial: 480,
    stages: [{ lasts: 200000, start: held(900), end: held(60) }],
  });
  const depths = expected.positions_m.map((radius) => radius - inner);

  // The schemes of the textbooks take the area halfway between nodes, which is of second order on a round part.
  it.each([automatic(0.01), implicit(5000, { nodes: kind === 'wall' ? 51 : 151 })])(
    'comes to rest within 0.01 K: $name',
    ({ under }) => {
      expectWithin(temperaturesAt(under(plan), depths, [200000]), [expected.T_degC], 0.01);
    },
  );

  it('lets through what the integral of its conductivity says', () => {
    const { flux } = solved(automatic(0.01).under(plan), [200000]);
    const area = { wall: 1, cylinder: outer / inner, sphere: (outer / inner) ** 2 }[kind];
    expect(flux[0].start / expected.flux_at_inner_face_W_m2).toBeCloseTo(1, 4);
    expect((-flux[0].end * area) / expected.flux_at_inner_face_W_m2).toBeCloseTo(1, 4);
  });
});

const curves: [string, Curve][] = [
  [
    'a table',
    {
      table: [
        [0, 1],
        [600, 2.2],
      ],
    },
  ],
  ['an expression', { expression: '1 + 0.002*T' }],
];

describe.each(curves)('a slab whose conductivity is given as %s', (_, conductivity) => {
  const plan = wall({
    layers: [{ thickness: 0.1, conductivity, density: 2000, heatCapacity: 1000 }],
    initial: 20,
    stages: [{ lasts: 7200, start: held(600) }],
  });
  const rows = [
    ...everyScheme({ accuracy: 0.5, grid: { nodes: 101 }, implicit: 2, crankNicolson: 10 }),
    automatic(0.05),
    crankNicolson(10, { cells: 100 }),
  ];

  it.each(rows)('warms as the fine solution does, within 0.1 % of the largest change: $name', ({ under }) => {
    expectWithin(temperaturesAt(under(plan), transient.positions_m, transient.times_s), transient.expected_T_degC, 0.58);
  });

  it('meets ten times that with a finer accuracy', () => {
    expectWithin(
      temperaturesAt(automatic(0.05).under(plan), transient.positions_m, transient.times_s),
      transient.expected_T_degC,
      0.058,
    );
  });
});
