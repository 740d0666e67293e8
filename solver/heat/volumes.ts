/**
 * A part as plain control volumes under its worst exposure: what the limits of the explicit scheme follow from.
 *
 *   C[i] dT[i]/dt = Σ G (T[neighbour] − T[i])      C [J/K], G [W/K], per m² of a wall, per m of a cylinder, or of a sphere
 *
 * Symmetric by construction. A node whose temperature is held has no row.
 */
import type { TemperatureRange, WallGrid, WallLayer } from '../grid';
import { largestConductance } from '../materials';
import { FACES, type LaidExposure, type LaidStage } from '../model';
import { partRows } from './partRows';

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

/**
 * Volumes of a part in one stage, with the least capacities and the largest conductances, at faces and contacts too, that a range of
 * temperatures brings. Latent heat at a point is left out: it only slows down.
 */
export function wallVolumes(
  layers: readonly WallLayer[],
  grid: WallGrid,
  stage: Pick<LaidStage, 'start' | 'end' | 'exposures'>,
  range: TemperatureRange,
): Volumes {
  const rows = partRows(layers, grid, 'plain');
  const capacity = new Float64Array(rows.size);
  const loss = new Float64Array(rows.size);
  const beside = new Float64Array(rows.size);
  const layer = new Int32Array(rows.size);
  const depth = new Float64Array(rows.size);
  /** Loss over capacity within the layer that a shared node counts to so far. */
  const fastest = new Float64Array(rows.size);
  let edge = 0;
  rows.layers.forEach(({ layer: { curves, thickness }, node, count, weights, shapeFactor, depth: within }, index) => {
    const slopes = curves.slopesBetween(range.lowest, range.highest);
    const [c] = slopes.heatCapacity;
    const k = slopes.conductivity[1];
    for (let i = 0; i < count; i++) {
      const left = i > 0 ? k * shapeFactor[i - 1] : 0;
      const right = i < count - 1 ? k * shapeFactor[i] : 0;
      const own = weights.here[i] * c;
      capacity[node + i] += own;
      loss[node + i] += left + right;
      if (i < count - 1) beside[node + i] = right;
      // A shared node is named after the layer in which it is fastest.
      if ((left + right) / own >= fastest[node + i]) {
        fastest[node + i] = (left + right) / own;
        layer[node + i] = index;
        depth[node + i] = edge + within[i];
      }
    }
    edge += thickness;
  });
  for (const { from, to, area, junction } of rows.links) {
    junction.at(range.highest, range.highest);
    const conductance = area * junction.perFirst;
    beside[from] = conductance;
    loss[from] += conductance;
    loss[to] += conductance;
  }
  const { exposures } = stage;
  FACES.forEach((face, i) => {
    const half = rows.halfCells[i];
    const inner = half === null ? 0 : 1 / (half.inverseDistance * half.curves.conductivity(range.highest));
    loss[i === 0 ? 0 : rows.size - 1] += rows.faceArea[i] * conductanceAt(exposures[face], inner, stage, range);
  });
  const held = (exposure: LaidExposure): boolean => exposure.kind === 'temperature' && grid.kind === 'nodes';
  const first = held(exposures.start) ? 1 : 0;
  const end = held(exposures.end) ? rows.size - 1 : rows.size;
  const free = <T extends Float64Array | Int32Array>(column: T): T => column.subarray(first, Math.max(first, end)) as T;
  return { capacity: free(capacity), loss: free(loss), beside: free(beside), layer: free(layer), depth: free(depth) };
}

/** Largest conductance of a face, W/(m²·K), with a resistance (m²·K/W) between it and its unknown; 0 where the unknown is held. */
function conductanceAt(
  exposure: LaidExposure,
  inner: number,
  stage: Pick<LaidStage, 'start' | 'end'>,
  range: TemperatureRange,
): number {
  if (exposure.kind === 'temperature') return inner > 0 ? 1 / inner : 0;
  return 1 / (1 / largestConductance(exposure, stage, range) + inner);
}
