import type { LaidCycle, Settings } from '../model';
import { automaticGrid, equalCounts } from './automaticGrid';
import type { TemperatureRange } from './sharpness';
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
): WallGrid {
  const { scheme, accuracy, grid } = settings;
  const thickness = layers.map((layer) => layer.thickness);
  if (grid === 'automatic') {
    if (scheme === 'automatic') return automaticGrid(layers, cycle, accuracy, range);
    return equalGrid('nodes', thickness, equalCounts(layers, accuracy, range));
  }
  const perLayer = (counts: number | number[]) => layers.map((_, i) => (typeof counts === 'number' ? counts : counts[i]));
  if ('cells' in grid) return equalGrid('cells', thickness, perLayer(grid.cells));
  return equalGrid(
    'nodes',
    thickness,
    perLayer(grid.nodes).map((nodes) => nodes - 1),
  );
}
