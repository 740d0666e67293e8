/**
 * H, Θ and T over the heat content of a node: where latent heat is at work, temperature says too little.
 *
 * The argument v of these tables is a heat content on the scale of a temperature: v grows with the heat that the node holds in
 * all its materials, by one for every `scale` [J/K] of it, the least heat capacity that the node has; and v = T at the reference
 * temperature. Between break points T is straight in v, and the rows of the materials are carried over to v. At a temperature at
 * which a material takes up latent heat there is a row of its own in which T stands still while H of that material grows.
 *
 * A node that two layers share has two tables over one v, one a layer: T is the same in both.
 */
import type { ThermalCurves } from './curves';
import { cubicAt, H0, HIGH, LOW, REF, rowOf, T0, T1, THETA0, WIDTH } from './thermalTable';

/** A material in a node, and the volume that it has in it. */
export interface Constituent {
  readonly curves: ThermalCurves;
  readonly volume: number;
}

export interface HeatTables {
  /** One for each constituent, all over the same v. */
  readonly tables: readonly Float64Array[];
  /** Heat of the node for which v grows by one, J. */
  readonly scale: number;
}

/** The tables of a node. `reference` in °C. */
export function heatTables(constituents: readonly Constituent[], reference: number): HeatTables {
  const scale = constituents.reduce((sum, { curves, volume }) => sum + volume * leastCapacity(curves), 0);
  const bounds = boundsOf(constituents);
  const tables = constituents.map(() => [] as number[]);
  let v = reference - (heatOf(constituents, reference) - heatOf(constituents, bounds[1], 'below')) / scale;
  for (let i = 0; i + 1 < bounds.length; i++) {
    const [from, to] = [bounds[i], bounds[i + 1]];
    if (from > -Infinity) v = addPlateaus(tables, constituents, from, v, scale);
    v = addRise(tables, constituents, from, to, v, scale);
  }
  return { tables: tables.map((rows) => Float64Array.from(rows)), scale };
}

function leastCapacity({ rows }: ThermalCurves): number {
  let least = Infinity;
  for (let row = 0; row < rows.length; row += WIDTH) least = Math.min(least, slopeInside(rows, row));
  return least;
}

/** Slope of H in the middle of a row, or one kelvin beyond the last point. */
function slopeInside(rows: Float64Array, row: number): number {
  const [low, high] = [rows[row + LOW], rows[row + HIGH]];
  const middle =
    low === -Infinity ? (high < Infinity ? high - 1 : rows[row + REF]) : high === Infinity ? low + 1 : 0.5 * (low + high);
  const d = middle - rows[row + REF];
  return rows[row + H0 + 1] + d * (2 * rows[row + H0 + 2] + 3 * d * rows[row + H0 + 3]);
}

/** All temperatures at which a row of any constituent ends, and those of its plateaus; at least one, between −∞ and ∞. */
function boundsOf(constituents: readonly Constituent[]): number[] {
  const inside = constituents.flatMap(({ curves: { rows, jumps } }) => [
    ...Array.from({ length: rows.length / WIDTH - 1 }, (_, i) => rows[i * WIDTH + HIGH]),
    ...jumps.map(({ temperature }) => temperature),
  ]);
  return [-Infinity, ...[...new Set(inside)].sort((a, b) => a - b), Infinity];
}

/** Heat content of a node, J; at a jump above it, or 'below'. */
function heatOf(constituents: readonly Constituent[], temperature: number, side: 'above' | 'below' = 'above'): number {
  return constituents.reduce((sum, { curves, volume }) => {
    const jump = side === 'below' ? jumpAt(curves, temperature) : 0;
    return sum + volume * (curves.heatContent(temperature) - jump);
  }, 0);
}

const jumpAt = ({ jumps }: ThermalCurves, at: number): number => jumps.find(({ temperature }) => temperature === at)?.heat ?? 0;

/** The rows in which T stands still, one for each constituent that jumps; returns v after them. */
function addPlateaus(tables: number[][], constituents: readonly Constituent[], at: number, v: number, scale: number): number {
  let now = v;
  constituents.forEach(({ curves, volume }, jumping) => {
    const jump = jumpAt(curves, at);
    if (jump === 0) return;
    const length = (volume * jump) / scale;
    constituents.forEach((other, i) => {
      // What jumps later in the list has not jumped yet.
      const heat = other.curves.heatContent(at) - (i >= jumping ? jumpAt(other.curves, at) : 0);
      const slope = i === jumping ? jump / length : 0;
      tables[i].push(now, now + length, now, heat, slope, 0, 0, other.curves.conductionIntegral(at), 0, 0, 0, at, 0);
    });
    now += length;
  });
  return now;
}

/** The rows from one break point to the next; returns v at their end. */
function addRise(
  tables: number[][],
  constituents: readonly Constituent[],
  from: number,
  to: number,
  v: number,
  scale: number,
): number {
  const open = from === -Infinity || to === Infinity;
  const inside = from === -Infinity ? to - 1 : to === Infinity ? from + 1 : 0.5 * (from + to);
  const origin = from === -Infinity ? to : from;
  // Beyond the last points capacities are constant: any stretch of one kelvin tells.
  const [low, high] = open ? [Math.min(inside, origin), Math.max(inside, origin)] : [from, to];
  const length = (heatOf(constituents, high, 'below') - heatOf(constituents, low)) / scale;
  const slope = (high - low) / length;
  const begin = from === -Infinity ? -Infinity : v;
  const end = to === Infinity ? Infinity : from === -Infinity ? v : v + length;
  constituents.forEach(({ curves }, i) => {
    const row = rowOf(curves.rows, inside, 0);
    const jumped = curves.heatContent(inside) - cubicAt(curves.rows, row + H0, inside - curves.rows[row + REF]);
    const heat = carriedOver(curves.rows, row + H0, origin - curves.rows[row + REF], slope);
    const theta = carriedOver(curves.rows, row + THETA0, origin - curves.rows[row + REF], slope);
    heat[0] += jumped;
    tables[i].push(begin, end, v, ...heat, ...theta, origin, slope);
  });
  return end < Infinity ? end : v;
}

/** Coefficients of a cubic in d, counted from d = `by` on and with d = `slope` × the new argument. */
function carriedOver(rows: Float64Array, at: number, by: number, slope: number): [number, number, number, number] {
  const [c0, c1, c2, c3] = [rows[at], rows[at + 1], rows[at + 2], rows[at + 3]];
  return [
    c0 + by * (c1 + by * (c2 + by * c3)),
    (c1 + by * (2 * c2 + 3 * by * c3)) * slope,
    (c2 + 3 * by * c3) * slope * slope,
    c3 * slope * slope * slope,
  ];
}

/** T at v. */
export function temperatureIn(rows: Float64Array, v: number): number {
  const row = rowOf(rows, v, 0);
  return rows[row + T0] + rows[row + T1] * (v - rows[row + REF]);
}

/** v at a temperature; where T stands still, at the upper end. */
export function argumentAt(rows: Float64Array, temperature: number): number {
  let row = 0;
  while (rows[row + HIGH] < Infinity && temperature >= rows[row + WIDTH + T0]) row += WIDTH;
  return rows[row + REF] + (temperature - rows[row + T0]) / rows[row + T1];
}
