/**
 * The largest stable step of the explicit scheme, and the place that sets it.
 *
 * Forward Euler is bounded up to h = 2/λmax, λ the eigenvalues of C⁻¹ K, which are those of the symmetric C^(−1/2) K C^(−1/2)
 * (C capacities, K conductances). The usual hand rule, Fo (1 + Bi) ≤ 1/2, is the smaller limit without overshoot,
 * the smallest capacity over conductance of any volume.
 */
import { equalGrid, temperatureRange, type TemperatureRange, type WallGrid, type WallLayer } from '../grid';
import { wallVolumes, type Volumes } from '../heat';
import { eigenvectorAt, largestEigenvalue } from '../linear';
import { largestConductance } from '../materials';
import { FACES, type LaidCycle, type LaidStage } from '../model';

export interface ExplicitLimit {
  /** 2/λmax rounded down by 0.1 %, s. */
  readonly limit: number;
  /** Largest step without overshoot, s. */
  readonly noOvershoot: number;
  /** Where the fastest mode is largest: index of the layer, depth in m. */
  readonly layer: number;
  readonly depth: number;
}

const ROUNDED_DOWN = 0.999;

/** The limit of some volumes; null where nothing flows or no volume is free. */
export function limitOf(volumes: Volumes): ExplicitLimit | null {
  const { capacity, loss, beside } = volumes;
  const symmetric = {
    diagonal: Float64Array.from(loss, (value, i) => value / capacity[i]),
    beside: Float64Array.from({ length: Math.max(0, capacity.length - 1) }, (_, i) => {
      return -beside[i] / (Math.sqrt(capacity[i]) * Math.sqrt(capacity[i + 1]));
    }),
  };
  const largest = largestEigenvalue(symmetric);
  if (!(largest > 0)) return null;
  const mode = eigenvectorAt(symmetric, largest);
  let place = 0;
  for (let i = 1; i < mode.length; i++) if (Math.abs(mode[i]) > Math.abs(mode[place])) place = i;
  return {
    limit: (ROUNDED_DOWN * 2) / largest,
    noOvershoot: 1 / symmetric.diagonal.reduce((most, rate) => Math.max(most, rate), 0),
    layer: volumes.layer[place],
    depth: volumes.depth[place],
  };
}

/** The smallest limits over all stages of a cycle, each with the largest conductances at faces and contacts that occur in it. */
export function wallLimit(layers: readonly WallLayer[], grid: WallGrid, cycle: LaidCycle): ExplicitLimit | null {
  const range = temperatureRange(layers, cycle);
  const limits = distinctStages(cycle, range)
    .map((stage) => limitOf(wallVolumes(layers, grid, stage, range)))
    .filter((limit) => limit !== null);
  if (limits.length === 0) return null;
  const worst = limits.reduce((lowest, limit) => (limit.limit < lowest.limit ? limit : lowest));
  return { ...worst, noOvershoot: Math.min(...limits.map((limit) => limit.noOvershoot)) };
}

/** The stages, but only one of those that conduct alike. */
function distinctStages(cycle: LaidCycle, range: TemperatureRange): LaidStage[] {
  const seen = new Map<string, LaidStage>();
  for (const stage of cycle.stages) {
    const key = FACES.map((face) => {
      const exposure = stage.exposures[face];
      return exposure.kind === 'film' ? largestConductance(exposure, stage, range) : exposure.kind;
    }).join();
    seen.set(key, stage);
  }
  return [...seen.values()];
}

/**
 * How many nodes (or cells) in the layer that sets the limit would make a step stable, all else as it is; null if none would.
 */
export function countThatDoes(
  layers: readonly WallLayer[],
  grid: WallGrid,
  cycle: LaidCycle,
  layer: number,
  step: number,
): number | null {
  const extra = grid.kind === 'nodes' ? 1 : 0;
  const limitWith = (elements: number): number => {
    const one = equalGrid(grid.kind, grid.thickness, new Array<number>(layers.length).fill(elements));
    const changed = { ...grid, elements: grid.elements.map((lengths, i) => (i === layer ? one.elements[layer] : lengths)) };
    return wallLimit(layers, changed, cycle)?.limit ?? Infinity;
  };
  // The schema asks for at least two nodes or cells a layer.
  let enough = 2 - extra;
  let tooMany = grid.elements[layer].length;
  if (enough >= tooMany || !(limitWith(enough) >= step)) return null;
  while (tooMany - enough > 1) {
    const middle = (enough + tooMany) >> 1;
    if (limitWith(middle) >= step) enough = middle;
    else tooMany = middle;
  }
  return enough + extra;
}
