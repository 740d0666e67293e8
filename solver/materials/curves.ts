/**
 * A material as conduction sees it: heat content and conductivity integral over temperature.
 *
 *   H(T) = ∫ ρ c dT  [J/m³]      Θ(T) = ∫ k dT  [W/m]      both from a reference temperature
 *
 * Balances are written in H and Θ, so that heat is kept and the flux between two points is exact whatever the curves are:
 * conduct between T1 and T2 over a length d, and the flux is (Θ(T1) − Θ(T2))/d.
 */
import type { Material } from '../model';

/** Temperatures in °C. Both integrals rise with temperature. */
export interface ThermalCurves {
  /** H(T), J/m³; zero at the reference temperature. */
  heatContent(temperature: number): number;
  /** Θ(T), W/m; zero at the reference temperature. */
  conductionIntegral(temperature: number): number;
  /** dH/dT, the heat capacity of a volume, J/(m³·K). */
  heatCapacity(temperature: number): number;
  /** dΘ/dT, the conductivity, W/(m·K). */
  conductivity(temperature: number): number;
  /** True when neither slope depends on temperature. */
  readonly constant: boolean;
}

/**
 * Curves of a material with constant properties. `reference` is where H and Θ are zero: from the temperature that a layer
 * starts at, sums of heat begin at zero and keep their digits.
 */
export function constantCurves(material: Material, reference: number): ThermalCurves {
  return new ConstantCurves(material.density * material.heatCapacity, material.conductivity, reference);
}

class ConstantCurves implements ThermalCurves {
  readonly constant = true;
  private readonly capacity: number;
  private readonly k: number;
  private readonly reference: number;

  constructor(capacity: number, k: number, reference: number) {
    this.capacity = capacity;
    this.k = k;
    this.reference = reference;
  }

  heatContent(temperature: number): number {
    return this.capacity * (temperature - this.reference);
  }

  conductionIntegral(temperature: number): number {
    return this.k * (temperature - this.reference);
  }

  heatCapacity(): number {
    return this.capacity;
  }

  conductivity(): number {
    return this.k;
  }
}
