/**
 * Storage and conduction of a layered part: S, the part of F that flows between its unknowns, and their derivatives.
 *
 *   row i:  S = w− H[i−1] + w0 H[i] + w+ H[i+1],   F = S− (Θ[i−1] − Θ[i]) − S+ (Θ[i] − Θ[i+1]) + what crosses contacts
 *
 * H [J/m³] heat content, Θ [W/m] conductivity integral of the row's material, w [m³ per basis] storage weights, S± [m per basis]
 * shape factors (elements.ts). A node that bonded layers share adds up a row from each, with its own material. At a contact two
 * nodes at one depth are joined by what crosses it (junction.ts); with cells the two half cells lie in series with it. In a
 * layer with fronts (fronts.ts) the flux beside a cell that is changing is that of the front.
 */
import { BandMatrix } from '../linear';
import type { Fronts } from './fronts';
import type { LayerRows, PartRows } from './partRows';
import type { Slots } from './slots';

export class Conduction {
  readonly storage: Float64Array;
  readonly inflow: Float64Array;
  /** dS/du and its row sums. */
  readonly capacity: BandMatrix;
  readonly rowCapacity: Float64Array;
  /** dF/du: entries to the left, at, and to the right of the diagonal. */
  readonly toLeft: Float64Array;
  readonly atNode: Float64Array;
  readonly toRight: Float64Array;
  private readonly rows: PartRows;
  private readonly slots: Slots;
  /** By layer. */
  private readonly fronts: readonly (Fronts | null)[];

  constructor(rows: PartRows, slots: Slots, fronts: readonly (Fronts | null)[]) {
    const column = () => new Float64Array(rows.size);
    this.rows = rows;
    this.slots = slots;
    this.fronts = fronts;
    this.storage = column();
    this.inflow = column();
    this.capacity = new BandMatrix(rows.size);
    this.rowCapacity = column();
    this.toLeft = column();
    this.atNode = column();
    this.toRight = column();
  }

  /** S and F at u. */
  evaluate(u: Float64Array): void {
    const { inflow, rows, slots } = this;
    let shared = -1;
    for (let index = 0; index < rows.layers.length; index++) {
      const layer = rows.layers[index];
      const fronts = this.fronts[index];
      slots.evaluate(index, layer, u);
      if (fronts === null) this.addLayer(layer, layer.node === shared);
      else this.addFrontLayer(layer, fronts, layer.node === shared);
      shared = layer.node + layer.count - 1;
    }
    for (const { from, to, area, junction } of rows.links) {
      junction.at(slots.temperature(from, u[from]), slots.temperature(to, u[to]));
      inflow[from] -= area * junction.flux;
      inflow[to] += area * junction.flux;
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

  /** The same of a layer with fronts, whose cells hold their own heat only. */
  private addFrontLayer({ first, count, node, weights, shapeFactor }: LayerRows, fronts: Fronts, shared: boolean): void {
    const { storage, inflow } = this;
    const { heat, conduction } = this.slots;
    fronts.locate(heat);
    if (!shared) storage[node] = inflow[node] = 0;
    storage[node] += weights.here[0] * heat[first];
    for (let i = 1, slot = first + 1, row = node + 1; i < count; i++, slot++, row++) {
      const flux = fronts.flux(i - 1, conduction) ?? shapeFactor[i - 1] * (conduction[slot - 1] - conduction[slot]);
      storage[row] = weights.here[i] * heat[slot];
      inflow[row - 1] -= flux;
      inflow[row] = flux;
    }
  }

  /** dS/du, its row sums, and dF/du at u. */
  assemble(u: Float64Array): void {
    const { capacity, toLeft, atNode, toRight, rowCapacity, rows, slots } = this;
    const { lower, diagonal, upper, farLower, farUpper } = capacity;
    for (const { node, count } of rows.layers) {
      for (const column of [toLeft, atNode, toRight, lower, diagonal, upper]) column[node] = column[node + count - 1] = 0;
    }
    for (let index = 0; index < rows.layers.length; index++) {
      const layer = rows.layers[index];
      const fronts = this.fronts[index];
      slots.linearise(index, layer, u);
      if (fronts === null) this.assembleLayer(layer);
      else this.assembleFrontLayer(layer, fronts);
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
    for (let row = 0; row < rows.size; row++) {
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

  private assembleFrontLayer({ first, count, node, weights, shapeFactor }: LayerRows, fronts: Fronts): void {
    const { toLeft, atNode, toRight } = this;
    const { diagonal } = this.capacity;
    const { capacity: c, conductivity: k, conduction } = this.slots;
    diagonal[node] += weights.here[0] * c[first];
    for (let i = 1, slot = first + 1, row = node + 1; i < count; i++, slot++, row++) {
      diagonal[row] = weights.here[i] * c[slot];
      const near = fronts.linearise(i - 1, conduction, c, k);
      const perFirst = near ? fronts.perFirst : shapeFactor[i - 1] * k[slot - 1];
      const perSecond = near ? fronts.perSecond : -shapeFactor[i - 1] * k[slot];
      atNode[row - 1] -= perFirst;
      toRight[row - 1] = -perSecond;
      toLeft[row] = perFirst;
      atNode[row] = perSecond;
    }
  }
}
