/**
 * A rod with a source, as a body of the tests' own: length, conductivity and heat capacity 1, so that temperatures are plain numbers.
 *
 * Its start is held at 0. Its end is held, or takes a flux by one of two formulas: the balance of a half cell with the source in it
 * (which a fictitious node beyond the end comes to as well), or the difference to the last node alone, one-sided.
 */
import type { HeatSystem } from '../../solver/heat';
import { BandMatrix } from '../../solver/linear';

export type RodEnd = { held: number } | { flux: number; formula: 'halfCell' | 'oneSided' };

export class RodWithSource implements HeatSystem {
  readonly size: number;
  readonly heatRows: number;
  /** Through the start, through the end, and from the source. */
  readonly heats = 3;
  readonly linear = true;
  readonly points: number;
  readonly pointUnknown: Int32Array;
  readonly storage: Float64Array;
  readonly inflow: Float64Array;
  readonly rates = new Float64Array(3);
  readonly inflowSlope: Float64Array;
  readonly rateSlopes = new Float64Array(3);
  readonly rowCapacity: Float64Array;
  readonly heldRows: readonly number[];
  factorisations = 0;
  private readonly spacing: number;
  private readonly end: RodEnd;
  private readonly source: Float64Array;
  private readonly matrix: BandMatrix;

  /** `elements` equal elements; `source` at a depth, per length. */
  constructor(elements: number, end: RodEnd, source: (x: number) => number) {
    const size = elements + 1;
    this.size = this.heatRows = size;
    this.points = size;
    this.spacing = 1 / elements;
    this.end = end;
    this.pointUnknown = Int32Array.from({ length: size }, (_, i) => i);
    this.storage = new Float64Array(size);
    this.inflow = new Float64Array(size);
    this.inflowSlope = new Float64Array(size);
    this.rowCapacity = Float64Array.from({ length: size }, (_, i) => this.spacing * (i === 0 || i === elements ? 0.5 : 1));
    // One-sided: the last node is only where the flux is put to, it has neither capacity nor source.
    if ('formula' in end && end.formula === 'oneSided') this.rowCapacity[elements] = 0;
    this.source = Float64Array.from(this.rowCapacity, (width, i) => width * source(i * this.spacing));
    this.heldRows = 'held' in end ? [0, elements] : [0];
    this.matrix = new BandMatrix(size);
  }

  private heldAt(row: number): number {
    return row > 0 && 'held' in this.end ? this.end.held : 0;
  }

  initial(): Float64Array {
    return new Float64Array(this.size);
  }

  enter(_interval: unknown, u: Float64Array, stored: Float64Array, through: Float64Array): void {
    this.hold(u, 0, stored, through);
  }

  evaluate(u: Float64Array): void {
    const { size, inflow, source, rates, spacing } = this;
    for (let i = 0; i < size; i++) {
      this.storage[i] = this.rowCapacity[i] * u[i];
      inflow[i] = source[i];
    }
    for (let i = 0; i + 1 < size; i++) {
      const flux = (u[i] - u[i + 1]) / spacing;
      inflow[i] -= flux;
      inflow[i + 1] += flux;
    }
    rates[2] = source.reduce((sum, value) => sum + value, 0);
    rates[0] = -inflow[0];
    rates[1] = 'flux' in this.end ? this.end.flux : -inflow[size - 1];
    inflow[0] += rates[0];
    inflow[size - 1] += rates[1];
  }

  linearise(): void {}

  factorise(a: number, b: number): void {
    const { matrix, size, spacing } = this;
    this.factorisations++;
    for (let i = 0; i < size; i++) {
      const held = this.heldRows.includes(i);
      const neighbours = i === 0 || i === size - 1 ? 1 : 2;
      matrix.lower[i] = held ? 0 : -b / spacing;
      matrix.upper[i] = held ? 0 : -b / spacing;
      matrix.diagonal[i] = held ? 1 : a * this.rowCapacity[i] + (b * neighbours) / spacing;
    }
    matrix.factorise();
  }

  solve(rightHandSide: Float64Array): void {
    this.matrix.solve(rightHandSide);
  }

  capacityTimes(x: Float64Array, out: Float64Array): void {
    for (let i = 0; i < this.size; i++) out[i] = this.rowCapacity[i] * x[i];
  }

  rateTimes(heat: number, x: Float64Array): number {
    const last = this.size - 1;
    if (heat === 0) return (x[0] - x[1]) / this.spacing;
    return heat === 1 && 'held' in this.end ? (x[last] - x[last - 1]) / this.spacing : 0;
  }

  evenOutRates() {
    const rate = 1 / (this.spacing * this.spacing);
    const held = (row: number): boolean => this.heldRows.includes(row);
    const diagonal = Float64Array.from({ length: this.size }, (_, row) => (held(row) ? 0 : 2 * rate));
    const beside = Float64Array.from({ length: this.size - 1 }, (_, row) =>
      held(row) || held(row + 1) ? 0 : row + 1 === this.size - 1 ? -Math.SQRT2 * rate : -rate,
    );
    return { diagonal, beside };
  }

  heldChanges(u: Float64Array, _time: number, _ahead: number, rightHandSide: Float64Array): void {
    for (const row of this.heldRows) rightHandSide[row] = this.heldAt(row) - u[row];
  }

  hold(u: Float64Array, _time: number, stored: Float64Array, through: Float64Array): void {
    for (const row of this.heldRows) {
      u[row] = this.heldAt(row);
      const holds = this.rowCapacity[row] * u[row];
      through[row === 0 ? 0 : 1] += holds - stored[row];
      stored[row] = holds;
    }
  }

  largestChange(_u: ArrayLike<number>, x: ArrayLike<number>): { kelvin: number; row: number } {
    const largest = { kelvin: 0, row: 0 };
    for (let row = 0; row < this.size; row++) {
      if (Math.abs(x[row]) > largest.kelvin) Object.assign(largest, { kelvin: Math.abs(x[row]), row });
    }
    return largest;
  }

  report(u: Float64Array, _time: number, out: Float64Array): void {
    out.set(u);
  }

  rateAt(): null {
    return null;
  }
}
