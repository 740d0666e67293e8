/**
 * A row of layers along a line of pixels: to scale, except that a layer too thin to see or take hold of gets a least width.
 */
import { clamp } from './scale';

export interface LayerRow {
  /** Pixel of the near edge of every layer, and of the far face at the end. */
  readonly edges: readonly number[];
  /** True when every layer has its true share of the width. */
  readonly toScale: boolean;
  /** Layers drawn wider than they are. */
  readonly widened: readonly boolean[];
  /** Pixel of a point so far into a layer, 0 to 1. */
  inLayer(layer: number, fraction: number): number;
  /** Pixel of a depth from the start face, m. */
  at(depth: number): number;
  /** Depth at a pixel, m. */
  depthAt(pixel: number): number;
  /** Layer that holds a depth; at an edge, the one before it if `before`. */
  layerAt(depth: number, before?: boolean): number;
}

/** Lays layers of the given thicknesses (m) between two pixels, none narrower than `least` where there is room for that. */
export function layLayers(thicknesses: readonly number[], start: number, end: number, least: number): LayerRow {
  const count = thicknesses.length;
  const width = end - start;
  const floor = Math.min(least, width / count);
  const widened = widen(thicknesses, width, floor);
  const fixed = widened.filter(Boolean).length * floor;
  const free = thicknesses.reduce((sum, thickness, i) => (widened[i] ? sum : sum + thickness), 0);
  const edges = [start];
  const depths = [0];
  thicknesses.forEach((thickness, i) => {
    edges.push(edges[i] + (widened[i] ? floor : (thickness / free) * (width - fixed)));
    depths.push(depths[i] + thickness);
  });
  edges[count] = end;
  const layerAt = (depth: number, before = false): number => {
    let layer = 0;
    while (layer < count - 1 && (before ? depth > depths[layer + 1] : depth >= depths[layer + 1])) layer++;
    return layer;
  };
  const inLayer = (layer: number, fraction: number): number => edges[layer] + fraction * (edges[layer + 1] - edges[layer]);
  return {
    edges,
    toScale: !widened.includes(true),
    widened,
    inLayer,
    layerAt,
    at: (depth) => {
      const layer = layerAt(depth);
      return inLayer(layer, (depth - depths[layer]) / thicknesses[layer]);
    },
    depthAt: (pixel) => {
      let layer = 0;
      while (layer < count - 1 && pixel >= edges[layer + 1]) layer++;
      const fraction = clamp((pixel - edges[layer]) / (edges[layer + 1] - edges[layer]), 0, 1);
      return depths[layer] + fraction * thicknesses[layer];
    },
  };
}

/** Which layers need the least width: widening some takes room from the others, so it is asked again until nothing changes. */
function widen(thicknesses: readonly number[], width: number, floor: number): boolean[] {
  const widened = thicknesses.map(() => false);
  for (let again = true; again;) {
    again = false;
    const left = width - widened.filter(Boolean).length * floor;
    const free = thicknesses.reduce((sum, thickness, i) => (widened[i] ? sum : sum + thickness), 0);
    thicknesses.forEach((thickness, i) => {
      if (widened[i] || (thickness / free) * left >= floor - 1e-9) return;
      widened[i] = true;
      again = true;
    });
  }
  return widened;
}
