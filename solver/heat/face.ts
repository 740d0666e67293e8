/**
 * What a face exchanges during one interval.
 *
 *   q(T, t) = imposed(t) + G(t) (Ts(t) − T),   G = h/(1 + h R)      q [W/m²] positive into the part
 *
 * T is the temperature of the face's unknown, Ts that of the surroundings, h the film coefficient, R [m²·K/W] the conduction
 * between the face and its unknown: 0 where the unknown is the face itself, half a cell's with cells. A face held at a
 * temperature is the same with G given; or its unknown is imposed, and q unknown.
 */
import { lineAt, type LaidExposure, type Line } from '../model';
import type { Interval } from './system';

/** How a face with a held temperature acts: by a given conductance, W/(m²·K), or by imposing its unknown. */
export type HeldFace = { readonly conductance: number } | 'imposed';

/** value + slope × (time since the interval began) */
interface Straight {
  value: number;
  slope: number;
}

const NOTHING: Straight = { value: 0, slope: 0 };

/** A line inside an interval, its ends taken from inside. */
function straightPart(line: Line, { from, to }: Interval): Straight {
  const value = lineAt(line, from, 'after');
  return { value, slope: (lineAt(line, to, 'before') - value) / (to - from) };
}

export class Face {
  private readonly resistance: number;
  private readonly held: HeldFace;
  private from = 0;
  private imposed = NOTHING;
  private coefficient = NOTHING;
  private surroundings = NOTHING;
  private kind: LaidExposure['kind'] = 'insulated';
  /** After `at`: q, ∂q/∂T and ∂q/∂t. */
  flux = 0;
  fluxPerKelvin = 0;
  fluxSlope = 0;

  /** `resistance` between face and unknown, m²·K/W. */
  constructor(resistance: number, held: HeldFace) {
    this.resistance = resistance;
    this.held = held;
  }

  enter(exposure: LaidExposure, interval: Interval): void {
    this.from = interval.from;
    this.kind = exposure.kind;
    this.imposed = exposure.kind === 'flux' ? straightPart(exposure.flux, interval) : NOTHING;
    this.coefficient = exposure.kind === 'film' ? straightPart(exposure.coefficient, interval) : NOTHING;
    this.surroundings =
      exposure.kind === 'film'
        ? straightPart(exposure.surroundings, interval)
        : exposure.kind === 'temperature'
          ? straightPart(exposure.temperature, interval)
          : NOTHING;
  }

  /** Whether the face's unknown is imposed in this interval. */
  get imposes(): boolean {
    return this.kind === 'temperature' && this.held === 'imposed';
  }

  /** Whether ∂q/∂T changes with time in this interval. */
  get steepens(): boolean {
    return this.coefficient.slope !== 0;
  }

  /** Temperature of the surroundings, or the held one, °C. */
  surroundingsAt(time: number): number {
    return this.surroundings.value + this.surroundings.slope * (time - this.from);
  }

  /** Evaluates the exchange with an unknown at `temperature`; nothing flows by this law where the unknown is imposed. */
  at(temperature: number, time: number): void {
    const since = time - this.from;
    let conductance = 0;
    let conductanceSlope = 0;
    if (this.kind === 'film') {
      const h = this.coefficient.value + this.coefficient.slope * since;
      const series = 1 / (1 + h * this.resistance);
      conductance = h * series;
      conductanceSlope = this.coefficient.slope * series * series;
    } else if (this.kind === 'temperature' && this.held !== 'imposed') {
      conductance = this.held.conductance;
    }
    const difference = this.surroundings.value + this.surroundings.slope * since - temperature;
    this.flux = this.imposed.value + this.imposed.slope * since + conductance * difference;
    this.fluxPerKelvin = -conductance;
    this.fluxSlope = this.imposed.slope + conductanceSlope * difference + conductance * this.surroundings.slope;
  }

  /** Temperature of the face itself, °C, from that of its unknown: by the balance of the face, which holds no heat. */
  faceTemperature(temperature: number, time: number): number {
    if (this.resistance === 0) return temperature;
    this.at(temperature, time);
    return temperature + this.flux * this.resistance;
  }

  /** Whether the flux follows from temperatures well enough to be read off them: not through the film that stands for a held face. */
  get lawful(): boolean {
    return this.kind !== 'temperature' || this.resistance > 0;
  }
}
