/**
 * Latent heat at one temperature, for the automatic scheme: where in its cell the front of a change is.
 *
 * While a cell takes up latent heat, its temperature alone says nothing of the heat that passes: the front wanders through the
 * cell, and what conducts on either side is as long as the way from the neighbour's node to the front,
 *
 *   flux to neighbour j = S h/δ (Θ(Tm) − Θ[j]),   δ = h/2 + (part of the cell between its edge towards j and the front)
 *
 * h distance and S shape factor between the nodes, Tm temperature of the change. The cold phase of the cell lies beside its colder
 * neighbour, the warm one beside the warmer; between two neighbours of one kind the phase is shared. Two cells that are both
 * on their way exchange nothing: both are at Tm. In a cell that is cold up to a part g, the node in the middle is on the profile
 * between the front and the neighbour,
 *
 *   T = Tm − Wc (g − ½) where g > ½,   T = Tm + Ww (½ − g) else
 *
 * with Wc and Ww the drops of temperature over one cell on the cold and on the warm side. So a cell begins to change when its node is
 * at Tm + Ww/2, just as the front passes its edge, and has changed at Tm − Wc/2. The drops are those at the start of a step;
 * all heat is in the unknown, which they do not touch. Without drops and ways this is the plain enthalpy method, whose cells
 * stay at Tm until they have changed: of first order, with a staircase in every history. This is of second order.
 *
 * Nodes at the edges of a layer have half a cell, and stay at Tm while it changes. Own derivation, tested against Neumann's
 * solution.
 */
import type { LayerRows } from './partRows';

/** A change of a layer: its temperature, H of the cold and of the warm phase there, and Θ. */
interface Change {
  readonly temperature: number;
  readonly cold: number;
  readonly warm: number;
  readonly theta: number;
}

/** Not less than this part of the distance between two nodes lies between a node and a front, or between two fronts. */
const SHORTEST = 0.05;
/** A drop takes no more than this part of the way to the next change. */
const LARGEST_DROP = 0.8;

/** Drops over every cell, the change each is nearest to, and H where a cell with that drop has changed to either side. */
class Drops {
  readonly nearest: Int32Array;
  readonly cold: Float64Array;
  readonly warm: Float64Array;
  readonly allCold: Float64Array;
  readonly allWarm: Float64Array;

  constructor(count: number) {
    this.nearest = new Int32Array(count);
    this.cold = new Float64Array(count);
    this.warm = new Float64Array(count);
    this.allCold = new Float64Array(count);
    this.allWarm = new Float64Array(count);
  }
}

/** The fronts of one layer; cells by their index in the layer. */
export class Fronts {
  readonly rows: LayerRows;
  private readonly changes: readonly Change[];
  /** Length of every cell, and distance between nodes, m. */
  private readonly cell: Float64Array;
  private readonly distance: Float64Array;
  /** After `locate`: the change that a cell is in the middle of, or −1; its cold part, and how that goes with H. */
  private readonly change: Int32Array;
  private readonly coldPart: Float64Array;
  private readonly coldSlope: Float64Array;
  private readonly heat: Float64Array;
  /** Of the step that begins, or was taken last, and of the one before. */
  private drops: Drops;
  private dropsBefore: Drops;
  /** After `linearise`: ∂flux/∂v of both cells. */
  perFirst = 0;
  perSecond = 0;

  constructor(rows: LayerRows) {
    const { count, depth } = rows;
    const { curves } = rows.layer;
    this.rows = rows;
    this.changes = curves.jumps.map(({ temperature, heat }) => {
      const warm = curves.heatContent(temperature);
      return { temperature, cold: warm - heat, warm, theta: curves.conductionIntegral(temperature) };
    });
    this.distance = Float64Array.from({ length: count - 1 }, (_, i) => depth[i + 1] - depth[i]);
    this.cell = Float64Array.from(depth, (_, i) => ((this.distance[i - 1] ?? 0) + (this.distance[i] ?? 0)) / 2);
    this.change = new Int32Array(count);
    this.coldPart = new Float64Array(count);
    this.coldSlope = new Float64Array(count);
    this.heat = new Float64Array(count);
    this.drops = new Drops(count);
    this.dropsBefore = new Drops(count);
  }

  /** Finds every front from H of all slots of the part. */
  locate(heat: Float64Array): void {
    const { change, coldPart, coldSlope, changes } = this;
    const { nearest, allCold, allWarm } = this.drops;
    const { first, count } = this.rows;
    this.heat.set(heat.subarray(first, first + count));
    for (let i = 0; i < count; i++) {
      const own = this.heat[i];
      if (!(own > allCold[i] && own < allWarm[i])) {
        change[i] = -1;
        continue;
      }
      const { cold, warm } = changes[nearest[i]];
      const half = 0.5 * (cold + warm);
      change[i] = nearest[i];
      coldSlope[i] = own < half ? -0.5 / (half - allCold[i]) : -0.5 / (allWarm[i] - half);
      coldPart[i] = 0.5 + (own - half) * coldSlope[i];
    }
  }

  /** Flux from cell i to cell i + 1; null where no front is near. `conduction` holds Θ of all slots. */
  flux(i: number, conduction: Float64Array): number | null {
    const { change } = this;
    if (change[i] < 0 && change[i + 1] < 0) return null;
    if (change[i] === change[i + 1]) return 0;
    const difference = this.thetaOf(i, conduction) - this.thetaOf(i + 1, conduction);
    const way = this.way(i, difference > 0);
    return ((this.rows.shapeFactor[i] * this.distance[i]) / way) * difference;
  }

  /** Writes ∂flux/∂v of both cells, v the unknowns; whether a front is near. `capacity` and `conductivity` hold dH/dv and dΘ/dv. */
  linearise(i: number, conduction: Float64Array, capacity: Float64Array, conductivity: Float64Array): boolean {
    const { change, coldSlope, rows } = this;
    if (change[i] < 0 && change[i + 1] < 0) return false;
    this.perFirst = this.perSecond = 0;
    if (change[i] === change[i + 1]) return true;
    const difference = this.thetaOf(i, conduction) - this.thetaOf(i + 1, conduction);
    const falling = difference > 0;
    const way = this.way(i, falling);
    const conductance = (rows.shapeFactor[i] * this.distance[i]) / way;
    const slot = rows.first + i;
    const perWay = (-conductance * difference) / way;
    const byPart = (j: number, cold: boolean): number =>
      perWay * (cold ? 1 : -1) * coldSlope[j] * capacity[rows.first + j] * this.cell[j] * this.share(j, cold);
    this.perFirst = change[i] < 0 ? conductance * conductivity[slot] : byPart(i, !falling);
    this.perSecond = change[i + 1] < 0 ? -conductance * conductivity[slot + 1] : byPart(i + 1, falling);
    return true;
  }

  private thetaOf(i: number, conduction: Float64Array): number {
    const level = this.change[i];
    return level < 0 ? conduction[this.rows.first + i] : this.changes[level].theta;
  }

  /** Way between the nodes, or fronts, of cell i and i + 1, m; `falling` where i is the warmer one. */
  private way(i: number, falling: boolean): number {
    const { change, distance } = this;
    const before = change[i] < 0 ? 0.5 * distance[i] : this.partOf(i, !falling);
    const after = change[i + 1] < 0 ? 0.5 * distance[i] : this.partOf(i + 1, falling);
    return Math.max(before + after, SHORTEST * distance[i]);
  }

  /** Length of the cold, or the warm, part of a cell on one of its sides, m. */
  private partOf(i: number, cold: boolean): number {
    const part = cold ? this.coldPart[i] : 1 - this.coldPart[i];
    return part * this.cell[i] * this.share(i, cold);
  }

  /** 1, or a half where both neighbours are in that phase. */
  private share(i: number, cold: boolean): number {
    if (i === 0 || i === this.rows.count - 1) return 1;
    return this.isCold(i - 1, i) === cold && this.isCold(i + 1, i) === cold ? 0.5 : 1;
  }

  /** Whether cell j is cold as the change of cell i goes; null where it is in the same change. */
  private isCold(j: number, i: number): boolean | null {
    if (this.change[j] === this.change[i]) return null;
    const { cold, warm } = this.changes[this.change[i]];
    return this.heat[j] < 0.5 * (cold + warm);
  }

  /** T of a cell's node, °C, from its H and what the curves say; at a part of the last step: 0 with the drops it began with, 1 with those it left. */
  temperature(i: number, heat: number, byCurves: number, part: number): number {
    const now = this.temperatureBy(this.drops, i, heat, byCurves);
    return part === 1 ? now : part * now + (1 - part) * this.temperatureBy(this.dropsBefore, i, heat, byCurves);
  }

  private temperatureBy({ nearest, cold, warm, allCold, allWarm }: Drops, i: number, heat: number, byCurves: number): number {
    if (!(heat > allCold[i] && heat < allWarm[i])) return byCurves;
    const change = this.changes[nearest[i]];
    const half = 0.5 * (change.cold + change.warm);
    return heat < half
      ? change.temperature - (0.5 * cold[i] * (half - heat)) / (half - allCold[i])
      : change.temperature + (0.5 * warm[i] * (heat - half)) / (allWarm[i] - half);
  }

  /** Takes the drops from where a step ended: H of all slots, and T of the layer's cells by the curves alone, °C. */
  settle(heat: Float64Array, temperature: (i: number) => number): void {
    this.locate(heat);
    [this.drops, this.dropsBefore] = [this.dropsBefore, this.drops];
    const { rows, change, changes } = this;
    const last = rows.count - 1;
    const valueOf = (i: number): number => (change[i] < 0 ? temperature(i) : changes[change[i]].temperature);
    let [behind, own] = [NaN, valueOf(0)];
    for (let i = 0; i <= last; i++) {
      const ahead = i < last ? valueOf(i + 1) : NaN;
      const nearest = change[i] >= 0 ? change[i] : this.nearestTo(this.heat[i]);
      const isEdge = i === 0 || i === last;
      const slopes = isEdge ? [] : [(behind - own) / this.way(i - 1, behind > own), (ahead - own) / this.way(i, own > ahead)];
      this.setDrops(i, nearest, slopes, own);
      [behind, own] = [own, ahead];
    }
  }

  private nearestTo(heat: number): number {
    const distanceTo = ({ cold, warm }: Change): number => Math.max(cold - heat, heat - warm);
    return this.changes.reduce((best, change, i) => (distanceTo(change) < distanceTo(this.changes[best]) ? i : best), 0);
  }

  /** `slopes`: how much warmer it is towards both neighbours, K/m; `own`: T of the cell, °C. */
  private setDrops(i: number, nearest: number, slopes: readonly number[], own: number): void {
    const { drops, changes, cell } = this;
    const { curves } = this.rows.layer;
    const change = changes[nearest];
    const room = (other: Change | undefined): number =>
      other === undefined ? Infinity : LARGEST_DROP * Math.abs(other.temperature - change.temperature);
    // A cell that has not begun knows the profile on its own side only.
    const cold = own <= change.temperature ? Math.max(0, ...slopes.map((slope) => -slope)) * cell[i] : 0;
    const warm = own >= change.temperature ? Math.max(0, ...slopes) * cell[i] : 0;
    drops.nearest[i] = nearest;
    drops.cold[i] = Math.min(cold, room(changes[nearest - 1]));
    drops.warm[i] = Math.min(warm, room(changes[nearest + 1]));
    drops.allCold[i] = drops.cold[i] > 0 ? curves.heatContent(change.temperature - 0.5 * drops.cold[i]) : change.cold;
    drops.allWarm[i] = drops.warm[i] > 0 ? curves.heatContent(change.temperature + 0.5 * drops.warm[i]) : change.warm;
  }
}
