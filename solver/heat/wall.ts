/**
 * A plane wall of layers as a HeatSystem. All heats per m² of wall.
 *
 *   row i:  d/dt ( w− H[i−1] + w0 H[i] + w+ H[i+1] ) = (Θ[i−1] − Θ[i])/a − (Θ[i] − Θ[i+1])/b + exchange at faces and contacts
 *
 * H [J/m³] heat content, Θ [W/m] conductivity integral of the row's material, a and b [m] the distances to the neighbours, w [m]
 * the storage weights. A node that bonded layers share adds up a row from each, with its own material. A contact is a
 * conductance 1/R between the two nodes at its depth; with cells the two half cells lie in series with it.
 */
import { fieldPoints, type WallGrid, type WallLayer } from '../grid';
import { BandMatrix } from '../linear';
import { FACES, type LaidCycle } from '../model';
import { Face } from './face';
import type { HeatSystem, Interval } from './system';
import { initialTemperatures, wallRows, type WallRows } from './wallRows';
import type { StorageKind } from './weights';

export class WallSystem implements HeatSystem {
  readonly size: number;
  readonly heats = 2;
  readonly linear: boolean;
  readonly points: number;
  readonly pointUnknown: Int32Array;
  readonly storage: Float64Array;
  readonly inflow: Float64Array;
  readonly rates = new Float64Array(2);
  readonly inflowSlope: Float64Array;
  readonly rateSlopes = new Float64Array(2);
  readonly rowCapacity: Float64Array;
  factorisations = 0;
  heldRows: readonly number[] = [];

  private readonly rows: WallRows;
  private readonly cycle: LaidCycle;
  private readonly cells: boolean;
  /** Start and end face, and the unknowns they act on. */
  private readonly faces: readonly [Face, Face];
  private readonly faceRow: readonly [number, number];
  private readonly perKelvin = new Float64Array(2);
  /** H and Θ of every slot. */
  private readonly heat: Float64Array;
  private readonly conduction: Float64Array;
  private readonly capacity: BandMatrix;
  /** dF/du without the faces: entries to the left, at, and to the right of the diagonal. */
  private readonly toLeft: Float64Array;
  private readonly atNode: Float64Array;
  private readonly toRight: Float64Array;
  private readonly shifted: BandMatrix;
  private assembled = false;
  /** What the shifted matrix was made of: a, b, and whether the slopes at the faces are still the same. */
  private factored: { a: number; b: number } | null = null;
  private readonly largest = { kelvin: 0, row: 0 };

  constructor(layers: readonly WallLayer[], grid: WallGrid, cycle: LaidCycle, storage: StorageKind) {
    const rows = wallRows(layers, grid, storage);
    this.rows = rows;
    this.cycle = cycle;
    this.cells = grid.kind === 'cells';
    this.size = rows.size;
    this.linear = layers.every((layer) => layer.curves.constant);
    this.faceRow = [0, rows.size - 1];
    this.faces = [new Face(rows.faceResistance.start), new Face(rows.faceResistance.end)];
    const points = fieldPoints(grid);
    this.points = points.position.length;
    this.pointUnknown = this.unknownsOfPoints(points.layerStart);
    const column = () => new Float64Array(rows.size);
    this.storage = column();
    this.inflow = column();
    this.inflowSlope = column();
    this.rowCapacity = column();
    this.heat = new Float64Array(rows.slots);
    this.conduction = new Float64Array(rows.slots);
    this.capacity = new BandMatrix(rows.size);
    this.toLeft = column();
    this.atNode = column();
    this.toRight = column();
    this.shifted = new BandMatrix(rows.size);
  }

  /** With nodes every point is one; with cells the first and last point of a layer are its edges. */
  private unknownsOfPoints(layerStart: Int32Array): Int32Array {
    const unknown = new Int32Array(this.points).fill(-1);
    this.rows.layers.forEach(({ node, count }, index) => {
      const from = layerStart[index] + (this.cells ? 1 : 0);
      for (let i = 0; i < count; i++) unknown[from + i] = node + i;
    });
    return unknown;
  }

  initial(): Float64Array {
    return initialTemperatures(this.rows);
  }

  enter(interval: Interval, u: Float64Array, stored: Float64Array, through: Float64Array): void {
    const { exposures } = this.cycle.stages[interval.stage];
    FACES.forEach((face, i) => this.faces[i].enter(exposures[face], interval));
    this.heldRows = this.faceRow.filter((_, i) => this.faces[i].holds);
    this.factored = null;
    for (let i = 0; i < 2; i++) {
      if (!this.faces[i].holds) continue;
      const row = this.faceRow[i];
      const before = this.storageAtFace(i, u);
      u[row] = this.faces[i].surroundingsAt(interval.from);
      const taken = this.storageAtFace(i, u) - before;
      stored[row] += taken;
      through[i] += taken;
    }
  }

  /** S of the row of a face's node. */
  private storageAtFace(face: number, u: Float64Array): number {
    const { layer, node, weights, count } = this.rows.layers[face === 0 ? 0 : this.rows.layers.length - 1];
    const heat = (i: number): number => layer.curves.heatContent(u[node + i]);
    const last = count - 1;
    if (face === 0) {
      const far = weights.far[0] === 0 ? 0 : weights.far[0] * heat(2);
      return weights.here[0] * heat(0) + weights.after[0] * heat(1) + far;
    }
    const far = weights.far[last] === 0 ? 0 : weights.far[last] * heat(last - 2);
    return weights.here[last] * heat(last) + weights.before[last] * heat(last - 1) + far;
  }

  evaluate(u: Float64Array, time: number): void {
    const { storage, inflow, rows } = this;
    storage.fill(0);
    inflow.fill(0);
    for (const layer of rows.layers) this.evaluateLayer(layer, u);
    for (const { from, to, conductance } of rows.links) {
      const flux = conductance * (u[from] - u[to]);
      inflow[from] -= flux;
      inflow[to] += flux;
    }
    for (let i = 0; i < 2; i++) {
      const row = this.faceRow[i];
      const face = this.faces[i];
      face.at(u[row], time);
      // A held node takes no heat from its balance: what conduction brings leaves through the face.
      this.rates[i] = face.holds ? -inflow[row] : face.flux;
      inflow[row] += this.rates[i];
    }
  }

  private evaluateLayer(
    { layer, first, count, node, weights, inverseDistance }: WallRows['layers'][number],
    u: Float64Array,
  ): void {
    const { heat, conduction, storage, inflow } = this;
    const { before, here, after, far } = weights;
    const { curves } = layer;
    for (let i = 0; i < count; i++) {
      heat[first + i] = curves.heatContent(u[node + i]);
      conduction[first + i] = curves.conductionIntegral(u[node + i]);
    }
    const last = count - 1;
    if (last === 0) {
      storage[node] += here[0] * heat[first];
      return;
    }
    // First row, interior, last row.
    storage[node] += here[0] * heat[first] + after[0] * heat[first + 1];
    if (far[0] !== 0) storage[node] += far[0] * heat[first + 2];
    for (let i = 1, slot = first + 1; i < last; i++, slot++) {
      storage[node + i] += before[i] * heat[slot - 1] + here[i] * heat[slot] + after[i] * heat[slot + 1];
    }
    storage[node + last] += before[last] * heat[first + last - 1] + here[last] * heat[first + last];
    if (far[last] !== 0) storage[node + last] += far[last] * heat[first + last - 2];
    for (let i = 0, slot = first; i < last; i++, slot++) {
      const flux = inverseDistance[i] * (conduction[slot] - conduction[slot + 1]);
      inflow[node + i] -= flux;
      inflow[node + i + 1] += flux;
    }
  }

  linearise(u: Float64Array, time: number): void {
    if (!this.assembled || !this.linear) {
      this.assemble(u);
      this.assembled = true;
      this.factored = null;
    }
    for (let i = 0; i < 2; i++) {
      const face = this.faces[i];
      const row = this.faceRow[i];
      face.at(u[row], time);
      if (face.fluxPerKelvin !== this.perKelvin[i]) {
        this.perKelvin[i] = face.fluxPerKelvin;
        this.factored = null;
      }
      this.rateSlopes[i] = face.fluxSlope;
    }
    this.inflowSlope[this.faceRow[0]] = 0;
    this.inflowSlope[this.faceRow[1]] = 0;
    for (let i = 0; i < 2; i++) this.inflowSlope[this.faceRow[i]] += this.rateSlopes[i];
  }

  /** dS/du, its row sums, and dF/du without the faces. */
  private assemble(u: Float64Array): void {
    const { capacity, toLeft, atNode, toRight, rowCapacity } = this;
    for (const column of [toLeft, atNode, toRight, rowCapacity]) column.fill(0);
    const { lower, diagonal, upper, farLower, farUpper } = capacity;
    for (const column of [lower, diagonal, upper, farLower, farUpper]) column.fill(0);
    for (const { layer, count, node, weights, inverseDistance } of this.rows.layers) {
      const c = (i: number): number => layer.curves.heatCapacity(u[node + i]);
      const k = (i: number): number => layer.curves.conductivity(u[node + i]);
      const last = count - 1;
      for (let i = 0; i <= last; i++) {
        const row = node + i;
        diagonal[row] += weights.here[i] * c(i);
        if (i > 0) {
          lower[row] = weights.before[i] * c(i - 1);
          toLeft[row] = inverseDistance[i - 1] * k(i - 1);
          atNode[row] -= inverseDistance[i - 1] * k(i);
        }
        if (i < last) {
          upper[row] = weights.after[i] * c(i + 1);
          toRight[row] = inverseDistance[i] * k(i + 1);
          atNode[row] -= inverseDistance[i] * k(i);
        }
      }
      if (last >= 2) {
        farUpper[node] = weights.far[0] * c(2);
        farLower[node + last] = weights.far[last] * c(last - 2);
      }
    }
    for (const { from, to, conductance } of this.rows.links) {
      atNode[from] -= conductance;
      toRight[from] += conductance;
      atNode[to] -= conductance;
      toLeft[to] += conductance;
    }
    for (let row = 0; row < this.size; row++) {
      rowCapacity[row] = farLower[row] + lower[row] + diagonal[row] + upper[row] + farUpper[row];
    }
  }

  factorise(a: number, b: number): void {
    if (this.factored !== null && this.factored.a === a && this.factored.b === b) return;
    const { capacity, shifted, toLeft, atNode, toRight } = this;
    for (let row = 0; row < this.size; row++) {
      shifted.farLower[row] = a * capacity.farLower[row];
      shifted.lower[row] = a * capacity.lower[row] - b * toLeft[row];
      shifted.diagonal[row] = a * capacity.diagonal[row] - b * atNode[row];
      shifted.upper[row] = a * capacity.upper[row] - b * toRight[row];
      shifted.farUpper[row] = a * capacity.farUpper[row];
    }
    for (let i = 0; i < 2; i++) {
      const row = this.faceRow[i];
      shifted.diagonal[row] -= b * this.perKelvin[i];
      if (!this.faces[i].holds) continue;
      shifted.lower[row] = shifted.upper[row] = shifted.farLower[row] = shifted.farUpper[row] = 0;
      shifted.diagonal[row] = 1;
    }
    shifted.factorise();
    this.factorisations++;
    this.factored = { a, b };
  }

  solve(rightHandSide: Float64Array): void {
    this.shifted.solve(rightHandSide);
  }

  capacityTimes(x: Float64Array, out: Float64Array): void {
    this.capacity.times(x, out);
  }

  rateTimes(heat: number, x: Float64Array): number {
    const row = this.faceRow[heat];
    if (!this.faces[heat].holds) return this.perKelvin[heat] * x[row];
    const left = row > 0 ? this.toLeft[row] * x[row - 1] : 0;
    const right = row < this.size - 1 ? this.toRight[row] * x[row + 1] : 0;
    return -(left + this.atNode[row] * x[row] + right);
  }

  heldChanges(u: Float64Array, time: number, ahead: number, rightHandSide: Float64Array): void {
    for (let i = 0; i < 2; i++) {
      const face = this.faces[i];
      const row = this.faceRow[i];
      if (face.holds) rightHandSide[row] = face.surroundingsAt(time) - u[row] + ahead * face.surroundingsRate;
    }
  }

  hold(u: Float64Array, time: number, stored: Float64Array, through: Float64Array): void {
    for (let i = 0; i < 2; i++) {
      if (!this.faces[i].holds) continue;
      const row = this.faceRow[i];
      u[row] = this.faces[i].surroundingsAt(time);
      const holds = this.storageAtFace(i, u);
      through[i] += holds - stored[row];
      stored[row] = holds;
    }
  }

  largestChange(x: ArrayLike<number>): { kelvin: number; row: number } {
    const { largest } = this;
    largest.kelvin = 0;
    for (let row = 0; row < this.size; row++) {
      const change = Math.abs(x[row]);
      // Written so that NaN counts as largest.
      if (!(change <= largest.kelvin)) {
        largest.kelvin = change;
        largest.row = row;
        if (change !== change) break;
      }
    }
    return largest;
  }

  report(u: Float64Array, time: number, out: Float64Array): void {
    for (let point = 0; point < this.points; point++) {
      const unknown = this.pointUnknown[point];
      if (unknown >= 0) out[point] = u[unknown];
    }
    if (!this.cells) return;
    // Edges of layers: from the series of half cell, contact and half cell, and from the balance of each face.
    out[0] = this.faces[0].faceTemperature(u[0], time);
    out[this.points - 1] = this.faces[1].faceTemperature(u[this.size - 1], time);
    let edge = 0;
    this.rows.links.forEach(({ from, to, halfBefore, halfAfter }, index) => {
      edge += this.rows.layers[index].count + 2;
      out[edge - 1] = u[from] + (u[to] - u[from]) * halfBefore;
      out[edge] = u[to] - (u[to] - u[from]) * halfAfter;
    });
  }

  rateAt(heat: number, u: (row: number) => number, time: number): number | null {
    const face = this.faces[heat];
    if (face.holds) return null;
    face.at(u(this.faceRow[heat]), time);
    return face.flux;
  }
}
