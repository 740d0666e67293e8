/**
 * A layered part as a HeatSystem: plane wall, cylinder or sphere. All heats per m² of a wall, per m of a cylinder, or of the sphere.
 *
 * Storage and conduction are conduction.ts, exchange at the faces face.ts, heat given off inside sources.ts; here they meet.
 */
import type { WallGrid, WallLayer } from '../grid';
import { BandMatrix, type SymmetricTridiagonal } from '../linear';
import { isStraight, type OutOfRange } from '../materials';
import { FACES, type LaidCycle } from '../model';
import { Conduction } from './conduction';
import type { StorageKind } from './elements';
import { Face } from './face';
import { Field, type BendingPoint } from './field';
import { Fronts } from './fronts';
import { initialUnknowns, partRows, type PartRows } from './partRows';
import { Slots } from './slots';
import { Sources } from './sources';
import type { HeatSystem, Interval } from './system';

export class WallSystem implements HeatSystem {
  readonly size: number;
  readonly heatRows: number;
  readonly heats: number;
  readonly linear: boolean;
  readonly points: number;
  readonly pointUnknown: Int32Array;
  readonly bendingPoints: readonly BendingPoint[];
  readonly faceArea: readonly [number, number];
  readonly storage: Float64Array;
  readonly inflow: Float64Array;
  readonly rates: Float64Array;
  readonly inflowSlope: Float64Array;
  readonly rateSlopes: Float64Array;
  readonly rowCapacity: Float64Array;
  factorisations = 0;
  heldRows: readonly number[] = [];

  private readonly rows: PartRows;
  private readonly slots: Slots;
  private readonly sources: Sources;
  /** Whether conduction and storage are linear, whatever the faces do. */
  private readonly constant: boolean;
  private readonly cycle: LaidCycle;
  /** Start and end face, and the unknowns they act on. */
  private readonly faces: readonly [Face, Face];
  private readonly faceRow: readonly [number, number];
  /** ∂q/∂u of both faces, W per basis. */
  private readonly perUnknown = new Float64Array(2);
  private readonly conduction: Conduction;
  /** Fronts of latent heat, one a layer; null where there are none, or are not followed. */
  private readonly fronts: readonly (Fronts | null)[];
  private readonly shifted: BandMatrix;
  private readonly field: Field;
  private assembled = false;
  /** What the shifted matrix was made of: a, b, and whether the slopes at the faces are still the same. */
  private factored: { a: number; b: number } | null = null;
  private readonly largest = { kelvin: 0, row: 0 };
  private symmetric: SymmetricTridiagonal | null = null;

  constructor(layers: readonly WallLayer[], grid: WallGrid, cycle: LaidCycle, storage: StorageKind) {
    const rows = partRows(layers, grid, storage);
    this.rows = rows;
    this.slots = new Slots(rows);
    this.sources = new Sources(rows.layers, this.slots, rows.size, cycle);
    this.heats = this.sources.present ? 3 : 2;
    this.rates = new Float64Array(this.heats);
    this.rateSlopes = new Float64Array(this.heats);
    this.cycle = cycle;
    this.size = this.heatRows = rows.size;
    this.faceArea = rows.faceArea;
    this.constant = layers.every((layer) => layer.curves.constant) && rows.links.every(({ junction }) => junction.constant);
    this.linear =
      this.constant &&
      !this.sources.byTemperature &&
      cycle.stages.every(({ exposures }) => FACES.every((face) => isStraight(exposures[face])));
    this.faceRow = [0, rows.size - 1];
    this.faces = [new Face(rows.halfCells[0]), new Face(rows.halfCells[1])];
    this.fronts = rows.layers.map((layer) =>
      storage === 'fourthOrder' && grid.kind === 'nodes' && layer.layer.curves.jumps.length > 0 ? new Fronts(layer) : null,
    );
    this.field = new Field(rows, this.slots, this.faces, this.fronts, grid);
    this.points = this.field.points;
    this.pointUnknown = this.field.pointUnknown;
    this.bendingPoints = this.field.bendingPoints;
    this.conduction = new Conduction(rows, this.slots, this.fronts);
    this.storage = this.conduction.storage;
    this.inflow = this.conduction.inflow;
    this.rowCapacity = this.conduction.rowCapacity;
    this.inflowSlope = new Float64Array(rows.size);
    this.shifted = new BandMatrix(rows.size);
  }

  initial(): Float64Array {
    return initialUnknowns(this.rows);
  }

  enter(interval: Interval, u: Float64Array, stored: Float64Array, through: Float64Array): void {
    const { exposures } = this.cycle.stages[interval.stage];
    FACES.forEach((face, i) => this.faces[i].enter(exposures[face], interval));
    this.heldRows = this.faceRow.filter((_, i) => this.faces[i].holds);
    this.sources.enter(interval);
    this.factored = null;
    for (let i = 0; i < 2; i++) {
      if (!this.faces[i].holds) continue;
      const row = this.faceRow[i];
      const before = this.storageAtFace(i, u);
      u[row] = this.heldUnknown(i, interval.from);
      const taken = this.storageAtFace(i, u) - before;
      stored[row] += taken;
      through[i] += taken;
    }
  }

  /** Value of a face's unknown that is held. */
  private heldUnknown(face: number, time: number): number {
    return this.slots.unknownAt(this.faceRow[face], this.faces[face].heldAt(time));
  }

  /** S of the row of a face's node. */
  private storageAtFace(face: number, u: Float64Array): number {
    const index = face === 0 ? 0 : this.rows.layers.length - 1;
    const { first, node, weights, count } = this.rows.layers[index];
    const heat = (i: number): number => this.slots.heatAt(index, first + i, u[node + i]);
    const last = count - 1;
    if (last === 0) return weights.here[0] * heat(0);
    if (face === 0) {
      const far = weights.far[0] === 0 ? 0 : weights.far[0] * heat(2);
      return weights.here[0] * heat(0) + weights.after[0] * heat(1) + far;
    }
    const far = weights.far[last] === 0 ? 0 : weights.far[last] * heat(last - 2);
    return weights.here[last] * heat(last) + weights.before[last] * heat(last - 1) + far;
  }

  settle(u: Float64Array): void {
    const { slots, rows } = this;
    rows.layers.forEach((layer, index) => {
      const fronts = this.fronts[index];
      if (fronts === null) return;
      slots.evaluate(index, layer, u);
      fronts.settle(slots.heat, (i) => slots.temperature(layer.node + i, u[layer.node + i]));
    });
  }

  evaluate(u: Float64Array, time: number): void {
    const { inflow, slots, faceArea } = this;
    this.conduction.evaluate(u);
    if (this.sources.present) {
      this.sources.addTo(inflow, u, time);
      this.rates[2] = this.sources.power;
    }
    for (let i = 0; i < 2; i++) {
      const row = this.faceRow[i];
      const face = this.faces[i];
      face.at(slots.temperature(row, u[row]), time);
      // A held node takes no heat from its balance: what conduction brings leaves through the face.
      this.rates[i] = face.holds ? -inflow[row] : faceArea[i] * face.flux;
      inflow[row] += this.rates[i];
    }
  }

  linearise(u: Float64Array, time: number): void {
    const { slots, faceArea, inflowSlope } = this;
    if (!this.assembled || !this.constant) {
      this.conduction.assemble(u);
      this.assembled = true;
      this.factored = null;
    }
    inflowSlope.fill(0);
    if (this.sources.present) {
      this.sources.linearise(inflowSlope, u, time);
      this.rateSlopes[2] = this.sources.powerSlope;
      if (this.sources.byTemperature) this.factored = null;
    }
    for (let i = 0; i < 2; i++) {
      const face = this.faces[i];
      const row = this.faceRow[i];
      face.linearise(slots.temperature(row, u[row]), time);
      const perUnknown = faceArea[i] * face.fluxPerKelvin * slots.temperatureSlope(row, u[row]);
      if (perUnknown !== this.perUnknown[i]) {
        this.perUnknown[i] = perUnknown;
        this.factored = null;
      }
      // The heat that holds a row answers what a source in it does.
      this.rateSlopes[i] = face.holds ? -inflowSlope[row] : faceArea[i] * face.fluxSlope;
      inflowSlope[row] += this.rateSlopes[i];
    }
  }

  factorise(a: number, b: number): void {
    if (this.factored !== null && this.factored.a === a && this.factored.b === b) return;
    const { shifted } = this;
    const { capacity, toLeft, atNode, toRight } = this.conduction;
    for (let row = 0; row < this.size; row++) {
      shifted.farLower[row] = a * capacity.farLower[row];
      shifted.lower[row] = a * capacity.lower[row] - b * toLeft[row];
      shifted.diagonal[row] = a * capacity.diagonal[row] - b * atNode[row];
      shifted.upper[row] = a * capacity.upper[row] - b * toRight[row];
      shifted.farUpper[row] = a * capacity.farUpper[row];
    }
    if (this.sources.byTemperature) shifted.subtract(b, this.sources.slopes);
    for (let i = 0; i < 2; i++) {
      const row = this.faceRow[i];
      shifted.diagonal[row] -= b * this.perUnknown[i];
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
    this.conduction.capacity.times(x, out);
  }

  rateTimes(heat: number, x: Float64Array): number {
    if (heat === 2) return this.sources.powerTimes(x);
    const row = this.faceRow[heat];
    if (!this.faces[heat].holds) return this.perUnknown[heat] * x[row];
    const { toLeft, atNode, toRight } = this.conduction;
    const left = row > 0 ? toLeft[row] * x[row - 1] : 0;
    const right = row < this.size - 1 ? toRight[row] * x[row + 1] : 0;
    return -(left + atNode[row] * x[row] + right + this.sources.rowTimes(row, x));
  }

  evenOutRates(): SymmetricTridiagonal {
    const { size } = this;
    const { capacity, toLeft, atNode, toRight } = this.conduction;
    const { diagonal, beside } = (this.symmetric ??= { diagonal: new Float64Array(size), beside: new Float64Array(size) });
    for (let row = 0; row < size; row++) {
      diagonal[row] = -atNode[row] / capacity.diagonal[row];
      if (row + 1 === size) break;
      // Between any two neighbours heat flows down the slope of both, so the product is not negative.
      beside[row] = -Math.sqrt((toRight[row] / capacity.diagonal[row]) * (toLeft[row + 1] / capacity.diagonal[row + 1]));
    }
    for (let i = 0; i < 2; i++) {
      const row = this.faceRow[i];
      if (this.faces[i].holds) diagonal[row] = beside[i === 0 ? 0 : Math.max(0, row - 1)] = 0;
      else diagonal[row] -= this.perUnknown[i] / capacity.diagonal[row];
    }
    return { diagonal, beside };
  }

  heldChanges(u: Float64Array, time: number, ahead: number, rightHandSide: Float64Array): void {
    for (let i = 0; i < 2; i++) {
      const face = this.faces[i];
      if (!face.holds) continue;
      const row = this.faceRow[i];
      const held = this.heldUnknown(i, time);
      const slope = this.slots.temperatureSlope(row, held);
      rightHandSide[row] = held - u[row] + (ahead === 0 ? 0 : (ahead * face.heldRateAt(time)) / slope);
    }
  }

  hold(u: Float64Array, time: number, stored: Float64Array, through: Float64Array): void {
    for (let i = 0; i < 2; i++) {
      if (!this.faces[i].holds) continue;
      const row = this.faceRow[i];
      u[row] = this.heldUnknown(i, time);
      const holds = this.storageAtFace(i, u);
      through[i] += holds - stored[row];
      stored[row] = holds;
    }
  }

  largestChange(u: ArrayLike<number>, x: ArrayLike<number>): { kelvin: number; row: number } {
    const { largest, slots, field } = this;
    largest.kelvin = 0;
    for (let row = 0; row < this.size; row++) {
      const change = slots.countsHeat(row) ? field.temperature(row, u[row] + x[row]) - field.temperature(row, u[row]) : x[row];
      // Written so that NaN counts as largest.
      if (!(Math.abs(change) <= largest.kelvin)) {
        largest.kelvin = Math.abs(change);
        largest.row = row;
        if (change !== change) break;
      }
    }
    return largest;
  }

  /** Where an unknown sits: index of its layer, the one nearer the start face of two, and depth from the start face, m. */
  placeOf(row: number): { layer: number; depth: number } {
    const { layers } = this.rows;
    const layer = layers.findIndex(({ node, count }) => row < node + count);
    const edge = layers.slice(0, layer).reduce((sum, before) => sum + before.layer.thickness, 0);
    return { layer, depth: edge + layers[layer].depth[row - layers[layer].node] };
  }

  bends(row: number, from: number, to: number): boolean {
    return this.field.bends(row, from, to);
  }

  report(u: Float64Array, time: number, out: Float64Array, part = 1): void {
    this.field.report(u, time, out, part);
  }

  /** What the film correlation of a face (0 start, 1 end) is used outside of. */
  outOfRange(face: number, u: Float64Array, time: number): OutOfRange[] {
    const row = this.faceRow[face];
    return this.faces[face].outOfRange(this.slots.temperature(row, u[row]), time);
  }

  rateAt(heat: number, u: (row: number) => number, time: number): number | null {
    const face = this.faces[heat];
    if (face.holds) return null;
    const row = this.faceRow[heat];
    face.at(this.slots.temperature(row, u(row)), time);
    return this.faceArea[heat] * face.flux;
  }
}
