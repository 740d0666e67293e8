/**
 * H and Θ over temperature as one table of polynomials on merged break points: what inner loops read.
 *
 *   H(T) = ∫ ρ c dT + latent heat taken up  [J/m³],   Θ(T) = ∫ k dT  [W/m]
 *
 * A row holds from LOW up to HIGH, in d = v − REF:  H = H0 + d (H1 + d (H2 + d H3)),  Θ alike,  T = T0 + T1 d. Here the argument v is the
 * temperature itself. Where latent heat is at work the argument is a heat content on the scale of a temperature
 * (latentTable.ts), and T of it is read from the row too.
 *
 * Exact: a straight k or a straight ρ times a straight c makes H and Θ of the third degree at most. Latent heat over a range adds
 * to the slope of H there; latent heat at a point is a jump of H, kept in a list beside the table.
 */
import type { Latent, Material } from '../model';
import { curveAt } from './curveAt';
import { breaksOf, expandedAt, piecesOf, samplePieces, type Pieces } from './pieces';

/** Places in a row, and its width. */
export const LOW = 0;
export const HIGH = 1;
export const REF = 2;
export const H0 = 3;
export const THETA0 = 7;
export const T0 = 11;
export const T1 = 12;
export const WIDTH = 13;

/** Latent heat taken up at one temperature, °C and J/m³. */
export interface Jump {
  readonly temperature: number;
  readonly heat: number;
}

export interface ThermalTable {
  readonly rows: Float64Array;
  /** Ascending by temperature. */
  readonly jumps: readonly Jump[];
}

type Properties = Pick<Material, 'conductivity' | 'density' | 'heatCapacity' | 'latent'>;

/** The table of a material; H, without what jumps, and Θ are zero at `reference`, °C. */
export function thermalTable(material: Properties, reference: number): ThermalTable {
  const { conductivity, density, latent = [] } = material;
  const k = piecesOf(conductivity, reference);
  const rho = piecesOf(density, reference);
  const c = sensibleCapacity(material, reference);
  const ranges = latent.filter(({ from, to }) => to > from);
  const edges = [
    ...new Set([...breaksOf(k, c, ...(ranges.length > 0 ? [rho] : [])), ...ranges.flatMap(({ from, to }) => [from, to])]),
  ].sort((a, b) => a - b);
  const bounds = [-Infinity, ...edges, Infinity];
  const rows = new Float64Array((bounds.length - 1) * WIDTH);
  for (let i = 0; i + 1 < bounds.length; i++) {
    const [from, to] = [bounds[i], bounds[i + 1]];
    // The row that holds the reference counts from there: H and Θ are then zero to the last digit.
    const ref = from <= reference && reference < to ? reference : from > -Infinity ? from : to;
    const inside = from === -Infinity ? ref - 1 : to === Infinity ? ref + 1 : 0.5 * (from + to);
    const capacity = integralOf(capacityAt(c, rho, ranges, inside, ref));
    rows.set([from, to, ref, 0, ...capacity, 0, ...integralOf(expandedAt(k, inside, ref)), ref, 1], i * WIDTH);
  }
  countFrom(rows, reference);
  const jumps = latent
    .filter(({ from, to }) => to === from)
    .map(({ heat: perKg, from }): Jump => ({ temperature: from, heat: perKg * curveAt(density, from) }))
    .sort((a, b) => a.temperature - b.temperature);
  return { rows, jumps: mergedJumps(jumps) };
}

/** ρ c without latent heat: exact for numbers and tables; a product with an expression in it is sampled as one. */
function sensibleCapacity({ density, heatCapacity }: Properties, near: number): Pieces {
  const byExpression = [density, heatCapacity].some((curve) => typeof curve === 'object' && 'expression' in curve);
  if (byExpression && typeof density === 'object' && typeof heatCapacity === 'object') {
    return samplePieces((temperature) => curveAt(density, temperature) * curveAt(heatCapacity, temperature), near);
  }
  const [rho, c] = [piecesOf(density, near), piecesOf(heatCapacity, near)];
  const edges = [-Infinity, ...breaksOf(rho, c), Infinity];
  return edges.slice(1).map((to, i) => {
    const from = edges[i];
    const ref = from > -Infinity ? from : to < Infinity ? to : near;
    const inside = from === -Infinity ? ref - 1 : to === Infinity ? ref + 1 : 0.5 * (from + to);
    const [r0, r1, r2] = expandedAt(rho, inside, ref);
    const [c0, c1, c2] = expandedAt(c, inside, ref);
    // Both are straight, or one of them is a number: no term beyond the second degree is left out.
    return { from, to, ref, value: [r0 * c0, r0 * c1 + r1 * c0, r0 * c2 + r1 * c1 + r2 * c0] };
  });
}

/** dH/dT in one row, with the latent heat of the ranges that it lies in. */
function capacityAt(c: Pieces, rho: Pieces, ranges: readonly Latent[], inside: number, ref: number): [number, number, number] {
  const sum = expandedAt(c, inside, ref);
  for (const { from, to, heat } of ranges) {
    if (inside < from || inside > to) continue;
    expandedAt(rho, inside, ref).forEach((value, i) => (sum[i] += (value * heat) / (to - from)));
  }
  return sum;
}

const integralOf = ([c0, c1, c2]: readonly [number, number, number]): [number, number, number] => [c0, c1 / 2, c2 / 3];

/** One jump for all that happen at one temperature. */
function mergedJumps(jumps: readonly Jump[]): Jump[] {
  const merged: Jump[] = [];
  for (const jump of jumps) {
    const last = merged.at(-1);
    if (last !== undefined && last.temperature === jump.temperature) {
      merged[merged.length - 1] = { temperature: jump.temperature, heat: last.heat + jump.heat };
    } else merged.push(jump);
  }
  return merged;
}

/** Sets the constants of H and Θ: zero at the reference, and no jump from row to row. */
function countFrom(rows: Float64Array, reference: number): void {
  const start = rowOf(rows, reference, 0);
  for (const place of [H0, THETA0]) {
    for (let row = start; row + WIDTH < rows.length; row += WIDTH) joinRows(rows, row, row + WIDTH, rows[row + HIGH], place);
    for (let row = start; row > 0; row -= WIDTH) joinRows(rows, row, row - WIDTH, rows[row + LOW], place);
  }
}

/** Gives the row `next` the value that the row `known` has where they meet. */
function joinRows(rows: Float64Array, known: number, next: number, where: number, place: number): void {
  rows[next + place] = 0;
  rows[next + place] =
    cubicAt(rows, known + place, where - rows[known + REF]) - cubicAt(rows, next + place, where - rows[next + REF]);
}

/** c0 + d (c1 + d (c2 + d c3)), its coefficients from a place on. */
export function cubicAt(rows: Float64Array, at: number, d: number): number {
  return rows[at] + d * (rows[at + 1] + d * (rows[at + 2] + d * rows[at + 3]));
}

/** Slope of the same. */
export function cubicSlopeAt(rows: Float64Array, at: number, d: number): number {
  return rows[at + 1] + d * (2 * rows[at + 2] + 3 * d * rows[at + 3]);
}

/**
 * Place of the row that holds `value`, sought from a row near it. The first and last rows are open to their sides, so a number
 * is always found; NaN stays where it is.
 */
export function rowOf(rows: Float64Array, value: number, near: number): number {
  let at = near;
  if (value < rows[at + LOW]) {
    do at -= WIDTH;
    while (value < rows[at + LOW]);
  } else if (value >= rows[at + HIGH]) {
    do at += WIDTH;
    while (value >= rows[at + HIGH]);
  }
  return at;
}
