/**
 * The rows of a wall on a grid: which unknowns a layer has, and how they are linked. Geometry and constants only.
 *
 * A slot is a node (or cell) of one layer. Bonded layers share the unknown at their common edge: two slots, one unknown.
 */
import type { WallGrid, WallLayer } from '../grid';
import { cellWeights, nodeWeights, weightOnNode, type StorageKind, type StorageWeights } from './weights';

/** One layer's slots: first + i holds unknown node + i. */
export interface LayerRows {
  readonly layer: WallLayer;
  /** First slot, and number of slots. */
  readonly first: number;
  readonly count: number;
  /** Unknown of the first slot. */
  readonly node: number;
  readonly weights: StorageWeights;
  /** 1/distance between slot i and i + 1, 1/m; count − 1 entries. */
  readonly inverseDistance: Float64Array;
}

/** A conductance between two unknowns of different layers, W/(m²·K). */
export interface Link {
  readonly from: number;
  readonly to: number;
  readonly conductance: number;
  /** Part of the resistance that lies in the half cell before and after the interface; the rest is the contact's. */
  readonly halfBefore: number;
  readonly halfAfter: number;
}

export interface WallRows {
  readonly layers: readonly LayerRows[];
  readonly links: readonly Link[];
  readonly size: number;
  readonly slots: number;
  /** Conduction between a face and its unknown, m²·K/W: 0 with nodes, half a cell with cells. */
  readonly faceResistance: { readonly start: number; readonly end: number };
}

export function wallRows(layers: readonly WallLayer[], grid: WallGrid, storage: StorageKind): WallRows {
  const cells = grid.kind === 'cells';
  const rows: LayerRows[] = [];
  const links: Link[] = [];
  let slot = 0;
  let node = 0;
  layers.forEach((layer, index) => {
    const lengths = grid.elements[index];
    if (index > 0) {
      const before = layers[index - 1];
      if (cells || before.contact > 0) links.push(linkBetween(layers, grid, index, node));
      else node--;
    }
    const count = cells ? lengths.length : lengths.length + 1;
    rows.push({
      layer,
      first: slot,
      count,
      node,
      weights: cells ? cellWeights(lengths) : nodeWeights(lengths, storage, grid.plainRows?.[index]),
      inverseDistance: Float64Array.from({ length: count - 1 }, (_, i) =>
        cells ? 2 / (lengths[i] + lengths[i + 1]) : 1 / lengths[i],
      ),
    });
    slot += count;
    node += count;
  });
  const last = layers.length - 1;
  return {
    layers: rows,
    links,
    size: node,
    slots: slot,
    faceResistance: {
      start: cells ? halfCell(layers[0], grid.elements[0][0]) : 0,
      end: cells ? halfCell(layers[last], grid.elements[last][grid.elements[last].length - 1]) : 0,
    },
  };
}

/** Resistance of half a cell, m²·K/W; cells need a constant conductivity. */
const halfCell = (layer: WallLayer, width: number): number => width / 2 / layer.curves.conductivity(layer.initial);

function linkBetween(layers: readonly WallLayer[], grid: WallGrid, index: number, to: number): Link {
  const before = grid.elements[index - 1];
  const cells = grid.kind === 'cells';
  const halfBefore = cells ? halfCell(layers[index - 1], before[before.length - 1]) : 0;
  const halfAfter = cells ? halfCell(layers[index], grid.elements[index][0]) : 0;
  const resistance = halfBefore + layers[index - 1].contact + halfAfter;
  return {
    from: to - 1,
    to,
    conductance: 1 / resistance,
    halfBefore: halfBefore / resistance,
    halfAfter: halfAfter / resistance,
  };
}

/**
 * Temperatures of the unknowns at the start, °C. A node that two layers at different temperatures share takes the mean by the
 * heat capacity it stands for in each: the heat of both layers is then kept to rounding. On a grid graded by diffusion time
 * this is the mean by effusivity √(k ρ c), the temperature that two bodies brought into contact take at once.
 */
export function initialTemperatures({ layers, size }: WallRows): Float64Array {
  const temperature = new Float64Array(size);
  const capacity = new Float64Array(size);
  for (const { layer, count, node, weights } of layers) {
    for (let i = 0; i < count; i++) {
      const own = weightOnNode(weights, i) * layer.curves.heatCapacity(layer.initial);
      const whole = capacity[node + i] + own;
      temperature[node + i] += (layer.initial - temperature[node + i]) * (own / whole);
      capacity[node + i] = whole;
    }
  }
  return temperature;
}
