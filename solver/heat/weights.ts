/**
 * Storage weights: how much of the heat content at a node and its neighbours belongs to the node's row.
 *
 *   row i:  w− H[i−1] + w0 H[i] + w+ H[i+1]  ≈  ∫ φ_i H dx,   φ_i the hat that is 1 at node i and 0 at its neighbours
 *
 * H [J/m³]; weights in m. The rows of one layer sum to its whole heat with either kind of weights, and the flux between
 * neighbours is exact for any spacing, so only this integral decides the order in space:
 *   plain         all of the hat's area at its own node (control volumes): second order
 *   fourthOrder   exact where H is a parabola through the node and its neighbours; equal spacing h: (1, 10, 1) h/12
 * At a layer's ends half a hat is left; fourth order takes the parabola through the node and the next two of its layer.
 */

import type { PlainRows } from '../grid';

export type StorageKind = 'plain' | 'fourthOrder';

/** Weights of the nodes of one layer, m; `far` is the weight of the second neighbour, inwards, and non-zero at the ends only. */
export interface StorageWeights {
  readonly before: Float64Array;
  readonly here: Float64Array;
  readonly after: Float64Array;
  readonly far: Float64Array;
}

/**
 * Weights of a layer with a node at both ends of all its elements; lengths in m. So many rows as `plainRows` says at either end
 * are plain whatever the kind.
 */
export function nodeWeights(
  lengths: Float64Array,
  kind: StorageKind,
  plainRows: PlainRows = { start: 0, end: 0 },
): StorageWeights {
  const nodes = lengths.length + 1;
  const weights = emptyWeights(nodes);
  const { before, here, after } = weights;
  const kindOf = (i: number): StorageKind => (i < plainRows.start || i >= nodes - plainRows.end ? 'plain' : kind);
  // First row, interior, last row.
  endRow(weights, 0, 1, lengths[0], lengths[1], kindOf(0));
  for (let i = 1; i < nodes - 1; i++) {
    const a = lengths[i - 1];
    const b = lengths[i];
    if (kindOf(i) === 'fourthOrder') {
      before[i] = (a * a * a + 2 * a * a * b - b * b * b) / (12 * a * (a + b));
      after[i] = (b * b * b + 2 * b * b * a - a * a * a) / (12 * b * (a + b));
    }
    here[i] = (a + b) / 2 - before[i] - after[i];
  }
  endRow(weights, nodes - 1, -1, lengths[nodes - 2], lengths[nodes - 3], kindOf(nodes - 1));
  return weights;
}

/** Row of a layer's end node: half a hat. `inward` is +1 at the first node and −1 at the last; `second` undefined: no third node. */
function endRow(
  weights: StorageWeights,
  i: number,
  inward: 1 | -1,
  first: number,
  second: number | undefined,
  kind: StorageKind,
): void {
  const { here, far } = weights;
  const neighbour = inward === 1 ? weights.after : weights.before;
  if (kind === 'plain') {
    here[i] = first / 2;
  } else if (second === undefined) {
    // Two nodes in the layer: a line is all there is.
    here[i] = first / 3;
    neighbour[i] = first / 6;
  } else {
    // Moments of the half hat over its first element: first²/6 of x and first³/12 of x².
    const distance = first + second;
    far[i] = (first * first * (first / 12 - first / 6)) / (distance * second);
    neighbour[i] = first / 6 - (distance * far[i]) / first;
    here[i] = first / 2 - neighbour[i] - far[i];
  }
}

/** Weights of a layer of cells: each cell's row holds its own width. */
export function cellWeights(lengths: Float64Array): StorageWeights {
  const weights = emptyWeights(lengths.length);
  weights.here.set(lengths);
  return weights;
}

function emptyWeights(nodes: number): StorageWeights {
  const column = () => new Float64Array(nodes);
  return { before: column(), here: column(), after: column(), far: column() };
}

/** All weights on the heat content of one node, over every row of its layer: the part of the layer that the node stands for, m. */
export function weightOnNode({ before, here, after, far }: StorageWeights, node: number): number {
  const last = here.length - 1;
  let sum = here[node];
  if (node > 0) sum += after[node - 1];
  if (node < last) sum += before[node + 1];
  if (node === 2) sum += far[0];
  if (node === last - 2) sum += far[last];
  return sum;
}
