import { describe, expect, it } from 'vitest';
import {
  betweenWalls,
  blackFlux,
  blackSlope,
  CorrelationFilm,
  CORRELATION_ENTRIES,
  FLUIDS,
  STEFAN_BOLTZMANN,
  tableAt,
  tableSlopeAt,
} from '../../../solver/materials';
import { CORRELATIONS, type Correlation } from '../../../solver/model';

const stateOf = (fluid: 'air' | 'water', temperature: number) => {
  const state = { conductivity: 0, viscosity: 0, prandtl: 0, expansion: 0 };
  FLUIDS[fluid].at(temperature, state);
  return state;
};
const coefficient = (correlation: Correlation, surface: number, surroundings: number): number =>
  new CorrelationFilm(correlation).coefficient(surface, surroundings);

describe('air', () => {
  it.each([-50, 0, 25, 100, 250, 400, 700, 1000, 1250, 1700, 2000])(
    'conducts and flows at %d °C as the US Standard Atmosphere 1976 has it, within 3 % and 2 %',
    (temperature) => {
      const kelvin = temperature + 273.15;
      const { conductivity, viscosity } = stateOf('air', temperature);
      const expected = (2.64638e-3 * kelvin ** 1.5) / (kelvin + 245.4 * 10 ** (-12 / kelvin));
      expect(conductivity / expected).toBeGreaterThan(0.97);
      expect(conductivity / expected).toBeLessThan(1.03);
      const dynamic = (1.458e-6 * kelvin ** 1.5) / (kelvin + 110.4);
      const density = 101325 / 287.053 / kelvin;
      expect(Math.abs((viscosity * density) / dynamic - 1)).toBeLessThan(0.02);
    },
  );

  it('has the Prandtl number and viscosity of the printed table, beside those it is made from', () => {
    // Çengel, Table A-15, confirmed by look-up.
    const printed: [number, number, number][] = [
      [0, 1.338e-5, 0.7362],
      [50, 1.798e-5, 0.7228],
      [100, 2.306e-5, 0.7111],
      [140, 2.745e-5, 0.7041],
    ];
    for (const [temperature, viscosity, prandtl] of printed) {
      expect(stateOf('air', temperature).viscosity / viscosity).toBeCloseTo(1, 2.5);
      expect(stateOf('air', temperature).prandtl / prandtl).toBeCloseTo(1, 2.5);
    }
  });

  it('has properties that rise without a break over the whole table', () => {
    let before = stateOf('air', -50);
    for (let temperature = -45; temperature <= 2000; temperature += 5) {
      const now = stateOf('air', temperature);
      expect(now.conductivity).toBeGreaterThan(before.conductivity);
      expect(now.viscosity).toBeGreaterThan(before.viscosity);
      expect(Math.abs(now.prandtl / before.prandtl - 1)).toBeLessThan(0.01);
      before = now;
    }
  });

  it('knows the slope of its conductivity, and stays as it is outside its table', () => {
    const { air } = FLUIDS;
    for (const temperature of [-49, 3, 155, 612, 1999]) {
      const rise = air.conductivity(temperature + 0.01) - air.conductivity(temperature - 0.01);
      expect(air.conductivitySlope(temperature)).toBeCloseTo(rise / 0.02, 9);
    }
    expect(air.conductivity(-80)).toBe(air.conductivity(-50));
    expect(air.conductivitySlope(-80)).toBe(0);
    expect(air.conductivitySlope(2500)).toBe(0);
  });
});

describe('water', () => {
  it('has the densities of the table its other properties come from', () => {
    // Perry, 9th ed., Table 2-135, mol/dm³ at saturation, confirmed by look-up: ν is µ over the density by Kell.
    const printed: [kelvin: number, molar: number, viscosity: number][] = [
      [280, 55.501, 1433.7],
      [300, 55.315, 853.84],
      [330, 54.662, 489.49],
      [350, 54.049, 368.77],
      [370, 53.321, 291.36],
    ];
    for (const [kelvin, molar, viscosity] of printed) {
      const density = (viscosity * 1e-6) / stateOf('water', kelvin - 273.15).viscosity;
      expect(density / (molar * 18.015268)).toBeCloseTo(1, 4);
    }
  });

  it('expands as its density falls, and has its maximum of density at 4 °C', () => {
    expect(stateOf('water', 3.9).expansion).toBeLessThan(0);
    expect(stateOf('water', 4.1).expansion).toBeGreaterThan(0);
    // Incropera & DeWitt, Table A.6 (from memory): 276.1e-6 1/K at 300 K, 624.2e-6 at 350 K.
    expect(stateOf('water', 26.85).expansion / 276.1e-6).toBeCloseTo(1, 1.9);
    expect(stateOf('water', 76.85).expansion / 624.2e-6).toBeCloseTo(1, 1.9);
  });
});

describe('worked examples of film correlations', () => {
  // Properties in these books differ by about 1 % from the tables here.
  it.each<[string, Correlation, surface: number, surroundings: number, expected: number, within: number]>([
    [
      'a fire screen of 0.71 m at 232 °C in a room at 23 °C: 7.0 (Incropera & DeWitt, ex. 9.2, from memory)',
      { correlation: 'naturalVerticalPlate', fluid: 'air', length: 0.71 },
      232,
      23,
      7.0,
      0.015,
    ],
    [
      'a steam pipe of 0.1 m at 165 °C in a room at 23 °C: Nu 23.3, 7.29 (Incropera & DeWitt, ex. 9.4, from memory)',
      { correlation: 'naturalHorizontalCylinder', fluid: 'air', length: 0.1 },
      165,
      23,
      7.29,
      0.02,
    ],
    [
      'a circuit board facing up, 45 °C in 20 °C, area over perimeter 0.0429 m: 6.696 (Çengel, solutions to chapter 9, by look-up)',
      { correlation: 'naturalPlateUp', fluid: 'air', length: 0.0429 },
      45,
      20,
      6.696,
      0.005,
    ],
    [
      'a rod of 12.7 mm at 128.4 °C in air of 26.2 °C at 10 m/s: 96 (Incropera & DeWitt, ex. 7.4, from memory)',
      { correlation: 'forcedCylinder', fluid: 'air', length: 0.0127, velocity: 10 },
      128.4,
      26.2,
      96,
      0.015,
    ],
  ])('%s W/(m²·K)', (_, correlation, surface, surroundings, expected, within) => {
    expect(Math.abs(coefficient(correlation, surface, surroundings) / expected - 1)).toBeLessThan(within);
  });

  it('follow their formulas as printed, with the powers of the books', () => {
    const { nusselt: vertical } = CORRELATION_ENTRIES.naturalVerticalPlate.formula;
    expect(vertical(1.813e9, 0.69)).toBeCloseTo(
      (0.825 + (0.387 * 1.813e9 ** (1 / 6)) / (1 + (0.492 / 0.69) ** (9 / 16)) ** (8 / 27)) ** 2,
      9,
    );
    const { nusselt: cylinder } = CORRELATION_ENTRIES.forcedCylinder.formula;
    const bernstein =
      0.3 +
      ((0.62 * 6071 ** 0.5 * 0.7 ** (1 / 3)) / (1 + (0.4 / 0.7) ** (2 / 3)) ** 0.25) * (1 + (6071 / 282000) ** (5 / 8)) ** 0.8;
    expect(cylinder(6071, 0.7)).toBeCloseTo(bernstein, 9);
    const { nusselt: plate } = CORRELATION_ENTRIES.forcedPlate.formula;
    expect(plate(1e5, 0.7)).toBeCloseTo(0.664 * Math.sqrt(1e5) * 0.7 ** (1 / 3), 9);
    expect(plate(1e7, 0.7)).toBeCloseTo((0.037 * 1e7 ** 0.8 - 871) * 0.7 ** (1 / 3), 6);
    const { nusselt: up } = CORRELATION_ENTRIES.naturalPlateUp.formula;
    expect(up(1e5, 0.7)).toBeCloseTo(0.54 * 1e5 ** 0.25, 9);
    expect(up(1e9, 0.7)).toBeCloseTo(0.15 * 1e9 ** (1 / 3), 8);
  });
});

describe('every correlation', () => {
  const one = (correlation: (typeof CORRELATIONS)[number], fluid: 'air' | 'water' = 'air'): Correlation => ({
    correlation,
    fluid,
    length: 0.2,
    velocity: correlation.startsWith('forced') ? 2 : undefined,
  });

  it.each(CORRELATIONS)('%s gives a flux without a jump, through equal temperatures too', (name) => {
    for (const fluid of ['air', 'water'] as const) {
      const film = new CorrelationFilm(one(name, fluid));
      const flux = (surface: number): number => film.coefficient(surface, 40) * (40 - surface);
      let before = flux(10);
      for (let surface = 10.01; surface < 90; surface += 0.01) {
        const now = flux(surface);
        expect(now).toBeLessThan(before);
        expect(before - now).toBeLessThan(0.04 * film.coefficient(90, 40));
        before = now;
      }
    }
  });

  it('blows or lifts by the side that is warm: a plate facing up that cools its fluid is a warm one facing down', () => {
    const up = coefficient(one('naturalPlateUp'), 20, 80);
    const down = coefficient(one('naturalPlateDown'), 80, 20);
    expect(up).toBeCloseTo(down, 12);
    expect(coefficient(one('naturalPlateUp'), 80, 20)).toBeGreaterThan(1.5 * up);
  });

  it('tells when it is used outside of what it is for, with what it found and the range', () => {
    const small = new CorrelationFilm({ correlation: 'naturalPlateUp', fluid: 'air', length: 0.01 });
    const [{ what, value, range }] = small.outOfRange(60, 20);
    expect(what).toBe('Ra');
    expect(value).toBeGreaterThan(1000);
    expect(value).toBeLessThan(range.from);
    expect(range).toEqual({ from: 1e4, to: 1e11 });
    // Next to no heat flows: no matter.
    expect(small.outOfRange(20.5, 20)).toEqual([]);
    const fast = new CorrelationFilm({ correlation: 'forcedPlate', fluid: 'water', length: 10, velocity: 20 });
    expect(fast.outOfRange(60, 60).map((found) => found.what)).toEqual(['Re']);
    const hot = new CorrelationFilm({ correlation: 'forcedCylinder', fluid: 'water', length: 0.01, velocity: 1 });
    expect(hot.outOfRange(400, 20)).toEqual([
      { what: 'film temperature', value: 210, range: { from: 273.16 - 273.15, to: 380 - 273.15 } },
    ]);
    const cold = new CorrelationFilm({ correlation: 'naturalVerticalPlate', fluid: 'water', length: 0.1 });
    expect(cold.outOfRange(2, 8)[0].range.from).toBe(8);
    expect(cold.outOfRange(20, 40)).toEqual([]);
  });
});

describe('radiation', () => {
  it('is σ (Te⁴ − Ts⁴), with the slope of that', () => {
    expect(blackFlux(26.85, 726.85)).toBeCloseTo(STEFAN_BOLTZMANN * (300 ** 4 - 1000 ** 4), 8);
    expect(blackSlope(500)).toBeCloseTo((blackFlux(500.01, 0) - blackFlux(499.99, 0)) / 0.02, 6);
  });

  it('keeps its digits between near temperatures', () => {
    const flux = blackFlux(900 + 1e-9, 900);
    expect(flux / (blackSlope(900) * 1e-9)).toBeCloseTo(1, 4);
  });

  it('between two black walls is that of a black one, and weaker the greyer they are', () => {
    expect(betweenWalls(1, 1)).toBe(1);
    expect(betweenWalls(0.8, 0.5)).toBeCloseTo(1 / (1 / 0.8 + 1 / 0.5 - 1), 15);
    expect(betweenWalls(0.05, 0.9)).toBeLessThan(0.05);
  });
});

describe('a table', () => {
  const table: [number, number][] = [
    [100, 10],
    [200, 50],
    [400, 30],
  ];
  it('is straight between its points and constant beyond, with the slope of the piece after a point', () => {
    expect([50, 100, 150, 200, 300, 400, 900].map((x) => tableAt(table, x))).toEqual([10, 10, 30, 50, 40, 30, 30]);
    expect([50, 100, 150, 200, 300, 400].map((x) => tableSlopeAt(table, x))).toEqual([0, 0.4, 0.4, -0.1, -0.1, 0]);
    expect(tableAt([[5, 7]], -3)).toBe(7);
    expect(tableSlopeAt([[5, 7]], 5)).toBe(0);
  });
});
