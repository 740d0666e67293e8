/**
 * A layered part as a HeatSystem: plane wall, cylinder or sphere. All heats per m² of a wall, per m of a cylinder, or of the sphere.
 *
 *   row i:  d/dt ( w− H[i−1] + w0 H[i] + w+ H[i+1] ) = S− (Θ[i−1] − Θ[i]) − S+ (Θ[i] − Θ[i+1]) + exchange at faces and contacts
 *
 * H [J/m³] heat content, Θ [W/m] conductivity integral of the row's material, w [m³ per basis] storage weights, S [m per basis] shape
 * factors (elements.ts). A node that bonded layers share adds up a row from each, with its own material. At a contact two nodes
 * at one depth are joined by what crosses it (junction.ts); with cells the two half cells lie in series with it.
 */
import { fieldPoints, hasCentre, type WallGrid, type WallLayer } from '../grid';
import { BandMatrix, type SymmetricTridiagonal } from '../linear';
import { isStraight } from '../materials';
import { FACES, type LaidCycle } from '../model';
import type { StorageKind } from './elements';
import { Face } from './face';
import { initialUnknowns, partRows, type LayerRows, type PartRows } from './partRows';
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
  private readonly capacity: BandMatrix;
  /** dF/du without the faces: entries to the left, at, and to the right of the diagonal. */
  private readonly toLeft: Float64Array;
  private readonly atNode: Float64Array;
  private readonly toRight: Float64Array;
  private readonly shifted: BandMatrix;
  private readonly cells: boolean;
  /** How the centre of a solid part follows from the two unknowns next to it; null: no such point. */
  private readonly centre: readonly [first: number, second: number] | null;
  private assembled = false;
  /** What the shifted matrix was made of: a, b, and whether the slopes at the faces are still the same. */
  private factored: { a: number; b: number } | null = null;
  private readonly largest = { kelvin: 0, row: 0 };
  private symmetric: SymmetricTridiagonal | null = null;

  constructor(layers: readonly WallLayer[], grid: WallGrid, cycle: LaidCycle, storage: StorageKind) {
    const rows = partRows(layers, grid, storage);
    const column = () => new Float64Array(rows.size);
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
    this.cells = grid.kind === 'cells';
    const points = fieldPoints(grid);
    this.points = points.position.length;
    this.pointUnknown = unknownsOfPoints(rows, points.layerStart, this.cells);
    this.centre = hasCentre(grid.shape) && this.pointUnknown[0] < 0 ? centreWeights(rows.layers[0].depth) : null;
    this.storage = column();
    this.inflow = column();
    this.inflowSlope = column();
    this.rowCapacity = column();
    this.capacity = new BandMatrix(rows.size);
    this.toLeft = column();
    this.atNode = column();
    this.toRight = column();
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

  evaluate(u: Float64Array, time: number): void {
    const { inflow, rows, slots, faceArea } = this;
    let shared = -1;
    for (let index = 0; index < rows.layers.length; index++) {
      const layer = rows.layers[index];
      slots.evaluate(index, layer, u);
      this.addLayer(layer, layer.node === shared);
      shared = layer.node + layer.count - 1;
    }
    for (const { from, to, area, junction } of rows.links) {
      junction.at(slots.temperature(from, u[from]), slots.temperature(to, u[to]));
      inflow[from] -= area * junction.flux;
      inflow[to] += area * junction.flux;
    }
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

  /** S and F of one layer's rows; its first row is added to where the layer before has it as its last. */
  private addLayer({ first, count, node, weights, shapeFactor }: LayerRows, shared: boolean): void {
    const { storage, inflow } = this;
    const { heat, conduction } = this.slots;
    const { before, here, after, far } = weights;
    const last = count - 1;
    if (!shared) storage[node] = inflow[node] = 0;
    storage[node] += here[0] * heat[first];
    if (last === 0) return;
    // First row, interior, last row; what the walk needs of the slots behind it travels in locals.
    let behind = heat[first];
    let own = heat[first + 1];
    let theta = conduction[first + 1];
    let flux = shapeFactor[0] * (conduction[first] - theta);
    storage[node] += after[0] * own;
    if (far[0] !== 0) storage[node] += far[0] * heat[first + 2];
    inflow[node] -= flux;
    for (let i = 1, slot = first + 2, row = node + 1; i < last; i++, slot++, row++) {
      const ahead = heat[slot];
      const thetaAhead = conduction[slot];
      const onward = shapeFactor[i] * (theta - thetaAhead);
      storage[row] = before[i] * behind + here[i] * own + after[i] * ahead;
      inflow[row] = flux - onward;
      flux = onward;
      theta = thetaAhead;
      behind = own;
      own = ahead;
    }
    storage[node + last] = before[last] * behind + here[last] * own;
    if (far[last] !== 0) storage[node + last] += far[last] * heat[first + last - 2];
    inflow[node + last] = flux;
  }

  linearise(u: Float64Array, time: number): void {
    const { slots, faceArea, inflowSlope } = this;
    if (!this.assembled || !this.constant) {
      this.assemble(u);
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

  /** dS/du, its row sums, and dF/du without the faces. */
  private assemble(u: Float64Array): void {
    const { capacity, toLeft, atNode, toRight, rowCapacity, rows, slots } = this;
    const { lower, diagonal, upper, farLower, farUpper } = capacity;
    for (const { node, count } of rows.layers)
      clearEnds(this.size, node, count, [toLeft, atNode, toRight, lower, diagonal, upper]);
    for (let index = 0; index < rows.layers.length; index++) {
      const layer = rows.layers[index];
      slots.linearise(index, layer, u);
      this.assembleLayer(layer);
    }
    for (const { from, to, area, junction } of rows.links) {
      junction.at(slots.temperature(from, u[from]), slots.temperature(to, u[to]));
      const perFrom = area * junction.perFirst * slots.temperatureSlope(from, u[from]);
      const perTo = area * junction.perSecond * slots.temperatureSlope(to, u[to]);
      atNode[from] -= perFrom;
      toRight[from] -= perTo;
      atNode[to] += perTo;
      toLeft[to] += perFrom;
    }
    for (let row = 0; row < this.size; row++) {
      rowCapacity[row] = farLower[row] + lower[row] + diagonal[row] + upper[row] + farUpper[row];
    }
  }

  private assembleLayer({ first, count, node, weights, shapeFactor }: LayerRows): void {
    const { toLeft, atNode, toRight } = this;
    const { lower, diagonal, upper, farLower, farUpper } = this.capacity;
    const { capacity: c, conductivity: k } = this.slots;
    const { before, here, after, far } = weights;
    const last = count - 1;
    diagonal[node] += here[0] * c[first];
    if (last === 0) return;
    upper[node] = after[0] * c[first + 1];
    atNode[node] -= shapeFactor[0] * k[first];
    toRight[node] = shapeFactor[0] * k[first + 1];
    for (let i = 1, slot = first + 1, row = node + 1; i < last; i++, slot++, row++) {
      lower[row] = before[i] * c[slot - 1];
      diagonal[row] = here[i] * c[slot];
      upper[row] = after[i] * c[slot + 1];
      toLeft[row] = shapeFactor[i - 1] * k[slot - 1];
      atNode[row] = -(shapeFactor[i - 1] + shapeFactor[i]) * k[slot];
      toRight[row] = shapeFactor[i] * k[slot + 1];
    }
    const row = node + last;
    const slot = first + last;
    lower[row] = before[last] * c[slot - 1];
    diagonal[row] += here[last] * c[slot];
    toLeft[row] = shapeFactor[last - 1] * k[slot - 1];
    atNode[row] -= shapeFactor[last - 1] * k[slot];
    if (last < 2) return;
    farUpper[node] = far[0] * c[first + 2];
    farLower[row] = far[last] * c[slot - 2];
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
    this.capacity.times(x, out);
  }

  rateTimes(heat: number, x: Float64Array): number {
    if (heat === 2) return this.sources.powerTimes(x);
    const row = this.faceRow[heat];
    if (!this.faces[heat].holds) return this.perUnknown[heat] * x[row];
    const left = row > 0 ? this.toLeft[row] * x[row - 1] : 0;
    const right = row < this.size - 1 ? this.toRight[row] * x[row + 1] : 0;
    return -(left + this.atNode[row] * x[row] + right + this.sources.rowTimes(row, x));
  }

  evenOutRates(): SymmetricTridiagonal {
    const { capacity, toLeft, atNode, toRight, size } = this;
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
    const { largest, slots } = this;
    largest.kelvin = 0;
    for (let row = 0; row < this.size; row++) {
      const change = Math.abs(
        slots.countsHeat(row) ? slots.temperature(row, u[row] + x[row]) - slots.temperature(row, u[row]) : x[row],
      );
      // Written so that NaN counts as largest.
      if (!(change <= largest.kelvin)) {
        largest.kelvin = change;
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

  report(u: Float64Array, time: number, out: Float64Array): void {
    const { slots, centre } = this;
    for (let point = 0; point < this.points; point++) {
      const unknown = this.pointUnknown[point];
      if (unknown >= 0) out[point] = slots.temperature(unknown, u[unknown]);
    }
    if (this.cells) this.reportEdges(u, time, out);
    if (centre !== null) out[0] = centre[0] * out[1] + centre[1] * out[2];
  }

  /** With cells: the edges of layers, from the balance of every face and of the two walls of every junction. */
  private reportEdges(u: Float64Array, time: number, out: Float64Array): void {
    const { slots, faces, rows } = this;
    const end = this.size - 1;
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

  rateAt(heat: number, u: (row: number) => number, time: number): number | null {
    const face = this.faces[heat];
    if (face.holds) return null;
    const row = this.faceRow[heat];
    face.at(this.slots.temperature(row, u(row)), time);
    return this.faceArea[heat] * face.flux;
  }
}

/** Zeroes the rows at both ends of a layer, to which several parts are added. */
function clearEnds(size: number, node: number, count: number, columns: readonly Float64Array[]): void {
  for (const column of columns) {
    column[node] = 0;
    column[Math.min(size, node + count) - 1] = 0;
  }
}

/**
 * The unknown of every point, −1 for those that are none: with cells the edges of layers, without a node there the centre. The
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

/** The centre by the parabola a + b r² through the two unknowns next to it, or by the one there is. */
function centreWeights(radius: Float64Array): [number, number] {
  if (radius.length < 2) return [1, 0];
  const part = (radius[0] * radius[0]) / ((radius[1] - radius[0]) * (radius[1] + radius[0]));
  return [1 + part, -part];
}
