/** Grey radiation between a face and what it sees: q = ε σ (Te⁴ − Ts⁴), temperatures absolute. */

/** σ, W/(m²·K⁴) (CODATA 2018). */
export const STEFAN_BOLTZMANN = 5.670374419e-8;
/** 0 °C in K. */
export const ZERO_CELSIUS = 273.15;

/** σ (Te⁴ − Ts⁴), W/m², both in °C; as a product, so that near temperatures keep their digits. */
export function blackFlux(enclosure: number, surface: number): number {
  const e = enclosure + ZERO_CELSIUS;
  const s = surface + ZERO_CELSIUS;
  return STEFAN_BOLTZMANN * (enclosure - surface) * (e + s) * (e * e + s * s);
}

/** d(σ T⁴)/dT at a temperature in °C, W/(m²·K). */
export function blackSlope(temperature: number): number {
  const t = temperature + ZERO_CELSIUS;
  return 4 * STEFAN_BOLTZMANN * t * t * t;
}

/** Emissivity of the exchange between two large parallel grey walls: 1/(1/ε1 + 1/ε2 − 1). */
export const betweenWalls = (first: number, second: number): number => 1 / (1 / first + 1 / second - 1);
