/**
 * Air and water, as film correlations and gas gaps see them, at 1 atm.
 *
 * Tables are straight between their points and constant beyond; ν = μ/ρ and Pr = μ cp/k are made from the straight pieces.
 */
import { ZERO_CELSIUS } from './radiation';

/** Properties at one temperature. */
export interface FluidState {
  /** k, W/(m·K) */
  conductivity: number;
  /** ν, m²/s */
  viscosity: number;
  /** Pr = ν/α */
  prandtl: number;
  /** β, 1/K: volumetric thermal expansion; negative in water below 4 °C. */
  expansion: number;
}

export interface Fluid {
  readonly name: 'air' | 'water';
  /** Temperatures that the tables cover, °C. */
  readonly from: number;
  readonly to: number;
  /** From this temperature on the density falls with it as natural convection asks for, °C. */
  readonly buoyantFrom: number;
  readonly source: string;
  /** Writes the properties at a temperature (°C) into `out`. */
  at(temperature: number, out: FluidState): void;
  /** k alone, W/(m·K). */
  conductivity(temperature: number): number;
  /** dk/dT, W/(m·K²). */
  conductivitySlope(temperature: number): number;
}

/** [T °C, k W/(m·K), μ µPa·s, cp J/(kg·K)] */
type Row = readonly [temperature: number, conductivity: number, viscosity: number, heatCapacity: number];

class TabledFluid implements Fluid {
  readonly name: 'air' | 'water';
  readonly buoyantFrom: number;
  readonly source: string;
  private readonly rows: readonly Row[];
  private readonly density: (temperature: number) => number;
  private readonly expansion: (temperature: number) => number;

  constructor(
    name: 'air' | 'water',
    source: string,
    buoyantFrom: number,
    rows: readonly Row[],
    density: (temperature: number) => number,
    expansion: (temperature: number) => number,
  ) {
    this.name = name;
    this.source = source;
    this.buoyantFrom = buoyantFrom;
    this.rows = rows;
    this.density = density;
    this.expansion = expansion;
  }

  get from(): number {
    return this.rows[0][0];
  }

  get to(): number {
    return this.rows[this.rows.length - 1][0];
  }

  at(temperature: number, out: FluidState): void {
    const { rows } = this;
    const within = Math.min(Math.max(temperature, this.from), this.to);
    const i = this.piece(within);
    const part = (within - rows[i][0]) / (rows[i + 1][0] - rows[i][0]);
    const straight = (column: 1 | 2 | 3): number => rows[i][column] + part * (rows[i + 1][column] - rows[i][column]);
    const dynamic = 1e-6 * straight(2);
    out.conductivity = straight(1);
    out.viscosity = dynamic / this.density(within);
    out.prandtl = (dynamic * straight(3)) / out.conductivity;
    out.expansion = this.expansion(within);
  }

  conductivity(temperature: number): number {
    const { rows } = this;
    const within = Math.min(Math.max(temperature, this.from), this.to);
    const i = this.piece(within);
    return rows[i][1] + ((within - rows[i][0]) * (rows[i + 1][1] - rows[i][1])) / (rows[i + 1][0] - rows[i][0]);
  }

  conductivitySlope(temperature: number): number {
    if (temperature < this.from || temperature >= this.to) return 0;
    const i = this.piece(temperature);
    return (this.rows[i + 1][1] - this.rows[i][1]) / (this.rows[i + 1][0] - this.rows[i][0]);
  }

  /** Index of the straight piece that holds a temperature. */
  private piece(temperature: number): number {
    const { rows } = this;
    let low = 0;
    let high = rows.length - 1;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (rows[middle][0] <= temperature) low = middle;
      else high = middle;
    }
    return low;
  }
}

const AIR: readonly Row[] = [
  [-50, 0.01979, 14.74, 999],
  [-40, 0.02057, 15.27, 1002],
  [-30, 0.02134, 15.79, 1004],
  [-20, 0.02211, 16.3, 1005],
  [-10, 0.02288, 16.8, 1006],
  [0, 0.02364, 17.29, 1006],
  [10, 0.02439, 17.78, 1006],
  [20, 0.02514, 18.25, 1007],
  [30, 0.02588, 18.72, 1007],
  [40, 0.02662, 19.18, 1007],
  [50, 0.02735, 19.63, 1007],
  [60, 0.02808, 20.08, 1007],
  [70, 0.02881, 20.52, 1007],
  [80, 0.02953, 20.96, 1008],
  [90, 0.03024, 21.39, 1008],
  [100, 0.03095, 21.81, 1009],
  [120, 0.03235, 22.64, 1011],
  [140, 0.03374, 23.45, 1013],
  [160, 0.03511, 24.24, 1016],
  [180, 0.03646, 25.04, 1019],
  [200, 0.03779, 25.77, 1023],
  [250, 0.04104, 27.6, 1033],
  [300, 0.04418, 29.34, 1044],
  [350, 0.04721, 31.01, 1056],
  [400, 0.05015, 32.61, 1069],
  [450, 0.05298, 34.15, 1081],
  [500, 0.05572, 35.63, 1093],
  [600, 0.06093, 38.46, 1115],
  [700, 0.06581, 41.11, 1135],
  [800, 0.07037, 43.62, 1153],
  [900, 0.07465, 46.0, 1169],
  [1000, 0.07868, 48.26, 1184],
  [1500, 0.09599, 58.17, 1234],
  [2000, 0.11113, 66.3, 1264],
];

/** Ideal gas at 101325 Pa, molar mass 28.9655 g/mol. */
const airDensity = (temperature: number): number => (101325 * 28.9655e-3) / (8.314462618 * (temperature + ZERO_CELSIUS));

/** kg/mol */
const WATER_MOLAR_MASS = 18.015268e-3;
/** [T K, k W/(m·K), μ µPa·s, cp J/(mol·K)] */
const WATER_BY_KELVIN: readonly Row[] = [
  [273.16, 0.56104, 1791.2, 76.023],
  [280, 0.57404, 1433.7, 75.688],
  [290, 0.59273, 1084.0, 75.429],
  [300, 0.61028, 853.84, 75.32],
  [310, 0.62605, 693.54, 75.294],
  [320, 0.63971, 577.02, 75.317],
  [330, 0.65118, 489.49, 75.373],
  [340, 0.66055, 421.97, 75.456],
  [350, 0.668, 368.77, 75.567],
  [360, 0.67376, 326.1, 75.708],
  [370, 0.67802, 291.36, 75.883],
  [380, 0.681, 262.69, 76.098],
];

/** ρ(T) = N(T)/D(T), kg/m³: G. S. Kell, J. Chem. Eng. Data 20 (1975) 97; coefficients from memory, tested against the table's densities. */
const KELL = [999.83952, 16.945176, -7.9870401e-3, -46.170461e-6, 105.56302e-9, -280.54253e-12];
const KELL_DIVISOR = 16.87985e-3;

function waterDensity(temperature: number): number {
  let value = 0;
  for (let power = KELL.length - 1; power >= 0; power--) value = value * temperature + KELL[power];
  return value / (1 + KELL_DIVISOR * temperature);
}

/** β = −(dρ/dT)/ρ = D'/D − N'/N */
function waterExpansion(temperature: number): number {
  let value = 0;
  let slope = 0;
  for (let power = KELL.length - 1; power >= 0; power--) {
    slope = slope * temperature + value;
    value = value * temperature + KELL[power];
  }
  return KELL_DIVISOR / (1 + KELL_DIVISOR * temperature) - slope / value;
}

export const FLUIDS: Readonly<Record<'air' | 'water', Fluid>> = {
  air: new TabledFluid(
    'air',
    'Çengel, Heat and Mass Transfer, Table A-15 (air at 1 atm): rows to 160 °C confirmed by look-up, the others from memory',
    -50,
    AIR,
    airDensity,
    (temperature) => 1 / (temperature + ZERO_CELSIUS),
  ),
  water: new TabledFluid(
    'water',
    "Perry's Chemical Engineers' Handbook, 9th ed., Table 2-135 (saturated water), confirmed by look-up; density and expansion by Kell 1975",
    8,
    WATER_BY_KELVIN.map(([kelvin, k, viscosity, molar]): Row => [kelvin - ZERO_CELSIUS, k, viscosity, molar / WATER_MOLAR_MASS]),
    waterDensity,
    waterExpansion,
  ),
};
