/**
 * Layered walls. Exact: Laplace transform inverted numerically, fixed Talbot, two node counts; an independent run on control
 * volumes agrees (cases/c07-*.json). Claim: 0.1 % of the largest change on a normal mesh, 0.01 % on a fine one.
 */
import { describe, expect, it } from 'vitest';
import {
  automatic,
  crankNicolson,
  everyScheme,
  expectWithin,
  film,
  held,
  largestChange,
  solved,
  temperaturesAt,
  type SchemeRow,
} from '../support';
import contact from './cases/c07-two-layer-contact-resistance.json';
import perfect from './cases/c07-two-layer-perfect.json';
import lining from './cases/c07-three-layer-wall.json';
import { wallOf } from './caseWall';

const families = [
  {
    title: 'two layers in perfect contact',
    table: perfect,
    depths: perfect.positions_m,
    plan: wallOf(perfect, [{ lasts: 36000, start: film(50, 800), end: film(10, 20) }]),
    normal: everyScheme({ accuracy: 0.7, grid: { nodes: [41, 61] }, implicit: 0.5, crankNicolson: 5 }),
    fine: [automatic(0.07), crankNicolson(1, { nodes: [201, 301] }), crankNicolson(1, { cells: [200, 300] })],
  },
  {
    title: 'two layers with a contact resistance',
    table: contact,
    depths: [0.01, { depth: 0.02, layer: 0 }, { depth: 0.02, layer: 1 }, 0.035],
    plan: wallOf(contact, [{ lasts: 300, start: held(200), end: film(500, 20) }]),
    normal: everyScheme({ accuracy: 0.14, grid: { nodes: [41, 16] }, implicit: 0.01, crankNicolson: 0.1 }),
    fine: [automatic(0.014), crankNicolson(0.02, { nodes: [201, 61] }), crankNicolson(0.02, { cells: [200, 60] })],
  },
  {
    title: 'a lining of three layers',
    table: lining,
    depths: lining.positions_m,
    plan: wallOf(lining, [{ lasts: 172800, start: film(90, 1250), end: film(12, 25) }]),
    normal: everyScheme({ accuracy: 1.2, grid: { nodes: [61, 41, 3] }, implicit: 5, crankNicolson: 20 }),
    fine: [automatic(0.12), crankNicolson(10, { nodes: [231, 129, 6] })],
  },
];

describe.each(families)('$title', ({ table, depths, plan, normal, fine }) => {
  const change = largestChange(table.expected_T_degC, table.T_initial_degC);
  const check = ({ under }: SchemeRow, tolerance: number): void =>
    expectWithin(temperaturesAt(under(plan), depths, table.times_s), table.expected_T_degC, tolerance * change);

  it.each(normal)('within 0.1 % of the largest change: $name', (row) => check(row, 1e-3));
  it.each(fine)('within 0.01 % of the largest change: $name', (row) => check(row, 1e-4));
});

describe('a contact', () => {
  it('holds back the difference that its flux and resistance give', () => {
    const { plan } = families[1];
    const [profile] = solved(automatic(0.001).under(plan), [300]).profiles;
    // Near the steady state: the flux of the right face, through its film, passes the contact too (within 0.2 %).
    const flux = 500 * (profile(0.035) - 20);
    const jump = profile({ depth: 0.02, layer: 0 }) - profile({ depth: 0.02, layer: 1 });
    expect(jump / (flux * 2e-4)).toBeGreaterThan(1);
    expect(jump / (flux * 2e-4)).toBeLessThan(1.01);
  });
});
