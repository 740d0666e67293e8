/**
 * What a face exchanges during one interval.
 *
 *   q(T, t) = imposed(t) + G(t) (Ts(t) − T),   G = h/(1 + h R)      q [W/m²] positive into the part
 *
 * T is the temperature of the face's unknown, Ts that of the surroundings, h the film coefficient, R [m²·K/W] the conduction
 * between the face and its unknown: 0 where the unknown is the face itself, half a cell's with cells. A face held at a
 * temperature is h without bound: G = 1/R; where R is 0 its unknown is held, and q is whatever the balance asks for.
 */
import { lineAt, type LaidExposure, type Line } from '../model';
import type { Interval } from './system';

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
  constructor(resistance: number) {
    this.resistance = resistance;
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

  /** Whether the face's unknown is held in this interval. */
  get holds(): boolean {
    return this.kind === 'temperature' && this.resistance === 0;
  }

  /** Rate of change of the surroundings' temperature, or of the held one, K/s. */
  get surroundingsRate(): number {
    return this.surroundings.slope;
  }

  /** Temperature of the surroundings, or the held one, °C. */
  surroundingsAt(time: number): number {
    return this.surroundings.value + this.surroundings.slope * (time - this.from);
  }

  /** Evaluates the exchange with an unknown at `temperature`; nothing flows by this law where the unknown is held. */
  at(temperature: number, time: number): void {
    const since = time - this.from;
    let conductance = 0;
    let conductanceSlope = 0;
    if (this.kind === 'film') {
      const h = this.coefficient.value + this.coefficient.slope * since;
      const series = 1 / (1 + h * this.resistance);
      conductance = h * series;
      conductanceSlope = this.coefficient.slope * series * series;
    } else if (this.kind === 'temperature' && !this.holds) {
      conductance = 1 / this.resistance;
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
}
