/**
 * A tube and a coated ball. Exact: Laplace transform inverted numerically, fixed Talbot, two node counts; an independent run on
 * control volumes agrees (cases/c01-hollow-cylinder.json, c07-layered-sphere.json). Claim: 0.1 % of the largest change on a normal mesh, 0.01 %
 * on a fine one.
 */
import { describe, it } from 'vitest';
import {
  automatic,
  crankNicolson,
  everyScheme,
  expectWithin,
  film,
  largestChange,
  temperaturesAt,
  type SchemeRow,
} from '../support';
import hollow from './cases/c01-hollow-cylinder.json';
import coated from './cases/c07-layered-sphere.json';
import { wallOf } from './caseWall';

const families = [
  {
    title: 'a tube with an insulated bore',
    table: hollow,
    plan: wallOf(hollow, [{ lasts: 900, end: film(320, 40) }], 'cylinder'),
    normal: everyScheme({ accuracy: 0.45, grid: { nodes: 41 }, implicit: 0.1, crankNicolson: 1 }),
    fine: [automatic(0.045), crankNicolson(0.2, { nodes: 121 }), crankNicolson(0.2, { cells: 120 })],
  },
  {
    title: 'a coated ball',
    table: coated,
    plan: wallOf(coated, [{ lasts: 120, end: film(1500, 50) }], 'sphere'),
    normal: everyScheme({ accuracy: 0.8, grid: { nodes: [41, 41] }, implicit: 0.01, crankNicolson: 0.05 }),
    fine: [automatic(0.08), crankNicolson(0.01, { nodes: [121, 161] }), crankNicolson(0.01, { cells: [120, 160] })],
  },
];

describe.each(families)('$title', ({ table, plan, normal, fine }) => {
  const change = largestChange(table.expected_T_degC, table.T_initial_degC);
  const depths = table.positions_m.map((radius) => radius - table.layers[0].from_m);
  const check = ({ under }: SchemeRow, tolerance: number): void =>
    expectWithin(temperaturesAt(under(plan), depths, table.times_s), table.expected_T_degC, tolerance * change);

  it.each(normal)('within 0.1 % of the largest change: $name', (row) => check(row, 1e-3));
  it.each(fine)('within 0.01 % of the largest change: $name', (row) => check(row, 1e-4));
});
