/**
 * The field of a layered part: temperatures at its points, read off its unknowns.
 *
 * With nodes a point is a node; the centre of a solid part whose grid has no node there is read off the nodes next to it. With
 * cells the edges of layers follow from the balances of faces and contacts, which hold no heat.
 */
import { fieldPoints, hasCentre, type WallGrid } from '../grid';
import type { Face } from './face';
import type { Fronts } from './fronts';
import type { PartRows } from './partRows';
import type { Slots } from './slots';

/** A point whose temperature is not straight in its unknown. */
export interface BendingPoint {
  readonly point: number;
  readonly row: number;
}

/** Slopes of temperature over the unknown that differ by more than this are a bend. */
const BEND = 1.5;
/** Unknowns that the centre is read off. */
const READ_AT_CENTRE = 4;

export class Field {
  readonly points: number;
  /** The unknown that a point reports as it is, −1 where there is none. */
  readonly pointUnknown: Int32Array;
  readonly bendingPoints: readonly BendingPoint[];
  private readonly rows: PartRows;
  private readonly slots: Slots;
  private readonly faces: readonly [Face, Face];
  private readonly cells: boolean;
  /** Weights of the points that the centre of a solid part is read off; null: no such point. */
  private readonly centre: Float64Array | null;
  /** Of unknowns inside a layer with fronts: its fronts, its index, and the cell in it. */
  private readonly frontCells = new Map<number, readonly [fronts: Fronts, layer: number, cell: number]>();

  constructor(
    rows: PartRows,
    slots: Slots,
    faces: readonly [Face, Face],
    fronts: readonly (Fronts | null)[],
    grid: Pick<WallGrid, 'kind' | 'elements' | 'thickness' | 'shape'>,
  ) {
    const points = fieldPoints(grid);
    this.rows = rows;
    this.slots = slots;
    this.faces = faces;
    this.cells = grid.kind === 'cells';
    this.points = points.position.length;
    const rowOf = unknownsOfPoints(rows, points.layerStart, this.cells);
    this.pointUnknown = rowOf.map((row) => (row >= 0 && slots.countsHeat(row) ? -1 : row));
    this.bendingPoints = [...rowOf.keys()]
      .filter((point) => rowOf[point] >= 0 && this.pointUnknown[point] < 0)
      .map((point) => ({ point, row: rowOf[point] }));
    this.centre = hasCentre(grid.shape) && rowOf[0] < 0 ? centreWeights(rows.layers[0].depth) : null;
    rows.layers.forEach(({ node, count }, index) => {
      const own = fronts[index];
      if (own !== null) for (let i = 1; i < count - 1; i++) this.frontCells.set(node + i, [own, index, i]);
    });
  }

  /** T of an unknown, °C; `part` of the last step, where fronts have moved on with it. */
  temperature(row: number, value: number, part = 1): number {
    const { slots } = this;
    const byCurves = slots.temperature(row, value);
    if (!slots.countsHeat(row)) return byCurves;
    const cell = this.frontCells.get(row);
    if (cell === undefined) return byCurves;
    const [fronts, layer, i] = cell;
    return fronts.temperature(i, slots.heatAt(layer, fronts.rows.first + i, value), byCurves, part);
  }

  /** Whether a point's temperature bends between two values of its unknown. */
  bends(row: number, from: number, to: number): boolean {
    const slope = (value: number, way: number): number => this.temperature(row, value + way) - this.temperature(row, value);
    const way = 1e-3 * (to - from);
    if (way === 0) return false;
    const [first, last] = [slope(from, way) / way, slope(to, -way) / -way];
    return Math.max(first, last) > BEND * Math.min(first, last);
  }

  report(u: ArrayLike<number>, time: number, out: Float64Array, part: number): void {
    const { centre, pointUnknown } = this;
    for (let point = 0; point < this.points; point++) {
      const row = pointUnknown[point];
      if (row >= 0) out[point] = u[row];
    }
    for (const { point, row } of this.bendingPoints) out[point] = this.temperature(row, u[row], part);
    if (this.cells) this.reportEdges(u, time, out);
    if (centre !== null) out[0] = centre.reduce((sum, weight, i) => sum + weight * out[i + 1], 0);
  }

  /** With cells: the edges of layers, from the balance of every face and of the two walls of every junction. */
  private reportEdges(u: ArrayLike<number>, time: number, out: Float64Array): void {
    const { slots, faces, rows } = this;
    const end = rows.size - 1;
    out[0] = faces[0].faceTemperature(slots.temperature(0, u[0]), time);
    out[this.points - 1] = faces[1].faceTemperature(slots.temperature(end, u[end]), time);
    let edge = 0;
    rows.links.forEach(({ from, to, junction }, index) => {
      edge += rows.layers[index].count + 2;
      junction.at(slots.temperature(from, u[from]), slots.temperature(to, u[to]));
      out[edge - 1] = junction.firstWall;
      out[edge] = junction.secondWall;
    });
  }
}

/**
 * The unknown of every point, −1 for those that have none: with cells the edges of layers, without a node there the centre. The
 * points of a layer end with its last node, or with its edge beyond the last cell.
 */
function unknownsOfPoints({ layers }: PartRows, layerStart: Int32Array, cells: boolean): Int32Array {
  const unknown = new Int32Array(layerStart[layers.length]).fill(-1);
  layers.forEach(({ node, count }, index) => {
    const from = layerStart[index + 1] - count - (cells ? 1 : 0);
    for (let i = 0; i < count; i++) unknown[from + i] = node + i;
  });
  return unknown;
}

/** The centre by the even polynomial a + b r² + c r⁴ + … through the unknowns next to it: Lagrange's weights in r². */
function centreWeights(radius: Float64Array): Float64Array {
  const near = radius.subarray(0, READ_AT_CENTRE);
  return near.map((own) =>
    near.reduce((weight, other) => (other === own ? weight : (weight * other * other) / ((other - own) * (other + own))), 1),
  );
}
