/**
 * A lump that radiates and whose heat capacity rises with temperature, as a body of the tests' own: nothing about it is linear.
 *
 *   S(u) = c0 u + c1 u²/2      q(u, t) = ε σ ((Ts(t) + 273.15)⁴ − (u + 273.15)⁴),   Ts = surroundings + rate t
 */
import type { HeatSystem } from '../../solver/heat';

const C0 = 4e4;
const C1 = 40;
const RADIATION = 0.8 * 5.670374419e-8;

export class RadiatingLump implements HeatSystem {
  readonly size = 1;
  readonly heats = 1;
  readonly linear = false;
  readonly points = 1;
  readonly pointUnknown = Int32Array.of(0);
  readonly storage = new Float64Array(1);
  readonly inflow = new Float64Array(1);
  readonly rates = new Float64Array(1);
  readonly inflowSlope = new Float64Array(1);
  readonly rateSlopes = new Float64Array(1);
  readonly rowCapacity = new Float64Array(1);
  readonly heldRows: readonly number[] = [];
  factorisations = 0;
  private readonly start: number;
  private readonly surroundings: number;
  private readonly rate: number;
  private perKelvin = 0;
  private shifted = 1;

  /** Start and surroundings in °C; the surroundings change by `rate` K/s. */
  constructor(start: number, surroundings: number, rate: number) {
    this.start = start;
    this.surroundings = surroundings;
    this.rate = rate;
  }

  private absoluteSurroundings(time: number): number {
    return this.surroundings + this.rate * time + 273.15;
  }
  initial(): Float64Array {
    return Float64Array.of(this.start);
  }
  enter(): void {}
  evaluate(u: Float64Array, time: number): void {
    this.storage[0] = u[0] * (C0 + (C1 / 2) * u[0]);
    this.rates[0] = RADIATION * (this.absoluteSurroundings(time) ** 4 - (u[0] + 273.15) ** 4);
    this.inflow[0] = this.rates[0];
  }
  linearise(u: Float64Array, time: number): void {
    this.rowCapacity[0] = C0 + C1 * u[0];
    this.perKelvin = -4 * RADIATION * (u[0] + 273.15) ** 3;
    this.rateSlopes[0] = this.inflowSlope[0] = 4 * RADIATION * this.absoluteSurroundings(time) ** 3 * this.rate;
  }
  factorise(a: number, b: number): void {
    this.factorisations++;
    this.shifted = a * this.rowCapacity[0] - b * this.perKelvin;
  }
  solve(rightHandSide: Float64Array): void {
    rightHandSide[0] /= this.shifted;
  }
  capacityTimes(x: Float64Array, out: Float64Array): void {
    out[0] = this.rowCapacity[0] * x[0];
  }
  rateTimes(_heat: number, x: Float64Array): number {
    return this.perKelvin * x[0];
  }
  heldChanges(): void {}
  hold(): void {}
  largestChange(x: ArrayLike<number>): { kelvin: number; row: number } {
    return { kelvin: Math.abs(x[0]), row: 0 };
  }
  report(u: Float64Array, _time: number, out: Float64Array): void {
    out[0] = u[0];
  }
  rateAt(): null {
    return null;
  }
}
