/**
 * Storage weights and shape factors of a layer: how its heat content is shared out to its nodes, and how they conduct.
 *
 *   row i:  w− H[i−1] + w0 H[i] + w+ H[i+1]  ≈  ∫ φ_i H dV,   φ_i the hat that is 1 at node i and 0 at its neighbours
 *   flux from node i to i+1:  S (Θ[i] − Θ[i+1])
 *
 * H [J/m³], Θ [W/m]; w volume and S shape factor per m² of a wall, m of a cylinder, or of the whole sphere. The rows of a layer sum to
 * its whole heat whatever the weights. Two kinds:
 *
 *   plain         control volumes: areas and volumes as they are, S = area halfway over distance, w0 = the node's own volume, up
 *                 to halfway to its neighbours, no other weights. Second order. A solid part has a node at its centre.
 *   fourthOrder   hats that conduct steadily between neighbours (straight, ln r, 1/r), so that S is exact; weights exact where H
 *                 is a parabola through the node and its neighbours, from moments of the hats by five Gauss points. At a layer's
 *                 ends half a hat is left, and the parabola goes through the node and the next two. A solid part has no node at
 *                 its centre: the first one carries the core, with the parabola a + b r² through it and the next.
 *
 * On a wall with equal spacing h the weights of fourth order are (1, 10, 1) h/12.
 */
import { areaAt, hasCentre, resistanceFrom, volumeFrom, type PlainRows, type Shape } from '../grid';

export type StorageKind = 'plain' | 'fourthOrder';

/** Weights of the nodes of one layer; `far` is the weight of the second neighbour, inwards, and non-zero at the ends only. */
export interface StorageWeights {
  readonly before: Float64Array;
  readonly here: Float64Array;
  readonly after: Float64Array;
  readonly far: Float64Array;
}

export interface Elements {
  readonly weights: StorageWeights;
  /** Shape factor between node i and i + 1. */
  readonly shapeFactor: Float64Array;
  /** Depth of every node, m. */
  readonly depth: Float64Array;
}

/** A layer cut into pieces: its shape, the depth at which it begins, m, and the lengths of the pieces, m. */
export interface CutLayer {
  readonly shape: Shape;
  readonly edge: number;
  readonly lengths: Float64Array;
}

/** Cells: a node in the middle of every piece, which holds all of its heat. */
export function cellElements({ shape, edge, lengths }: CutLayer): Elements {
  const weights = emptyWeights(lengths.length);
  const depth = new Float64Array(lengths.length);
  const shapeFactor = new Float64Array(lengths.length - 1);
  let at = edge;
  lengths.forEach((length, i) => {
    weights.here[i] = volumeFrom(shape, at, length);
    depth[i] = at + length / 2;
    at += length;
    if (i < shapeFactor.length) shapeFactor[i] = areaAt(shape, at) / ((length + lengths[i + 1]) / 2);
  });
  return { weights, shapeFactor, depth };
}

/** Nodes at both ends of every piece, as control volumes. */
export function plainElements({ shape, edge, lengths }: CutLayer): Elements {
  const weights = emptyWeights(lengths.length + 1);
  const depth = new Float64Array(lengths.length + 1).fill(edge);
  const shapeFactor = new Float64Array(lengths.length);
  lengths.forEach((length, i) => {
    const half = length / 2;
    depth[i + 1] = depth[i] + length;
    weights.here[i] += volumeFrom(shape, depth[i], half);
    weights.here[i + 1] += volumeFrom(shape, depth[i] + half, half);
    shapeFactor[i] = areaAt(shape, depth[i] + half) / length;
  });
  return { weights, shapeFactor, depth };
}

/**
 * Nodes of fourth order at both ends of every piece, but none at a centre. So many rows as `plainRows` says at either end hold all
 * of their hat's volume themselves.
 */
export function fourthOrderElements(layer: CutLayer, plainRows: PlainRows = { start: 0, end: 0 }): Elements {
  const solid = hasCentre(layer.shape) && layer.edge === 0;
  const pieces = solid ? layer.lengths.subarray(1) : layer.lengths;
  const count = pieces.length + 1;
  const weights = emptyWeights(count);
  const depth = new Float64Array(count).fill(solid ? layer.lengths[0] : layer.edge);
  pieces.forEach((length, i) => (depth[i + 1] = depth[i] + length));
  const last = count - 1;
  for (let i = 0; i < count; i++) {
    const before = i > 0 ? hatMoments(layer.shape, depth[i - 1], pieces[i - 1], 'falls back') : NOTHING;
    const after = i < last ? hatMoments(layer.shape, depth[i], pieces[i], 'falls ahead') : NOTHING;
    const isPlain = i < plainRows.start || i >= count - plainRows.end;
    if (solid && i === 0) coreRow(weights, layer.shape, depth, isPlain);
    else if (isPlain) weights.here[i] = before[0] + after[0];
    else if (i === 0) endRow(weights, i, after, pieces[0], pieces[1], weights.after);
    else if (i === last) endRow(weights, i, before, pieces[last - 1], pieces[last - 2], weights.before);
    else insideRow(weights, i, before, after, pieces[i - 1], pieces[i]);
  }
  const shapeFactor = pieces.map((length, i) => 1 / resistanceFrom(layer.shape, depth[i], length));
  return { weights, shapeFactor, depth };
}

/** ∫ φ s^k dV for k = 0, 1, 2 over one piece, s the distance from the hat's node. */
type Moments = readonly [number, number, number];
const NOTHING: Moments = [0, 0, 0];

/** Gauss's points and weights on 0 to 1, exact to the ninth degree. Abramowitz & Stegun, table 25.4 (from memory; tested). */
const GAUSS: readonly (readonly [point: number, weight: number])[] = [
  [0.5 - 0.453089922969332, 0.11846344252809454],
  [0.5 - 0.26923465505284155, 0.23931433524968324],
  [0.5, 0.28444444444444444],
  [0.5 + 0.26923465505284155, 0.23931433524968324],
  [0.5 + 0.453089922969332, 0.11846344252809454],
];

/** Moments of the half of a hat that lies ahead of its node, or behind it, on the piece that begins at a depth. */
function hatMoments(shape: Shape, depth: number, length: number, way: 'falls ahead' | 'falls back'): Moments {
  if (shape.kind === 'wall') return [length / 2, (length * length) / 6, (length * length * length) / 12];
  const whole = resistanceFrom(shape, depth, length);
  const moments: [number, number, number] = [0, 0, 0];
  for (const [point, weight] of GAUSS) {
    const at = point * length;
    const rest = length - at;
    const ahead = way === 'falls ahead';
    const hat = (ahead ? resistanceFrom(shape, depth + at, rest) : resistanceFrom(shape, depth, at)) / whole;
    const s = ahead ? at : rest;
    const part = weight * length * areaAt(shape, depth + at) * hat;
    moments[0] += part;
    moments[1] += part * s;
    moments[2] += part * s * s;
  }
  return moments;
}

/** A row between two others, a before it and b after it: a parabola through all three. */
function insideRow(weights: StorageWeights, i: number, behind: Moments, ahead: Moments, a: number, b: number): void {
  const first = ahead[1] - behind[1];
  const second = ahead[2] + behind[2];
  weights.after[i] = (second + a * first) / (b * (a + b));
  weights.before[i] = (second - b * first) / (a * (a + b));
  weights.here[i] = behind[0] + ahead[0] - weights.after[i] - weights.before[i];
}

/**
 * A row at the end of a layer: half a hat, with the parabola through the node and the next two inwards, `first` and then `second` apart; a
 * line where there is no third node (`second` undefined).
 */
function endRow(
  { here, far }: StorageWeights,
  i: number,
  [m0, m1, m2]: Moments,
  first: number,
  second: number | undefined,
  neighbour: Float64Array,
): void {
  if (second !== undefined) {
    const distance = first + second;
    far[i] = (m2 - first * m1) / (distance * second);
    neighbour[i] = (m1 - distance * far[i]) / first;
  } else neighbour[i] = m1 / first;
  here[i] = m0 - neighbour[i] - far[i];
}

/** The first row of a solid part: its hat, and the core inside it, with the parabola a + b r² through it and the next node. */
function coreRow({ here, after }: StorageWeights, shape: Shape, depth: Float64Array, isPlain: boolean): void {
  const [inner, next] = depth;
  const core = volumeFrom(shape, 0, inner);
  if (next === undefined) {
    here[0] = core;
    return;
  }
  const [m0, m1, m2] = hatMoments(shape, inner, next - inner, 'falls ahead');
  // The part that the next node has in it: (r² − inner²)/(next² − inner²), over the hat with r = inner + s, and over the core.
  const squares = (next - inner) * (next + inner);
  const meanSquare = shape.kind === 'sphere' ? 3 / 5 : 1 / 2;
  after[0] = isPlain ? 0 : (2 * inner * m1 + m2 - core * (1 - meanSquare) * inner * inner) / squares;
  here[0] = core + m0 - after[0];
}

function emptyWeights(nodes: number): StorageWeights {
  const column = () => new Float64Array(nodes);
  return { before: column(), here: column(), after: column(), far: column() };
}

/** All weights on the heat content of one node, over every row of its layer: the volume that the node stands for. */
export function weightOnNode({ before, here, after, far }: StorageWeights, node: number): number {
  const last = here.length - 1;
  let sum = here[node];
  if (node > 0) sum += after[node - 1];
  if (node < last) sum += before[node + 1];
  if (node === 2) sum += far[0];
  if (node === last - 2) sum += far[last];
  return sum;
}
