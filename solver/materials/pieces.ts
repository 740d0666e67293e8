/**
 * A property over temperature as pieces of polynomials, made from what a person gave: a number, a table, or an expression.
 *
 * Numbers and tables are taken as they stand: constant or straight pieces. An expression is sampled once, into parabolas through
 * the ends and the middle of pieces that are halved until they agree with it to 1e-5 of its value, so that what solves never sees
 * an expression. It is followed from −273.15 to 4000 °C as far as it is finite and positive, and held beyond.
 */
import { evaluatorOf, type Curve } from '../model';

/** value(T) = c0 + c1 (T − ref) + c2 (T − ref)² from `from` to `to`, which may be infinite. */
export interface Piece {
  readonly from: number;
  readonly to: number;
  readonly ref: number;
  readonly value: readonly [c0: number, c1: number, c2: number];
}

/** Pieces without gaps from −∞ to ∞, ascending. */
export type Pieces = readonly Piece[];

/** How far a sampled expression may lie from itself where it is looked at, as a part of its value; 1e-5 between. */
const SAMPLING = 0.8e-5;
/** The widest distance between temperatures at which an expression is looked at, K: no bump wider than this is missed. */
const LOOK_K = 5;
const NARROWEST_K = 1e-3;
const COLDEST_C = -273.15;
const HOTTEST_C = 4000;

/** `near` is a temperature at which an expression is sure to hold, °C: it is followed from there to both sides. */
export function piecesOf(curve: Curve, near: number): Pieces {
  if (typeof curve === 'number') return [constant(-Infinity, Infinity, curve)];
  if ('table' in curve) return tablePieces(curve.table);
  return expressionPieces(curve.expression, near);
}

const constant = (from: number, to: number, value: number): Piece => ({
  from,
  to,
  ref: from > -Infinity ? from : to < Infinity ? to : 0,
  value: [value, 0, 0],
});

function tablePieces(table: readonly (readonly [number, number])[]): Pieces {
  const last = table.length - 1;
  const inside = table.slice(1).map(([to, value], i): Piece => {
    const [from, before] = table[i];
    return { from, to, ref: from, value: [before, (value - before) / (to - from), 0] };
  });
  return [constant(-Infinity, table[0][0], table[0][1]), ...inside, constant(table[last][0], Infinity, table[last][1])];
}

/** Expressions sampled before: a plan that is edited names the same ones again and again. */
const sampled = new Map<string, Pieces>();
const MOST_SAMPLED = 100;

function expressionPieces(expression: string, near: number): Pieces {
  const key = `${near}: ${expression}`;
  const known = sampled.get(key);
  if (known !== undefined) return known;
  const evaluate = evaluatorOf(expression, ['T']);
  const variables = [0];
  const pieces = samplePieces((temperature) => {
    variables[0] = temperature;
    return evaluate(variables);
  }, near);
  if (sampled.size >= MOST_SAMPLED) sampled.clear();
  sampled.set(key, pieces);
  return pieces;
}

/** Pieces that follow a function of temperature. Throws RangeError where it is not finite and positive at `near`. */
export function samplePieces(value: (temperature: number) => number, near: number): Pieces {
  if (!holds(value(near))) throw new RangeError(`gives ${value(near)} at ${near} °C`);
  const lowest = furthest(value, near, COLDEST_C);
  const highest = furthest(value, near, HOTTEST_C);
  const inside: Piece[] = [];
  sampleInto(inside, value, lowest, highest);
  return [constant(-Infinity, lowest, value(lowest)), ...inside, constant(highest, Infinity, value(highest))];
}

const holds = (value: number): boolean => value > 0 && value < Infinity;

/** The last temperature towards `limit` up to which a function holds, to NARROWEST_K. */
function furthest(value: (temperature: number) => number, near: number, limit: number): number {
  const way = Math.sign(limit - near);
  const left = Math.abs(limit - near);
  let reached = 0;
  while (reached < left && holds(value(near + way * Math.min(reached + LOOK_K, left))))
    reached = Math.min(reached + LOOK_K, left);
  let beyond = Math.min(reached + LOOK_K, left);
  while (beyond - reached > NARROWEST_K) {
    const middle = 0.5 * (reached + beyond);
    if (holds(value(near + way * middle))) reached = middle;
    else beyond = middle;
  }
  return near + way * reached;
}

function sampleInto(pieces: Piece[], value: (temperature: number) => number, from: number, to: number): void {
  if (!(to > from)) return;
  const piece = parabola(value, from, to);
  if (to - from <= NARROWEST_K || agrees(piece, value)) {
    pieces.push(piece);
    return;
  }
  const middle = 0.5 * (from + to);
  sampleInto(pieces, value, from, middle);
  sampleInto(pieces, value, middle, to);
}

/** The parabola through a function at both ends and in the middle. */
function parabola(value: (temperature: number) => number, from: number, to: number): Piece {
  const width = to - from;
  const [first, middle, last] = [value(from), value(from + 0.5 * width), value(to)];
  const bend = 2 * (first - 2 * middle + last);
  return { from, to, ref: from, value: [first, (last - first - bend) / width, bend / (width * width)] };
}

function agrees(piece: Piece, value: (temperature: number) => number): boolean {
  const { from, to } = piece;
  const looks = Math.max(8, Math.ceil((to - from) / LOOK_K));
  for (let i = 1; i < looks; i++) {
    const temperature = from + ((to - from) * i) / looks;
    const wanted = value(temperature);
    if (!(Math.abs(pieceAt(piece, temperature) - wanted) <= SAMPLING * wanted)) return false;
  }
  return true;
}

export function pieceAt({ ref, value: [c0, c1, c2] }: Piece, temperature: number): number {
  const d = temperature - ref;
  return c0 + d * (c1 + d * c2);
}

/** Ends of the pieces of some properties, ascending, each once; −∞ and ∞ left out. */
export function breaksOf(...properties: Pieces[]): number[] {
  const ends = properties.flatMap((pieces) => pieces.map(({ to }) => to)).filter((to) => to < Infinity);
  return [...new Set(ends)].sort((a, b) => a - b);
}

/** The coefficients of the piece that holds a temperature, counted from `ref`. */
export function expandedAt(pieces: Pieces, temperature: number, ref: number): [c0: number, c1: number, c2: number] {
  const piece = pieces.find(({ to }) => temperature < to) ?? pieces[pieces.length - 1];
  const d = ref - piece.ref;
  const [c0, c1, c2] = piece.value;
  return [c0 + d * (c1 + d * c2), c1 + 2 * d * c2, c2];
}
