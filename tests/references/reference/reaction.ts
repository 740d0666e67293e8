/**
 * Reactions, one ordinary differential equation a cell beside its heat: r' = rate(r, T), heat given off = heat × degree'.
 *
 * r is the degree of reaction, or, for hydration, the equivalent age.
 */
import type { Reaction } from '../../../solver/model';

/** Molar gas constant, J/(mol·K), CODATA 2018. */
const GAS = 8.314462618;

export interface Kinetics {
  readonly start: number;
  /** Heat of the whole reaction, J/kg. */
  readonly heat: number;
  /** r' at a state and a temperature, °C. */
  rate(state: number, temperature: number): number;
  /** Speed of the degree of reaction, 1/s. */
  speed(state: number, temperature: number): number;
}

const arrhenius = (factor: number, energy: number, temperature: number): number =>
  factor * Math.exp(-energy / (GAS * (temperature + 273.15)));

export function kineticsOf(reaction: Reaction): Kinetics {
  switch (reaction.kind) {
    case 'nthOrder': {
      const rate = (degree: number, temperature: number): number =>
        arrhenius(reaction.factor, reaction.activationEnergy, temperature) * Math.max(0, 1 - degree) ** reaction.order;
      return { start: reaction.initial, heat: reaction.heat, rate, speed: rate };
    }
    case 'autocatalytic': {
      const { first, second, m, n } = reaction;
      const rate = (degree: number, temperature: number): number => {
        const k1 = arrhenius(first.factor, first.activationEnergy, temperature);
        const k2 = arrhenius(second.factor, second.activationEnergy, temperature);
        return (k1 + k2 * Math.max(0, degree) ** m) * Math.max(0, 1 - degree) ** n;
      };
      return { start: reaction.initial, heat: reaction.heat, rate, speed: rate };
    }
    case 'hydration': {
      const { ultimate, time, slope, activationEnergy, reference, age, heat } = reaction;
      const ageing = (temperature: number): number =>
        Math.exp((activationEnergy / GAS) * (1 / (reference + 273.15) - 1 / (temperature + 273.15)));
      const perAge = (now: number): number => {
        const x = (time / now) ** slope;
        return (ultimate * slope * x * Math.exp(-x)) / now;
      };
      return {
        start: age,
        heat,
        rate: (_age, temperature) => ageing(temperature),
        speed: (now, temperature) => perAge(now) * ageing(temperature),
      };
    }
  }
}

/** The state that solves state = known + weight × rate(state, temperature), by Newton's method with differences. */
export function stateAfter(kinetics: Kinetics, known: number, weight: number, temperature: number): number {
  let state = known + weight * kinetics.rate(known, temperature);
  for (let i = 0; i < 40; i++) {
    const by = 1e-7 * (Math.abs(state) + 1e-3);
    const rate = kinetics.rate(state, temperature);
    const slope = (kinetics.rate(state + by, temperature) - kinetics.rate(state - by, temperature)) / (2 * by);
    const change = (state - known - weight * rate) / (1 - weight * slope);
    state -= change;
    if (Math.abs(change) <= 1e-13 * (Math.abs(state) + 1e-3)) break;
  }
  return state;
}
