/**
 * The temperature at any depth from the temperatures at the points of its layer.
 *
 * Lagrange polynomial through the six nearest points of one layer (fewer where the layer has fewer): a profile is smooth
 * inside a layer and has a kink, or a jump, at its edges. Six, because with four the reading was less exact than the field.
 */
import type { FieldPoints } from './points';

/** A reading: the sum of weights[i] × temperature of points[i]; the weights sum to 1. */
export interface Stencil {
  readonly points: Int32Array;
  readonly weights: Float64Array;
}

const WIDTH = 6;
/** A depth this close to a point, as a part of the layer's thickness, is that point. */
const SAME_PLACE = 1e-9;

/**
 * Reading at `depth` (m from the start face; outside the part the nearer face). At an interface, and wherever a depth
 * belongs to two layers, `layer` (index) chooses; without it the layer nearer the start face is taken.
 */
export function stencilAt(points: FieldPoints, depth: number, layer = layerAt(points, depth)): Stencil {
  const { position, layerStart } = points;
  const first = layerStart[layer];
  const last = layerStart[layer + 1] - 1;
  const place = Math.min(Math.max(depth, position[first]), position[last]);
  const near = nearestPoint(position, first, last, place);
  if (Math.abs(position[near] - place) <= SAME_PLACE * (position[last] - position[first])) {
    return { points: Int32Array.of(near), weights: Float64Array.of(1) };
  }
  const width = Math.min(WIDTH, last - first + 1);
  const left = position[near] > place ? near - 1 : near;
  const start = Math.max(first, Math.min(left - (width >> 1) + 1, last - width + 1));
  const chosen = Int32Array.from({ length: width }, (_, i) => start + i);
  return { points: chosen, weights: lagrangeWeights(position, chosen, place) };
}

/** Index of the layer that holds a depth; an interface belongs to the layer nearer the start face. */
export function layerAt(points: FieldPoints, depth: number): number {
  const { position, layerStart } = points;
  const layers = layerStart.length - 1;
  let layer = 0;
  while (layer < layers - 1 && depth > position[layerStart[layer + 1] - 1] * (1 + 1e-12)) layer++;
  return layer;
}

function nearestPoint(position: Float64Array, first: number, last: number, place: number): number {
  let near = first;
  for (let i = first + 1; i <= last; i++) if (Math.abs(position[i] - place) < Math.abs(position[near] - place)) near = i;
  return near;
}

function lagrangeWeights(position: Float64Array, chosen: Int32Array, place: number): Float64Array {
  return Float64Array.from(chosen, (i) => {
    let weight = 1;
    for (const j of chosen) if (j !== i) weight *= (place - position[j]) / (position[i] - position[j]);
    return weight;
  });
}
