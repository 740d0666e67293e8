/**
 * What a face exchanges during one interval, seen from its unknown.
 *
 * With nodes the unknown is the face itself, and the law of exchange/exchange.ts holds as it stands; a face held at a temperature
 * holds its unknown, and the flux is whatever the balance asks for. With cells half a cell lies between, and the
 * temperature Ts of the face, which holds no heat, follows from its own balance:
 *
 *   q(Ts, t) = g (Θ(Ts) − Θ(T))        dTs (g k(Ts) − ∂q/∂Ts) = g k(T) dT + ∂q/∂t dt
 *
 * q [W/m²] positive into the part, T temperature of the unknown, g and Θ of the half cell.
 */
import type { OutOfRange } from '../materials';
import type { LaidExposure } from '../model';
import { Exchange } from './exchange';
import { crossing, type HalfCell } from './halfCell';
import type { Interval } from './system';

export class Face {
  /** After `at`: q. After `linearise`: also ∂q/∂T and ∂q/∂t. */
  flux = 0;
  fluxPerKelvin = 0;
  fluxSlope = 0;
  private readonly half: HalfCell | null;
  private readonly exchange = new Exchange();

  /** What lies between the face and its unknown; null: nothing. */
  constructor(half: HalfCell | null) {
    this.half = half;
  }

  enter(exposure: LaidExposure, interval: Interval): void {
    this.exchange.enter(exposure, interval);
  }

  /** Whether the face's unknown is held in this interval. */
  get holds(): boolean {
    return this.half === null && this.exchange.heldCourse !== null;
  }

  /** The temperature that the face is held at, °C, and its rate of change, K/s. Throws where it is not held. */
  heldAt(time: number): number {
    return this.held.at(time);
  }

  heldRateAt(time: number): number {
    return this.held.slopeAt(time);
  }

  private get held() {
    const course = this.exchange.heldCourse;
    if (course === null) throw new Error('the face is not held at a temperature');
    return course;
  }

  /** Evaluates the exchange with an unknown at `temperature`; nothing flows by this law where the unknown is held. */
  at(temperature: number, time: number): void {
    const { exchange, half } = this;
    if (half === null) {
      exchange.at(temperature, time);
      this.flux = exchange.flux;
      return;
    }
    const surface = this.balance(half, temperature, time);
    if (exchange.heldCourse === null) {
      exchange.at(surface, time);
      this.flux = exchange.flux;
    } else {
      this.flux = between(half, surface, temperature);
    }
  }

  linearise(temperature: number, time: number): void {
    const { exchange, half } = this;
    if (half === null) {
      exchange.linearise(temperature, time);
      this.flux = exchange.flux;
      this.fluxPerKelvin = exchange.fluxPerKelvin;
      this.fluxSlope = exchange.fluxSlope;
      return;
    }
    const { curves, inverseDistance } = half;
    const surface = this.balance(half, temperature, time);
    const inner = inverseDistance * curves.conductivity(temperature);
    const outer = inverseDistance * curves.conductivity(surface);
    if (exchange.heldCourse !== null) {
      this.flux = between(half, surface, temperature);
      this.fluxPerKelvin = -inner;
      this.fluxSlope = outer * exchange.heldCourse.slopeAt(time);
      return;
    }
    exchange.linearise(surface, time);
    this.flux = exchange.flux;
    const stiffness = outer - exchange.fluxPerKelvin;
    this.fluxPerKelvin = (exchange.fluxPerKelvin * inner) / stiffness;
    this.fluxSlope = (exchange.fluxSlope * outer) / stiffness;
  }

  /** Temperature of the face itself, °C, from that of its unknown. */
  faceTemperature(temperature: number, time: number): number {
    return this.half === null ? temperature : this.balance(this.half, temperature, time);
  }

  /** What a correlation is used outside of, with the unknown at a temperature. */
  outOfRange(temperature: number, time: number): OutOfRange[] {
    return this.exchange.outOfRange(this.faceTemperature(temperature, time), time);
  }

  /** Ts from T. Started from T itself, so that it depends on nothing evaluated before. */
  private balance({ curves, inverseDistance }: HalfCell, temperature: number, time: number): number {
    const { exchange } = this;
    if (exchange.heldCourse !== null) return exchange.heldCourse.at(time);
    if (exchange.straight && curves.constant) {
      exchange.linearise(temperature, time);
      return temperature + exchange.flux / (inverseDistance * curves.conductivity(temperature) - exchange.fluxPerKelvin);
    }
    const behind = curves.conductionIntegral(temperature);
    const { lowest, highest } = exchange.outside(time);
    const bounded = lowest <= highest;
    return crossing(
      (at, out) => {
        exchange.linearise(at, time);
        out.value = exchange.flux - inverseDistance * (curves.conductionIntegral(at) - behind);
        out.slope = exchange.fluxPerKelvin - inverseDistance * curves.conductivity(at);
      },
      temperature,
      bounded ? Math.min(temperature, lowest) : -Infinity,
      bounded ? Math.max(temperature, highest) : Infinity,
    );
  }
}

/** Flux through half a cell from its surface to its unknown, W/m². */
const between = ({ curves, inverseDistance }: HalfCell, surface: number, temperature: number): number =>
  inverseDistance * (curves.conductionIntegral(surface) - curves.conductionIntegral(temperature));
