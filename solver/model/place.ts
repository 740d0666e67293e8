/** Where the probes of a plan sit. */
import { partThickness } from './check';
import type { Part } from './part';
import type { Place } from './probe';

/** A depth from the start face, m, and the index of the layer that the place belongs to. */
export interface Position {
  readonly position_m: number;
  readonly layer: number;
}

/** A depth this close to an edge of a layer, as a part of the thickness of the part, lies on it. */
const ON_EDGE = 1e-12;

/**
 * Position of a place in a part. A depth, or a fraction of the whole part, that lies exactly on an edge between two layers
 * belongs to the layer before it (nearer the start face); an interface belongs to the layer on its named side.
 */
export function positionOf(part: Pick<Part, 'layers'>, place: Place): Position {
  const { layers } = part;
  const indexOf = (id: string): number => layers.findIndex((layer) => layer.id === id);
  const edgeBefore = (index: number): number => partThickness({ layers: layers.slice(0, index) });
  if ('face' in place) {
    return place.face === 'start' ? { position_m: 0, layer: 0 } : { position_m: partThickness(part), layer: layers.length - 1 };
  }
  if ('interface' in place) {
    const before = indexOf(place.interface);
    return { position_m: edgeBefore(before + 1), layer: place.side === 'before' ? before : before + 1 };
  }
  if ('fraction' in place && place.layer !== undefined) {
    const layer = indexOf(place.layer);
    return { position_m: edgeBefore(layer) + place.fraction * layers[layer].thickness, layer };
  }
  const thickness = partThickness(part);
  const depth = Math.min(thickness, 'depth' in place ? place.depth : place.fraction * thickness);
  let layer = 0;
  while (layer < layers.length - 1 && depth > edgeBefore(layer + 1) + ON_EDGE * thickness) layer++;
  return { position_m: depth, layer };
}
