/**
 * The rows of a layered part on a grid: which unknowns a layer has, what they mean, and how they are linked.
 *
 * A slot is a node (or cell) of one layer. Bonded layers share the unknown at their common edge: two slots, one unknown.
 */
import { areaAt, startAt, type WallGrid, type WallLayer } from '../grid';
import { argumentAt, heatTables } from '../materials';
import {
  cellElements,
  fourthOrderElements,
  plainElements,
  weightOnNode,
  type StorageKind,
  type StorageWeights,
} from './elements';
import { across } from './gap';
import type { HalfCell } from './halfCell';
import { Junction } from './junction';

/** One layer's slots: first + i holds unknown node + i. */
export interface LayerRows {
  readonly layer: WallLayer;
  /** First slot, and number of slots. */
  readonly first: number;
  readonly count: number;
  /** Unknown of the first slot. */
  readonly node: number;
  /** Depth of every slot within the layer, m. */
  readonly depth: Float64Array;
  readonly weights: StorageWeights;
  /** Between slot i and i + 1; count − 1 entries. */
  readonly shapeFactor: Float64Array;
}

/** The way between two unknowns of different layers. */
export interface Link {
  readonly from: number;
  readonly to: number;
  /** m² per basis */
  readonly area: number;
  readonly junction: Junction;
}

export interface PartRows {
  readonly layers: readonly LayerRows[];
  readonly links: readonly Link[];
  readonly size: number;
  readonly slots: number;
  /** Area of the start and the end face, m² per basis. */
  readonly faceArea: readonly [start: number, end: number];
  /** What lies between a face and its unknown: nothing with nodes, half a cell with cells. */
  readonly halfCells: readonly [start: HalfCell | null, end: HalfCell | null];
  /** Unknowns that are a heat content on the scale of a temperature, not a temperature, with the tables of their slots. */
  readonly heatNodes: readonly HeatNode[];
}

/** An unknown that counts heat (materials/heatTables.ts). */
export interface HeatNode {
  readonly row: number;
  readonly slots: readonly number[];
  /** One table a slot. */
  readonly tables: readonly Float64Array[];
  /** Value at the start. */
  readonly initial: number;
}

/** A layer whose heat capacity differs by more than this needs heat contents for unknowns. */
const LATENT_RATIO = 10;

/** Whether a layer's unknowns are heat contents: latent heat at a point, or over a range that is narrow beside it. */
export function countsHeat({ curves }: Pick<WallLayer, 'curves'>): boolean {
  const [least, greatest] = curves.slopesBetween(-Infinity, Infinity).heatCapacity;
  return curves.jumps.length > 0 || greatest > LATENT_RATIO * least;
}

export function partRows(layers: readonly WallLayer[], grid: WallGrid, storage: StorageKind): PartRows {
  const shape = grid.shape;
  const cells = grid.kind === 'cells';
  const rows: LayerRows[] = [];
  const links: Link[] = [];
  let slot = 0;
  let node = 0;
  let edge = 0;
  layers.forEach((layer, index) => {
    const lengths = grid.elements[index];
    if (index > 0) {
      const junction = junctionBefore(layers, grid, index);
      if (junction === null) node--;
      else links.push({ from: node - 1, to: node, area: areaAt(shape, edge), junction });
    }
    const cut = { shape, edge, lengths };
    const plain = storage === 'plain' || countsHeat(layer);
    const elements = cells ? cellElements(cut) : plain ? plainElements(cut) : fourthOrderElements(cut, grid.plainRows?.[index]);
    const { weights, shapeFactor, depth } = elements;
    const within = depth.map((at) => at - edge);
    if (!cells) within[within.length - 1] = layer.thickness;
    rows.push({ layer, first: slot, count: depth.length, node, depth: within, weights, shapeFactor });
    slot += depth.length;
    node += depth.length;
    edge += layer.thickness;
  });
  const last = layers.length - 1;
  const lastLengths = grid.elements[last];
  return {
    layers: rows,
    links,
    size: node,
    slots: slot,
    faceArea: [areaAt(shape, 0), areaAt(shape, edge)],
    halfCells: cells
      ? [halfCell(layers[0], grid.elements[0][0]), halfCell(layers[last], lastLengths[lastLengths.length - 1])]
      : [null, null],
    heatNodes: heatNodesOf(rows),
  };
}

/** What lies between a layer and the one before it; null: they share a node. */
function junctionBefore(layers: readonly WallLayer[], grid: WallGrid, index: number): Junction | null {
  const between = across(layers[index - 1].contact);
  if (grid.kind === 'nodes') return between === null ? null : new Junction(null, between, null);
  const before = grid.elements[index - 1];
  return new Junction(
    halfCell(layers[index - 1], before[before.length - 1]),
    between,
    halfCell(layers[index], grid.elements[index][0]),
  );
}

const halfCell = ({ curves }: WallLayer, width: number): HalfCell => ({ curves, inverseDistance: 2 / width });

/** Unknowns that count heat: those of layers that need it, and what such a layer shares with a neighbour. */
function heatNodesOf(layers: readonly LayerRows[]): HeatNode[] {
  const nodes: HeatNode[] = [];
  layers.forEach((rows, index) => {
    const before = index > 0 && sharesNode(layers[index - 1], rows) ? layers[index - 1] : null;
    const after = index + 1 < layers.length && sharesNode(rows, layers[index + 1]);
    const counts = countsHeat(rows.layer);
    if (before !== null && (counts || countsHeat(before.layer))) nodes.push(sharedNode(before, rows));
    if (!counts) return;
    // All nodes inside a layer have one table, whatever their volume.
    const { tables } = heatTables([{ curves: rows.layer.curves, volume: 1 }], rows.layer.initial);
    for (let i = before === null ? 0 : 1; i < rows.count - (after ? 1 : 0); i++) {
      const initial = argumentAt(tables[0], startAt(rows.layer, rows.depth[i]));
      nodes.push({ row: rows.node + i, slots: [rows.first + i], tables, initial });
    }
  });
  return nodes;
}

const sharesNode = (before: LayerRows, after: LayerRows): boolean => before.node + before.count - 1 === after.node;

/** The node that two bonded layers share; it starts with the heat of both. */
function sharedNode(before: LayerRows, after: LayerRows): HeatNode {
  const last = before.count - 1;
  const parts = [
    { curves: before.layer.curves, volume: weightOnNode(before.weights, last), start: startAt(before.layer, before.depth[last]) },
    { curves: after.layer.curves, volume: weightOnNode(after.weights, 0), start: startAt(after.layer, 0) },
  ];
  const [first, second] = parts;
  const { tables, scale } = heatTables(parts, before.layer.initial);
  const excess = second.volume * (second.curves.heatContent(second.start) - second.curves.heatContent(first.start));
  const initial = argumentAt(tables[0], first.start) + excess / scale;
  return { row: after.node, slots: [before.first + last, after.first], tables, initial };
}

/**
 * The unknowns at the start. A node that two layers at different temperatures share takes the mean by the heat capacity it
 * stands for in each: the heat of both layers is then kept to rounding. On a grid graded by diffusion time this is the mean by
 * effusivity √(k ρ c), the temperature that two bodies brought into contact take at once.
 */
export function initialUnknowns({ layers, size, heatNodes }: PartRows): Float64Array {
  const unknowns = new Float64Array(size);
  const capacity = new Float64Array(size);
  for (const { layer, count, node, depth, weights } of layers) {
    for (let i = 0; i < count; i++) {
      const start = startAt(layer, depth[i]);
      const own = weightOnNode(weights, i) * layer.curves.heatCapacity(start);
      const whole = capacity[node + i] + own;
      unknowns[node + i] += (start - unknowns[node + i]) * (own / whole);
      capacity[node + i] = whole;
    }
  }
  for (const { row, initial } of heatNodes) unknowns[row] = initial;
  return unknowns;
}
