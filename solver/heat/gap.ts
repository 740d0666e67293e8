/**
 * What two walls that face each other exchange, by their own temperatures.
 *
 *   contact:  q = (T1 − T2)/R
 *   gas gap:  q = k(Tm)/d (T1 − T2) + ε σ (T1⁴ − T2⁴),   Tm = (T1 + T2)/2,   ε = 1/(1/ε1 + 1/ε2 − 1)
 *
 * q [W/m²] from the first wall to the second, R contact resistance, k conductivity of air, d width of the gap, ε1 and ε2
 * emissivities of the walls (absolute temperatures in that term). The air is still: right for gaps of a few millimetres, in
 * which it cannot circulate.
 */
import type { Contact } from '../model';
import { betweenWalls, blackFlux, blackSlope, FLUIDS } from '../materials';

export interface Across {
  /** Whether q is straight in T1 − T2. */
  readonly constant: boolean;
  /** After `at`: q, ∂q/∂T1 and ∂q/∂T2. */
  readonly flux: number;
  readonly perFirst: number;
  readonly perSecond: number;
  at(first: number, second: number): void;
}

/** What lies between two layers; null: perfect contact. */
export function across(contact: Contact): Across | null {
  if (typeof contact !== 'number') return new GasGap(contact.gap, betweenWalls(...contact.emissivities));
  return contact > 0 ? new Resistance(contact) : null;
}

class Resistance implements Across {
  readonly constant = true;
  flux = 0;
  readonly perFirst: number;
  readonly perSecond: number;

  constructor(resistance: number) {
    this.perFirst = 1 / resistance;
    this.perSecond = -this.perFirst;
  }

  at(first: number, second: number): void {
    this.flux = this.perFirst * (first - second);
  }
}

class GasGap implements Across {
  readonly constant = false;
  flux = 0;
  perFirst = 0;
  perSecond = 0;
  private readonly width: number;
  private readonly emissivity: number;

  constructor(width: number, emissivity: number) {
    this.width = width;
    this.emissivity = emissivity;
  }

  at(first: number, second: number): void {
    const mean = (first + second) / 2;
    const conductance = FLUIDS.air.conductivity(mean) / this.width;
    const byMean = (FLUIDS.air.conductivitySlope(mean) / this.width / 2) * (first - second);
    this.flux = conductance * (first - second) + this.emissivity * blackFlux(first, second);
    this.perFirst = conductance + byMean + this.emissivity * blackSlope(first);
    this.perSecond = byMean - conductance - this.emissivity * blackSlope(second);
  }
}
