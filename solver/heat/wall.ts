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

export interface WallOptions {
  readonly storage: StorageKind;
  /** With nodes, how a held face temperature acts: imposed on its node, or through a film so strong that it makes no difference. */
  readonly heldFaces: 'imposed' | 'film';
}

/** The film that stands for a held temperature conducts this many times better than the first element. */
const HELD_FILM = 1e6;

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

  constructor(layers: readonly WallLayer[], grid: WallGrid, cycle: LaidCycle, options: WallOptions) {
    const rows = wallRows(layers, grid, options.storage);
    this.rows = rows;
    this.cycle = cycle;
    this.cells = grid.kind === 'cells';
    this.size = rows.size;
    this.linear = layers.every((layer) => layer.curves.constant);
    this.faceRow = [0, rows.size - 1];
    this.faces = [this.makeFace('start', options), this.makeFace('end', options)];
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

  private makeFace(face: 'start' | 'end', options: WallOptions): Face {
    const { layers, faceResistance } = this.rows;
    if (this.cells) return new Face(faceResistance[face], { conductance: 1 / faceResistance[face] });
    if (options.heldFaces === 'imposed') return new Face(0, 'imposed');
    const { layer, inverseDistance } = layers[face === 'start' ? 0 : layers.length - 1];
    const first = inverseDistance[face === 'start' ? 0 : inverseDistance.length - 1];
    return new Face(0, { conductance: HELD_FILM * layer.curves.conductivity(layer.initial) * first });
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

  enter(interval: Interval): void {
    const { exposures } = this.cycle.stages[interval.stage];
    FACES.forEach((face, i) => this.faces[i].enter(exposures[face], interval));
    this.factored = null;
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
      this.faces[i].at(u[row], time);
      this.rates[i] = this.faces[i].flux;
      inflow[row] += this.faces[i].flux;
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
      if (!this.faces[i].imposes) continue;
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
    return this.perKelvin[heat] * x[this.faceRow[heat]];
  }

  imposedChanges(u: Float64Array, time: number, rightHandSide: Float64Array): void {
    for (let i = 0; i < 2; i++) {
      const row = this.faceRow[i];
      if (this.faces[i].imposes) rightHandSide[row] = this.faces[i].surroundingsAt(time) - u[row];
    }
  }

  impose(u: Float64Array, time: number, stored: Float64Array, through: Float64Array): void {
    const { layers } = this.rows;
    for (let i = 0; i < 2; i++) {
      if (!this.faces[i].imposes) continue;
      const row = this.faceRow[i];
      const { layer, weights, count } = layers[i === 0 ? 0 : layers.length - 1];
      u[row] = this.faces[i].surroundingsAt(time);
      const holds = weights.here[i === 0 ? 0 : count - 1] * layer.curves.heatContent(u[row]);
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
    if (!face.lawful) return null;
    face.at(u(this.faceRow[heat]), time);
    return face.flux;
  }
}
