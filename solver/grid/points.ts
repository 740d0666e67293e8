import type { WallGrid } from './wallGrid';

/**
 * The points at which a field is reported, layer by layer from the start face to the end face.
 *
 * Every layer has a point at both its edges, so any interface has two points at one depth: equal temperatures where the
 * layers are bonded, different ones across a contact. Face points carry true face temperatures.
 */
export interface FieldPoints {
  /** Depth of each point, m; rising within a layer. */
  readonly position: Float64Array;
  /** First point of every layer, and the number of points at the end: layers + 1 entries. */
  readonly layerStart: Int32Array;
}

/** Points of a grid: its nodes; with cells, the cells' centres and the edges of the layers. */
export function fieldPoints(grid: WallGrid): FieldPoints {
  const position: number[] = [];
  const layerStart = [0];
  let edge = 0;
  grid.elements.forEach((lengths, layer) => {
    position.push(edge);
    let depth = 0;
    for (const length of lengths) {
      if (grid.kind === 'cells') position.push(edge + depth + length / 2);
      depth += length;
      if (grid.kind === 'nodes') position.push(edge + depth);
    }
    // The last point of a layer lies on its edge to the last digit, which a sum of lengths does not promise.
    edge += grid.thickness[layer];
    if (grid.kind === 'cells') position.push(edge);
    else position[position.length - 1] = edge;
    layerStart.push(position.length);
  });
  return { position: Float64Array.from(position), layerStart: Int32Array.from(layerStart) };
}
