import type { FaceId, LaidCycle, Settings } from '../model';
import { automaticGrid, equalCounts, type GridDemand } from './automaticGrid';
import { FLAT, type Shape } from './shape';
import { sharpnessOf, type Sharpness } from './sharpness';
import type { TemperatureRange } from './temperatureRange';
import { equalGrid, type WallGrid } from './wallGrid';
import type { WallLayer } from './wallLayers';

/**
 * The grid that a plan's settings ask for. From the accuracy it is graded for the automatic scheme, and equal within each
 * layer for the schemes of the textbooks.
 */
export function gridOf(
  settings: Pick<Settings, 'scheme' | 'accuracy' | 'grid'>,
  layers: readonly WallLayer[],
  cycle: LaidCycle,
  range: TemperatureRange,
  shape: Shape = FLAT,
): WallGrid {
  const { scheme, accuracy, grid } = settings;
  const sharpness = { start: sharpnessAt('start', layers[0]), end: sharpnessAt('end', layers[layers.length - 1]) };
  const demand: GridDemand = { shape, layers, cycle, accuracy, range, sharpness };
  if (grid === 'automatic' && scheme === 'automatic') return automaticGrid(demand);
  const thickness = layers.map((layer) => layer.thickness);
  if (grid === 'automatic') return equalGrid('nodes', thickness, equalCounts(demand), shape);
  const perLayer = (counts: number | number[]) => layers.map((_, i) => (typeof counts === 'number' ? counts : counts[i]));
  if ('cells' in grid) return equalGrid('cells', thickness, perLayer(grid.cells), shape);
  const elements = perLayer(grid.nodes).map((nodes) => nodes - 1);
  const equal = equalGrid('nodes', thickness, elements, shape);
  return scheme === 'automatic' ? automaticGrid(demand, equal.elements) : equal;

  function sharpnessAt(face: FaceId, layer: WallLayer): Sharpness | null {
    if (cycle.stages.every((stage) => stage.exposures[face].kind === 'insulated')) return null;
    return sharpnessOf(cycle, face, layer, range);
  }
}
