/**
 * Published correlations for film coefficients, h = Nu k/L, properties at the film temperature (Ts + Ta)/2.
 *
 *   natural: Ra = g |β (Ts − Ta)| L³ Pr/ν²       forced: Re = U L/ν
 *
 * Nu Nusselt number, k conductivity, L length, Ra Rayleigh number, g gravity, β expansion, ν viscosity, Pr Prandtl number, Re
 * Reynolds number, U velocity. Where a source gives two formulas side by side the larger holds: they cross where it
 * says one ends and the other begins, or near there, and h stays without a jump.
 * Formulas and ranges as in Incropera & DeWitt, Fundamentals of Heat and Mass Transfer, 5th ed., chapters 7 and 9 (from memory).
 */
import type { Correlation, CorrelationName } from '../../model';
import { root, whole } from './powers';
import { FLUIDS, type Fluid, type FluidState } from './fluids';

/** m/s² */
const GRAVITY = 9.80665;

/** The range of the number that a correlation is written in. */
export interface Range {
  readonly from: number;
  readonly to: number;
}

/** How Nu follows from Ra or Re, with the range the source gives. */
interface Formula {
  readonly range: Range;
  nusselt(number: number, prandtl: number): number;
}

/** A correlation: what it is for, who published it, its formula. */
export interface CorrelationEntry {
  readonly describes: string;
  readonly source: string;
  /** What `length` means. */
  readonly length: string;
  readonly forced: boolean;
  /** Formula where a warm face drives the fluid, or the fluid flows. */
  readonly formula: Formula;
  /** Of a horizontal plate: the formula where buoyancy holds the fluid against the plate, and which way the plate faces. */
  readonly stable?: { readonly facing: 'up' | 'down'; readonly formula: Formula };
}

const CHURCHILL_CHU = (constant: number, prandtlConstant: number): Formula => ({
  range: { from: 0, to: 1e12 },
  nusselt(rayleigh, prandtl) {
    // (1 + (…/Pr)^(9/16))^(8/27), and Ra^(1/6)
    const byPrandtl = whole(root(1 + whole(root(prandtlConstant / prandtl, 16), 9), 27), 8);
    return whole(constant + (0.387 * root(rayleigh, 6)) / byPrandtl, 2);
  },
});

const UNSTABLE_PLATE: Formula = {
  range: { from: 1e4, to: 1e11 },
  nusselt: (rayleigh) => Math.max(0.54 * root(rayleigh, 4), 0.15 * root(rayleigh, 3)),
};
const STABLE_PLATE: Formula = { range: { from: 1e5, to: 1e10 }, nusselt: (rayleigh) => 0.27 * root(rayleigh, 4) };

const PLATE_SOURCE = 'McAdams 1954, with the length of Goldstein, Sparrow and Jones 1973 and of Lloyd and Moran 1974';

export const CORRELATION_ENTRIES: Readonly<Record<CorrelationName, CorrelationEntry>> = {
  naturalVerticalPlate: {
    describes: 'natural convection on a vertical plate',
    source: 'Churchill and Chu 1975',
    length: 'height of the plate',
    forced: false,
    formula: CHURCHILL_CHU(0.825, 0.492),
  },
  naturalPlateUp: {
    describes: 'natural convection on a horizontal plate facing up',
    source: PLATE_SOURCE,
    length: 'area over perimeter of the plate',
    forced: false,
    formula: UNSTABLE_PLATE,
    stable: { facing: 'up', formula: STABLE_PLATE },
  },
  naturalPlateDown: {
    describes: 'natural convection on a horizontal plate facing down',
    source: PLATE_SOURCE,
    length: 'area over perimeter of the plate',
    forced: false,
    formula: UNSTABLE_PLATE,
    stable: { facing: 'down', formula: STABLE_PLATE },
  },
  naturalHorizontalCylinder: {
    describes: 'natural convection on a horizontal cylinder',
    source: 'Churchill and Chu 1975',
    length: 'diameter of the cylinder',
    forced: false,
    formula: CHURCHILL_CHU(0.6, 0.559),
  },
  forcedPlate: {
    describes: 'forced convection over a plate, mean over its length',
    source: 'laminar to Re 5e5, mixed beyond; Incropera and DeWitt, section 7.2',
    length: 'length of the plate along the flow',
    forced: true,
    formula: {
      range: { from: 0, to: 1e8 },
      nusselt: (reynolds, prandtl) =>
        Math.max(0.664 * Math.sqrt(reynolds), 0.037 * whole(root(reynolds, 5), 4) - 871) * root(prandtl, 3),
    },
  },
  forcedCylinder: {
    describes: 'forced convection across a cylinder',
    source: 'Churchill and Bernstein 1977',
    length: 'diameter of the cylinder',
    forced: true,
    formula: {
      // The source asks for Re Pr of 0.2 and more; its data end at Re 1e7.
      range: { from: 0.3, to: 1e7 },
      nusselt(reynolds, prandtl) {
        // (1 + (0.4/Pr)^(2/3))^(1/4) and (1 + (Re/282000)^(5/8))^(4/5)
        const byPrandtl = root(1 + whole(root(0.4 / prandtl, 3), 2), 4);
        const byReynolds = whole(root(1 + whole(root(reynolds / 282000, 8), 5), 5), 4);
        return 0.3 + ((0.62 * Math.sqrt(reynolds) * root(prandtl, 3)) / byPrandtl) * byReynolds;
      },
    },
  },
};

/** Differences smaller than this drive hardly any heat, K: no matter then how far Ra lies below its range. */
const SMALL_DIFFERENCE = 1;

/** Where a correlation was evaluated outside what it is for. */
export interface OutOfRange {
  readonly what: 'Ra' | 'Re' | 'film temperature';
  readonly value: number;
  readonly range: Range;
}

/** A correlation for one fluid, length and velocity. */
export class CorrelationFilm {
  readonly entry: CorrelationEntry;
  private readonly fluid: Fluid;
  private readonly length: number;
  private readonly velocity: number;
  private readonly state: FluidState = { conductivity: 0, viscosity: 0, prandtl: 0, expansion: 0 };

  constructor({ correlation, fluid, length, velocity }: Correlation) {
    this.entry = CORRELATION_ENTRIES[correlation];
    this.fluid = FLUIDS[fluid];
    this.length = length;
    this.velocity = velocity ?? 0;
  }

  /** Film coefficient of a face at `surface` in a fluid at `surroundings` (°C), W/(m²·K). */
  coefficient(surface: number, surroundings: number): number {
    const number = this.numberAt(surface, surroundings);
    const { conductivity, prandtl } = this.state;
    return (this.formulaAt(surface, surroundings).nusselt(number, prandtl) * conductivity) / this.length;
  }

  /** What lies outside the ranges at these temperatures, °C. */
  outOfRange(surface: number, surroundings: number): OutOfRange[] {
    const { entry, fluid } = this;
    if (!entry.forced && Math.abs(surface - surroundings) < SMALL_DIFFERENCE) return [];
    const value = this.numberAt(surface, surroundings);
    const film = (surface + surroundings) / 2;
    const found: OutOfRange[] = [
      { what: entry.forced ? 'Re' : 'Ra', value, range: this.formulaAt(surface, surroundings).range },
      {
        what: 'film temperature',
        value: film,
        range: { from: entry.forced ? fluid.from : Math.max(fluid.from, fluid.buoyantFrom), to: fluid.to },
      },
    ];
    return found.filter(({ value, range }) => value < range.from || value > range.to);
  }

  /** Ra or Re, with the properties at the film temperature left in `state`. */
  private numberAt(surface: number, surroundings: number): number {
    const { state, length } = this;
    this.fluid.at((surface + surroundings) / 2, state);
    if (this.entry.forced) return (this.velocity * length) / state.viscosity;
    const buoyancy = GRAVITY * Math.abs(state.expansion * (surface - surroundings));
    return (buoyancy * whole(length, 3) * state.prandtl) / whole(state.viscosity, 2);
  }

  private formulaAt(surface: number, surroundings: number): Formula {
    const { formula, stable } = this.entry;
    if (stable === undefined) return formula;
    const lifts = this.state.expansion * (surface - surroundings) > 0;
    return lifts === (stable.facing === 'up') ? formula : stable.formula;
  }
}
