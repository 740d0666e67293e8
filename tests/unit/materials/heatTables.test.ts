import { describe, expect, it } from 'vitest';
import { argumentAt, heatTables, temperatureIn, thermalCurves } from '../../../solver/materials';
import { cubicAt, cubicSlopeAt, H0, REF, rowOf, THETA0 } from '../../../solver/materials/thermalTable';

const steel = thermalCurves(
  {
    conductivity: {
      table: [
        [20, 52],
        [800, 27],
      ],
    },
    density: 7850,
    heatCapacity: {
      table: [
        [20, 460],
        [735, 950],
        [770, 620],
      ],
    },
  },
  20,
);
const water = thermalCurves(
  {
    conductivity: {
      table: [
        [-0.5, 2.2],
        [0.5, 0.6],
      ],
    },
    density: 1000,
    heatCapacity: {
      table: [
        [-1, 2100],
        [1, 4200],
      ],
    },
    latent: [
      { heat: 334000, from: 0, to: 0 },
      { heat: 5000, from: 30, to: 40 },
    ],
  },
  20,
);
const wax = thermalCurves(
  {
    conductivity: 0.2,
    density: 800,
    heatCapacity: 2500,
    latent: [
      { heat: 180000, from: 0, to: 0 },
      { heat: 90000, from: 60, to: 60 },
    ],
  },
  20,
);
const at = (rows: Float64Array, v: number, place: number): number => {
  const row = rowOf(rows, v, 0);
  return cubicAt(rows, row + place, v - rows[row + REF]);
};

describe.each([
  ['of one material', [{ curves: water, volume: 2e-3 }]],
  [
    'of a material beside another',
    [
      { curves: steel, volume: 1e-3 },
      { curves: water, volume: 4e-3 },
    ],
  ],
  [
    'of two that change, at one temperature even',
    [
      { curves: water, volume: 1e-3 },
      { curves: wax, volume: 3e-3 },
    ],
  ],
])('tables over the heat content %s', (_, constituents) => {
  const { tables } = heatTables(constituents, 20);
  const temperatures = [-80, -1, -0.2, -1e-6, 1e-6, 0.2, 1, 20, 35, 50, 59, 61, 500, 760, 900];

  it('say of temperature, heat content and conduction integral what the curves say', () => {
    for (const temperature of temperatures) {
      constituents.forEach(({ curves }, i) => {
        const v = argumentAt(tables[i], temperature);
        expect(temperatureIn(tables[i], v)).toBeCloseTo(temperature, 9);
        expect(at(tables[i], v, H0) / 1e6).toBeCloseTo(curves.heatContent(temperature) / 1e6, 8);
        expect(at(tables[i], v, THETA0)).toBeCloseTo(curves.conductionIntegral(temperature), 8);
      });
    }
  });

  it('share one argument, equal to the temperature at the reference', () => {
    for (const temperature of temperatures) {
      const arguments_ = tables.map((rows) => argumentAt(rows, temperature));
      for (const v of arguments_) expect(v).toBe(arguments_[0]);
    }
    expect(argumentAt(tables[0], 20)).toBeCloseTo(20, 12);
  });

  it('have an argument that counts all of the heat, plateaus too', () => {
    const heatAt = (v: number): number => constituents.reduce((sum, { volume }, i) => sum + volume * at(tables[i], v, H0), 0);
    const [low, high] = [-80, 900].map((temperature) => argumentAt(tables[0], temperature));
    const scale = (heatAt(high) - heatAt(low)) / (high - low);
    for (let v = low; v < high; v += (high - low) / 997) {
      // Straight but for the bend of c(T) between two points of a table.
      expect((heatAt(v) - heatAt(low)) / scale - (v - low)).toBeLessThan(0.02 * (high - low));
    }
    for (let v = low; v < high; v += (high - low) / 9973) expect(heatAt(v + 1e-3)).toBeGreaterThan(heatAt(v));
  });

  it('hold on without a jump over every break point', () => {
    for (const rows of tables) {
      for (let row = 13; row < rows.length; row += 13) {
        const v = rows[row];
        expect(rows[row - 12]).toBe(v);
        for (const place of [H0, THETA0]) {
          const before = cubicAt(rows, row - 13 + place, v - rows[row - 13 + REF]);
          expect(Math.abs(cubicAt(rows, row + place, v - rows[row + REF]) - before)).toBeLessThan(1e-9 * (1e3 + Math.abs(before)));
        }
      }
    }
  });
});

describe('the plateau of a material', () => {
  const [rows] = heatTables([{ curves: water, volume: 1 }], 20).tables;

  it('is a row in which temperature stands still and all latent heat is taken up', () => {
    const end = argumentAt(rows, 0);
    const row = rowOf(rows, end - 1e-6, 0);
    expect(temperatureIn(rows, end - 50)).toBe(0);
    expect(cubicSlopeAt(rows, row + THETA0, 0)).toBe(0);
    expect(at(rows, end, H0) - at(rows, rows[row], H0)).toBeCloseTo(334e6, 0);
  });

  it('counts as taken up at its own temperature', () => {
    expect(at(rows, argumentAt(rows, 0), H0)).toBeCloseTo(water.heatContent(0), 3);
  });
});
