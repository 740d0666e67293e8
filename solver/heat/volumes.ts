/**
 * A wall as plain control volumes under its worst exposure: what the limits of the explicit scheme follow from.
 *
 *   C[i] dT[i]/dt = Σ G (T[neighbour] − T[i])      C [J/(m²·K)], G [W/(m²·K)]
 *
 * Symmetric by construction. A node whose temperature is held has no row.
 */
import type { WallGrid, WallLayer } from '../grid';
import type { LaidExposure, LaidStage } from '../model';
import { wallRows } from './wallRows';

export interface Volumes {
  /** C of every volume. */
  readonly capacity: Float64Array;
  /** Sum of all conductances of every volume, films included. */
  readonly loss: Float64Array;
  /** Conductance between volume i and i + 1. */
  readonly beside: Float64Array;
  /** Where each volume's node is: index of its layer, depth in m. */
  readonly layer: Int32Array;
  readonly depth: Float64Array;
}

/** Volumes of a wall in one stage, with the largest film coefficients that occur in it. */
export function wallVolumes(layers: readonly WallLayer[], grid: WallGrid, exposures: LaidStage['exposures']): Volumes {
  const rows = wallRows(layers, grid, 'plain');
  const capacity = new Float64Array(rows.size);
  const loss = new Float64Array(rows.size);
  const beside = new Float64Array(rows.size);
  const layer = new Int32Array(rows.size);
  const depth = new Float64Array(rows.size);
  /** Loss over capacity within the layer that a shared node counts to so far. */
  const fastest = new Float64Array(rows.size);
  let edge = 0;
  rows.layers.forEach(({ layer: { curves, initial, thickness }, node, count, weights, inverseDistance }, index) => {
    const c = curves.heatCapacity(initial);
    const k = curves.conductivity(initial);
    let within = grid.kind === 'cells' ? grid.elements[index][0] / 2 : 0;
    for (let i = 0; i < count; i++) {
      const left = i > 0 ? k * inverseDistance[i - 1] : 0;
      const right = i < count - 1 ? k * inverseDistance[i] : 0;
      const own = weights.here[i] * c;
      capacity[node + i] += own;
      loss[node + i] += left + right;
      if (i < count - 1) beside[node + i] = right;
      // A shared node is named after the layer in which it is fastest.
      if ((left + right) / own >= fastest[node + i]) {
        fastest[node + i] = (left + right) / own;
        layer[node + i] = index;
        depth[node + i] = edge + within;
      }
      if (i < count - 1) within += 1 / inverseDistance[i];
    }
    edge += thickness;
  });
  for (const { from, to, conductance } of rows.links) {
    beside[from] = conductance;
    loss[from] += conductance;
    loss[to] += conductance;
  }
  loss[0] += faceConductance(exposures.start, rows.faceResistance.start);
  loss[rows.size - 1] += faceConductance(exposures.end, rows.faceResistance.end);
  const held = (exposure: LaidExposure): boolean => exposure.kind === 'temperature' && grid.kind === 'nodes';
  const first = held(exposures.start) ? 1 : 0;
  const end = held(exposures.end) ? rows.size - 1 : rows.size;
  const free = <T extends Float64Array | Int32Array>(column: T): T => column.subarray(first, Math.max(first, end)) as T;
  return { capacity: free(capacity), loss: free(loss), beside: free(beside), layer: free(layer), depth: free(depth) };
}

/** Largest conductance of a face in a stage, W/(m²·K). */
function faceConductance(exposure: LaidExposure, resistance: number): number {
  if (exposure.kind === 'film') return 1 / (1 / Math.max(...exposure.coefficient.value) + resistance);
  // Held where the node is the face itself: no conductance.
  return exposure.kind === 'temperature' && resistance > 0 ? 1 / resistance : 0;
}
