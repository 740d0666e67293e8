/**
 * A material as conduction sees it: heat content and conductivity integral over temperature.
 *
 *   H(T) = ∫ ρ c dT  [J/m³]      Θ(T) = ∫ k dT  [W/m]      both from a reference temperature
 *
 * Balances are written in H and Θ, so that heat is kept and the flux between two points is exact whatever the curves are:
 * conduct between T1 and T2 over a length d, and the flux is (Θ(T1) − Θ(T2))/d.
 */
import type { Material } from '../model';
import { cubicAt, cubicSlopeAt, H0, HIGH, LOW, REF, rowOf, THETA0, thermalTable, WIDTH, type Jump } from './thermalTable';

/** Temperatures in °C. Both integrals rise with temperature. */
export interface ThermalCurves {
  /** H(T), J/m³; zero at the reference temperature. Where it jumps, the value above the jump. */
  heatContent(temperature: number): number;
  /** Θ(T), W/m; zero at the reference temperature. */
  conductionIntegral(temperature: number): number;
  /** dH/dT, the heat capacity of a volume, J/(m³·K); with latent heat where that is spread over a range. */
  heatCapacity(temperature: number): number;
  /** dΘ/dT, the conductivity, W/(m·K). */
  conductivity(temperature: number): number;
  /** True when neither slope depends on temperature. */
  readonly constant: boolean;
  /** H, without its jumps, and Θ in rows (thermalTable.ts), for inner loops. */
  readonly rows: Float64Array;
  /** Latent heat taken up at one temperature, ascending. */
  readonly jumps: readonly Jump[];
  /** Least and greatest slopes between two temperatures, latent heat over a range counted in. */
  slopesBetween(lowest: number, highest: number): SlopeRange;
}

export interface SlopeRange {
  /** W/(m·K) */
  readonly conductivity: readonly [least: number, greatest: number];
  /** J/(m³·K) */
  readonly heatCapacity: readonly [least: number, greatest: number];
}

/**
 * Curves of a material. `reference` is where H and Θ are zero: from the temperature that a layer starts at, sums of heat begin at
 * zero and keep their digits. Throws RangeError where an expression does not hold there.
 */
export function thermalCurves(
  material: Pick<Material, 'conductivity' | 'density' | 'heatCapacity' | 'latent'>,
  reference: number,
): ThermalCurves {
  const { rows, jumps } = thermalTable(material, reference);
  return new TabledCurves(rows, jumps, reference);
}

class TabledCurves implements ThermalCurves {
  readonly constant: boolean;
  readonly rows: Float64Array;
  readonly jumps: readonly Jump[];
  /** What the jumps below the reference temperature have taken up. */
  private readonly jumpedAtReference: number;
  private last = 0;

  constructor(rows: Float64Array, jumps: readonly Jump[], reference: number) {
    this.rows = rows;
    this.jumps = jumps;
    this.constant = rows.length === WIDTH && jumps.length === 0;
    this.jumpedAtReference = jumps.reduce((sum, { temperature, heat }) => sum + (temperature <= reference ? heat : 0), 0);
  }

  heatContent(temperature: number): number {
    const { rows, jumps } = this;
    const row = this.find(temperature);
    let heat = cubicAt(rows, row + H0, temperature - rows[row + REF]);
    if (jumps.length === 0) return heat;
    heat -= this.jumpedAtReference;
    for (const jump of jumps) if (jump.temperature <= temperature) heat += jump.heat;
    return heat;
  }

  conductionIntegral(temperature: number): number {
    const row = this.find(temperature);
    return cubicAt(this.rows, row + THETA0, temperature - this.rows[row + REF]);
  }

  heatCapacity(temperature: number): number {
    const row = this.find(temperature);
    return cubicSlopeAt(this.rows, row + H0, temperature - this.rows[row + REF]);
  }

  conductivity(temperature: number): number {
    const row = this.find(temperature);
    return cubicSlopeAt(this.rows, row + THETA0, temperature - this.rows[row + REF]);
  }

  slopesBetween(lowest: number, highest: number): SlopeRange {
    const { rows } = this;
    const conductivity: [number, number] = [Infinity, -Infinity];
    const heatCapacity: [number, number] = [Infinity, -Infinity];
    for (let row = 0; row < rows.length; row += WIDTH) {
      const from = Math.max(lowest, rows[row + LOW]);
      const to = Math.min(highest, rows[row + HIGH]);
      if (from > to) continue;
      widen(conductivity, rows, row + THETA0, from - rows[row + REF], to - rows[row + REF]);
      widen(heatCapacity, rows, row + H0, from - rows[row + REF], to - rows[row + REF]);
    }
    return { conductivity, heatCapacity };
  }

  /** From the row found last: neighbours in a profile are asked for one after the other. */
  private find(temperature: number): number {
    return (this.last = rowOf(this.rows, temperature, this.last));
  }
}

/** Takes the slope of a cubic from d = `from` to d = `to` into a range: its ends, and where it turns. */
function widen(range: [number, number], rows: Float64Array, at: number, from: number, to: number): void {
  const turn = -rows[at + 2] / (3 * rows[at + 3]);
  for (const d of turn > from && turn < to ? [from, turn, to] : [from, to]) {
    const slope = cubicSlopeAt(rows, at, d);
    range[0] = Math.min(range[0], slope);
    range[1] = Math.max(range[1], slope);
  }
}
