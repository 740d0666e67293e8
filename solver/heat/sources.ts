/**
 * Heat given off inside the layers.
 *
 *   row i:  + w− p[i−1] + w0 p[i] + w+ p[i+1]        p [W/m³], w the storage weights of the row
 *
 * The weights of the storage spread a source as they spread heat content, to the same order; all of them in a layer sum to its
 * volume, so that a source gives its power to the last digit. p follows time, or an expression of temperature, depth and time.
 */
import { BandMatrix } from '../linear';
import { readExpression, SOURCE_VARIABLES, type Compiled, type LaidCycle, type LaidSource } from '../model';
import { courseInside, timeSlope, type CourseInside } from './exchange';
import type { LayerRows } from './partRows';
import type { Slots } from './slots';
import type { Interval } from './system';

/** A source in one interval: alike throughout its layer, or by expression. */
type SourceInside = { readonly rows: LayerRows; readonly course: CourseInside } | ByExpression;

interface ByExpression {
  readonly rows: LayerRows;
  /** Depth of the layer's first edge, m. */
  readonly edge: number;
  readonly stageStart: number;
  readonly power: Compiled;
  readonly byTemperature: boolean;
}

export class Sources {
  /** Whether the cycle has any. */
  readonly present: boolean;
  /** Whether any depends on temperature, in any stage. */
  readonly byTemperature: boolean;
  /** After `addTo`: all that is given off, W per basis. After `linearise`: its rate of change by time alone. */
  power = 0;
  powerSlope = 0;
  /** After `linearise`, where `byTemperature`: what a change of the unknowns does to the rows. */
  readonly slopes: BandMatrix;
  private readonly layers: readonly LayerRows[];
  private readonly slots: Pick<Slots, 'temperature' | 'temperatureSlope'>;
  private readonly cycle: LaidCycle;
  private inside: readonly SourceInside[] = [];
  private interval: Interval = { stage: 0, from: 0, to: 1 };
  // Scratch of one layer: what its slots give off, and by temperature and time.
  private readonly given: Float64Array;
  private readonly perKelvin: Float64Array;
  private readonly values = [0, 0, 0, 0];

  constructor(
    layers: readonly LayerRows[],
    slots: Pick<Slots, 'temperature' | 'temperatureSlope'>,
    size: number,
    cycle: LaidCycle,
  ) {
    this.layers = layers;
    this.slots = slots;
    this.cycle = cycle;
    const sources = cycle.stages.flatMap((stage) => stage.sources);
    this.present = sources.length > 0;
    this.byTemperature = sources.some(({ power }) => 'expression' in power && read(power.expression).byTemperature);
    this.slopes = new BandMatrix(this.byTemperature ? size : 0);
    const most = Math.max(...layers.map(({ count }) => count));
    this.given = new Float64Array(most);
    this.perKelvin = new Float64Array(most);
  }

  enter(interval: Interval): void {
    this.interval = interval;
    this.inside = this.cycle.stages[interval.stage].sources.map((source) => this.insideOf(source, interval));
  }

  private insideOf({ layer, power }: LaidSource, interval: Interval): SourceInside {
    const rows = this.layers[layer];
    if (!('expression' in power)) return { rows, course: courseInside(power, interval) };
    const edge = this.layers.slice(0, layer).reduce((sum, before) => sum + before.layer.thickness, 0);
    const { evaluate, byTemperature } = read(power.expression);
    return { rows, edge, stageStart: power.stageStart, power: evaluate, byTemperature };
  }

  /** Adds what every row is given. */
  addTo(inflow: Float64Array, u: Float64Array, time: number): void {
    this.power = 0;
    const { given } = this;
    for (const source of this.inside) {
      if ('course' in source) given.fill(source.course.at(time), 0, source.rows.count);
      else this.write(source, u, time);
      this.power += spread(source.rows, given, inflow);
    }
  }

  /** Adds what every row's gain changes by time to `inflowSlope`, and fills `slopes`. */
  linearise(inflowSlope: Float64Array, u: Float64Array, time: number): void {
    this.powerSlope = 0;
    const { slopes, given } = this;
    for (const column of [slopes.farLower, slopes.lower, slopes.diagonal, slopes.upper, slopes.farUpper]) column.fill(0);
    for (const source of this.inside) {
      if ('course' in source) given.fill(source.course.slopeAt(time), 0, source.rows.count);
      else {
        if (source.byTemperature) this.addSlopes(source, u, time);
        this.writeTimeSlope(source, u, time);
      }
      this.powerSlope += spread(source.rows, given, inflowSlope);
    }
  }

  /** What every slot of a layer gives off, into `given`. */
  private write(source: ByExpression, u: Float64Array, time: number): void {
    for (let i = 0; i < source.rows.count; i++) this.given[i] = this.valueAt(source, i, this.temperatureAt(source, i, u), time);
  }

  private temperatureAt({ rows: { node } }: ByExpression, slot: number, u: Float64Array): number {
    return this.slots.temperature(node + slot, u[node + slot]);
  }

  private valueAt(source: ByExpression, slot: number, temperature: number, time: number): number {
    const { values } = this;
    values[0] = temperature;
    values[1] = source.edge + source.rows.depth[slot];
    values[2] = time - source.stageStart;
    values[3] = time;
    return source.power(values);
  }

  private writeTimeSlope(source: ByExpression, u: Float64Array, time: number): void {
    for (let i = 0; i < source.rows.count; i++) {
      const temperature = this.temperatureAt(source, i, u);
      this.given[i] = timeSlope((at) => this.valueAt(source, i, temperature, at), time, this.interval);
    }
  }

  private addSlopes(source: ByExpression, u: Float64Array, time: number): void {
    const { perKelvin, slopes } = this;
    const { count, node, weights } = source.rows;
    for (let i = 0; i < count; i++) {
      const at = this.temperatureAt(source, i, u);
      const rise = this.valueAt(source, i, at + HALF_WIDTH, time) - this.valueAt(source, i, at - HALF_WIDTH, time);
      perKelvin[i] = (rise / (2 * HALF_WIDTH)) * this.slots.temperatureSlope(node + i, u[node + i]);
    }
    for (let i = 0; i < count; i++) {
      slopes.diagonal[node + i] += weights.here[i] * perKelvin[i];
      if (i > 0) slopes.lower[node + i] += weights.before[i] * perKelvin[i - 1];
      if (i < count - 1) slopes.upper[node + i] += weights.after[i] * perKelvin[i + 1];
    }
    if (count > 2) {
      slopes.farUpper[node] += weights.far[0] * perKelvin[2];
      slopes.farLower[node + count - 1] += weights.far[count - 1] * perKelvin[count - 3];
    }
  }

  /** ∂power/∂u × x: the sum over all rows. */
  powerTimes(x: Float64Array): number {
    let sum = 0;
    for (let row = 0; row < this.slopes.size; row++) sum += this.rowTimes(row, x);
    return sum;
  }

  /** One row of `slopes` × x. */
  rowTimes(row: number, x: Float64Array): number {
    if (!this.byTemperature) return 0;
    const { farLower, lower, diagonal, upper, farUpper, size } = this.slopes;
    let sum = diagonal[row] * x[row];
    if (row > 0) sum += lower[row] * x[row - 1];
    if (row > 1) sum += farLower[row] * x[row - 2];
    if (row < size - 1) sum += upper[row] * x[row + 1];
    if (row < size - 2) sum += farUpper[row] * x[row + 2];
    return sum;
  }
}

/** Half the width of a difference in temperature, K. */
const HALF_WIDTH = 1e-3;

function read(expression: string): { evaluate: Compiled; byTemperature: boolean } {
  const found = readExpression(expression, SOURCE_VARIABLES);
  if (found.kind === 'refused') throw new RangeError(`${expression} ${found.message}`);
  return { evaluate: found.evaluate, byTemperature: found.uses.has('T') };
}

/** Spreads what the slots of a layer give off over its rows; returns the sum. */
function spread({ count, node, weights }: LayerRows, given: Float64Array, rows: Float64Array): number {
  const { before, here, after, far } = weights;
  let sum = 0;
  for (let i = 0; i < count; i++) {
    let value = here[i] * given[i];
    if (i > 0) value += before[i] * given[i - 1];
    if (i < count - 1) value += after[i] * given[i + 1];
    if (i === 0 && count > 2) value += far[0] * given[2];
    if (i === count - 1 && count > 2) value += far[i] * given[count - 3];
    rows[node + i] += value;
    sum += value;
  }
  return sum;
}
